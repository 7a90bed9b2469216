namespace FemCore2D.Geometry;

/// <summary>A point, line or arc at which a size is wanted; the size grows with the distance from it.</summary>
internal readonly struct SizeSource
{
    private readonly Point2D start;
    private readonly Vector2D along;
    private readonly double inverseSquare;
    private readonly Point2D end;
    private readonly Point2D centre;
    private readonly double radius;
    private readonly double turn;

    public SizeSource(PieceCurve curve, double size)
    {
        Size = size;
        start = curve.Start;
        end = curve.End;
        along = end - start;
        inverseSquare = along.LengthSquared > 0 ? 1 / along.LengthSquared : 0;

        // An arc so flat that it differs from its chord by a millionth is taken for the chord.
        if (Math.Abs(curve.Sweep) > 1e-5)
        {
            turn = Math.Sign(curve.Sweep);
            radius = curve.Radius;
            centre = curve.Centre;
        }
    }

    public SizeSource(Point2D point, double size)
        : this(new PieceCurve(point, point, 0), size)
    {
    }

    public double Size { get; }

    public double DistanceTo(Point2D point)
    {
        if (turn != 0)
        {
            Vector2D arm = point - centre;

            // The arc spans at most a half turn: within its sector the circle is nearest, elsewhere an end.
            bool inSector = turn * (start - centre).Cross(arm) >= 0 && turn * arm.Cross(end - centre) >= 0;
            return inSector
                ? Math.Abs(arm.Length - radius)
                : Math.Sqrt(Math.Min((point - start).LengthSquared, (point - end).LengthSquared));
        }

        Vector2D offset = point - start;
        double fraction = Math.Clamp(offset.Dot(along) * inverseSquare, 0, 1);
        return (offset - (fraction * along)).Length;
    }
}
