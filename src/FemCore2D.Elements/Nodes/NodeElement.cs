using System.Runtime.CompilerServices;
using FemCore2D.Geometry;

namespace FemCore2D.Elements;

/// <summary>Finds node elements, and evaluates them at many points and on edges.</summary>
public static class NodeElement
{
    private const int OnStack = 64;

    private static readonly INodeElement[] Triangles =
        [.. Enumerable.Range(1, LagrangeTriangle.MaximumDegree).Select(p => (INodeElement)new LagrangeTriangle(p))];

    private static readonly INodeElement[] Quadrilaterals =
        [.. Enumerable.Range(1, LagrangeQuadrilateral.MaximumDegree).Select(p => (INodeElement)new LagrangeQuadrilateral(p))];

    /// <summary>The Lagrange element of a cell and degree.</summary>
    /// <param name="cell">The shape of the cell.</param>
    /// <param name="degree">The degree: 1 to 5 on triangles, 1 to 3 on quadrilaterals.</param>
    /// <exception cref="ArgumentOutOfRangeException">There is no element of that degree.</exception>
    public static INodeElement Lagrange(CellKind cell, int degree)
    {
        INodeElement[] elements = cell == CellKind.Triangle ? Triangles : Quadrilaterals;
        return degree >= 1 && degree <= elements.Length
            ? elements[degree - 1]
            : throw new ArgumentOutOfRangeException(
                nameof(degree), degree, $"Lagrange elements on a {cell} have a degree from 1 to {elements.Length}.");
    }

    /// <summary>Evaluates all shape functions at many points.</summary>
    /// <param name="element">The element.</param>
    /// <param name="points">The points, in coordinates of the reference cell.</param>
    /// <param name="values">Receives the values, point by point: the value of function <c>i</c> at point <c>q</c> stands
    /// at <c>q * UnknownCount + i</c>.</param>
    /// <exception cref="ArgumentOutOfRangeException">The span is too short.</exception>
    public static void Values<TElement>(
        this TElement element, ReadOnlySpan<Point2D> points, Span<double> values)
        where TElement : INodeElement
    {
        int count = element.UnknownCount;
        for (int q = 0; q < points.Length; q++)
        {
            element.Values(points[q], values.Slice(q * count, count));
        }
    }

    /// <summary>Evaluates the gradients of all shape functions, in reference coordinates, at many points.</summary>
    /// <param name="element">The element.</param>
    /// <param name="points">The points, in coordinates of the reference cell.</param>
    /// <param name="gradients">Receives the gradients, point by point: that of function <c>i</c> at point <c>q</c> stands
    /// at <c>q * UnknownCount + i</c>.</param>
    /// <exception cref="ArgumentOutOfRangeException">The span is too short.</exception>
    public static void Gradients<TElement>(
        this TElement element, ReadOnlySpan<Point2D> points, Span<Vector2D> gradients)
        where TElement : INodeElement
    {
        int count = element.UnknownCount;
        for (int q = 0; q < points.Length; q++)
        {
            element.Gradients(points[q], gradients.Slice(q * count, count));
        }
    }

    /// <summary>Evaluates the traces on a local edge: the values of the edge's own shape functions at a point of it.</summary>
    /// <param name="element">The element.</param>
    /// <param name="edge">The local edge.</param>
    /// <param name="parameter">0 at the edge's local start, 1 at its local end.</param>
    /// <param name="values">Receives the values in the order of <see cref="UnknownLayout.UnknownsOnEdge"/> (start, end,
    /// between); at least <see cref="UnknownLayout.OnClosedEdge"/> long.</param>
    /// <exception cref="ArgumentOutOfRangeException">The cell has no such edge, or the span is too short.</exception>
    [SkipLocalsInit]
    public static void EdgeValues<TElement>(
        this TElement element, int edge, double parameter, Span<double> values)
        where TElement : INodeElement
    {
        UnknownLayout layout = element.Layout;
        int count = element.UnknownCount;
        int onEdge = layout.OnClosedEdge;
        values = values[..onEdge];
        Span<double> all = count <= OnStack ? stackalloc double[OnStack] : new double[count];
        Span<int> unknowns = onEdge <= OnStack ? stackalloc int[OnStack] : new int[onEdge];
        layout.UnknownsOnEdge(element.Cell, edge, unknowns);
        element.Values(ReferenceCell.PointOnEdge(element.Cell, edge, parameter), all);
        for (int i = 0; i < values.Length; i++)
        {
            values[i] = all[unknowns[i]];
        }
    }
}
