namespace FemCore2D.Geometry;

/// <summary>Whether straight and circular lines cross.</summary>
internal static class CurveCrossing
{
    /// <summary>An arc this short differs from its chord by 1e-7 of its length.</summary>
    private const double FlatSweep = 1e-3;

    /// <summary>Whether two lines cross at a point within both; touching ends are no crossing.</summary>
    /// <remarks>Both are halved, as long as their boxes meet, until they are as good as straight.</remarks>
    public static bool Cross(in EdgeCurve first, in EdgeCurve second)
    {
        if (!first.Box.Meets(second.Box))
        {
            return false;
        }

        bool splitFirst = Math.Abs(first.SweepRadians) >= Math.Abs(second.SweepRadians);
        EdgeCurve longer = splitFirst ? first : second;
        if (Math.Abs(longer.SweepRadians) <= FlatSweep)
        {
            return Separates(first, second) && Separates(second, first);
        }

        EdgeCurve other = splitFirst ? second : first;
        Point2D middle = longer.PointAt(0.5);
        double half = 0.5 * longer.SweepRadians;
        return Cross(new EdgeCurve(longer.Start, middle, half), other)
            || Cross(new EdgeCurve(middle, longer.End, half), other);
    }

    private static bool Separates(in EdgeCurve line, in EdgeCurve other)
    {
        double start = (line.Start - other.Start).Cross(line.End - other.Start);
        double end = (line.Start - other.End).Cross(line.End - other.End);
        return start < 0 ? end > 0 : start > 0 && end < 0;
    }
}
