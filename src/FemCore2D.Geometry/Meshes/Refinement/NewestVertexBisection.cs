namespace FemCore2D.Geometry;

/// <summary>Bisection of marked triangles opposite their newest vertex.</summary>
/// <remarks>
/// Quadrilaterals take part as pairs of triangles with a diagonal between them; a pair of which no line is marked in
/// the end stays a quadrilateral. Marks are only ever added, so their spreading ends, whatever lines the triangles
/// begin with.
/// </remarks>
internal sealed class NewestVertexBisection
{
    private readonly Mesh mesh;
    private readonly HalfCells halves;

    /// <summary>For each edge and diagonal the vertex in its middle, or a negative number for an unmarked one.</summary>
    private readonly int[] middles;

    private readonly List<int> triangles = [];
    private readonly List<byte> labels = [];
    private readonly List<int> parents = [];
    private readonly List<MarkedEdge> medians = [];
    private Point2D[] vertices = [];
    private int parent;

    private NewestVertexBisection(Mesh mesh)
    {
        if (24L * mesh.CellCount > Array.MaxLength)
        {
            throw new MeshingException(
                $"The cells of a mesh of {mesh.CellCount} cells cannot be bisected: the result might not fit into " +
                "arrays. Begin with a coarser mesh.");
        }

        this.mesh = mesh;
        halves = new HalfCells(mesh);
        middles = new int[halves.LineCount];
        Array.Fill(middles, -1);
    }

    public static RefinedMesh Refine(Mesh mesh, ReadOnlySpan<int> cells)
    {
        var bisection = new NewestVertexBisection(mesh);
        bisection.Spread(cells);
        return bisection.Divide(cutAll: false);
    }

    public static RefinedMesh CutQuadrilaterals(Mesh mesh) => new NewestVertexBisection(mesh).Divide(cutAll: true);

    /// <summary>Marks lines until every half cell with a marked line has its bisection line marked.</summary>
    private void Spread(ReadOnlySpan<int> cells)
    {
        Stack<int> pending = [];
        foreach (int cell in cells)
        {
            (int first, int count) = halves.HalvesOf(cell);
            for (int half = first; half < first + count; half++)
            {
                Mark(half);
            }
        }

        while (pending.TryPop(out int line))
        {
            (int first, int second) = halves.HalvesAt(line);
            Mark(first);
            Mark(second);
        }

        void Mark(int half)
        {
            if (half < 0)
            {
                return;
            }

            int line = halves[half].Line(halves.BisectionLine(half));
            if (middles[line] < 0)
            {
                middles[line] = 0;
                pending.Push(line);
            }
        }
    }

    private RefinedMesh Divide(bool cutAll)
    {
        vertices = PlaceMiddles();
        List<int> whole = [];
        for (int cell = 0; cell < mesh.CellCount; cell++)
        {
            parent = cell;
            (int first, int count) = halves.HalvesOf(cell);
            if (count == 2 && !cutAll && !IsTouched(cell))
            {
                whole.Add(cell);
                continue;
            }

            for (int half = first; half < first + count; half++)
            {
                int local = halves.BisectionLine(half);
                HalfCell triangle = halves[half];
                if (middles[triangle.Line(local)] < 0)
                {
                    Add(triangle, local);
                }
                else
                {
                    HalfCell apexFirst = triangle.Turned((local + 2) % 3);
                    Bisect(apexFirst, CurveOf(apexFirst));
                }
            }
        }

        parents.AddRange(whole);
        return Assemble(whole, [.. parents]);
    }

    private RefinedMesh Assemble(List<int> whole, int[] parentOfCells)
    {
        int[] regions = new int[parentOfCells.Length];
        for (int i = 0; i < regions.Length; i++)
        {
            regions[i] = mesh.CellRegions[parentOfCells[i]];
        }

        BoundaryMarks boundaries = BoundaryMarks.Of(mesh);
        List<MarkedEdge> marks = EdgeHalves.Marks(mesh, boundaries, middles);
        MarkDiagonals(marks, whole);
        marks.AddRange(medians);
        int[] quadrilaterals = new int[4 * whole.Count];
        for (int i = 0; i < whole.Count; i++)
        {
            mesh.VerticesOf(whole[i]).CopyTo(quadrilaterals.AsSpan(4 * i, 4));
        }

        Mesh refined = new MeshBuilder
        {
            Vertices = vertices,
            Triangles = [.. triangles],
            Quadrilaterals = quadrilaterals,
            CellRegions = regions,
            RegionNames = mesh.RegionNames,
            MarkedEdges = marks,
            BoundarySets = boundaries.Sets,
            BoundaryNames = mesh.BoundaryNames,
            PointNames = mesh.PointNames,
            PointVertices = mesh.Arrays.PointVertices,
            BisectionEdges = [.. labels],
        }.Build();
        CurvedParts.Check(mesh, refined, parentOfCells);
        return new RefinedMesh(refined, parentOfCells);
    }

    /// <summary>Gives the bent diagonals of the quadrilaterals that are cut their arcs.</summary>
    private void MarkDiagonals(List<MarkedEdge> marks, List<int> whole)
    {
        int nextWhole = 0;
        for (int cell = mesh.TriangleCount; cell < mesh.CellCount; cell++)
        {
            if (nextWhole < whole.Count && whole[nextWhole] == cell)
            {
                nextWhole++;
                continue;
            }

            double sweep = halves.DiagonalCurve(cell).SweepRadians;
            if (sweep == 0)
            {
                continue;
            }

            HalfCell half = halves[halves.HalvesOf(cell).First];
            int middle = middles[halves.DiagonalOf(cell)];
            if (middle < 0)
            {
                marks.Add(new MarkedEdge(half.C, half.A, sweep, -1));
            }
            else
            {
                marks.Add(new MarkedEdge(half.C, middle, 0.5 * sweep, -1));
                marks.Add(new MarkedEdge(middle, half.A, 0.5 * sweep, -1));
            }
        }
    }

    private Point2D[] PlaceMiddles()
    {
        List<Point2D> added = [];
        for (int line = 0; line < middles.Length; line++)
        {
            if (middles[line] < 0)
            {
                continue;
            }

            middles[line] = mesh.VertexCount + added.Count;
            if (line < mesh.EdgeCount)
            {
                added.Add(mesh.PointOnEdge(line, 0.5));
            }
            else
            {
                added.Add(halves.DiagonalCurve(mesh.TriangleCount + line - mesh.EdgeCount).PointAt(0.5));
            }
        }

        return [.. mesh.Vertices, .. added];
    }

    private bool IsTouched(int quadrilateral)
    {
        bool isTouched = middles[halves.DiagonalOf(quadrilateral)] >= 0;
        foreach (int edge in mesh.EdgesOf(quadrilateral))
        {
            isTouched |= middles[edge] >= 0;
        }

        return isTouched;
    }

    private CurvedTriangle CurveOf(in HalfCell half) => new(
        Side(half.A, half.B, half.LineAB), Side(half.B, half.C, half.LineBC), Side(half.C, half.A, half.LineCA));

    private OutlinePiece Side(int start, int end, int line)
    {
        if (!mesh.HasArcs)
        {
            return new OutlinePiece(vertices[start], vertices[end], 0);
        }

        OutlinePiece curve = line < mesh.EdgeCount
            ? mesh.CurveOf(line)
            : halves.DiagonalCurve(mesh.TriangleCount + line - mesh.EdgeCount);
        return curve.Start == vertices[start] ? curve : curve.Reversed();
    }

    /// <summary>Cuts a triangle from its first vertex, the newest, to the line that faces it, and the parts likewise.</summary>
    private void Bisect(in HalfCell triangle, in CurvedTriangle curves)
    {
        const int New = -1;
        int middle = triangle.LineBC == New ? New : middles[triangle.LineBC];
        if (middle < 0)
        {
            Add(triangle, 1);
            return;
        }

        Point2D place = vertices[middle];
        double half = 0.5 * curves.BC.SweepRadians;
        var median = new OutlinePiece(vertices[triangle.A], place, curves.MedianSweep);
        if (!median.IsStraight)
        {
            medians.Add(new MarkedEdge(triangle.A, middle, median.SweepRadians, -1));
        }

        Bisect(
            new HalfCell(middle, triangle.A, triangle.B, New, triangle.LineAB, New),
            new CurvedTriangle(median.Reversed(), curves.AB, new OutlinePiece(curves.BC.Start, place, half)));
        Bisect(
            new HalfCell(middle, triangle.C, triangle.A, New, triangle.LineCA, New),
            new CurvedTriangle(new OutlinePiece(place, curves.BC.End, half), curves.CA, median));
    }

    private void Add(in HalfCell triangle, int bisectionLine)
    {
        triangles.Add(triangle.A);
        triangles.Add(triangle.B);
        triangles.Add(triangle.C);
        labels.Add((byte)bisectionLine);
        parents.Add(parent);
    }
}
