namespace FemCore2D.Geometry;

/// <summary>
/// The cells of a mesh as triangles: the triangles themselves, and the two halves of every quadrilateral on either
/// hand of a diagonal.
/// </summary>
/// <remarks>Diagonals are numbered behind the edges of the mesh, halves behind its triangles.</remarks>
internal sealed class HalfCells
{
    private readonly Mesh mesh;
    private readonly byte[] labels;

    /// <summary>The local vertex, 0 or 1, at which each quadrilateral's diagonal begins.</summary>
    private readonly byte[] diagonalStarts;

    public HalfCells(Mesh mesh)
    {
        this.mesh = mesh;
        labels = mesh.Arrays.BisectionEdges;
        diagonalStarts = new byte[mesh.QuadrilateralCount];
        for (int q = 0; q < diagonalStarts.Length; q++)
        {
            diagonalStarts[q] = IsSecondDiagonalBetter(mesh.TriangleCount + q) ? (byte)1 : (byte)0;
        }
    }

    /// <summary>The number of edges and diagonals.</summary>
    public int LineCount => mesh.EdgeCount + mesh.QuadrilateralCount;

    public int DiagonalOf(int quadrilateral) => mesh.EdgeCount + quadrilateral - mesh.TriangleCount;

    /// <summary>
    /// The diagonal of a quadrilateral: straight in a cell that bends but little, and bent as by the transfinite map
    /// of its sides in any other.
    /// </summary>
    public OutlinePiece DiagonalCurve(int quadrilateral)
    {
        HalfCell half = this[HalvesOf(quadrilateral).First];
        Point2D start = mesh.Vertices[half.C];
        Point2D end = mesh.Vertices[half.A];
        var straight = new OutlinePiece(start, end, 0);
        if (!mesh.IsCurved(quadrilateral))
        {
            return straight;
        }

        int first = diagonalStarts[quadrilateral - mesh.TriangleCount];
        bool isStronglyBent = false;
        for (int i = first; i < first + 4; i += 2)
        {
            isStronglyBent |= new CurvedTriangle(
                mesh.SideOf(quadrilateral, i), mesh.SideOf(quadrilateral, (i + 1) % 4),
                i == first ? straight : straight.Reversed()).IsStronglyBent;
        }

        return isStronglyBent
            ? OutlinePiece.Bent(
                start, end, FourSides.Of(mesh, quadrilateral).PointAt(0.5, 0.5) - straight.PointAt(0.5))
            : straight;
    }

    /// <summary>The half cells of a cell: one of a triangle, two of a quadrilateral.</summary>
    public (int First, int Count) HalvesOf(int cell) => cell < mesh.TriangleCount
        ? (cell, 1)
        : (mesh.TriangleCount + (2 * (cell - mesh.TriangleCount)), 2);

    /// <summary>The vertices of a half cell, counterclockwise, and the lines from each to the next.</summary>
    public HalfCell this[int half]
    {
        get
        {
            if (half < mesh.TriangleCount)
            {
                ReadOnlySpan<int> v = mesh.VerticesOf(half);
                ReadOnlySpan<int> e = mesh.EdgesOf(half);
                return new HalfCell(v[0], v[1], v[2], e[0], e[1], e[2]);
            }

            int cell = mesh.TriangleCount + ((half - mesh.TriangleCount) / 2);
            ReadOnlySpan<int> corners = mesh.VerticesOf(cell);
            ReadOnlySpan<int> edges = mesh.EdgesOf(cell);
            int start = diagonalStarts[cell - mesh.TriangleCount] + (2 * ((half - mesh.TriangleCount) % 2));
            int next = (start + 1) % 4;
            return new HalfCell(
                corners[start], corners[next], corners[(start + 2) % 4], edges[start], edges[next], DiagonalOf(cell));
        }
    }

    /// <summary>The half cells on either hand of an edge or diagonal; -1 for none.</summary>
    public (int First, int Second) HalvesAt(int line)
    {
        if (line >= mesh.EdgeCount)
        {
            int first = HalvesOf(mesh.TriangleCount + line - mesh.EdgeCount).First;
            return (first, first + 1);
        }

        (int left, int right) = mesh.CellsOf(line);
        return (HalfOf(left, line), HalfOf(right, line));
    }

    /// <summary>The local line at which a half cell is bisected next: remembered, or else the longest.</summary>
    /// <remarks>Of equally long lines the lower-numbered counts as longer, so that neighbours agree.</remarks>
    public int BisectionLine(int half)
    {
        if (half < labels.Length)
        {
            return labels[half];
        }

        HalfCell cell = this[half];
        ReadOnlySpan<Point2D> p = mesh.Vertices;
        Span<double> lengths = [Squared(p, cell.A, cell.B), Squared(p, cell.B, cell.C), Squared(p, cell.C, cell.A)];
        int longest = 0;
        for (int i = 1; i < 3; i++)
        {
            if (lengths[i] > lengths[longest]
                || (lengths[i] == lengths[longest] && cell.Line(i) < cell.Line(longest)))
            {
                longest = i;
            }
        }

        return longest;
    }

    private static double Squared(ReadOnlySpan<Point2D> points, int start, int end) =>
        (points[end] - points[start]).LengthSquared;

    private int HalfOf(int cell, int edge)
    {
        if (cell < mesh.TriangleCount)
        {
            return cell;
        }

        int local = mesh.EdgesOf(cell).IndexOf(edge);
        int start = diagonalStarts[cell - mesh.TriangleCount];
        return HalvesOf(cell).First + ((local - start + 4) % 4 / 2);
    }

    /// <summary>
    /// The diagonal from the second vertex is better when the angles at the first and third, which it faces, are
    /// together the smaller pair (Delaunay): their cotangents have the larger sum.
    /// </summary>
    private bool IsSecondDiagonalBetter(int cell)
    {
        ReadOnlySpan<int> v = mesh.VerticesOf(cell);
        ReadOnlySpan<Point2D> p = mesh.Vertices;
        double facingSecond = Cotangent(p[v[0]], p[v[1]], p[v[3]]) + Cotangent(p[v[2]], p[v[3]], p[v[1]]);
        double facingFirst = Cotangent(p[v[1]], p[v[2]], p[v[0]]) + Cotangent(p[v[3]], p[v[0]], p[v[2]]);
        return facingSecond > facingFirst + 1e-12;
    }

    private static double Cotangent(Point2D corner, Point2D next, Point2D previous)
    {
        Vector2D first = next - corner;
        Vector2D second = previous - corner;
        return first.Dot(second) / first.Cross(second);
    }
}

/// <summary>A triangle that is a cell or half of one.</summary>
internal readonly record struct HalfCell(int A, int B, int C, int LineAB, int LineBC, int LineCA)
{
    public int Line(int local) => local == 0 ? LineAB : local == 1 ? LineBC : LineCA;

    /// <summary>The same triangle, begun at a later vertex.</summary>
    public HalfCell Turned(int steps) => steps switch
    {
        0 => this,
        1 => new HalfCell(B, C, A, LineBC, LineCA, LineAB),
        _ => new HalfCell(C, A, B, LineCA, LineAB, LineBC),
    };
}
