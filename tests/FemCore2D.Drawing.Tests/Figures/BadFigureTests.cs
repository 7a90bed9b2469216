using FemCore2D.Geometry;

namespace FemCore2D.Drawing.Tests;

public sealed class BadFigureTests
{
    private static readonly Mesh Plate = TestMeshes.Rectangle(2, 2, 1, 1);

    [Fact]
    public void A_figure_without_anything_to_draw_says_what_is_missing()
    {
        Assert.Contains("no panels", Message(new Figure(Array.Empty<Panel>())), StringComparison.Ordinal);
        Assert.Contains("no layers", Message(new Figure(new Panel())), StringComparison.Ordinal);
        Assert.Contains("extent", Message(new Figure(new PointLayer(new LabelledPoint(Point2D.Origin, "A")))), StringComparison.Ordinal);
    }

    [Fact]
    public void A_figure_without_room_is_refused()
    {
        var layer = new BandLayer(CellScalar.OfPlace(Plate, p => p.X));
        Assert.Contains("room", Message(new Figure(layer) { Width = 80 }), StringComparison.Ordinal);
        Assert.Contains("room", Message(new Figure(layer) { Height = 40 }), StringComparison.Ordinal);
        var needle = new Box2D(new Point2D(0, 0), new Point2D(1, 1e-9));
        Assert.Contains("narrow", Message(new Figure(new Panel(layer) { View = needle })), StringComparison.Ordinal);
    }

    [Theory]
    [InlineData(0, 0, 0, 1)]
    [InlineData(0, 0, -1, 1)]
    [InlineData(double.NaN, 0, 1, 1)]
    [InlineData(0, 0, double.PositiveInfinity, 1)]
    public void A_view_has_a_finite_size(double left, double bottom, double right, double top) =>
        Assert.Throws<ArgumentOutOfRangeException>(
            () => new Panel(new MeshLayer(Plate)) { View = new Box2D(new Point2D(left, bottom), new Point2D(right, top)) });

    [Fact]
    public void Numbers_out_of_range_are_refused_where_they_are_given()
    {
        var scalar = CellScalar.OfPlace(Plate, p => p.X);
        Assert.Throws<ArgumentOutOfRangeException>(() => new BandLayer(scalar) { Count = 0 });
        Assert.Throws<ArgumentOutOfRangeException>(() => new LevelLineLayer(scalar) { Width = -1 });
        Assert.Throws<ArgumentException>(() => new LevelLineLayer(scalar) { Levels = [1, double.NaN] });
        Assert.Throws<ArgumentOutOfRangeException>(() => new ArrowLayer(CellVector.OfPlace(Plate, _ => default)) { Spacing = 0 });
        Assert.Throws<ArgumentOutOfRangeException>(() => new Figure(new MeshLayer(Plate)) { Width = 0 });
        Assert.Throws<ArgumentOutOfRangeException>(() => new Figure(new MeshLayer(Plate)) { Columns = 0 });
        Assert.Throws<ArgumentOutOfRangeException>(() => new Figure(new MeshLayer(Plate)).ToPng(3));
        Assert.Throws<ArgumentOutOfRangeException>(() => Colour.White.WithOpacity(double.NaN));
        Assert.Throws<ArgumentException>(() => new PointLayer(new LabelledPoint(new Point2D(double.NaN, 0), "A")));
    }

    [Fact]
    public void Values_must_be_as_many_as_vertices_or_cells()
    {
        Assert.Throws<ArgumentException>(() => CellScalar.AtVertices(Plate, new double[3]));
        Assert.Throws<ArgumentException>(() => CellScalar.PerCell(Plate, new double[3]));
        Assert.Throws<ArgumentException>(() => CellVector.OfPlace(Plate, _ => default).Along(Vector2D.Zero));
    }

    [Fact]
    public void Nothing_may_be_missing()
    {
        Assert.Throws<ArgumentNullException>(() => new MeshLayer(null!));
        Assert.Throws<ArgumentNullException>(() => new BandLayer(null!));
        Assert.Throws<ArgumentNullException>(() => new Panel([null!]));
        Assert.Throws<ArgumentNullException>(() => new Figure(new Panel[] { null! }));
    }

    private static string Message(Figure figure) => Assert.Throws<InvalidFigureException>(() => figure.ToPng(320)).Message;
}
