namespace FemCore2D.Geometry;

/// <summary>How a straight or arc piece of at most a half turn bends away from its chord.</summary>
internal static class PieceBending
{
    extension(OutlinePiece piece)
    {
        /// <summary>
        /// The signed distance from the middle of the chord to the middle of the arc, positive when it lies on the
        /// right.
        /// </summary>
        public double Rise => 0.5 * piece.Chord.Length * Math.Tan(0.25 * piece.SweepRadians);

        /// <summary>The vector from the middle of the chord to the middle of the arc.</summary>
        public Vector2D RiseVector => -0.5 * Math.Tan(0.25 * piece.SweepRadians) * piece.Chord.LeftNormal;

        /// <summary>The unnamed part between two fractions of the length.</summary>
        public OutlinePiece Part(double from, double to) =>
            new(piece.PointAt(from), piece.PointAt(to), (to - from) * piece.SweepRadians);

        /// <summary>
        /// Whether a point that lies on the bulging side of the chord lies between chord and arc: negative inside,
        /// zero on the arc, positive beyond.
        /// </summary>
        /// <remarks>From a point on the arc the chord is seen under pi less half the sweep (Euclid III.21).</remarks>
        public double BeyondArc(Point2D point)
        {
            Vector2D toStart = piece.Start - point;
            Vector2D toEnd = piece.End - point;
            (double sine, double cosine) = Math.SinCos(0.5 * Math.Abs(piece.SweepRadians));
            return (toStart.Dot(toEnd) * sine) + (Math.Abs(toStart.Cross(toEnd)) * cosine);
        }

        /// <summary>The distance to the nearest of its points.</summary>
        public double DistanceTo(Point2D point) => point.DistanceTo(piece.PointAt(piece.NearestFraction(point)));

        /// <summary>The fraction of the length at which it is nearest to a point.</summary>
        public double NearestFraction(Point2D point)
        {
            // Of a sweep below 1e-9 the rise is below the rounding of the chord, while the centre is lost far away.
            Vector2D chord = piece.Chord;
            if (Math.Abs(piece.SweepRadians) < 1e-9)
            {
                double squared = chord.LengthSquared;
                return squared == 0 ? 0 : Math.Clamp((point - piece.Start).Dot(chord) / squared, 0, 1);
            }

            // Seen from the centre, the nearest point of the circle lies in the direction of the point.
            double half = 0.5 * piece.SweepRadians;
            Vector2D outward = (-0.5 / Math.Sin(half)) * chord.LeftNormal;
            Vector2D towards = point - (piece.Midpoint - outward);
            double angle = Math.Atan2(outward.Cross(towards), outward.Dot(towards));
            return Math.Abs(angle) <= Math.Abs(half)
                ? Math.Clamp(0.5 + (angle / piece.SweepRadians), 0, 1)
                : point.DistanceTo(piece.Start) <= point.DistanceTo(piece.End) ? 0 : 1;
        }

        /// <summary>The sweep of the arc over a chord of given length that rises by a given distance to its right.</summary>
        public static double SweepOf(double rise, double chordLength) => 4 * Math.Atan(2 * rise / chordLength);

        /// <summary>
        /// The piece between two points whose middle is moved off the chord by a vector, as far as that is normal.
        /// </summary>
        public static OutlinePiece Bent(Point2D start, Point2D end, Vector2D rise)
        {
            Vector2D chord = end - start;
            return new OutlinePiece(start, end, SweepOf(rise.Cross(chord) / chord.Length, chord.Length));
        }
    }

    extension(Box2D box)
    {
        /// <summary>The smallest box that holds this one and a point.</summary>
        public Box2D With(Point2D point) => box.Union(new Box2D(point, point));

        /// <summary>The square of the distance to a point, zero inside.</summary>
        public double DistanceSquaredTo(Point2D point)
        {
            double x = Math.Max(0, Math.Max(box.Lower.X - point.X, point.X - box.Upper.X));
            double y = Math.Max(0, Math.Max(box.Lower.Y - point.Y, point.Y - box.Upper.Y));
            return (x * x) + (y * y);
        }
    }
}
