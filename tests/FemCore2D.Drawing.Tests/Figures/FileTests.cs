using System.Text;
using System.Text.RegularExpressions;
using System.Xml.Linq;
using FemCore2D.Geometry;
using SkiaSharp;

namespace FemCore2D.Drawing.Tests;

public sealed class FileTests
{
    private static readonly Mesh Plate = TestMeshes.Rectangle(12, 6, 1.2, 0.6);
    private static readonly CellScalar Wave = CellScalar.OfPlace(Plate, p => Math.Sin(5 * p.X) * Math.Cos(4 * p.Y));

    private static Figure Example(double factor = 1) => new(
        new BandLayer(Wave.Select(value => factor * value)) { Label = "Potential", Unit = "V" },
        new LevelLineLayer(Wave),
        new OutlineLayer(Plate),
        new RegionLayer(Plate) { IsTinted = false })
    {
        Title = "Ampère & <Ω>",
    };

    [Fact]
    public void Svg_is_well_formed_with_letters_as_shapes_and_a_view_box()
    {
        XElement root = XDocument.Parse(Example().ToSvg()).Root!;
        Assert.Equal("svg", root.Name.LocalName);
        Assert.Matches(@"^0 0 480 \d+(\.\d+)?$", root.Attribute("viewBox")!.Value);
        Assert.DoesNotContain(root.Descendants(), element => element.Name.LocalName is "text" or "image");
        Assert.InRange(root.Descendants().Count(element => element.Name.LocalName == "path"), 30, 300);
        foreach (int band in Enumerable.Range(0, 10))
        {
            string colour = ColourScale.Undertow.At((band + 0.5) / 10).ToString();
            Assert.Contains(root.Descendants(), element =>
                string.Equals(element.Attribute("fill")?.Value, colour, StringComparison.OrdinalIgnoreCase));
        }
    }

    [Fact]
    public void Svg_pictures_on_one_page_do_not_share_the_names_of_their_clips()
    {
        string[] Names(string svg) => [.. Regex.Matches(svg, "id=\"([^\"]+)\"").Select(match => match.Groups[1].Value)];
        string first = Example().ToSvg();
        Assert.NotEmpty(Names(first));
        Assert.Empty(Names(first).Intersect(Names(Example(2).ToSvg())));
        Assert.All(Names(first), name => Assert.Contains($"url(#{name})", first, StringComparison.Ordinal));
    }

    [Fact]
    public void Svg_of_a_large_mesh_stays_small()
    {
        Mesh large = TestMeshes.Rectangle(300, 200, 1.5, 1);
        var scalar = CellScalar.OfPlace(large, p => Math.Sin(5 * p.X) * Math.Cos(4 * p.Y));
        Assert.InRange(new Figure(new BandLayer(scalar), new LevelLineLayer(scalar)).ToSvg().Length, 10_000, 600_000);

        // 180 600 edges would be several megabytes as shapes: they become a picture inside the file.
        string mesh = new Figure(new MeshLayer(large)).ToSvg();
        Assert.InRange(mesh.Length, 10_000, 2_500_000);
        Assert.Contains("<image", mesh, StringComparison.Ordinal);
    }

    [Fact]
    public void Pdf_is_one_page_with_its_letters_inside()
    {
        string text = Encoding.Latin1.GetString(Example().ToPdf());
        Assert.StartsWith("%PDF-1.", text, StringComparison.Ordinal);
        Assert.EndsWith("%%EOF", text.TrimEnd(), StringComparison.Ordinal);
        Assert.Single(Regex.Matches(text, @"/Type /Page\b(?!s)"));
        Assert.Contains("/Font", text, StringComparison.Ordinal);
        Assert.Contains("/MediaBox [0 0 480 ", text, StringComparison.Ordinal);
    }

    [Fact]
    public void Png_has_the_width_asked_for_and_the_proportions_of_the_page()
    {
        byte[] png = Example().ToPng(777);
        using SKBitmap bitmap = SKBitmap.Decode(png);
        SKSize page = FigureLayout.Arrange(Example(), 777 / 480.0).Size;
        Assert.Equal(777, bitmap.Width);
        Assert.Equal(Math.Ceiling(page.Height * 777 / 480), bitmap.Height);
    }

    [Fact]
    public void Streams_and_files_hold_the_same_as_the_bytes()
    {
        string path = Path.Combine(Path.GetTempPath(), Path.GetRandomFileName());
        try
        {
            Example().SavePng(path, 320);
            Assert.Equal(Example().ToPng(320), File.ReadAllBytes(path));
            Example().SaveSvg(path);
            Assert.Equal(Example().ToSvg(), File.ReadAllText(path));
            Example().SavePdf(path);
            Assert.StartsWith("%PDF", File.ReadAllText(path), StringComparison.Ordinal);
            using var stream = new MemoryStream();
            Example().WriteSvg(stream);
            Assert.Equal(Example().ToSvg(), Encoding.UTF8.GetString(stream.ToArray()));
        }
        finally
        {
            File.Delete(path);
        }
    }

    [Fact]
    public void Drawing_from_many_threads_gives_the_same_picture_each_time()
    {
        Figure figure = Example();
        byte[] expected = figure.ToPng(640);
        byte[][] all = new byte[8][];
        Parallel.For(0, all.Length, i => all[i] = figure.ToPng(640));
        Assert.All(all, png => Assert.Equal(expected, png));
    }

    [Fact]
    public void Any_canvas_will_do()
    {
        using var bitmap = new SKBitmap(960, 900);
        using var canvas = new SKCanvas(bitmap);
        canvas.Scale(2);
        SKSize size = Example().DrawOn(canvas);
        Assert.Equal(480, size.Width);
        Assert.Contains(bitmap.Pixels, pixel => pixel.Alpha > 0);
    }
}
