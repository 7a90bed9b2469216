using System.Collections.Immutable;

namespace FemCore2D.Drawing;

/// <summary>One pair of axes with layers drawn over each other, to the same scale both ways.</summary>
public sealed record Panel
{
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
    public ViewWindow? View { get; init; }

    /// <summary>The name of the first coordinate.</summary>
    public string HorizontalName { get; init; } = "x";

    /// <summary>The name of the second coordinate.</summary>
    public string VerticalName { get; init; } = "y";

    /// <summary>Whether axes with their numbers are drawn.</summary>
    public bool ShowsAxes { get; init; } = true;

    /// <summary>The window that is seen.</summary>
    internal ViewWindow Window()
    {
        if (Layers.IsDefaultOrEmpty)
            throw new InvalidFigureException("A panel has no layers, so there is nothing to draw. Give it at least one.");
        if (View is { } chosen)
        {
            return chosen.Width > 0 && chosen.Height > 0
                ? chosen
                : throw new InvalidFigureException("The view window of a panel has no size. Create it from its four sides.");
        }

        ViewWindow? all = null;
        foreach (Layer layer in Layers)
        {
            if (layer.Extent is not { } one)
                continue;
            all = all is not { } so
                ? one
                : new ViewWindow(
                    Math.Min(so.Left, one.Left),
                    Math.Min(so.Bottom, one.Bottom),
                    Math.Max(so.Right, one.Right),
                    Math.Max(so.Top, one.Top));
        }

        return all?.Widened(0.02) ?? throw new InvalidFigureException(
            "No layer of a panel has an extent of its own. Add a layer that shows a mesh or field, or choose the view window.");
    }
}
