using System.Collections.Immutable;
using SkiaSharp;

namespace FemCore2D.Drawing;

/// <summary>
/// A picture of one or more panels, described once and drawn the same way to PNG, SVG, PDF or any canvas.
/// </summary>
/// <remarks>
/// Sizes are in points (1/72 inch). An image is the same page in more or fewer pixels. Drawing reads the figure only;
/// it may happen on many threads at once.
/// </remarks>
public sealed partial record Figure
{
    private readonly double width = 480;
    private readonly double? height;
    private readonly int? columns;

    /// <summary>Creates a figure of panels side by side.</summary>
    /// <param name="panels">The panels, row by row.</param>
    public Figure(params ReadOnlySpan<Panel> panels)
    {
        foreach (Panel panel in panels)
            ArgumentNullException.ThrowIfNull(panel, nameof(panels));
        Panels = [.. panels];
    }

    /// <summary>Creates a figure of one panel.</summary>
    /// <param name="layers">The layers of the panel, the lowest first.</param>
    public Figure(params ReadOnlySpan<Layer> layers)
        : this(new Panel(layers))
    {
    }

    /// <summary>The panels, row by row.</summary>
    public ImmutableArray<Panel> Panels { get; init; }

    /// <summary>A title above all panels; empty for none.</summary>
    public string Title { get; init; } = "";

    /// <summary>The width of the page in points.</summary>
    /// <exception cref="ArgumentOutOfRangeException">The width is not from 36 to 14400 points.</exception>
    public double Width
    {
        get => width;
        init => width = CheckedSize(value, nameof(Width));
    }

    /// <summary>The height of the page in points; by default what the contents need.</summary>
    /// <exception cref="ArgumentOutOfRangeException">The height is not from 36 to 14400 points.</exception>
    public double? Height
    {
        get => height;
        init => height = value is { } given ? CheckedSize(given, nameof(Height)) : null;
    }

    /// <summary>The number of panels in a row; by default all up to three, else about as many as rows.</summary>
    /// <exception cref="ArgumentOutOfRangeException">The number is below one.</exception>
    public int? Columns
    {
        get => columns;
        init => columns = value is null or >= 1
            ? value
            : throw new ArgumentOutOfRangeException(nameof(Columns), value, "A row holds at least one panel.");
    }

    /// <summary>The ground; null for a transparent one.</summary>
    public Colour? Background { get; init; } = Colour.White;

    /// <summary>Draws the figure on a canvas whose unit is one point.</summary>
    /// <param name="canvas">The canvas; its origin becomes the upper left corner of the page.</param>
    /// <param name="pixelsPerPoint">How finely curves are drawn: the device pixels of one point.</param>
    /// <returns>The size of the page in points.</returns>
    /// <exception cref="InvalidFigureException">There is nothing to draw, or no room for it.</exception>
    public SKSize DrawOn(SKCanvas canvas, double pixelsPerPoint = 2)
    {
        ArgumentNullException.ThrowIfNull(canvas);
        if (!(pixelsPerPoint > 0 && pixelsPerPoint <= 100))
            throw new ArgumentOutOfRangeException(nameof(pixelsPerPoint), pixelsPerPoint, "A point has more than 0 and at most 100 pixels.");
        FigureLayout layout = FigureLayout.Arrange(this, pixelsPerPoint);
        layout.Draw(new Surface(canvas, pixelsPerPoint, isVector: false, writesGlyphs: true));
        return layout.Size;
    }

    private static double CheckedSize(double size, string name) => size is >= 36 and <= 14400
        ? size
        : throw new ArgumentOutOfRangeException(name, size, "A page measures 36 to 14400 points each way.");
}
