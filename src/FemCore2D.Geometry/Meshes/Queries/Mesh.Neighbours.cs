namespace FemCore2D.Geometry;

/// <content>What lies around a vertex, along the rim, in a region and between two regions.</content>
public sealed partial class Mesh
{
    // Tables that not every use needs are built at the first request. Two threads may build one at the same time;
    // both get equal content, and the one published first stays.
    private IncidenceTable? edgesAround;
    private IncidenceTable? cellsAround;
    private IncidenceTable? cellsOfRegions;
    private int[]? outerEdges;
    private CellLocator? locator;

    /// <summary>The edges with one cell only, ascending.</summary>
    public ReadOnlySpan<int> OuterEdges => outerEdges ?? Publish(ref outerEdges, FindOuterEdges());

    /// <summary>Finds the cell at a point; prepared at the first request.</summary>
    public CellLocator Locator => locator ?? Publish(ref locator, new CellLocator(this));

    /// <summary>The edges that meet in a vertex, ascending.</summary>
    public ReadOnlySpan<int> EdgesAround(int vertex) =>
        (edgesAround ?? Publish(
            ref edgesAround, IncidenceTable.Invert(VertexCount, arrays.EdgeVertices, (EdgeCount, 2))))[vertex];

    /// <summary>The cells that meet in a vertex, ascending.</summary>
    public ReadOnlySpan<int> CellsAround(int vertex) =>
        (cellsAround ?? Publish(ref cellsAround, FindCellsAround()))[vertex];

    /// <summary>The edge between two vertices, or -1 when no cell joins them.</summary>
    public int EdgeBetween(int vertex, int otherVertex)
    {
        int lower = Math.Min(vertex, otherVertex);
        int higher = Math.Max(vertex, otherVertex);
        for (int edge = arrays.FirstEdges[lower]; edge < arrays.FirstEdges[lower + 1]; edge++)
        {
            if (arrays.EdgeVertices[(2 * edge) + 1] == higher)
            {
                return edge;
            }
        }

        return -1;
    }

    /// <summary>The cells of a region, ascending.</summary>
    /// <exception cref="UnknownNameException">No region has that name.</exception>
    public ReadOnlySpan<int> CellsIn(string region)
    {
        int index = RegionIndex(region);
        return (cellsOfRegions ?? Publish(
            ref cellsOfRegions,
            IncidenceTable.Invert(RegionNames.Length, arrays.CellRegions, (CellCount, 1))))[index];
    }

    /// <summary>The edges with a cell of one region on one side and of the other region on the other, ascending.</summary>
    /// <param name="region">The one region.</param>
    /// <param name="otherRegion">The other region.</param>
    /// <exception cref="UnknownNameException">No region has that name.</exception>
    public int[] EdgesBetween(string region, string otherRegion)
    {
        int first = RegionIndex(region);
        int second = RegionIndex(otherRegion);
        List<int> edges = [];
        for (int edge = 0; edge < EdgeCount; edge++)
        {
            (int left, int right) = CellsOf(edge);
            if (left >= 0 && right >= 0)
            {
                int onLeft = arrays.CellRegions[left];
                int onRight = arrays.CellRegions[right];
                if ((onLeft == first && onRight == second) || (onLeft == second && onRight == first))
                {
                    edges.Add(edge);
                }
            }
        }

        return [.. edges];
    }

    private static T Publish<T>(ref T? field, T value)
        where T : class =>
        Interlocked.CompareExchange(ref field, value, null) ?? value;

    private int[] FindOuterEdges()
    {
        List<int> edges = [];
        for (int edge = 0; edge < EdgeCount; edge++)
        {
            if (IsOuter(edge))
            {
                edges.Add(edge);
            }
        }

        return [.. edges];
    }

    private IncidenceTable FindCellsAround() => IncidenceTable.Invert(
        VertexCount, (int[])[.. arrays.Triangles, .. arrays.Quadrilaterals], (TriangleCount, 3), (QuadrilateralCount, 4));
}
