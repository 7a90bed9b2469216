using FemCore2D.Geometry;

namespace FemCore2D.Elements;

/// <summary>
/// The shape functions of a node element and their gradients, tabulated at the points of a quadrature rule for loops
/// over many cells. Immutable; one table serves all threads.
/// </summary>
public sealed class ShapeTable
{
    private readonly double[] values;
    private readonly Vector2D[] gradients;

    /// <summary>Tabulates an element at the points of a rule.</summary>
    /// <param name="element">The element.</param>
    /// <param name="rule">The rule, of the same shape of cell.</param>
    /// <exception cref="ArgumentException">Element and rule belong to different shapes.</exception>
    public ShapeTable(INodeElement element, QuadratureRule rule)
    {
        ArgumentNullException.ThrowIfNull(element);
        ArgumentNullException.ThrowIfNull(rule);
        if (element.Cell != rule.Cell)
        {
            throw new ArgumentException(
                $"The element lives on a {element.Cell}, but the rule on a {rule.Cell}. Take a rule of the element's cell.",
                nameof(rule));
        }

        Element = element;
        Rule = rule;
        values = new double[rule.Count * element.UnknownCount];
        gradients = new Vector2D[rule.Count * element.UnknownCount];
        element.Values(rule.Points, values);
        element.Gradients(rule.Points, gradients);
    }

    /// <summary>The element.</summary>
    public INodeElement Element { get; }

    /// <summary>The rule.</summary>
    public QuadratureRule Rule { get; }

    /// <summary>The number of points.</summary>
    public int PointCount => Rule.Count;

    /// <summary>The number of shape functions.</summary>
    public int UnknownCount => Element.UnknownCount;

    /// <summary>All values: that of function <c>i</c> at point <c>q</c> stands at <c>q * UnknownCount + i</c>.</summary>
    public ReadOnlySpan<double> Values => values;

    /// <summary>All gradients, in reference coordinates, in the order of <see cref="Values"/>.</summary>
    public ReadOnlySpan<Vector2D> Gradients => gradients;

    /// <summary>The values of all shape functions at one point of the rule.</summary>
    public ReadOnlySpan<double> ValuesAt(int point) => values.AsSpan(point * UnknownCount, UnknownCount);

    /// <summary>The gradients of all shape functions, in reference coordinates, at one point of the rule.</summary>
    public ReadOnlySpan<Vector2D> GradientsAt(int point) => gradients.AsSpan(point * UnknownCount, UnknownCount);
}
