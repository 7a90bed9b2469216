namespace FemCore2D.Elements;

/// <summary>
/// The values of an edge's shape functions along it, tabulated at the points of an edge rule. All edges of a cell
/// share one table, since the traces of a node element depend on the local direction alone. Immutable.
/// </summary>
public sealed class TraceTable
{
    private readonly double[] values;

    /// <summary>Tabulates the traces of an element at the points of a rule.</summary>
    public TraceTable(INodeElement element, EdgeRule rule)
    {
        ArgumentNullException.ThrowIfNull(element);
        ArgumentNullException.ThrowIfNull(rule);
        Element = element;
        Rule = rule;
        UnknownCount = element.Layout.OnClosedEdge;
        values = new double[rule.Count * UnknownCount];
        for (int q = 0; q < rule.Count; q++)
        {
            element.EdgeValues(0, rule.Parameters[q], values.AsSpan(q * UnknownCount, UnknownCount));
        }
    }

    /// <summary>The element.</summary>
    public INodeElement Element { get; }

    /// <summary>The rule.</summary>
    public EdgeRule Rule { get; }

    /// <summary>The number of points.</summary>
    public int PointCount => Rule.Count;

    /// <summary>The number of shape functions that an edge holds: those of its start, of its end, then its own.</summary>
    public int UnknownCount { get; }

    /// <summary>All values: that of function <c>i</c> at point <c>q</c> stands at <c>q * UnknownCount + i</c>.</summary>
    public ReadOnlySpan<double> Values => values;

    /// <summary>The values of the edge's shape functions at one point of the rule.</summary>
    public ReadOnlySpan<double> ValuesAt(int point) => values.AsSpan(point * UnknownCount, UnknownCount);
}
