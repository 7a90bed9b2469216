using SkiaSharp;

namespace FemCore2D.Drawing;

/// <summary>A canvas measured in points, with the few strokes that pictures are made of.</summary>
internal sealed class Surface(SKCanvas canvas, double pixelsPerPoint, bool isVector, bool writesGlyphs)
{
    public SKCanvas Canvas { get; } = canvas;

    /// <summary>The pixels of one point; on paper the fineness that is drawn to.</summary>
    public double PixelsPerPoint { get; } = pixelsPerPoint;

    /// <summary>Whether the canvas keeps shapes instead of pixels.</summary>
    public bool IsVector { get; } = isVector;

    public static float WidthOf(string text, float size, bool isBold = false)
    {
        using SKFont font = FontOf(size, isBold);
        return font.MeasureText(text);
    }

    /// <summary>Moves a coordinate so that a thin line at it falls on whole pixels.</summary>
    public float Crisp(double position, float width)
    {
        if (IsVector)
            return (float)position;
        double pixels = Math.Max(1, Math.Round(width * PixelsPerPoint));
        double half = pixels % 2 / 2;
        return (float)((Math.Round((position * PixelsPerPoint) - half) + half) / PixelsPerPoint);
    }

    public void Line(float x0, float y0, float x1, float y1, Colour colour, float width)
    {
        using SKPaint paint = Stroke(colour, width);
        Canvas.DrawLine(x0, y0, x1, y1, paint);
    }

    public void Fill(SKRect rectangle, Colour colour)
    {
        using SKPaint paint = FillPaint(colour);
        Canvas.DrawRect(rectangle, paint);
    }

    public void Frame(SKRect rectangle, Colour colour, float width)
    {
        using SKPaint paint = Stroke(colour, width);
        Canvas.DrawRect(rectangle, paint);
    }

    public void Fill(SKPath path, Colour colour)
    {
        using SKPaint paint = FillPaint(colour);
        Canvas.DrawPath(path, paint);
    }

    public void Stroke(SKPath path, Colour colour, float width)
    {
        using SKPaint paint = Stroke(colour, width);
        Canvas.DrawPath(path, paint);
    }

    /// <summary>Writes a text with its capitals centred on a height.</summary>
    /// <param name="text">The text.</param>
    /// <param name="x">The point to which it is anchored.</param>
    /// <param name="y">The height of the middle of its capitals.</param>
    /// <param name="anchor">Where it stands beside that point.</param>
    /// <param name="style">How it looks.</param>
    /// <param name="degrees">A turn around the point, clockwise.</param>
    public void Write(string text, float x, float y, Anchor anchor, TextStyle style, float degrees = 0)
    {
        if (text.Length == 0)
            return;
        using SKFont font = FontOf(style.Size, style.IsBold);
        float width = font.MeasureText(text);
        float left = anchor switch { Anchor.Start => 0, Anchor.Middle => -width / 2, _ => -width };
        float baseline = font.Metrics.CapHeight / 2;
        Canvas.Save();
        Canvas.Translate(x, y);
        Canvas.RotateDegrees(degrees);
        if (style.Halo.Opacity > 0)
        {
            using SKPath letters = font.GetTextPath(text, new SKPoint(left, baseline));
            using SKPaint halo = Stroke(style.Halo, 0.28f * style.Size);
            Canvas.DrawPath(letters, halo);
        }

        using SKPaint paint = FillPaint(style.Colour);
        if (writesGlyphs)
        {
            Canvas.DrawText(text, left, baseline, SKTextAlign.Left, font, paint);
        }
        else
        {
            using SKPath letters = font.GetTextPath(text, new SKPoint(left, baseline));
            Canvas.DrawPath(letters, paint);
        }

        Canvas.Restore();
    }

    private static SKFont FontOf(float size, bool isBold) =>
        new(isBold ? Typefaces.SemiBold : Typefaces.Regular, size)
        {
            Subpixel = true,
            LinearMetrics = true,
            Hinting = SKFontHinting.None,
            Edging = SKFontEdging.Antialias,
        };

    private static SKPaint FillPaint(Colour colour) => new() { Color = colour.ToSkia(), IsAntialias = true };

    private static SKPaint Stroke(Colour colour, float width) => new()
    {
        Color = colour.ToSkia(),
        IsAntialias = true,
        Style = SKPaintStyle.Stroke,
        StrokeWidth = width,
        StrokeCap = SKStrokeCap.Round,
        StrokeJoin = SKStrokeJoin.Round,
    };
}
