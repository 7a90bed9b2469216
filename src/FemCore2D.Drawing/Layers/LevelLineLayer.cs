using System.Collections.Immutable;
using FemCore2D.Geometry;
using SkiaSharp;

namespace FemCore2D.Drawing;

/// <summary>Lines along which a scalar has the same value, such as equipotential lines.</summary>
public sealed record LevelLineLayer : Layer
{
    private readonly int count = 12;
    private readonly float width = 0.5f;
    private readonly ImmutableArray<double> levels = [];

    /// <summary>Creates the layer.</summary>
    /// <param name="scalar">What is drawn.</param>
    public LevelLineLayer(CellScalar scalar)
    {
        ArgumentNullException.ThrowIfNull(scalar);
        Scalar = scalar;
    }

    /// <summary>What is drawn.</summary>
    public CellScalar Scalar { get; }

    /// <summary>About how many lines, at round values; the same number as in a band layer gives lines at its band edges.</summary>
    /// <exception cref="ArgumentOutOfRangeException">The number is not from 1 to 1000.</exception>
    public int Count
    {
        get => count;
        init => count = CheckedCount(value, nameof(Count));
    }

    /// <summary>The values of the lines; when empty, round ones are chosen.</summary>
    /// <exception cref="ArgumentException">A value is not finite.</exception>
    public ImmutableArray<double> Levels
    {
        get => levels;
        init => levels = value.IsDefault ? [] : value.All(double.IsFinite)
            ? [.. value.Distinct().Order()]
            : throw new ArgumentException("Every level must be a finite number.", nameof(Levels));
    }

    /// <summary>How the levels follow each other.</summary>
    public ValueSpacing Spacing { get; init; }

    /// <summary>The range in which levels are chosen; by default that of the values seen.</summary>
    public ValueRange? Range { get; init; }

    /// <summary>The colour of the lines.</summary>
    public Colour Colour { get; init; } = Ink.Outline.WithOpacity(0.75);

    /// <summary>The width of the lines in points.</summary>
    /// <exception cref="ArgumentOutOfRangeException">The width is not from 0 to 100.</exception>
    public double Width
    {
        get => width;
        init => width = CheckedWidth(value, nameof(Width));
    }

    /// <summary>Whether the lines carry their values, where there is room.</summary>
    public bool ShowsValues { get; init; }

    /// <summary>The unit of the values, which tells the prefix and is written with them.</summary>
    public string Unit { get; init; } = "";

    /// <summary>Whether values that differ between cells of one region are averaged where the cells meet.</summary>
    public bool AveragesInRegions { get; init; } = true;

    internal override Box2D Extent => Sight.BoundsOf(Scalar.Mesh);

    internal override void Draw(Surface surface, PlotFrame frame)
    {
        FacetMesh facets = frame.FacetsOf(Scalar, AveragesInRegions);
        if (double.IsNaN(facets.Minimum))
            return;
        ImmutableArray<double> values = !Levels.IsEmpty
            ? Levels
            : LevelChoice.LineLevels(facets.Minimum, facets.Maximum, Count, Spacing, Range, Unit);
        if (values.IsEmpty)
            return;
        UnitPrefix prefix = UnitPrefix.For(Unit, values.Max(Math.Abs));
        int decimals = NumberText.DecimalsFor(values.Select(value => value / prefix.Factor));
        var all = new List<Polyline>();
        var texts = new List<LineText>();
        foreach (double level in values)
        {
            List<Polyline> lines = LevelTracer.Lines(facets, level);
            all.AddRange(lines);
            if (!ShowsValues)
                continue;
            string number = Spacing == ValueSpacing.Logarithmic
                ? NumberText.Short(level / prefix.Factor)
                : NumberText.Fixed(level / prefix.Factor, decimals);
            string text = prefix.Unit.Length == 0 ? number : $"{number} {prefix.Unit}";
            if (LineText.Place(text, lines, frame) is { } placed)
                texts.Add(placed);
        }

        surface.Canvas.Save();
        foreach (LineText text in texts)
            text.ClipOut(surface.Canvas);
        using (SKPath path = frame.PathOf(all))
            surface.Stroke(path, Colour, width);
        surface.Canvas.Restore();
        foreach (LineText text in texts)
            text.Draw(surface, Colour.WithOpacity(1));
    }
}
