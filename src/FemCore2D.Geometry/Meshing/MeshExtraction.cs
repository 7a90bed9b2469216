namespace FemCore2D.Geometry;

/// <summary>
/// Takes the cells of the regions out of a triangulation, with vertices numbered along a space-filling curve and
/// cells by their vertices.
/// </summary>
internal sealed unsafe class MeshExtraction
{
    private readonly Triangulation source;
    private readonly MeshPlan plan;
    private readonly int[] newNumbers;

    public MeshExtraction(Triangulation source, MeshPlan plan, Refiner refiner)
    {
        this.source = source;
        this.plan = plan;
        bool[] isUsed = new bool[source.VertexCount];
        int cellCount = 0;
        for (int triangle = 0; triangle < source.TriangleCount; triangle++)
        {
            if (source.RegionOf(triangle) < 0)
                continue;
            cellCount++;
            isUsed[source.Origin[4 * triangle]] = true;
            isUsed[source.Origin[(4 * triangle) + 1]] = true;
            isUsed[source.Origin[(4 * triangle) + 2]] = true;
        }

        newNumbers = new int[source.VertexCount];
        Array.Fill(newNumbers, -1);
        int[] order = HilbertOrder.Of(source.Coordinates, source.VertexCount);
        int vertexCount = isUsed.Count(used => used);
        Point2D[] vertices = new Point2D[vertexCount];
        Sizes = new double[vertexCount];
        int number = 0;
        foreach (int vertex in order)
        {
            if (!isUsed[vertex])
                continue;
            newNumbers[vertex] = number;
            vertices[number] = source.PointAt(vertex);
            Sizes[number] = refiner.SizeOf(vertex);
            if (refiner.PieceOf(vertex) >= -1)
                BoundaryVertices++;
            number++;
        }

        (int[] triangles, int[] regions) = OrderCells(vertexCount, cellCount);
        Mesh = new MeshBuilder
        {
            Vertices = vertices,
            Triangles = triangles,
            CellRegions = regions,
            RegionNames = plan.Arrangement.RegionNames,
            MarkedEdges = CollectMarks(),
            BoundarySets = plan.Arrangement.BoundarySets,
            PointNames = plan.Arrangement.PointNames,
            PointVertices = NamedPoints(),
        }.Build();
    }

    public Mesh Mesh { get; }

    /// <summary>The wanted edge length at every vertex of the mesh.</summary>
    public double[] Sizes { get; }

    public int BoundaryVertices { get; }

    /// <summary>Counts the cells into the order of their lowest vertices.</summary>
    private (int[] Triangles, int[] Regions) OrderCells(int vertexCount, int cellCount)
    {
        int[] starts = new int[vertexCount + 1];
        for (int triangle = 0; triangle < source.TriangleCount; triangle++)
        {
            if (source.RegionOf(triangle) >= 0)
                starts[LowestVertex(triangle) + 1]++;
        }

        for (int vertex = 0; vertex < vertexCount; vertex++)
        {
            starts[vertex + 1] += starts[vertex];
        }

        int[] triangles = new int[3 * cellCount];
        int[] regions = new int[cellCount];
        for (int triangle = 0; triangle < source.TriangleCount; triangle++)
        {
            int region = source.RegionOf(triangle);
            if (region < 0)
                continue;
            int cell = starts[LowestVertex(triangle)]++;
            regions[cell] = region;
            triangles[3 * cell] = newNumbers[source.Origin[4 * triangle]];
            triangles[(3 * cell) + 1] = newNumbers[source.Origin[(4 * triangle) + 1]];
            triangles[(3 * cell) + 2] = newNumbers[source.Origin[(4 * triangle) + 2]];
        }

        return (triangles, regions);
    }

    private int LowestVertex(int triangle)
    {
        int* corners = source.Origin + (4 * triangle);
        return Math.Min(newNumbers[corners[0]], Math.Min(newNumbers[corners[1]], newNumbers[corners[2]]));
    }

    private List<MarkedEdge> CollectMarks()
    {
        List<MarkedEdge> marks = [];
        for (int index = 0; index < source.Segments.Count; index++)
        {
            ref Segment segment = ref source.Segments[index];
            if (segment.Piece < 0 || !HasCell(2 * index))
                continue;
            double sweep = plan.Rings.Directed(segment.Piece).Sweep * (segment.LastFraction - segment.FirstFraction);
            int boundaries = plan.Arrangement.Pieces[segment.Piece].Boundaries;
            if (sweep != 0 || boundaries >= 0)
                marks.Add(new MarkedEdge(newNumbers[segment.Start], newNumbers[segment.End], sweep, boundaries));
        }

        return marks;
    }

    private bool HasCell(int side) =>
        source.RegionOf(source.Segments.HalfEdgeAt(side) >> 2) >= 0
        || source.RegionOf(source.Segments.HalfEdgeAt(side ^ 1) >> 2) >= 0;

    private int[] NamedPoints()
    {
        int[] vertices = [.. plan.Arrangement.PointVertices.Select(vertex => newNumbers[vertex])];
        int outside = Array.IndexOf(vertices, -1);
        return outside < 0
            ? vertices
            : throw new MeshingException(
                $"The point '{plan.Arrangement.PointNames[outside]}' at {plan.Arrangement.Vertices[plan.Arrangement.PointVertices[outside]]} lies in no region. Move it into one or leave it out.");
    }
}
