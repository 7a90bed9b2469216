using FemCore2D.Elements;
using FemCore2D.Geometry;

namespace FemCore2D.Assembly;

/// <summary>All that integration over cells of one kind needs to know of their element. Tables are made at first use.</summary>
internal sealed class CellTables
{
    /// <summary>The highest degree for which there are quadrature rules.</summary>
    public const int HighestDegree = QuadratureRule.MaximumDegree;

    private readonly ChannelTable?[] tables = new ChannelTable?[HighestDegree + 1];
    private ChannelIntegrals? integrals;

    public CellTables(INodeElement element)
    {
        Element = element;
        Count = element.UnknownCount;
        Stride = ChannelTable.Padded(Count);
        Centre = ReferenceCell.Centre(element.Cell);
        ReferenceArea = ReferenceCell.Area(element.Cell);
    }

    public INodeElement Element { get; }

    public int Count { get; }

    public int Stride { get; }

    /// <summary>The middle of the reference cell.</summary>
    public Point2D Centre { get; }

    public double ReferenceArea { get; }

    public ChannelIntegrals Integrals => integrals ??= new ChannelIntegrals(Rule(2 * Element.Degree));

    /// <summary>The shape functions at the points of the rule of a degree.</summary>
    public ChannelTable Rule(int degree)
    {
        ChannelTable? table = Volatile.Read(ref tables[degree]);
        if (table is null)
        {
            // Two threads may both make it; the tables are equal, and one of them stays.
            var rule = QuadratureRule.For(Element.Cell, degree);
            table = new ChannelTable(Element, rule.Points, rule.Weights);
            Volatile.Write(ref tables[degree], table);
        }

        return table;
    }
}
