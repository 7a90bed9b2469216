using FemCore2D.Geometry;

namespace FemCore2D.Drawing;

/// <summary>A part of a picture, drawn over the layers before it.</summary>
public abstract record Layer
{
    private protected Layer()
    {
    }

    /// <summary>The window that holds everything in the layer; the empty box when it has no extent of its own.</summary>
    internal abstract Box2D Extent { get; }

    /// <summary>Whether a scale bar stands beside the panel for the layer.</summary>
    internal virtual bool HasScaleBar => false;

    internal abstract void Draw(Surface surface, PlotFrame frame);

    /// <summary>The bands for the scale bar; null when there is no value to show.</summary>
    internal virtual BandScale? ScaleIn(PlotFrame frame) => null;

    /// <summary>What the legend must explain.</summary>
    internal virtual IEnumerable<LegendItem> LegendIn(PlotFrame frame) => [];

    private protected static float CheckedWidth(double width, string name) =>
        width >= 0 && width <= 100
            ? (float)width
            : throw new ArgumentOutOfRangeException(name, width, "A line is from 0 (not drawn) to 100 points wide.");

    private protected static int CheckedCount(int count, string name) =>
        count is >= 1 and <= 1000
            ? count
            : throw new ArgumentOutOfRangeException(name, count, "Ask for 1 to 1000 levels.");
}
