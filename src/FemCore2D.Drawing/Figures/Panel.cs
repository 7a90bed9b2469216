using System.Collections.Immutable;
using FemCore2D.Geometry;

namespace FemCore2D.Drawing;

/// <summary>One pair of axes with layers drawn over each other, to the same scale both ways.</summary>
public sealed record Panel
{
    private readonly Box2D? view;

    /// <summary>Creates a panel.</summary>
    /// <param name="layers">The layers, the lowest first.</param>
    public Panel(params ReadOnlySpan<Layer> layers)
    {
        foreach (Layer layer in layers)
            ArgumentNullException.ThrowIfNull(layer, nameof(layers));
        Layers = [.. layers];
    }

    /// <summary>The layers, the lowest first.</summary>
    public ImmutableArray<Layer> Layers { get; init; }

    /// <summary>A title above the panel; empty for none.</summary>
    public string Title { get; init; } = "";

    /// <summary>The part of the plane that is seen; by default all layers with a narrow margin.</summary>
    /// <exception cref="ArgumentOutOfRangeException">The box is not finite, or has no width or height.</exception>
    public Box2D? View
    {
        get => view;
        init => view = value is not { } box || (box.Lower.IsFinite && box.Upper.IsFinite && box.Width > 0 && box.Height > 0)
            ? value
            : throw new ArgumentOutOfRangeException(nameof(View), value, "The view is a finite box with a width and a height.");
    }

    /// <summary>The name of the first coordinate.</summary>
    public string HorizontalName { get; init; } = "x";

    /// <summary>The name of the second coordinate.</summary>
    public string VerticalName { get; init; } = "y";

    /// <summary>Whether axes with their numbers are drawn.</summary>
    public bool ShowsAxes { get; init; } = true;

    /// <summary>The window that is seen.</summary>
    internal Box2D Window()
    {
        if (Layers.IsDefaultOrEmpty)
            throw new InvalidFigureException("A panel has no layers, so there is nothing to draw. Give it at least one.");
        if (View is { } chosen)
            return chosen;
        Box2D all = Layers.Aggregate(Box2D.Empty, (box, layer) => box.Union(layer.Extent));
        return all.Width > 0 && all.Height > 0
            ? all.Widened(0.02 * Math.Max(all.Width, all.Height))
            : throw new InvalidFigureException(
                "No layer of a panel has an extent of its own. Add a layer that shows a mesh or field, or choose the view.");
    }
}
