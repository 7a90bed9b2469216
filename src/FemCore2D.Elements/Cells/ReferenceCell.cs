using FemCore2D.Geometry;

namespace FemCore2D.Elements;

/// <summary>The shapes on which elements and quadrature rules are defined.</summary>
/// <remarks>
/// The reference triangle has the vertices (0,0), (1,0), (0,1); the reference quadrilateral is the unit square with
/// the vertices (0,0), (1,0), (1,1), (0,1). Local edge <c>i</c> leads from vertex <c>i</c> to vertex <c>i + 1</c>,
/// cyclically, so that the cell lies on its left.
/// </remarks>
public static class ReferenceCell
{
    private static readonly Point2D[] TriangleVertices = [new(0, 0), new(1, 0), new(0, 1)];
    private static readonly Point2D[] SquareVertices = [new(0, 0), new(1, 0), new(1, 1), new(0, 1)];

    /// <summary>The vertices of a reference cell, counterclockwise.</summary>
    public static ReadOnlySpan<Point2D> Vertices(CellKind cell) =>
        cell == CellKind.Triangle ? TriangleVertices : SquareVertices;

    /// <summary>The number of vertices, which is the number of edges too: 3 or 4.</summary>
    public static int VertexCount(CellKind cell) => cell == CellKind.Triangle ? 3 : 4;

    /// <summary>The area: 1/2 for the triangle, 1 for the square.</summary>
    public static double Area(CellKind cell) => cell == CellKind.Triangle ? 0.5 : 1;

    /// <summary>The centre of area.</summary>
    public static Point2D Centre(CellKind cell) =>
        cell == CellKind.Triangle ? new Point2D(1.0 / 3, 1.0 / 3) : new Point2D(0.5, 0.5);

    /// <summary>The point at a parameter of a local edge.</summary>
    /// <param name="cell">The shape of the cell.</param>
    /// <param name="edge">The local edge.</param>
    /// <param name="parameter">0 at the edge's local start, 1 at its local end.</param>
    /// <exception cref="ArgumentOutOfRangeException">The cell has no such edge.</exception>
    public static Point2D PointOnEdge(CellKind cell, int edge, double parameter) => (cell, edge) switch
    {
        (_, 0) => new Point2D(parameter, 0),
        (CellKind.Triangle, 1) => new Point2D(1 - parameter, parameter),
        (CellKind.Triangle, 2) => new Point2D(0, 1 - parameter),
        (CellKind.Quadrilateral, 1) => new Point2D(1, parameter),
        (CellKind.Quadrilateral, 2) => new Point2D(1 - parameter, 1),
        (CellKind.Quadrilateral, 3) => new Point2D(0, 1 - parameter),
        _ => throw new ArgumentOutOfRangeException(nameof(edge), edge, $"A {cell} has no edge of that number."),
    };

    /// <summary>The change of the point on a local edge for a unit step of the edge's parameter.</summary>
    /// <param name="cell">The shape of the cell.</param>
    /// <param name="edge">The local edge.</param>
    /// <exception cref="ArgumentOutOfRangeException">The cell has no such edge.</exception>
    public static Vector2D EdgeVector(CellKind cell, int edge) =>
        PointOnEdge(cell, edge, 1) - PointOnEdge(cell, edge, 0);

    /// <summary>Whether a point lies in the reference cell or within a margin around it.</summary>
    /// <param name="cell">The shape of the cell.</param>
    /// <param name="point">The point.</param>
    /// <param name="margin">The margin, in reference coordinates (of barycentric coordinates for the triangle).</param>
    public static bool Contains(CellKind cell, Point2D point, double margin = 0)
    {
        double low = -margin;
        double high = 1 + margin;
        return point.X >= low && point.Y >= low
            && (cell == CellKind.Triangle ? point.X + point.Y <= high : point.X <= high && point.Y <= high);
    }
}
