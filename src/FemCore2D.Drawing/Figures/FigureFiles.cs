using System.Text;
using SkiaSharp;

namespace FemCore2D.Drawing;

/// <content>Writing the figure to files.</content>
public sealed partial record Figure
{
    private const double PaperFineness = 2.5;
    private const int LargestPixels = 20_000;

    /// <summary>Draws the figure as a PNG image (ISO/IEC 15948).</summary>
    /// <param name="widthPixels">The width of the image; the height follows.</param>
    /// <returns>The bytes of the file.</returns>
    /// <exception cref="ArgumentOutOfRangeException">The width is not from 16 to 20000 pixels.</exception>
    /// <exception cref="InvalidFigureException">There is nothing to draw, or no room for it, or the image would be higher than 20000 pixels.</exception>
    public byte[] ToPng(int widthPixels = 1600)
    {
        using var stream = new MemoryStream();
        WritePng(stream, widthPixels);
        return stream.ToArray();
    }

    /// <summary>Writes the figure as a PNG image (ISO/IEC 15948).</summary>
    /// <param name="stream">Receives the file.</param>
    /// <param name="widthPixels">The width of the image; the height follows.</param>
    /// <exception cref="ArgumentOutOfRangeException">The width is not from 16 to 20000 pixels.</exception>
    /// <exception cref="InvalidFigureException">There is nothing to draw, or no room for it, or the image would be higher than 20000 pixels.</exception>
    public void WritePng(Stream stream, int widthPixels = 1600)
    {
        ArgumentNullException.ThrowIfNull(stream);
        if (widthPixels is < 16 or > LargestPixels)
            throw new ArgumentOutOfRangeException(nameof(widthPixels), widthPixels, $"An image is 16 to {LargestPixels} pixels wide.");
        double pixelsPerPoint = widthPixels / Width;
        FigureLayout layout = FigureLayout.Arrange(this, pixelsPerPoint);
        double heightPixels = Math.Ceiling(layout.Size.Height * pixelsPerPoint);
        if (heightPixels > LargestPixels)
            throw new InvalidFigureException(
                $"The image would be {heightPixels} pixels high; at most {LargestPixels} are drawn. Ask for a narrower image.");
        using var bitmap = new SKBitmap(new SKImageInfo(
            widthPixels, (int)heightPixels, SKColorType.Rgba8888, Background is null ? SKAlphaType.Premul : SKAlphaType.Opaque));
        using var canvas = new SKCanvas(bitmap);
        canvas.Clear(Background?.ToSkia() ?? SKColors.Transparent);
        canvas.Scale((float)pixelsPerPoint);
        layout.Draw(new Surface(canvas, pixelsPerPoint, isVector: false, writesGlyphs: true));
        bitmap.Encode(stream, SKEncodedImageFormat.Png, 100);
    }

    /// <summary>Saves the figure as a PNG image (ISO/IEC 15948).</summary>
    /// <param name="path">The file, overwritten if it exists.</param>
    /// <param name="widthPixels">The width of the image; the height follows.</param>
    /// <inheritdoc cref="WritePng" path="/exception"/>
    public void SavePng(string path, int widthPixels = 1600) => File.WriteAllBytes(path, ToPng(widthPixels));

    /// <summary>Draws the figure as scalable shapes (SVG 1.1, W3C). Letters are shapes too, so it looks the same everywhere.</summary>
    /// <returns>The text of the file.</returns>
    /// <exception cref="InvalidFigureException">There is nothing to draw, or no room for it.</exception>
    public string ToSvg()
    {
        FigureLayout layout = FigureLayout.Arrange(this, PaperFineness);
        using var stream = new MemoryStream();
        using (SKCanvas canvas = SKSvgCanvas.Create(new SKRect(0, 0, layout.Size.Width, layout.Size.Height), stream))
        {
            FillGround(canvas, layout.Size);
            layout.Draw(new Surface(canvas, PaperFineness, isVector: true, writesGlyphs: false));
        }

        return SvgText.Tidy(Encoding.UTF8.GetString(stream.ToArray()), layout.Size);
    }

    /// <summary>Writes the figure as scalable shapes (SVG 1.1, W3C).</summary>
    /// <param name="stream">Receives the file.</param>
    /// <exception cref="InvalidFigureException">There is nothing to draw, or no room for it.</exception>
    public void WriteSvg(Stream stream)
    {
        ArgumentNullException.ThrowIfNull(stream);
        stream.Write(Encoding.UTF8.GetBytes(ToSvg()));
    }

    /// <summary>Saves the figure as scalable shapes (SVG 1.1, W3C).</summary>
    /// <param name="path">The file, overwritten if it exists.</param>
    /// <exception cref="InvalidFigureException">There is nothing to draw, or no room for it.</exception>
    public void SaveSvg(string path) => File.WriteAllText(path, ToSvg());

    /// <summary>Draws the figure as a PDF of one page (ISO 32000), with its letters inside.</summary>
    /// <returns>The bytes of the file.</returns>
    /// <exception cref="InvalidFigureException">There is nothing to draw, or no room for it.</exception>
    public byte[] ToPdf()
    {
        using var stream = new MemoryStream();
        WritePdf(stream);
        return stream.ToArray();
    }

    /// <summary>Writes the figure as a PDF of one page (ISO 32000), with its letters inside.</summary>
    /// <param name="stream">Receives the file.</param>
    /// <exception cref="InvalidFigureException">There is nothing to draw, or no room for it.</exception>
    public void WritePdf(Stream stream)
    {
        ArgumentNullException.ThrowIfNull(stream);
        FigureLayout layout = FigureLayout.Arrange(this, PaperFineness);
        var metadata = new SKDocumentPdfMetadata { Title = Title, RasterDpi = 300, EncodingQuality = 101 };
        using SKDocument document = SKDocument.CreatePdf(stream, metadata);
        SKCanvas canvas = document.BeginPage(layout.Size.Width, layout.Size.Height);
        FillGround(canvas, layout.Size);
        layout.Draw(new Surface(canvas, PaperFineness, isVector: true, writesGlyphs: true));
        document.EndPage();
        document.Close();
    }

    /// <summary>Saves the figure as a PDF of one page (ISO 32000), with its letters inside.</summary>
    /// <param name="path">The file, overwritten if it exists.</param>
    /// <exception cref="InvalidFigureException">There is nothing to draw, or no room for it.</exception>
    public void SavePdf(string path) => File.WriteAllBytes(path, ToPdf());

    private void FillGround(SKCanvas canvas, SKSize size)
    {
        if (Background is not { } ground)
            return;
        using var paint = new SKPaint { Color = ground.ToSkia() };
        canvas.DrawRect(0, 0, size.Width, size.Height, paint);
    }
}
