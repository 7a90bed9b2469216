namespace FemCore2D.Geometry;

/// <summary>A straight or circular line between two points, as the edges of a mesh are.</summary>
/// <remarks>
/// An arc is held by its ends and the angle it sweeps, never by its centre, so that an arc of nearly no sweep is as
/// exact as a straight line. The sweep is at most a half turn either way.
/// </remarks>
/// <param name="Start">Where it begins.</param>
/// <param name="End">Where it ends.</param>
/// <param name="SweepRadians">The angle swept, positive counterclockwise, zero for a straight line.</param>
internal readonly record struct EdgeCurve(Point2D Start, Point2D End, double SweepRadians)
{
    public bool IsStraight => SweepRadians == 0;

    public Vector2D Chord => End - Start;

    public EdgeCurve Reversed => new(End, Start, -SweepRadians);

    public double Length => Chord.Length * LengthFactor(0.5 * SweepRadians);

    /// <summary>
    /// The signed distance from the middle of the chord to the middle of the arc, positive when it lies on the right.
    /// </summary>
    public double Rise => 0.5 * Chord.Length * Math.Tan(0.25 * SweepRadians);

    /// <summary>The signed area between chord and arc, positive when the arc lies on the right of the chord.</summary>
    public double AreaBeyondChord
    {
        get
        {
            if (IsStraight)
            {
                return 0;
            }

            double sine = Math.Sin(0.5 * SweepRadians);
            return Chord.LengthSquared * AngleLessSine(SweepRadians) / (8 * sine * sine);
        }
    }

    /// <summary>The vector from the chord's middle to the arc's middle.</summary>
    public Vector2D RiseVector => -0.5 * Math.Tan(0.25 * SweepRadians) * Chord.LeftNormal;

    /// <summary>The point reached after a fraction of the length.</summary>
    public Point2D PointAt(double fraction)
    {
        if (IsStraight)
        {
            // The nearer end is the base, so that both ends come out exactly and either direction gives one point.
            return fraction < 0.5 ? Start + (fraction * Chord)
                : fraction > 0.5 ? End - ((1 - fraction) * Chord)
                : new Point2D(0.5 * (Start.X + End.X), 0.5 * (Start.Y + End.Y));
        }

        if (fraction == 0.5)
        {
            return new Point2D(0.5 * (Start.X + End.X), 0.5 * (Start.Y + End.Y)) + RiseVector;
        }

        return fraction < 0.5
            ? Start + ChordTo(Chord, 0.5 * SweepRadians, fraction)
            : End - ChordTo(Chord, -0.5 * SweepRadians, 1 - fraction);
    }

    /// <summary>The derivative of the place with respect to the fraction of the length.</summary>
    public Vector2D TangentAt(double fraction)
    {
        double half = 0.5 * SweepRadians;
        return LengthFactor(half) * Turned(Chord, half * ((2 * fraction) - 1));
    }

    /// <summary>The part between two fractions of the length.</summary>
    public EdgeCurve Part(double from, double to) =>
        new(PointAt(from), PointAt(to), (to - from) * SweepRadians);

    /// <summary>The smallest box around it.</summary>
    public BoundingBox Box
    {
        get
        {
            BoundingBox box = BoundingBox.Around(Start).With(End);
            if (IsStraight)
            {
                return box;
            }

            // Where the tangent is parallel to an axis the arc is extreme, if it gets there.
            Vector2D chord = Chord;
            double tangent = Math.Atan2(chord.Y, chord.X) - (0.5 * SweepRadians);
            double low = Math.Min(tangent, tangent + SweepRadians);
            double high = Math.Max(tangent, tangent + SweepRadians);
            for (double k = Math.Ceiling(low / (0.5 * Math.PI)); k * 0.5 * Math.PI <= high; k++)
            {
                box = box.With(PointAt(Math.Clamp(((k * 0.5 * Math.PI) - tangent) / SweepRadians, 0, 1)));
            }

            return box.Widened(4e-16 * (Math.Abs(chord.X) + Math.Abs(chord.Y)));
        }
    }

    /// <summary>
    /// Whether a point that lies on the bulging side of the chord lies between chord and arc: negative inside, zero
    /// on the arc, positive beyond.
    /// </summary>
    /// <remarks>From a point on the arc the chord is seen under the angle pi less half the sweep (Euclid III.21).</remarks>
    public double BeyondArc(Point2D point)
    {
        Vector2D toStart = Start - point;
        Vector2D toEnd = End - point;
        (double sine, double cosine) = Math.SinCos(0.5 * Math.Abs(SweepRadians));
        return (toStart.Dot(toEnd) * sine) + (Math.Abs(toStart.Cross(toEnd)) * cosine);
    }

    /// <summary>The distance to the nearest of its points.</summary>
    public double DistanceTo(Point2D point) => point.DistanceTo(PointAt(NearestFraction(point)));

    /// <summary>The fraction of the length at which it is nearest to a point.</summary>
    public double NearestFraction(Point2D point)
    {
        // Of a sweep below 1e-9 the rise is below the rounding of the chord, while the centre is lost far away.
        Vector2D chord = Chord;
        if (Math.Abs(SweepRadians) < 1e-9)
        {
            double squared = chord.LengthSquared;
            return squared == 0 ? 0 : Math.Clamp((point - Start).Dot(chord) / squared, 0, 1);
        }

        // Seen from the centre, the nearest point of the circle lies in the direction of the point.
        double half = 0.5 * SweepRadians;
        Vector2D toCentre = (0.5 / Math.Sin(half)) * chord.LeftNormal;
        Point2D centre = PointAt(0.5) + toCentre;
        Vector2D outward = -toCentre;
        Vector2D towards = point - centre;
        double angle = Math.Atan2(outward.Cross(towards), outward.Dot(towards));
        return Math.Abs(angle) <= Math.Abs(half)
            ? Math.Clamp(0.5 + (angle / SweepRadians), 0, 1)
            : point.DistanceTo(Start) <= point.DistanceTo(End) ? 0 : 1;
    }

    /// <summary>The sweep of the arc over a chord of given length that rises by a given distance to its right.</summary>
    public static double SweepOf(double rise, double chordLength) => 4 * Math.Atan(2 * rise / chordLength);

    /// <summary>The arc between two points whose middle is moved off the chord as a vector is, as far as it is normal.</summary>
    public static EdgeCurve Bent(Point2D start, Point2D end, Vector2D rise)
    {
        Vector2D chord = end - start;
        return new EdgeCurve(start, end, SweepOf(rise.Cross(chord) / chord.Length, chord.Length));
    }

    private static Vector2D ChordTo(Vector2D chord, double halfSweep, double fraction) =>
        (Math.Sin(halfSweep * fraction) / Math.Sin(halfSweep)) * Turned(chord, -halfSweep * (1 - fraction));

    private static Vector2D Turned(Vector2D vector, double radians)
    {
        (double sine, double cosine) = Math.SinCos(radians);
        return (cosine * vector) + (sine * vector.LeftNormal);
    }

    private static double LengthFactor(double halfSweep) => halfSweep == 0 ? 1 : halfSweep / Math.Sin(halfSweep);

    private static double AngleLessSine(double angle)
    {
        if (Math.Abs(angle) > 0.5)
        {
            return angle - Math.Sin(angle);
        }

        // The power series, as the difference would cancel.
        double square = angle * angle;
        double term = angle * square / 6;
        double sum = term;
        for (int k = 4; k <= 14; k += 2)
        {
            term *= -square / (k * (k + 1));
            sum += term;
        }

        return sum;
    }
}
