using System.Collections.Immutable;
using FemCore2D.Geometry;
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
    public BandLayer(CellScalar scalar)
    {
        ArgumentNullException.ThrowIfNull(scalar);
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

    /// <summary>
    /// The range that the colours cover; by default that of the values seen. Values beyond it get the end colours; on a
    /// cyclic scale the range is the period, so that values beyond it begin anew.
    /// </summary>
    public ValueRange? Range { get; init; }

    /// <summary>
    /// Whether values that differ between cells of one region, such as gradients, are averaged where the cells meet.
    /// Values always jump freely between regions. Without averaging every jump is shown as it is.
    /// </summary>
    public bool AveragesInRegions { get; init; } = true;

    /// <summary>Whether a scale bar is drawn.</summary>
    public bool ShowsScaleBar { get; init; } = true;

    internal override Box2D Extent => Sight.BoundsOf(Scalar.Mesh);

    internal override bool HasScaleBar => ShowsScaleBar;

    /// <summary>Whether values that differ by the whole range are the same, as on a cyclic scale with a given range.</summary>
    private bool IsPeriodic => Colours.Kind == ColourScaleKind.Cyclic && Range is not null;

    internal override BandScale? ScaleIn(PlotFrame frame)
    {
        FacetMesh facets = FacetsIn(frame);
        if (double.IsNaN(facets.Minimum))
            return null;
        bool isLogarithmic = Spacing == ValueSpacing.Logarithmic && (Range?.High ?? facets.Maximum) > 0;
        ImmutableArray<double> edges = LevelChoice.BandEdges(facets.Minimum, facets.Maximum, Count, Spacing, Range, Unit);
        (double low, double high) = IsPeriodic ? (edges[0], edges[^1]) : (facets.Minimum, facets.Maximum);
        return BandScale.Make(edges, low, high, Colours, Label, Unit, isLogarithmic);
    }

    internal override void Draw(Surface surface, PlotFrame frame)
    {
        if (ScaleIn(frame) is not { } scale)
            return;
        FacetMesh facets = FacetsIn(frame);
        double period = IsPeriodic ? scale.Edges[^1] - scale.Edges[0] : 0;
        int bands = scale.Colours.Length;
        int first = IsPeriodic ? bands * (int)Math.Floor((facets.Minimum - scale.Edges[0]) / period) : 0;
        int end = IsPeriodic ? bands * (int)Math.Ceiling((facets.Maximum - scale.Edges[0]) / period) : bands;

        // Each band is laid over the one below it, which reaches under it: no ground shows between them.
        bool isGround = true;
        for (int band = first; band < Math.Max(end, first + 1); band++)
        {
            if (band + 1 < end && LowerEdge(band + 1) <= facets.Minimum)
                continue;
            double level = isGround ? double.NegativeInfinity : LowerEdge(band);
            if (level > facets.Maximum)
                break;
            using SKPath area = frame.PathOf(LevelTracer.OutlinesAbove(facets, level));
            surface.Fill(area, scale.Colours[((band % bands) + bands) % bands]);
            isGround = false;
        }

        double LowerEdge(int band)
        {
            int turns = (int)Math.Floor((double)band / bands);
            return scale.Edges[band - (turns * bands)] + (turns * period);
        }
    }

    private FacetMesh FacetsIn(PlotFrame frame) => IsPeriodic
        ? frame.PeriodicFacetsOf(Scalar, Range!.Value)
        : frame.FacetsOf(Scalar, AveragesInRegions);
}
