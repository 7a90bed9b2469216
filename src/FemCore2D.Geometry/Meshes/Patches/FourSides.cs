namespace FemCore2D.Geometry;

/// <summary>
/// The transfinite map of Gordon and Hall (1973) from the unit square into four sides: it agrees with each side along
/// the matching edge of the square.
/// </summary>
/// <param name="Bottom">From the first corner to the second.</param>
/// <param name="Right">From the second corner to the third.</param>
/// <param name="Top">From the fourth corner to the third.</param>
/// <param name="Left">From the first corner to the fourth.</param>
internal readonly record struct FourSides(OutlinePiece Bottom, OutlinePiece Right, OutlinePiece Top, OutlinePiece Left)
{
    /// <summary>The sides of a quadrilateral cell.</summary>
    public static FourSides Of(Mesh mesh, int cell) => new(
        mesh.SideOf(cell, 0), mesh.SideOf(cell, 1), mesh.SideOf(cell, 2).Reversed(), mesh.SideOf(cell, 3).Reversed());

    public Point2D PointAt(double u, double v)
    {
        if (v == 0)
        {
            return Bottom.PointAt(u);
        }

        if (v == 1)
        {
            return Top.PointAt(u);
        }

        if (u == 0)
        {
            return Left.PointAt(v);
        }

        if (u == 1)
        {
            return Right.PointAt(v);
        }

        // Offsets from one corner keep the rounding errors as small as the patch, wherever it lies.
        Point2D origin = Bottom.Start;
        Vector2D across = ((1 - v) * (Bottom.PointAt(u) - origin)) + (v * (Top.PointAt(u) - origin));
        Vector2D along = ((1 - u) * (Left.PointAt(v) - origin)) + (u * (Right.PointAt(v) - origin));
        Vector2D corners = ((1 - v) * u * (Bottom.End - origin))
            + (v * (((1 - u) * (Top.Start - origin)) + (u * (Top.End - origin))));
        return origin + (across + along - corners);
    }

    /// <summary>
    /// The sweep of a line between two opposite sides, or pieces of them that face each other.
    /// </summary>
    /// <remarks>
    /// The rise of the arc over its chord changes evenly from one side to the other. Between concentric arcs of one
    /// sweep every line then has the same sweep, so the lines are the concentric arcs between them.
    /// </remarks>
    /// <param name="first">The one side.</param>
    /// <param name="second">The side facing it, in the same direction.</param>
    /// <param name="fraction">How far the line has gone from the first to the second.</param>
    /// <param name="chordLength">The length of the line's own chord.</param>
    public static double SweepBetween(in OutlinePiece first, in OutlinePiece second, double fraction, double chordLength) =>
        first.IsStraight && second.IsStraight
            ? 0
            : OutlinePiece.SweepOf(((1 - fraction) * first.Rise) + (fraction * second.Rise), chordLength);
}
