using SkiaSharp;

namespace FemCore2D.Drawing;

/// <summary>The places of all parts of a figure on its page.</summary>
internal sealed class FigureLayout
{
    private const float Margin = 10;
    private const float Gap = 14;
    private const float TitleBand = 20;

    private readonly string title;

    private FigureLayout(string title, List<PanelLayout> panels, SKSize size)
    {
        this.title = title;
        Panels = panels;
        Size = size;
    }

    public IReadOnlyList<PanelLayout> Panels { get; }

    /// <summary>The size of the page in points.</summary>
    public SKSize Size { get; }

    public static FigureLayout Arrange(Figure figure, double pixelsPerPoint)
    {
        if (figure.Panels.IsDefaultOrEmpty)
            throw new InvalidFigureException("The figure has no panels, so there is nothing to draw. Give it at least one.");
        int count = figure.Panels.Length;
        int columns = Math.Min(count, figure.Columns ?? (count <= 3 ? count : (int)Math.Ceiling(Math.Sqrt(count))));
        int rows = (count + columns - 1) / columns;
        float pageWidth = (float)figure.Width;
        float top = Margin + (figure.Title.Length > 0 ? TitleBand : 0);
        float cellWidth = (pageWidth - (2 * Margin) - ((columns - 1) * Gap)) / columns;
        float cellHeight = figure.Height is { } given
            ? ((float)given - top - Margin - ((rows - 1) * Gap)) / rows
            : float.PositiveInfinity;

        var arranged = new List<PanelLayout>();
        float y = top;
        for (int row = 0; row < rows; row++)
        {
            var inRow = new List<PanelLayout>();
            for (int i = row * columns; i < Math.Min(count, (row + 1) * columns); i++)
            {
                float x = Margin + ((i - (row * columns)) * (cellWidth + Gap));
                inRow.Add(PanelLayout.Arrange(figure.Panels[i], x, y, cellWidth, cellHeight, pixelsPerPoint));
            }

            arranged.AddRange(inRow);
            y += (float.IsFinite(cellHeight) ? cellHeight : inRow.Max(panel => panel.Height)) + Gap;
        }

        float pageHeight = figure.Height is { } fixedHeight ? (float)fixedHeight : y - Gap + Margin;
        return new FigureLayout(figure.Title, arranged, new SKSize(pageWidth, pageHeight));
    }

    public void Draw(Surface surface)
    {
        var style = new TextStyle(Ink.TitleSize, Ink.Text, IsBold: true);
        surface.Write(title, Margin, Margin + 6, Anchor.Start, style);
        foreach (PanelLayout panel in Panels)
            panel.Draw(surface);
    }
}
