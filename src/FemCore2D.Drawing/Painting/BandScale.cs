using System.Collections.Immutable;

namespace FemCore2D.Drawing;

/// <summary>Bands of values with their colours, as drawn in a panel and in its scale bar.</summary>
internal sealed class BandScale
{
    /// <summary>The edges of the bands, ascending: one more than colours.</summary>
    public required ImmutableArray<double> Edges { get; init; }

    public required ImmutableArray<Colour> Colours { get; init; }

    /// <summary>Whether there are values below the first edge, which then have the first colour.</summary>
    public required bool GoesBelow { get; init; }

    /// <summary>Whether there are values above the last edge.</summary>
    public required bool GoesAbove { get; init; }

    public required string Label { get; init; }

    public required string Unit { get; init; }

    /// <summary>Whether the texts at the edges need their own precision each, as on logarithmic scales.</summary>
    public required bool IsLogarithmic { get; init; }

    public static BandScale Make(
        ImmutableArray<double> edges, double low, double high, ColourScale colours, string label, string unit, bool isLogarithmic)
    {
        int count = edges.Length - 1;
        var bands = ImmutableArray.CreateBuilder<Colour>(count);
        double first = edges[0];
        double last = edges[^1];
        double reach = Math.Max(Math.Abs(first), Math.Abs(last));
        for (int i = 0; i < count; i++)
        {
            double middle = (edges[i] + edges[i + 1]) / 2;
            double fraction = isLogarithmic ? (i + 0.5) / count
                : colours.Kind == ColourScaleKind.Diverging ? 0.5 + (0.5 * middle / reach)
                : count == 1 ? 0.5
                : (middle - first) / (last - first);
            bands.Add(colours.At(fraction));
        }

        double slack = 1e-9 * (last - first);
        return new BandScale
        {
            Edges = edges,
            Colours = bands.MoveToImmutable(),
            GoesBelow = low < first - slack,
            GoesAbove = high > last + slack,
            Label = label,
            Unit = unit,
            IsLogarithmic = isLogarithmic,
        };
    }

    /// <summary>The unit in which the edges are written.</summary>
    public UnitPrefix Prefix => UnitPrefix.For(Unit, Math.Max(Math.Abs(Edges[0]), Math.Abs(Edges[^1])));

    /// <summary>The text at each edge.</summary>
    public ImmutableArray<string> Texts()
    {
        double factor = Prefix.Factor;
        if (IsLogarithmic)
            return [.. Edges.Select(edge => NumberText.Compact(edge / factor))];

        // Ends that were asked for may be no round numbers: they do not set the decimals of the others.
        IEnumerable<double> inner = Edges.Length > 3 ? Edges.Skip(1).SkipLast(1) : Edges;
        int decimals = NumberText.DecimalsFor(inner.Select(edge => edge / factor));
        return [.. Edges.Select(edge => NumberText.Fixed(edge / factor, decimals))];
    }
}
