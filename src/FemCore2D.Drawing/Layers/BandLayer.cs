using SkiaSharp;

namespace FemCore2D.Drawing;

/// <summary>A scalar in bands of colour between round levels, with a scale bar.</summary>
/// <remarks>
/// A band is the area between two level lines, filled as one shape; so it has no seams between cells, and a file of
/// shapes grows with the length of the level lines rather than with the number of cells.
/// Where the scalar has no value (NaN) the ground shows through.
/// </remarks>
public sealed record BandLayer : Layer
{
    private readonly int count = 12;

    /// <summary>Creates the layer.</summary>
    /// <param name="scalar">What is drawn.</param>
    /// <exception cref="InvalidFigureException">The mesh has no cells.</exception>
    public BandLayer(CellScalar scalar)
    {
        ArgumentNullException.ThrowIfNull(scalar);
        Checked(scalar.Mesh);
        Scalar = scalar;
    }

    /// <summary>What is drawn.</summary>
    public CellScalar Scalar { get; }

    /// <summary>What the scale bar says the scalar is, such as <c>Potential</c>.</summary>
    public string Label { get; init; } = "";

    /// <summary>The unit of the values, such as <c>V/m</c>; the scale bar adds the prefix that suits.</summary>
    public string Unit { get; init; } = "";

    /// <summary>The colours.</summary>
    public ColourScale Colours { get; init; } = ColourScale.Undertow;

    /// <summary>About how many bands; the levels between them are round numbers.</summary>
    /// <exception cref="ArgumentOutOfRangeException">The number is not from 1 to 1000.</exception>
    public int Count
    {
        get => count;
        init => count = CheckedCount(value, nameof(Count));
    }

    /// <summary>How the levels follow each other.</summary>
    public ValueSpacing Spacing { get; init; }

    /// <summary>The range that the colours cover; by default that of the values seen. Values beyond get the end colours.</summary>
    public ValueRange? Range { get; init; }

    /// <summary>
    /// Whether values that differ between cells of one region, such as gradients, are averaged where the cells meet.
    /// Values always jump freely between regions. Without averaging every jump is shown as it is.
    /// </summary>
    public bool AveragesInRegions { get; init; } = true;

    /// <summary>Whether a scale bar is drawn.</summary>
    public bool ShowsScaleBar { get; init; } = true;

    internal override ViewWindow? Extent => RegionBorders.BoundsOf(Scalar.Mesh);

    internal override bool HasScaleBar => ShowsScaleBar;

    internal override BandScale? ScaleIn(PlotFrame frame)
    {
        FacetMesh facets = frame.FacetsOf(Scalar, AveragesInRegions);
        if (double.IsNaN(facets.Minimum))
            return null;
        bool isLogarithmic = Spacing == ValueSpacing.Logarithmic && (Range?.High ?? facets.Maximum) > 0;
        return BandScale.Make(
            LevelChoice.BandEdges(facets.Minimum, facets.Maximum, Count, Spacing, Range),
            facets.Minimum,
            facets.Maximum,
            Colours,
            Label,
            Unit,
            isLogarithmic);
    }

    internal override void Draw(Surface surface, PlotFrame frame)
    {
        if (ScaleIn(frame) is not { } scale)
            return;
        FacetMesh facets = frame.FacetsOf(Scalar, AveragesInRegions);

        // Each band is laid over the one below it, which reaches under it: no ground shows between them.
        for (int band = 0; band < scale.Colours.Length; band++)
        {
            double level = band == 0 ? double.NegativeInfinity : scale.Edges[band];
            if (level > facets.Maximum)
                break;
            if (band + 1 < scale.Colours.Length && scale.Edges[band + 1] <= facets.Minimum)
                continue;
            using SKPath area = frame.PathOf(LevelTracer.OutlinesAbove(facets, level));
            surface.Fill(area, scale.Colours[band]);
        }
    }
}
