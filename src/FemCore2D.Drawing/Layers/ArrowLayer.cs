using System.Collections.Immutable;
using FemCore2D.Geometry;
using SkiaSharp;

namespace FemCore2D.Drawing;

/// <summary>A vector as arrows on a regular grid, each with its middle at its grid point; names of lower layers are spared.</summary>
public sealed record ArrowLayer : Layer
{
    private const int ColourBands = 10;
    private readonly double spacing = 15;

    /// <summary>Creates the layer.</summary>
    /// <param name="vector">What is drawn.</param>
    public ArrowLayer(CellVector vector)
    {
        ArgumentNullException.ThrowIfNull(vector);
        Vector = vector;
    }

    /// <summary>What is drawn.</summary>
    public CellVector Vector { get; }

    /// <summary>The distance between arrows, in points of the page.</summary>
    /// <exception cref="ArgumentOutOfRangeException">The distance is not from 2 to 1000 points.</exception>
    public double Spacing
    {
        get => spacing;
        init => spacing = value is >= 2 and <= 1000
            ? value
            : throw new ArgumentOutOfRangeException(nameof(Spacing), value, "Arrows stand 2 to 1000 points apart.");
    }

    /// <summary>What the length of an arrow shows.</summary>
    public ArrowSizing Sizing { get; init; }

    /// <summary>The colours that show the magnitude, with a scale bar; null for arrows of one colour.</summary>
    public ColourScale? Colours { get; init; }

    /// <summary>The colour of arrows of one colour.</summary>
    public Colour Colour { get; init; } = Ink.Text;

    /// <summary>What the vector is, for the legend or scale bar; with neither label nor unit there is no legend.</summary>
    public string Label { get; init; } = "";

    /// <summary>The unit of its magnitude.</summary>
    public string Unit { get; init; } = "";

    internal override Box2D Extent => Sight.BoundsOf(Vector.Mesh);

    internal override bool HasScaleBar => Colours is not null;

    private float LongestArrow => (float)(0.92 * Spacing);

    internal override BandScale? ScaleIn(PlotFrame frame)
    {
        if (Colours is null)
            return null;
        List<(SKPoint Place, Vector2D Value)> samples = GridSampler.Sample(Vector, frame, Spacing);
        if (samples.Count == 0)
            return null;
        double high = samples.Max(sample => sample.Value.Length);
        ImmutableArray<double> edges = LevelChoice.BandEdges(0, high, ColourBands, ValueSpacing.Linear, null, Unit);
        return BandScale.Make(edges, 0, high, Colours, Label, Unit, isLogarithmic: false);
    }

    internal override IEnumerable<LegendItem> LegendIn(PlotFrame frame)
    {
        if (Sizing == ArrowSizing.Equal || Colours is not null || (Label.Length == 0 && Unit.Length == 0))
            yield break;
        double reach = ReachOf(GridSampler.Sample(Vector, frame, Spacing));
        if (!(reach > 0))
            yield break;
        double shown = RoundSteps.StepFor(reach, 1.25);
        while (shown > reach)
            shown /= 2;
        UnitPrefix prefix = UnitPrefix.For(Unit, shown);
        string measure = $"{NumberText.Short(shown / prefix.Factor)} {prefix.Unit}".TrimEnd();
        yield return new LegendItem(
            Label.Length == 0 ? measure : $"{Label}: {measure}", Ink.Text, (float)(LongestArrow * shown / reach));
    }

    internal override void Draw(Surface surface, PlotFrame frame)
    {
        List<(SKPoint Place, Vector2D Value)> samples = GridSampler.Sample(Vector, frame, Spacing);
        double reach = ReachOf(samples);
        if (!(reach > 0))
            return;
        BandScale? scale = ScaleIn(frame);
        int bandCount = scale?.Colours.Length ?? 1;
        for (int band = 0; band < bandCount; band++)
        {
            // Arrows of one colour are one path, which keeps files of shapes small.
            using var builder = new SKPathBuilder();
            foreach ((SKPoint place, Vector2D value) in samples)
            {
                double size = value.Length;
                if (size < 1e-12 * reach || !frame.IsFree(SKRect.Create(place.X - 1, place.Y - 1, 2, 2)) || (scale is not null && BandOf(scale, size) != band))
                    continue;
                double length = Sizing == ArrowSizing.Equal ? 0.8 * LongestArrow : LongestArrow * Math.Min(1, size / reach);
                if (length >= 1)
                    ArrowShape.Add(builder, place, value / size, length);
            }

            using SKPath path = builder.Detach();
            surface.Fill(path, scale?.Colours[band] ?? Colour);
        }
    }

    /// <summary>The magnitude of the longest arrow: that of all but the largest few, so that one peak does not dwarf the rest.</summary>
    private static double ReachOf(List<(SKPoint Place, Vector2D Value)> samples)
    {
        double[] sizes = [.. samples.Select(sample => sample.Value.Length).Where(size => size > 0).Order()];
        return sizes.Length == 0 ? 0 : sizes[Math.Min(sizes.Length - 1, (int)(0.97 * sizes.Length))];
    }

    private static int BandOf(BandScale scale, double size)
    {
        int band = 0;
        while (band + 1 < scale.Colours.Length && size >= scale.Edges[band + 1])
            band++;
        return band;
    }
}
