namespace FemCore2D.Geometry;

/// <summary>Checks of single cells: turned the right way, neither flat nor folded.</summary>
internal sealed class CellChecks(Mesh mesh)
{
    /// <summary>A corner with a smaller sine is as good as flat: its coordinates no longer tell which way it turns.</summary>
    private const double FlatSine = 1e-10;

    /// <summary>
    /// An angle no farther below zero comes from rounding, where two arcs touch in a vertex and leave a cusp.
    /// </summary>
    private const double CuspRadians = -1e-6;

    private readonly double tolerance = OutlineChecks.RelativeTolerance * mesh.Bounds.Diagonal;

    /// <summary>
    /// Checks that the vertices of a cell are those of a convex polygon, counterclockwise, and that its outline, arcs
    /// included, does not cross itself.
    /// </summary>
    /// <exception cref="InvalidMeshException">It does not hold; the message ends with the remedy.</exception>
    public void CheckUnfolded(int cell, string remedy)
    {
        ReadOnlySpan<int> corners = mesh.VerticesOf(cell);
        ReadOnlySpan<Point2D> vertices = mesh.Vertices;
        int turnedOver = 0;
        int flat = 0;
        for (int i = 0; i < corners.Length; i++)
        {
            Point2D corner = vertices[corners[i]];
            Vector2D next = vertices[corners[i + 1 < corners.Length ? i + 1 : 0]] - corner;
            Vector2D previous = vertices[corners[i > 0 ? i - 1 : corners.Length - 1]] - corner;
            double cross = next.Cross(previous);
            double limit = FlatSine * Math.Sqrt(next.LengthSquared * previous.LengthSquared);
            turnedOver += cross < -limit ? 1 : 0;
            flat += Math.Abs(cross) <= limit ? 1 : 0;
        }

        if (turnedOver + flat > 0)
        {
            string fault = turnedOver == corners.Length ? "lists its vertices clockwise"
                : turnedOver > 0 ? "is not convex"
                : "is flat at a corner";
            throw Fault(cell, fault, remedy);
        }

        if (mesh.IsCurved(cell))
        {
            CheckArcs(cell, remedy);
        }
    }

    /// <summary>A point well within a cell of moderate shape: the mean of its vertices.</summary>
    public static Point2D MiddleOf(Mesh mesh, int cell)
    {
        ReadOnlySpan<int> corners = mesh.VerticesOf(cell);
        Point2D first = mesh.Vertices[corners[0]];
        Vector2D sum = default;
        foreach (int corner in corners)
        {
            sum += mesh.Vertices[corner] - first;
        }

        return first + (sum / corners.Length);
    }

    /// <summary>An outline is simple when each corner opens inwards and no two sides cross.</summary>
    private void CheckArcs(int cell, string remedy)
    {
        int count = mesh.EdgesOf(cell).Length;
        for (int i = 0; i < count; i++)
        {
            OutlinePiece side = mesh.SideOf(cell, i);
            OutlinePiece before = mesh.SideOf(cell, i > 0 ? i - 1 : count - 1).Reversed();
            double angle = Math.Atan2(side.Chord.Cross(before.Chord), side.Chord.Dot(before.Chord))
                + (0.5 * (side.SweepRadians - before.SweepRadians));
            if (angle < CuspRadians || angle > (2 * Math.PI) - FlatSine)
            {
                throw Fault(cell, $"is folded by the arcs that meet at {side.Start}", remedy);
            }

            for (int j = 0; j < i; j++)
            {
                if (Cross(side, mesh.SideOf(cell, j)))
                {
                    throw Fault(cell, "is crossed by one of its arcs", remedy);
                }
            }
        }
    }

    /// <summary>Whether two sides cross or touch beside their common ends.</summary>
    private bool Cross(in OutlinePiece first, in OutlinePiece second)
    {
        Span<Point2D> contacts = stackalloc Point2D[2];
        return PieceContacts.Find(FormOf(first), FormOf(second), tolerance, contacts) > 0;
    }

    /// <summary>The equation of a side.</summary>
    public static PieceForm FormOf(in OutlinePiece side) => new(side.Start, side.End, side.SweepRadians);

    private InvalidMeshException Fault(int cell, string fault, string remedy)
    {
        Point2D place = MiddleOf(mesh, cell);
        string kind = mesh.KindOf(cell) == CellKind.Triangle ? "triangle" : "quadrilateral";
        return new InvalidMeshException(
            $"Cell {cell}, a {kind} of region '{mesh.RegionNames[mesh.CellRegions[cell]]}' around {place}, {fault}. {remedy}",
            place);
    }
}
