using FemCore2D.Geometry;
using SkiaSharp;

namespace FemCore2D.Drawing.Tests;

public sealed class NameTests
{
    private static readonly Mesh Cable = TestMeshes.Rings(60, [0.4, 0.9, 0.91, 1.2], ["conductor", "insulation", "screen", "sheath"]);

    [Fact]
    public void A_name_stands_wholly_inside_its_region()
    {
        var frame = new Pixels(new Figure(new RegionLayer(Cable))).Frame();
        var map = new RegionMap(Cable, frame);
        foreach ((int region, double low, double high) in new[] { (0, 0.0, 0.4), (1, 0.4, 0.9), (3, 0.91, 1.2) })
        {
            SKPoint middle = map.PlaceFor(region, 50, 9) ?? throw new InvalidOperationException("no place");
            foreach ((float x, float y) in new[] { (-25f, -4f), (25f, -4f), (-25f, 4f), (25f, 4f), (0f, 0f) })
            {
                double distance = frame.ToPlane(new SKPoint(middle.X + x, middle.Y + y)).DistanceTo(Point2D.Origin);
                Assert.InRange(distance, low - 0.01, high + 0.01);
            }
        }
    }

    [Fact]
    public void A_region_too_small_for_its_name_is_explained_below()
    {
        var layer = new RegionLayer(Cable);
        var frame = new Pixels(new Figure(layer)).Frame();
        LegendItem item = Assert.Single(layer.LegendIn(frame));
        Assert.Equal("screen", item.Text);
        Assert.Equal(RegionTints.Of(2), item.Colour);
    }

    [Fact]
    public void A_legend_makes_the_page_higher_and_has_its_swatch()
    {
        var with = new Pixels(new Figure(new RegionLayer(Cable)));
        var without = new Pixels(new Figure(new RegionLayer(Cable) { ShowsNames = false }));
        Assert.True(with.Height > without.Height + 20);
        SKRect plot = with.Frame().Area;
        var below = new SKRect(plot.Left, plot.Bottom + 30, plot.Right, plot.Bottom + 60);
        Assert.True(with.Count(below, colour => colour == RegionTints.Of(2)) > 50);
    }

    [Fact]
    public void Own_tints_replace_those_of_the_library()
    {
        var own = new Colour(200, 100, 50);
        var picture = new Pixels(new Figure(
            new RegionLayer(Cable) { Tints = RegionLayer.NoTints.Add("insulation", own), ShowsNames = false }));
        Assert.Equal(own, picture.At(0.6, 0.1));
    }

    [Fact]
    public void Labels_of_crowded_points_do_not_overlap()
    {
        var points = new PointLayer(
            new LabelledPoint(new Point2D(0, 0), "first"),
            new LabelledPoint(new Point2D(0.03, 0.01), "second"),
            new LabelledPoint(new Point2D(-0.02, -0.02), "third"));
        var figure = new Figure(new MeshLayer(Cable), points);
        PlotFrame frame = FigureLayout.Arrange(figure, 2).Panels[0].Frame;
        using var bitmap = new SKBitmap(100, 100);
        using var canvas = new SKCanvas(bitmap);
        points.Draw(new Surface(canvas, 2, isVector: false, writesGlyphs: true), frame);

        // Marks come first; the three labels after them.
        SKRect[] labels = [.. frame.Taken.Skip(3)];
        Assert.Equal(3, labels.Length);
        for (int i = 0; i < 3; i++)
        {
            for (int j = 0; j < i; j++)
                Assert.False(labels[i].IntersectsWith(labels[j]));
        }
    }

    [Fact]
    public void A_value_written_on_a_level_line_stands_in_a_gap_of_it()
    {
        var distance = CellScalar.OfPlace(Cable, p => p.DistanceTo(Point2D.Origin));
        var plain = new LevelLineLayer(distance) { Levels = [0.8], Colour = Colour.Black };
        var without = new Pixels(new Figure(plain));
        var with = new Pixels(new Figure(plain with { ShowsValues = true, Unit = "m" }));
        int changed = 0;
        for (double angle = 0; angle < 2 * Math.PI; angle += 0.01)
        {
            (double sine, double cosine) = Math.SinCos(angle);
            changed += without.At(0.8 * cosine, 0.8 * sine) == with.At(0.8 * cosine, 0.8 * sine) ? 0 : 1;
        }

        // The gap is about 30 of 900 points of the circle's way.
        Assert.InRange(changed, 8, 60);
    }

    [Fact]
    public void An_arrow_legend_gives_the_measure()
    {
        var field = CellVector.OfPlace(Cable, p => 1e6 * (p - Point2D.Origin));
        var layer = new ArrowLayer(field) { Label = "Field", Unit = "V/m" };
        PlotFrame frame = FigureLayout.Arrange(new Figure(layer), 2).Panels[0].Frame;
        LegendItem item = Assert.Single(layer.LegendIn(frame));
        Assert.Equal("Field: 1 MV/m", item.Text);

        // The longest arrow is near 1.15 MV/m long in the field, as 3 % of the samples are beyond it.
        Assert.InRange(item.ArrowLength, 0.75 * 0.92 * 15, 0.95 * 0.92 * 15);
    }
}
