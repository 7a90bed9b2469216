namespace FemCore2D.Geometry;

/// <summary>Divides every triangle and every quadrilateral into four.</summary>
internal sealed class UniformRefinement
{
    private readonly Mesh mesh;
    private readonly Point2D[] vertices;
    private readonly List<MarkedEdge> marks;
    private readonly BoundaryMarks boundaries;

    private UniformRefinement(Mesh mesh)
    {
        this.mesh = mesh;
        vertices = new Point2D[mesh.VertexCount + mesh.EdgeCount + mesh.QuadrilateralCount];
        mesh.Vertices.CopyTo(vertices);
        int[] middles = new int[mesh.EdgeCount];
        for (int edge = 0; edge < middles.Length; edge++)
        {
            middles[edge] = MiddleOf(edge);
            vertices[middles[edge]] = mesh.PointOnEdge(edge, 0.5);
        }

        boundaries = BoundaryMarks.Of(mesh);
        marks = EdgeHalves.Marks(mesh, boundaries, middles);
    }

    public static RefinedMesh Refine(Mesh mesh)
    {
        // The arrays of edges hold at most two numbers for each of sixteen sides of a cell's quarters.
        if (32L * mesh.CellCount > Array.MaxLength)
        {
            throw new MeshingException(
                $"A mesh of {mesh.CellCount} cells cannot be refined as a whole: the result would not fit into arrays. " +
                "Refine marked cells only.");
        }

        return new UniformRefinement(mesh).Divide();
    }

    private int MiddleOf(int edge) => mesh.VertexCount + edge;

    private RefinedMesh Divide()
    {
        int[] triangles = new int[12 * mesh.TriangleCount];
        int[] quadrilaterals = new int[16 * mesh.QuadrilateralCount];
        int[] parents = new int[4 * mesh.CellCount];
        int[] regions = new int[parents.Length];
        for (int cell = 0; cell < mesh.CellCount; cell++)
        {
            parents.AsSpan(4 * cell, 4).Fill(cell);
            regions.AsSpan(4 * cell, 4).Fill(mesh.CellRegions[cell]);
            if (mesh.KindOf(cell) == CellKind.Triangle)
            {
                DivideTriangle(cell, triangles.AsSpan(12 * cell, 12));
            }
            else
            {
                DivideQuadrilateral(cell, quadrilaterals.AsSpan(16 * (cell - mesh.TriangleCount), 16));
            }
        }

        Mesh refined = new MeshBuilder
        {
            Vertices = vertices,
            Triangles = triangles,
            Quadrilaterals = quadrilaterals,
            CellRegions = regions,
            RegionNames = mesh.RegionNames,
            MarkedEdges = marks,
            BoundarySets = boundaries.Sets,
            BoundaryNames = mesh.BoundaryNames,
            PointNames = mesh.PointNames,
            PointVertices = mesh.Arrays.PointVertices,
            BisectionEdges = QuarterLabels(mesh.Arrays.BisectionEdges),
        }.Build();
        CurvedParts.Check(mesh, refined, parents);
        return new RefinedMesh(refined, parents);
    }

    /// <summary>All quarters of a triangle are similar to it, with local edges parallel to its own.</summary>
    private static byte[] QuarterLabels(byte[] labels)
    {
        var quarters = new byte[4 * labels.Length];
        for (int i = 0; i < labels.Length; i++)
        {
            quarters.AsSpan(4 * i, 4).Fill(labels[i]);
        }

        return quarters;
    }

    private void DivideTriangle(int cell, Span<int> parts)
    {
        ReadOnlySpan<int> v = mesh.VerticesOf(cell);
        ReadOnlySpan<int> edges = mesh.EdgesOf(cell);
        int ab = MiddleOf(edges[0]);
        int bc = MiddleOf(edges[1]);
        int ca = MiddleOf(edges[2]);
        ReadOnlySpan<int> quarters = [v[0], ab, ca, ab, v[1], bc, ca, bc, v[2], bc, ca, ab];
        quarters.CopyTo(parts);
        if (mesh.IsCurved(cell))
        {
            var triangle = new CurvedTriangle(mesh.SideOf(cell, 0), mesh.SideOf(cell, 1), mesh.SideOf(cell, 2));
            Mark(ab, ca, triangle.MiddleLineSweep);
            Mark(bc, ab, triangle.Turned.MiddleLineSweep);
            Mark(ca, bc, triangle.Turned.Turned.MiddleLineSweep);
        }
    }

    private void DivideQuadrilateral(int cell, Span<int> parts)
    {
        ReadOnlySpan<int> v = mesh.VerticesOf(cell);
        ReadOnlySpan<int> edges = mesh.EdgesOf(cell);
        int bottom = MiddleOf(edges[0]);
        int right = MiddleOf(edges[1]);
        int top = MiddleOf(edges[2]);
        int left = MiddleOf(edges[3]);
        int middle = mesh.VertexCount + mesh.EdgeCount + cell - mesh.TriangleCount;
        FourSides sides = FourSides.Of(mesh, cell);
        vertices[middle] = sides.PointAt(0.5, 0.5);
        ReadOnlySpan<int> quarters =
        [
            v[0], bottom, middle, left, bottom, v[1], right, middle,
            middle, right, v[2], top, left, middle, top, v[3],
        ];
        quarters.CopyTo(parts);
        if (mesh.IsCurved(cell))
        {
            Bend(left, middle, sides.Bottom.Part(0, 0.5), sides.Top.Part(0, 0.5));
            Bend(middle, right, sides.Bottom.Part(0.5, 1), sides.Top.Part(0.5, 1));
            Bend(bottom, middle, sides.Left.Part(0, 0.5), sides.Right.Part(0, 0.5));
            Bend(middle, top, sides.Left.Part(0.5, 1), sides.Right.Part(0.5, 1));
        }
    }

    /// <summary>Lets a new edge bend as much as the mean of the two halves of sides on either hand.</summary>
    private void Bend(int start, int end, in OutlinePiece first, in OutlinePiece second) => Mark(
        start, end, FourSides.SweepBetween(first, second, 0.5, vertices[start].DistanceTo(vertices[end])));

    private void Mark(int start, int end, double sweep)
    {
        if (sweep != 0)
        {
            marks.Add(new MarkedEdge(start, end, sweep, -1));
        }
    }
}
