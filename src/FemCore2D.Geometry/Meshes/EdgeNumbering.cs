namespace FemCore2D.Geometry;

/// <summary>The edges of a set of cells, with the edges of each cell and the cells of each edge.</summary>
/// <remarks>
/// The sides of all cells are sorted by their lower vertex (counting sort). Within one vertex a side is an edge met
/// before exactly when the edge last seen to its other end is among the edges of this vertex, so the work is linear
/// in the number of sides, however many of them meet in one vertex. Edges are numbered by their lower vertex, and
/// those of one vertex in the order of the cells.
/// </remarks>
internal sealed class EdgeNumbering
{
    private readonly int[] triangles;
    private readonly int[] quadrilaterals;
    private int[] edgeVertices;
    private int[] edgeCells;

    private EdgeNumbering(int vertexCount, int[] triangles, int[] quadrilaterals)
    {
        this.triangles = triangles;
        this.quadrilaterals = quadrilaterals;
        int sideCount = triangles.Length + quadrilaterals.Length;
        SideEdges = GC.AllocateUninitializedArray<int>(sideCount);
        FirstEdges = new int[vertexCount + 1];

        // Nearly all edges are sides of two cells; the arrays grow if this guess does not hold.
        int guess = Math.Min(sideCount, (sideCount / 2) + (sideCount / 16) + 64);
        edgeVertices = GC.AllocateUninitializedArray<int>(2 * guess);
        edgeCells = GC.AllocateUninitializedArray<int>(2 * guess);
    }

    public int[] SideEdges { get; }

    public int[] FirstEdges { get; }

    public int[] EdgeVertices => edgeVertices;

    public int[] EdgeCells => edgeCells;

    /// <exception cref="InvalidMeshException">Two cells lie on the same side of one edge.</exception>
    public static EdgeNumbering Of(Point2D[] vertices, int[] triangles, int[] quadrilaterals)
    {
        var numbering = new EdgeNumbering(vertices.Length, triangles, quadrilaterals);
        int[] starts = numbering.CountSides();
        numbering.Number(vertices, starts, numbering.SortSides(starts));
        return numbering;
    }

    /// <summary>The end of a side in the counterclockwise direction of its cell, and the cell.</summary>
    private (int Start, int End, int Cell) Side(int side)
    {
        if (side < triangles.Length)
        {
            int cell = (int)((uint)side / 3);
            int first = 3 * cell;
            return (triangles[side], triangles[side == first + 2 ? first : side + 1], cell);
        }

        int place = side - triangles.Length;
        return (
            quadrilaterals[place],
            quadrilaterals[(place & 3) == 3 ? place - 3 : place + 1],
            (triangles.Length / 3) + (place >> 2));
    }

    private int[] CountSides()
    {
        int[] starts = new int[FirstEdges.Length + 1];
        for (int t = 0; t < triangles.Length; t += 3)
        {
            int a = triangles[t];
            int b = triangles[t + 1];
            int c = triangles[t + 2];
            starts[Math.Min(a, b) + 2]++;
            starts[Math.Min(b, c) + 2]++;
            starts[Math.Min(c, a) + 2]++;
        }

        for (int side = triangles.Length; side < SideEdges.Length; side++)
        {
            (int start, int end, _) = Side(side);
            starts[Math.Min(start, end) + 2]++;
        }

        for (int v = 2; v < starts.Length; v++)
        {
            starts[v] += starts[v - 1];
        }

        return starts;
    }

    /// <summary>Sorts the sides by lower vertex; afterwards <c>starts[v]</c> is the first place of vertex v.</summary>
    private int[] SortSides(int[] starts)
    {
        int[] sides = GC.AllocateUninitializedArray<int>(SideEdges.Length);
        for (int t = 0; t < triangles.Length; t += 3)
        {
            int a = triangles[t];
            int b = triangles[t + 1];
            int c = triangles[t + 2];
            sides[starts[Math.Min(a, b) + 1]++] = t;
            sides[starts[Math.Min(b, c) + 1]++] = t + 1;
            sides[starts[Math.Min(c, a) + 1]++] = t + 2;
        }

        for (int side = triangles.Length; side < SideEdges.Length; side++)
        {
            (int start, int end, _) = Side(side);
            sides[starts[Math.Min(start, end) + 1]++] = side;
        }

        return sides;
    }

    private void Number(Point2D[] vertices, int[] starts, int[] sides)
    {
        int vertexCount = FirstEdges.Length - 1;
        int[] lastEdgeTo = GC.AllocateUninitializedArray<int>(vertexCount);
        lastEdgeTo.AsSpan().Fill(-1);
        int edgeCount = 0;
        for (int lower = 0; lower < vertexCount; lower++)
        {
            int firstEdge = edgeCount;
            FirstEdges[lower] = firstEdge;
            for (int k = starts[lower]; k < starts[lower + 1]; k++)
            {
                int side = sides[k];
                (int start, int end, int cell) = Side(side);
                int isBackward = start == lower ? 0 : 1;
                int higher = isBackward == 0 ? end : start;
                int edge = lastEdgeTo[higher];
                if (edge < firstEdge)
                {
                    edge = edgeCount++;
                    lastEdgeTo[higher] = edge;
                    if (2 * edge >= edgeVertices.Length)
                    {
                        Array.Resize(ref edgeVertices, 2 * SideEdges.Length);
                        Array.Resize(ref edgeCells, 2 * SideEdges.Length);
                    }

                    edgeVertices[2 * edge] = lower;
                    edgeVertices[(2 * edge) + 1] = higher;
                    edgeCells[2 * edge] = -1;
                    edgeCells[(2 * edge) + 1] = -1;
                }

                ref int place = ref edgeCells[(2 * edge) + isBackward];
                if (place >= 0)
                {
                    throw InvalidMeshException.SameSide(place, cell, lower, higher, vertices);
                }

                place = cell;
                SideEdges[side] = edge;
            }
        }

        FirstEdges[vertexCount] = edgeCount;
        Array.Resize(ref edgeVertices, 2 * edgeCount);
        Array.Resize(ref edgeCells, 2 * edgeCount);
    }
}
