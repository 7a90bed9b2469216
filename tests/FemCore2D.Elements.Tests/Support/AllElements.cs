using FemCore2D.Geometry;

namespace FemCore2D.Elements.Tests;

/// <summary>Every node element of the library.</summary>
internal static class AllElements
{
    public static IReadOnlyList<INodeElement> List { get; } =
    [
        .. Enumerable.Range(1, 5).Select(p => NodeElement.Lagrange(CellKind.Triangle, p)),
        .. Enumerable.Range(1, 3).Select(p => NodeElement.Lagrange(CellKind.Quadrilateral, p)),
    ];

    /// <summary>Cell and degree of each, for theories.</summary>
    public static TheoryData<CellKind, int> Names()
    {
        TheoryData<CellKind, int> data = [];
        foreach (INodeElement element in List)
        {
            data.Add(element.Cell, element.Degree);
        }

        return data;
    }

    public static double[] ValuesAt(INodeElement element, Point2D point)
    {
        double[] values = new double[element.UnknownCount];
        element.Values(point, values);
        return values;
    }

    public static Vector2D[] GradientsAt(INodeElement element, Point2D point)
    {
        Vector2D[] gradients = new Vector2D[element.UnknownCount];
        element.Gradients(point, gradients);
        return gradients;
    }

    /// <summary>The exponents of all monomials that an element holds.</summary>
    public static IEnumerable<(int I, int J)> Monomials(CellKind cell, int degree) =>
        from i in Enumerable.Range(0, degree + 1)
        from j in Enumerable.Range(0, degree + 1)
        where cell == CellKind.Quadrilateral || i + j <= degree
        select (i, j);
}
