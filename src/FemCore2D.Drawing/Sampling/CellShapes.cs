using FemCore2D.Geometry;

namespace FemCore2D.Drawing;

/// <summary>The true shapes of all cells of a mesh, arcs included.</summary>
internal sealed class CellShapes(Mesh mesh)
{
    public CellShape Of(int cell) => new(mesh, cell);
}

/// <summary>
/// The shape of one cell. Edges follow their arcs exactly and the interior is blended between them.
/// </summary>
/// <remarks>W. J. Gordon and C. A. Hall, "Transfinite element methods" (1973); for triangles in the form of
/// B. Szabo and I. Babuska, "Finite Element Analysis" (1991).</remarks>
internal readonly struct CellShape
{
    private readonly Point2D a;
    private readonly Point2D b;
    private readonly Point2D c;
    private readonly Point2D d;
    private readonly bool isTriangle;
    private readonly CircularArc[]? sides;

    public CellShape(Mesh mesh, int cell)
    {
        ReadOnlySpan<int> corners = mesh.VerticesOf(cell);
        ReadOnlySpan<Point2D> vertices = mesh.Vertices;
        isTriangle = corners.Length == 3;
        a = vertices[corners[0]];
        b = vertices[corners[1]];
        c = vertices[corners[2]];
        d = isTriangle ? default : vertices[corners[3]];
        if (!mesh.HasArcs)
            return;
        ReadOnlySpan<int> edges = mesh.EdgesOf(cell);
        bool isBent = false;
        foreach (int edge in edges)
            isBent |= mesh.SweepRadiansOf(edge) != 0;
        if (!isBent)
            return;
        sides = new CircularArc[edges.Length];
        for (int i = 0; i < edges.Length; i++)
        {
            int next = i + 1 < edges.Length ? i + 1 : 0;
            double sweep = mesh.SweepRadiansOf(edges[i]);
            bool isForward = mesh.EndsOf(edges[i]).From == corners[i];
            sides[i] = new CircularArc(vertices[corners[i]], vertices[corners[next]], isForward ? sweep : -sweep);
        }
    }

    public Point2D PlaceOf(Point2D reference)
    {
        (double x, double y) = reference;
        if (isTriangle)
        {
            Point2D flat = a + (x * (b - a)) + (y * (c - a));
            return sides is null ? flat : flat + TriangleBulge(1 - x - y, x, y);
        }

        Point2D low = a.Towards(b, x);
        Point2D straight = low.Towards(d.Towards(c, x), y);
        return sides is null
            ? straight
            : straight + ((1 - y) * sides[0].BulgeAt(x)) + (x * sides[1].BulgeAt(y))
                + (y * sides[2].BulgeAt(1 - x)) + ((1 - x) * sides[3].BulgeAt(1 - y));
    }

    private Vector2D TriangleBulge(double l0, double l1, double l2) =>
        SideBulge(sides![0], l0, l1) + SideBulge(sides[1], l1, l2) + SideBulge(sides[2], l2, l0);

    private static Vector2D SideBulge(CircularArc side, double from, double to)
    {
        if (from <= 0 || to <= 0)
            return Vector2D.Zero;
        double difference = to - from;
        return 4 * from * to / (1 - (difference * difference)) * side.BulgeAt((1 + difference) / 2);
    }
}
