using FemCore2D.Geometry;
using SkiaSharp;

namespace FemCore2D.Drawing.Tests;

/// <summary>A drawn figure, to be read pixel by pixel.</summary>
internal sealed class Pixels
{
    private readonly SKColor[] pixels;
    private readonly double pixelsPerPoint;
    private readonly FigureLayout layout;

    public Pixels(Figure figure, int width = 960)
    {
        using SKBitmap bitmap = SKBitmap.Decode(figure.ToPng(width));
        pixels = bitmap.Pixels;
        Width = bitmap.Width;
        Height = bitmap.Height;
        pixelsPerPoint = width / figure.Width;
        layout = FigureLayout.Arrange(figure, pixelsPerPoint);
    }

    public int Width { get; }

    public int Height { get; }

    public PlotFrame Frame(int panel = 0) => layout.Panels[panel].Frame;

    public Colour At(int x, int y)
    {
        SKColor pixel = pixels[(y * Width) + x];
        return new Colour(pixel.Red, pixel.Green, pixel.Blue, pixel.Alpha);
    }

    /// <summary>The colour at a place of the plane.</summary>
    public Colour At(double x, double y, int panel = 0)
    {
        SKPoint point = Frame(panel).ToPage(new Point2D(x, y));
        return At((int)(point.X * pixelsPerPoint), (int)(point.Y * pixelsPerPoint));
    }

    /// <summary>How many pixels of a box, in points, a test holds for.</summary>
    public int Count(SKRect box, Func<Colour, bool> test)
    {
        int count = 0;
        for (int y = Math.Max(0, (int)(box.Top * pixelsPerPoint)); y < Math.Min(Height, box.Bottom * pixelsPerPoint); y++)
        {
            for (int x = Math.Max(0, (int)(box.Left * pixelsPerPoint)); x < Math.Min(Width, box.Right * pixelsPerPoint); x++)
                count += test(At(x, y)) ? 1 : 0;
        }

        return count;
    }

    public static bool IsDark(Colour colour) => colour.Red + colour.Green + colour.Blue < 300;
}
