namespace FemCore2D.Geometry;

/// <summary>A straight line or a circular arc from one point to another, the building block of outlines and sheets.</summary>
/// <param name="Start">Where the piece begins, in metres.</param>
/// <param name="End">Where it ends, in metres.</param>
/// <param name="SweepRadians">
/// The angle that the direction of travel turns by along the piece: 0 when it is straight, positive for a
/// counterclockwise arc, negative for a clockwise one, and less than a full turn either way.
/// </param>
/// <param name="Boundary">The name of the boundary that the piece belongs to, or <see langword="null"/> for none.</param>
/// <remarks>
/// Two points and a sweep fix the circle without a centre that rounding could put out of step with the ends, and the
/// formulas below stay accurate down to the straightest arc.
/// </remarks>
public readonly record struct OutlinePiece(Point2D Start, Point2D End, double SweepRadians = 0, string? Boundary = null)
{
    /// <summary>Whether the piece is a straight line.</summary>
    public bool IsStraight => SweepRadians == 0;

    /// <summary>The vector from the start to the end.</summary>
    public Vector2D Chord => End - Start;

    /// <summary>The radius of the arc in metres; infinite for a straight piece.</summary>
    public double Radius => IsStraight
        ? double.PositiveInfinity
        : Chord.Length / (2 * Math.Abs(Math.Sin(0.5 * SweepRadians)));

    /// <summary>The centre of the arc.</summary>
    /// <exception cref="InvalidOperationException">The piece is straight and has no centre.</exception>
    public Point2D Centre => IsStraight
        ? throw new InvalidOperationException($"The piece from {Start} to {End} is straight and has no centre.")
        : Start.Towards(End, 0.5) + (0.5 / Math.Tan(0.5 * SweepRadians) * Chord.LeftNormal);

    /// <summary>The length in metres, along the arc.</summary>
    public double Length => IsStraight
        ? Chord.Length
        : Chord.Length * (0.5 * SweepRadians / Math.Sin(0.5 * SweepRadians));

    /// <summary>The point half-way along the piece.</summary>
    public Point2D Midpoint => PointAt(0.5);

    /// <summary>The smallest box around the piece.</summary>
    public Box2D Bounds
    {
        get
        {
            Box2D box = Box2D.Around(Start, End);
            if (IsStraight)
            {
                return box;
            }

            // The extremes lie where the tangent is parallel to an axis.
            double first = StartAngle;
            double low = Math.Min(first, first + SweepRadians);
            double high = Math.Max(first, first + SweepRadians);
            for (double k = Math.Ceiling(low / (Math.PI / 2)); k * (Math.PI / 2) < high; k++)
            {
                Point2D extreme = PointAt(((k * (Math.PI / 2)) - first) / SweepRadians);
                box = box.Union(new Box2D(extreme, extreme));
            }

            return box;
        }
    }

    private double StartAngle => Math.Atan2(Chord.Y, Chord.X) - (0.5 * SweepRadians);

    /// <summary>The area between the chord and the arc: positive when the arc bulges to the right of the chord, 0 when straight.</summary>
    internal double SegmentArea
    {
        get
        {
            double s = SweepRadians;
            double squared = s * s;

            // s - sin s loses all its digits for small s, hence the series.
            double excess = squared < 0.25
                ? s * squared / 6 * (1 - (squared / 20 * (1 - (squared / 42 * (1 - (squared / 72 * (1 - (squared / 110))))))))
                : s - Math.Sin(s);
            double sine = Math.Sin(0.5 * s);
            return s == 0 ? 0 : Chord.LengthSquared * excess / (8 * sine * sine);
        }
    }

    /// <summary>The point at a fraction of the length, 0 at the start and 1 at the end.</summary>
    /// <param name="fraction">The fraction; values outside 0 to 1 continue the line or circle.</param>
    public Point2D PointAt(double fraction)
    {
        if (fraction == 1)
        {
            return End;
        }

        double half = 0.5 * SweepRadians;
        return half == 0
            ? Start + (fraction * Chord)
            : Start + (Math.Sin(fraction * half) / Math.Sin(half) * Turned(Chord, (fraction - 1) * half));
    }

    /// <summary>The unit vector along the piece at a fraction of its length.</summary>
    /// <param name="fraction">The fraction, 0 at the start and 1 at the end.</param>
    public Vector2D TangentAt(double fraction)
    {
        Vector2D direction = Chord / Chord.Length;
        return IsStraight ? direction : Turned(direction, (fraction - 0.5) * SweepRadians);
    }

    /// <summary>The same piece travelled the other way.</summary>
    public OutlinePiece Reversed() => new(End, Start, -SweepRadians, Boundary);

    /// <inheritdoc/>
    public override string ToString() => IsStraight
        ? $"straight piece from {Start} to {End}"
        : string.Create(null, $"arc from {Start} to {End} sweeping {SweepRadians * 180 / Math.PI:G6} degrees");

    /// <summary>A vector turned counterclockwise by an angle.</summary>
    internal static Vector2D Turned(Vector2D vector, double radians)
    {
        (double sine, double cosine) = Math.SinCos(radians);
        return new Vector2D((cosine * vector.X) - (sine * vector.Y), (sine * vector.X) + (cosine * vector.Y));
    }
}
