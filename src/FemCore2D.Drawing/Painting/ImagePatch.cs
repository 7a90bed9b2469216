using SkiaSharp;

namespace FemCore2D.Drawing;

/// <summary>A part of a file of shapes that is kept as pixels, because as shapes it would be too large.</summary>
internal static class ImagePatch
{
    private const double PixelsPerPoint = 3;

    /// <summary>Draws the contents of a panel as an image.</summary>
    public static void Draw(Surface surface, PlotFrame frame, Action<Surface> draw)
    {
        int width = (int)Math.Ceiling(frame.Area.Width * PixelsPerPoint);
        int height = (int)Math.Ceiling(frame.Area.Height * PixelsPerPoint);
        using var bitmap = new SKBitmap(new SKImageInfo(width, height, SKColorType.Rgba8888, SKAlphaType.Premul));
        using var canvas = new SKCanvas(bitmap);
        canvas.Clear(SKColors.Transparent);
        canvas.Scale((float)PixelsPerPoint);
        canvas.Translate(-frame.Area.Left, -frame.Area.Top);
        draw(new Surface(canvas, PixelsPerPoint, isVector: false, writesGlyphs: true));
        using SKImage image = SKImage.FromBitmap(bitmap);
        var target = SKRect.Create(
            frame.Area.Left, frame.Area.Top, (float)(width / PixelsPerPoint), (float)(height / PixelsPerPoint));
        surface.Canvas.DrawImage(image, target, new SKSamplingOptions(SKFilterMode.Linear));
    }
}
