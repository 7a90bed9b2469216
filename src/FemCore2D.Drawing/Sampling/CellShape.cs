using FemCore2D.Geometry;

namespace FemCore2D.Drawing;

/// <summary>
/// The shape of one cell as the eye expects it: edges follow their arcs exactly, whatever the degree of the maps that
/// a field was computed with, and the interior is blended between them.
/// </summary>
/// <remarks>W. J. Gordon and C. A. Hall, "Transfinite element methods" (1973); for triangles in the form of
/// B. Szabo and I. Babuska, "Finite Element Analysis" (1991).</remarks>
internal readonly struct CellShape
{
    private readonly Mesh mesh;
    private readonly int cell;
    private readonly Point2D a;
    private readonly Point2D b;
    private readonly Point2D c;
    private readonly Point2D d;
    private readonly bool isTriangle;
    private readonly bool isBent;

    public CellShape(Mesh mesh, int cell)
    {
        this.mesh = mesh;
        this.cell = cell;
        ReadOnlySpan<int> corners = mesh.VerticesOf(cell);
        ReadOnlySpan<Point2D> vertices = mesh.Vertices;
        isTriangle = corners.Length == 3;
        a = vertices[corners[0]];
        b = vertices[corners[1]];
        c = vertices[corners[2]];
        d = isTriangle ? default : vertices[corners[3]];
        if (!mesh.HasArcs)
            return;
        foreach (int edge in mesh.EdgesOf(cell))
            isBent |= mesh.SweepRadiansOf(edge) != 0;
    }

    /// <summary>Whether the cell is a triangle with straight edges, which is flat whatever is done to it.</summary>
    public bool IsFlat => isTriangle && !isBent;

    public Point2D PlaceOf(Point2D reference)
    {
        (double x, double y) = reference;
        if (isTriangle)
        {
            Point2D flat = a + (x * (b - a)) + (y * (c - a));
            double rest = 1 - x - y;
            return isBent ? flat + Bulge(0, rest, x) + Bulge(1, x, y) + Bulge(2, y, rest) : flat;
        }

        Point2D straight = a.Towards(b, x).Towards(d.Towards(c, x), y);
        return isBent
            ? straight + ((1 - y) * BulgeAt(0, x)) + (x * BulgeAt(1, y)) + (y * BulgeAt(2, 1 - x)) + ((1 - x) * BulgeAt(3, 1 - y))
            : straight;
    }

    private Vector2D Bulge(int side, double from, double to)
    {
        if (from <= 0 || to <= 0)
            return Vector2D.Zero;
        double difference = to - from;
        return 4 * from * to / (1 - (difference * difference)) * BulgeAt(side, (1 + difference) / 2);
    }

    /// <summary>How far a side stands off its chord after a fraction of its way.</summary>
    private Vector2D BulgeAt(int side, double fraction)
    {
        int edge = mesh.EdgesOf(cell)[side];
        if (mesh.SweepRadiansOf(edge) == 0)
            return Vector2D.Zero;
        (int from, int to) = mesh.EndsOf(edge);
        double along = mesh.VerticesOf(cell)[side] == from ? fraction : 1 - fraction;
        return mesh.PointOnEdge(edge, along) - mesh.Vertices[from].Towards(mesh.Vertices[to], along);
    }
}
