using FemCore2D.Geometry;
using SkiaSharp;

namespace FemCore2D.Drawing;

/// <summary>The places of all parts of a panel on the page.</summary>
internal sealed class PanelLayout
{
    private const float TitleBand = 16;
    private const float SideBarRoom = 62;
    private const float FlatBarRoom = 38;
    private const float LeastSide = 8;
    private const float LargestAspect = 1.5f;
    private const float FlatAspect = 0.42f;

    private readonly Panel panel;
    private readonly AxisPair? axes;
    private readonly Legend legend;
    private readonly bool hasFlatBars;

    private PanelLayout(Panel panel, PlotFrame frame, AxisPair? axes, Legend legend, bool hasFlatBars, float height)
    {
        this.panel = panel;
        Frame = frame;
        this.axes = axes;
        this.legend = legend;
        this.hasFlatBars = hasFlatBars;
        Height = height;
    }

    /// <summary>Where the plane lies on the page.</summary>
    public PlotFrame Frame { get; }

    /// <summary>The height that the panel takes, in points.</summary>
    public float Height { get; }

    public static PanelLayout Arrange(Panel panel, float x, float y, float width, float height, double pixelsPerPoint)
    {
        Box2D view = panel.Window();
        IReadOnlyList<LegendItem> items = [];
        PlotFrame? known = null;

        // What the legend must hold depends on the size of the plot, which depends on the legend: it soon settles.
        for (int round = 0; ; round++)
        {
            PanelLayout layout = Place(panel, view, items, x, y, width, height, pixelsPerPoint, known);
            known = layout.Frame;
            List<LegendItem> wanted = [.. panel.Layers.SelectMany(layer => layer.LegendIn(layout.Frame))];
            if (round == 2 || wanted.All(item => items.Any(old => old.Text == item.Text)))
                return layout;
            items = wanted;
        }
    }

    public void Draw(Surface surface)
    {
        if (panel.Title.Length > 0)
        {
            var style = new TextStyle(Ink.PanelTitleSize, Ink.Text, IsBold: true);
            surface.Write(panel.Title, Frame.Area.Left, Frame.Area.Top - 9, Anchor.Start, style);
        }

        Frame.Taken.Clear();
        surface.Canvas.Save();
        surface.Canvas.ClipRect(Frame.Area);
        foreach (Layer layer in panel.Layers)
            layer.Draw(surface, Frame);
        surface.Canvas.Restore();
        axes?.Draw(surface, Frame.Area);

        float below = axes is null ? 0 : AxisPair.Below;
        float offset = 0;
        foreach (Layer layer in panel.Layers.Where(layer => layer.HasScaleBar))
        {
            BandScale? scale = layer.ScaleIn(Frame);
            if (hasFlatBars)
            {
                ScaleBar.DrawFlat(surface, scale, Frame.Area, Frame.Area.Bottom + below + offset + 8);
                offset += FlatBarRoom;
            }
            else
            {
                ScaleBar.DrawUpright(surface, scale, Frame.Area, Frame.Area.Right + offset + 14);
                offset += SideBarRoom;
            }
        }

        legend.Draw(surface, Frame.Area.Left, Frame.Area.Bottom + below + (hasFlatBars ? offset : 0) + 8);
    }

    private static PanelLayout Place(
        Panel panel,
        Box2D view,
        IReadOnlyList<LegendItem> items,
        float x,
        float y,
        float width,
        float height,
        double pixelsPerPoint,
        PlotFrame? known)
    {
        int bars = panel.Layers.Count(layer => layer.HasScaleBar);
        double aspect = view.Height / view.Width;
        bool isFlat = bars > 0 && aspect < FlatAspect;
        AxisPair? axes = panel.ShowsAxes ? new AxisPair(panel, view, width) : null;
        float left = axes?.Beside ?? 1;
        float right = isFlat || bars == 0 ? 6 : (bars * SideBarRoom) + 4;
        float top = panel.Title.Length > 0 ? TitleBand : 3;
        float below = (axes is null ? 1 : AxisPair.Below) + (isFlat ? bars * FlatBarRoom : 0);

        float roomWide = width - left - right;
        var legend = new Legend(items, Math.Max(roomWide, 60));
        float roomHigh = Math.Min(height - top - below - legend.Height, LargestAspect * width);
        if (roomWide < LeastSide || roomHigh < LeastSide)
            throw new InvalidFigureException(
                $"A panel of {width:F0} by {height:F0} points leaves no room for its contents beside axes, scale bars and legend. "
                + "Enlarge the figure or put fewer panels in a row.");
        float plotWide = (float)Math.Min(roomWide, roomHigh / aspect);
        float plotHigh = (float)(plotWide * aspect);
        if (!(plotWide >= 1 && plotHigh >= 1))
            throw new InvalidFigureException(
                $"A view window of {view.Width:G3} m by {view.Height:G3} m is too narrow to be drawn to one scale. Choose a fuller one.");

        // What a narrow plot leaves free goes to both sides.
        float start = x + left + ((roomWide - plotWide) / 2);
        var area = SKRect.Create(start, y + top, plotWide, plotHigh);
        PlotFrame frame = known?.Area == area ? known : new PlotFrame(view, area, pixelsPerPoint);
        return new PanelLayout(panel, frame, axes?.For(frame), legend, isFlat, top + plotHigh + below + legend.Height);
    }
}
