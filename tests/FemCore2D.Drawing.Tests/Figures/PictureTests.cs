using FemCore2D.Assembly;
using FemCore2D.Geometry;
using SkiaSharp;

namespace FemCore2D.Drawing.Tests;

public sealed class PictureTests
{
    private static readonly Mesh Plate = TestMeshes.Rectangle(10, 6, 1, 0.6);
    private static readonly Mesh Disc = TestMeshes.Rings(24, [0.3, 0.5, 1], ["core", "core", "rim"]);
    private static readonly CellScalar Abscissa = CellScalar.OfPlace(Plate, p => p.X);

    [Fact]
    public void Both_axes_have_the_same_scale()
    {
        Colour tint = RegionTints.Of(0);
        var picture = new Pixels(new Figure(new RegionLayer(Disc) { ShowsNames = false, OutlineWidth = 0 }));
        int left = int.MaxValue;
        int right = 0;
        int top = int.MaxValue;
        int bottom = 0;
        for (int y = 0; y < picture.Height; y++)
        {
            for (int x = 0; x < picture.Width; x++)
            {
                if (picture.At(x, y) != tint)
                    continue;
                left = Math.Min(left, x);
                right = Math.Max(right, x);
                top = Math.Min(top, y);
                bottom = Math.Max(bottom, y);
            }
        }

        Assert.True(right - left > 200);
        Assert.InRange(right - left - (bottom - top), -1, 1);
    }

    [Fact]
    public void Bands_have_the_colours_of_their_values_and_end_at_round_ones()
    {
        var picture = new Pixels(new Figure(new BandLayer(Abscissa) { Count = 10 }));
        for (int band = 0; band < 10; band++)
        {
            Colour expected = ColourScale.Undertow.At((band + 0.5) / 10);
            Assert.Equal(expected, picture.At((band + 0.1) / 10, 0.31));
            Assert.Equal(expected, picture.At((band + 0.9) / 10, 0.17));
        }
    }

    [Fact]
    public void No_ground_shows_through_between_bands_cells_and_regions()
    {
        var picture = new Pixels(new Figure(new BandLayer(CellScalar.OfPlace(Disc, p => p.X - p.Y)) { Colours = ColourScale.Undertow.Reversed() })
        {
            Background = new Colour(0, 255, 0),
        });
        SKPoint middle = picture.Frame().ToPage(Point2D.Origin);
        float half = (float)(0.69 * picture.Frame().PointsPerMetre);
        var inside = new SKRect(middle.X - half, middle.Y - half, middle.X + half, middle.Y + half);
        Assert.Equal(0, picture.Count(inside, c => c.Green > c.Red + 60 && c.Green > c.Blue + 60));
    }

    [Fact]
    public void A_level_line_runs_where_the_value_is()
    {
        var picture = new Pixels(new Figure(new LevelLineLayer(Abscissa) { Levels = [0.37], Colour = Colour.Black, Width = 1 }));
        for (double y = 0.05; y < 0.6; y += 0.05)
        {
            Assert.True(Pixels.IsDark(picture.At(0.37, y)));
            Assert.Equal(Colour.White, picture.At(0.36, y));
            Assert.Equal(Colour.White, picture.At(0.38, y));
        }
    }

    [Fact]
    public void A_field_of_degree_two_is_drawn_as_bent_as_it_is()
    {
        // One square of two cells; the level line x^2 + y^2 = 0.5 must be round, not a straight cut.
        var field = NodeField.Interpolate(new NodeSpace(TestMeshes.Rectangle(1, 1, 1, 1), 2), p => (p.X * p.X) + (p.Y * p.Y));
        var picture = new Pixels(new Figure(
            new LevelLineLayer(CellScalar.Of(field)) { Levels = [0.5], Colour = Colour.Black, Width = 1.2 }));
        for (double angle = 0.1; angle < 1.5; angle += 0.1)
        {
            (double sine, double cosine) = Math.SinCos(angle);
            Assert.True(Pixels.IsDark(picture.At(Math.Sqrt(0.5) * cosine, Math.Sqrt(0.5) * sine)), $"at {angle} rad");
        }
    }

    [Fact]
    public void The_gradient_of_a_field_is_drawn_where_it_is_large()
    {
        var field = NodeField.Interpolate(new NodeSpace(Plate, 2), p => p.X * p.X / 2);
        CellScalar strength = CellVector.GradientOf(field).Magnitude();
        var picture = new Pixels(new Figure(new BandLayer(strength) { Count = 10 }));
        Assert.Equal(ColourScale.Undertow.At(0.25), picture.At(0.25, 0.3));
        Assert.Equal(ColourScale.Undertow.At(0.75), picture.At(0.75, 0.3));
    }

    [Fact]
    public void Text_is_there_where_a_title_is_asked_for()
    {
        var band = new SKRect(0, 0, 200, 24);
        var without = new Pixels(new Figure(new BandLayer(Abscissa)));
        var with = new Pixels(new Figure(new BandLayer(Abscissa)) { Title = "Potential φ" });
        Assert.Equal(0, without.Count(new SKRect(60, 0, 200, 10), Pixels.IsDark));
        Assert.True(with.Count(band, Pixels.IsDark) > 200);
    }

    [Fact]
    public void Axes_and_scale_bar_carry_numbers()
    {
        var picture = new Pixels(new Figure(new BandLayer(Abscissa) { Label = "Height", Unit = "m" }));
        SKRect plot = picture.Frame().Area;
        Assert.True(picture.Count(new SKRect(plot.Left, plot.Bottom + 3, plot.Right, plot.Bottom + 30), Pixels.IsDark) > 150);
        Assert.True(picture.Count(new SKRect(0, plot.Top, plot.Left - 3, plot.Bottom), Pixels.IsDark) > 100);
        Assert.True(picture.Count(new SKRect(plot.Right + 24, plot.Top - 4, (float)480, plot.Bottom + 4), Pixels.IsDark) > 150);
    }

    [Fact]
    public void Where_there_is_no_value_the_ground_shows()
    {
        var holed = CellScalar.OfPlace(Plate, p => p.X > 0.55 ? double.NaN : p.X);
        var picture = new Pixels(new Figure(new BandLayer(holed)));
        Assert.Equal(Colour.White, picture.At(0.8, 0.3));
        Assert.NotEqual(Colour.White, picture.At(0.45, 0.3));
    }

    [Fact]
    public void Without_any_value_the_picture_says_so()
    {
        var picture = new Pixels(new Figure(
            new BandLayer(CellScalar.OfPlace(Plate, _ => double.NaN)),
            new LevelLineLayer(CellScalar.OfPlace(Plate, _ => double.NaN)),
            new ArrowLayer(CellVector.OfPlace(Plate, _ => new Vector2D(double.NaN, 0)))));
        Assert.Equal(Colour.White, picture.At(0.5, 0.3));
        SKRect plot = picture.Frame().Area;
        Assert.True(picture.Count(new SKRect(plot.Right + 4, plot.Top, 480, plot.Bottom), Pixels.IsDark) > 50);
    }

    [Theory]
    [InlineData(0)]
    [InlineData(-3e5)]
    [InlineData(double.Epsilon)]
    public void A_constant_is_one_colour(double value)
    {
        var picture = new Pixels(new Figure(
            new BandLayer(CellScalar.OfPlace(Plate, _ => value)), new LevelLineLayer(CellScalar.OfPlace(Plate, _ => value))));
        Assert.Equal(picture.At(0.1, 0.1), picture.At(0.9, 0.5));
        Assert.NotEqual(Colour.White, picture.At(0.5, 0.3));
    }

    [Fact]
    public void Values_beyond_a_given_range_have_the_end_colours()
    {
        var layer = new BandLayer(Abscissa) { Range = new ValueRange(0.4, 0.6), Count = 4 };
        var picture = new Pixels(new Figure(layer));
        Assert.Equal(ColourScale.Undertow.At(0.125), picture.At(0.05, 0.3));
        Assert.Equal(ColourScale.Undertow.At(0.875), picture.At(0.95, 0.3));
    }

    [Fact]
    public void A_cyclic_range_begins_anew()
    {
        var phase = CellScalar.OfPlace(Plate, p => 720 * p.X);
        var picture = new Pixels(new Figure(
            new BandLayer(phase) { Colours = ColourScale.TideClock, Range = new ValueRange(0, 360), Count = 12, Unit = "°" }));
        for (double x = 0.02; x < 0.48; x += 0.0417)
            Assert.Equal(picture.At(x, 0.3), picture.At(x + 0.5, 0.3));
        Assert.NotEqual(picture.At(0.12, 0.3), picture.At(0.38, 0.3));
    }

    [Fact]
    public void A_view_shows_only_its_part()
    {
        var view = new Box2D(new Point2D(0.4, 0.2), new Point2D(0.6, 0.3));
        var picture = new Pixels(new Figure(new Panel(new BandLayer(Abscissa) { Count = 10 }) { View = view }));

        // The range is that of the cells seen, from 0.4 to 0.6 or a cell beyond.
        Assert.Equal(0.2, picture.Frame().View.Width, 1e-12);
        Assert.NotEqual(picture.At(0.41, 0.25), picture.At(0.47, 0.25));
        Assert.Equal(2, picture.Frame().Area.Width / picture.Frame().Area.Height, 1e-3);
    }

    [Fact]
    public void Arrows_point_along_the_vector()
    {
        var right = CellVector.OfPlace(Plate, _ => new Vector2D(2, 0));
        var picture = new Pixels(new Figure(new ArrowLayer(right) { Spacing = 60, Colour = Colour.Black }), 1920);
        (SKPoint place, Vector2D value) = GridSampler.Sample(right, picture.Frame(), 60)[0];
        Assert.Equal(new Vector2D(2, 0), value);

        // The longest arrow fills 0.92 of the spacing; its head is wider than its tail.
        float half = 0.46f * 60;
        int tail = picture.Count(SKRect.Create(place.X - half, place.Y - 3, 5, 6), Pixels.IsDark);
        int head = picture.Count(SKRect.Create(place.X + half - 5, place.Y - 3, 5, 6), Pixels.IsDark);
        Assert.True(tail > 20 && head > 1.5 * tail, $"tail {tail}, head {head}");
    }

    [Fact]
    public void Arrows_stand_in_bent_cells_and_quadrilaterals_too_with_their_own_values()
    {
        Mesh ring = TestMeshes.Rings(12, [0.3, 1], ["core", "rim"], ofQuadrilaterals: true);
        var picture = new Pixels(new Figure(new MeshLayer(ring)));
        PlotFrame frame = picture.Frame();
        var samples = GridSampler.Sample(CellVector.OfPlace(ring, p => p - Point2D.Origin), frame, 20);
        Assert.True(samples.Count > 250);
        Assert.All(samples, sample =>
        {
            Point2D place = frame.ToPlane(sample.Place);
            Assert.True((place - Point2D.Origin - sample.Value).Length < 2e-3);
        });
    }

    [Fact]
    public void A_transparent_ground_stays_transparent()
    {
        var picture = new Pixels(new Figure(new BandLayer(Abscissa)) { Background = null });
        Assert.Equal(0, picture.At(1, 1).Opacity);
        Assert.Equal(255, picture.At(0.5, 0.3).Opacity);
    }
}
