using FsCheck.Xunit;

namespace FemCore2D.Geometry.Tests;

public class OutlineTests
{
    private static readonly Point2D O = Point2D.Origin;

    public static TheoryData<string, Outline, double, double> Shapes => new()
    {
        { "rectangle", Outline.Rectangle(new Point2D(1, 2), 3, 4), 12, 14 },
        { "rounded rectangle", Outline.RoundedRectangle(O, 3, 2, 0.5), 6 - (4 * 0.25) + (Math.PI * 0.25), 6 + Math.PI },
        { "slot", Outline.RoundedRectangle(O, 3, 1, 0.5), 2 + (Math.PI * 0.25), 4 + Math.PI },
        { "upright slot", Outline.RoundedRectangle(O, 1, 3, 0.5), 2 + (Math.PI * 0.25), 4 + Math.PI },
        { "round rectangle", Outline.RoundedRectangle(O, 1, 1, 0.5), Math.PI * 0.25, Math.PI },
        { "triangle", Outline.Polygon(O, new(4, 0), new(0, 3)), 6, 12 },
        { "circle", Outline.Circle(new Point2D(-1, 5), 2), 4 * Math.PI, 4 * Math.PI },
        { "sector", Outline.Sector(O, 2, 0.3, 5), 10, 14 },
        { "ring sector", Outline.RingSector(O, 1, 2, 0.3, 1.5), 2.25, 6.5 },
        { "half disc", Outline.StartAt(O).StraightTo(new Point2D(2, 0)).ArcTo(O, Math.PI).Close(), Math.PI / 2, 2 + Math.PI },
        { "large arc", Outline.StartAt(O).ArcAround(new Point2D(1, 0), 6).Close(), 3 - (0.5 * Math.Sin(6)), 6 + (2 * Math.Sin(3)) },
        { "through", Outline.StartAt(O).ArcThrough(new(1, 1), new(2, 0)).ArcThrough(new(1, -1), O).Close(), -Math.PI, 2 * Math.PI },
        { "clockwise polygon", Outline.Polygon(O, new(0, 3), new(4, 0)), -6, 12 },
    };

    [Theory]
    [MemberData(nameof(Shapes), DisableDiscoveryEnumeration = true)]
    public void Area_and_perimeter_follow_the_formulas(string name, Outline outline, double area, double perimeter)
    {
        Assert.NotNull(name);
        Assert.Equal(area, outline.SignedArea, 1e-14);
        Assert.Equal(Math.Abs(area), outline.Area, 1e-14);
        Assert.Equal(perimeter, outline.Perimeter, 1e-14);
        Assert.Equal(-area, outline.Reversed().SignedArea, 1e-14);
    }

    [Theory]
    [MemberData(nameof(Shapes), DisableDiscoveryEnumeration = true)]
    public void Copies_keep_area_and_names(string name, Outline outline, double area, double perimeter)
    {
        Assert.NotNull(name);
        Outline named = outline.Named("edge");
        foreach (Outline copy in new[]
        {
            named.Moved(new Vector2D(3, -2)), named.Rotated(new Point2D(1, 1), 2), named.Scaled(new Point2D(0, 1), 3).Scaled(O, 1 / 3.0),
        })
        {
            Assert.Equal(area, copy.SignedArea, 1e-12);
            Assert.Equal(perimeter, copy.Perimeter, 1e-12);
            Assert.All(copy.Pieces, p => Assert.Equal("edge", p.Boundary));
        }

        Assert.Equal(-area, named.Mirrored(new Point2D(1, 0), new Vector2D(1, 2)).SignedArea, 1e-12);
        Assert.All(named.Named(null).Pieces, p => Assert.Null(p.Boundary));
    }

    [Property(Arbitrary = [typeof(GeneralShapes)], MaxTest = 50)]
    public void The_area_is_that_of_the_points_inside(ShapeSpec[] shapes)
    {
        // A random but repeatable lattice rule: 40 000 points, error well below 1 % of the box.
        Shape shape = shapes[0].ToShape();
        Box2D box = shape.Bounds;
        int inside = 0;
        const int Count = 40_000;
        for (int i = 0; i < Count; i++)
        {
            double x = i * 0.7548776662466927 % 1;
            double y = i * 0.5698402909980532 % 1;
            inside += shape.Contains(new Point2D(box.Lower.X + (x * box.Width), box.Lower.Y + (y * box.Height))) ? 1 : 0;
        }

        Assert.Equal(shape.Area, box.Width * box.Height * inside / Count, 0.01 * box.Width * box.Height);
    }

    [Fact]
    public void Bounds_hold_the_bulges()
    {
        Assert.Equal(new Box2D(new(-1, 3), new(3, 7)), Outline.Circle(new Point2D(1, 5), 2).Bounds);
        Box2D turned = Outline.Circle(O, 2).Rotated(O, 0.5).Bounds;
        Assert.Equal(-2, turned.Lower.X, 1e-15);
        Assert.Equal(2, turned.Upper.Y, 1e-15);
    }

    [Fact]
    public void Sides_are_named_one_by_one()
    {
        Outline box = Outline.Rectangle(O, 2, 1, bottom: "b", right: "r", top: "t", left: "l");
        Assert.Equal(["b", "r", "t", "l"], box.Pieces.Select(p => p.Boundary));
        Outline half = box.Named("low", p => p.Midpoint.Y < 0.75);
        Assert.Equal(["low", "low", "t", "low"], half.Pieces.Select(p => p.Boundary));
    }

    [Fact]
    public void Rings_and_holes_take_their_area_away()
    {
        Shape ring = Shape.Ring(O, 1, 2, "in", "out");
        Assert.Equal(3 * Math.PI, ring.Area, 1e-14);
        Assert.Equal(6 * Math.PI, ring.Perimeter, 1e-14);
        Assert.False(ring.Contains(O));
        Assert.True(ring.Contains(new Point2D(1.5, 0.1)));
        Shape perforated = Outline.Rectangle(O, 4, 2).Without(Outline.Circle(new(1, 1), 0.5), Outline.Circle(new(3, 1), 0.5));
        Assert.Equal(8 - (Math.PI / 2), perforated.Mirrored(O, new Vector2D(1, 1)).Rotated(O, 1).Scaled(O, 2).Moved(new(1, 1)).Area / 4, 1e-13);
    }

    [Fact]
    public void A_long_smooth_chain_is_taken_for_what_it_is()
    {
        // Straight pieces and arcs that join smoothly touch at a double root, which must not count as a contact.
        OutlinePath path = Outline.StartAt(O);
        double direction = 0.1;
        for (int i = 0; i < 60; i++)
        {
            double sweep = (i % 2 == 0 ? 1 : -1) * Math.Pow(10, -(i % 9));
            OutlinePiece probe = new(O, new Point2D(1, 0), sweep);
            Vector2D chord = Vector2D.AtAngle(direction + (0.5 * sweep));
            path = path.ArcTo(path.End + chord, sweep).StraightTo(path.End + chord + Vector2D.AtAngle(direction + sweep));
            Assert.True(Math.Abs(probe.Length) >= 1);
            direction += sweep;
        }

        Outline outline = path.StraightTo(new Point2D(50, 300)).Close();
        Assert.Equal(122, outline.Pieces.Length);
    }

    [Fact]
    public void Bad_outlines_say_what_is_wrong_and_where()
    {
        AssertInvalid("outline is open", () => Outline.Of([new(O, new(1, 0)), new(new(1, 0), new(1, 1))]));
        AssertInvalid("piece 0 ends at (1, 0)", () => Outline.Of([new(O, new(1, 0)), new(new(2, 0), O)]));
        AssertInvalid("crosses or touches itself at (0.5, 0.5)", () => Outline.Polygon(O, new(1, 1), new(1, 0), new(0, 1)));
        AssertInvalid("touches itself at (1, 0)", () => Outline.Polygon(O, new(2, 0), new(2, 1), new(1, 0), new(0, 1)));
        AssertInvalid("touches itself", () => Outline.Polygon(O, new(2, 0), new(1, 0), new(1, 1)));
        AssertInvalid("touches itself at (1, 1)", () => Outline.Polygon(O, new(1, 1), new(2, 0), new(2, 2), new(1, 1), new(0, 2)));
        AssertInvalid("touches itself", () => Outline.Of([new(O, new(1, 0), 1), new(new(1, 0), O, -1)]));
        AssertInvalid("crosses or touches itself at (1, 1)", () => Outline.StartAt(O).ArcTo(new(2, 0), -Math.PI).StraightTo(new(1, 0.5)).StraightTo(new(1, 2)).StraightTo(new(-1, 2)).Close());
        AssertInvalid("no length", () => Outline.Polygon(O, new(1, 0), new(1, 1e-12), new(0, 1)));
        AssertInvalid("no length", () => Outline.Polygon(O, O, new(0, 1)));
        AssertInvalid("not a finite number", () => Outline.Polygon(O, new(double.NaN, 0), new(0, 1)));
        AssertInvalid("not finite", () => Outline.StartAt(new Point2D(0, double.PositiveInfinity)));
        AssertInvalid("not finite", () => Outline.Circle(new Point2D(double.NaN, 0), 1));
        AssertInvalid("full turn", () => Outline.StartAt(O).ArcTo(new(1, 0), 2 * Math.PI));
        AssertInvalid("points lie in line", () => Outline.StartAt(O).ArcThrough(new(2, 0), new(1, 0)));
        AssertInvalid("blank", () => Outline.StartAt(O).StraightTo(new(1, 0), " "));
        AssertInvalid("no area", () => Outline.StartAt(O).StraightTo(new(1, 0)).ArcTo(O, 1e-8).Close());
        AssertInvalid("none was given", () => Outline.Of([]));
        AssertInvalid("lies outside", () => Outline.Circle(O, 1).Without(Outline.Circle(new(3, 0), 1)));
        AssertInvalid("meets its outer outline", () => Outline.Circle(O, 1).Without(Outline.Circle(new(0.5, 0), 0.5)));
        AssertInvalid("inside another hole", () => Outline.Circle(O, 1).Without(Outline.Circle(O, 0.5), Outline.Circle(O, 0.2)));
        Assert.Contains("radius", Assert.Throws<ArgumentOutOfRangeException>(() => Outline.Circle(O, 0)).Message, StringComparison.Ordinal);
        Assert.Throws<ArgumentOutOfRangeException>(() => Outline.Circle(O, double.NaN));
        Assert.Throws<ArgumentOutOfRangeException>(() => Outline.Rectangle(O, -1, 1));
        Assert.Throws<ArgumentOutOfRangeException>(() => Outline.RoundedRectangle(O, 2, 1, 0.6));
        Assert.Throws<ArgumentOutOfRangeException>(() => Outline.Sector(O, 1, 0, 7));
        Assert.Throws<ArgumentOutOfRangeException>(() => Outline.RingSector(O, 2, 1, 0, 1));
        Assert.Throws<ArgumentOutOfRangeException>(() => Shape.Ring(O, 1, 1));
        Assert.Throws<ArgumentOutOfRangeException>(() => Outline.Circle(O, 1).Scaled(O, 0));
        Assert.Throws<ArgumentException>(() => Outline.Circle(O, 1).Mirrored(O, Vector2D.Zero));
        Assert.Throws<ArgumentException>(() => Outline.Polygon(O, new Point2D(1, 0)));
        Assert.Throws<ArgumentException>(() => Outline.Circle(O, 1).Named(""));
    }

    private static void AssertInvalid(string cause, Func<object> call) =>
        Assert.Contains(cause, Assert.Throws<InvalidSectionException>(call).Message, StringComparison.Ordinal);
}
