using FsCheck.Xunit;

namespace FemCore2D.Geometry.Tests;

public class OutlineOffsetTests
{
    private static readonly Point2D O = Point2D.Origin;

    public static TheoryData<Outline> Convex => [Outline.Rectangle(O, 3, 2), Outline.Circle(O, 1), Outline.Sector(O, 2, 0.3, 1), Outline.RoundedRectangle(O, 3, 2, 0.5)];

    [Theory]
    [MemberData(nameof(Convex), DisableDiscoveryEnumeration = true)]
    public void A_convex_outline_grows_as_Steiner_says(Outline outline)
    {
        // Steiner 1840: the area grows by the perimeter times d plus pi d squared, the perimeter by 2 pi d.
        foreach (Outline way in new[] { outline, outline.Reversed() })
        {
            Outline offset = way.Offset(0.7);
            Assert.Equal(outline.Area + (0.7 * outline.Perimeter) + (Math.PI * 0.49), offset.Area, 1e-12);
            Assert.Equal(outline.Perimeter + (1.4 * Math.PI), offset.Perimeter, 1e-12);
            Assert.Equal(Math.Sign(way.SignedArea), Math.Sign(offset.SignedArea));
        }
    }

    [Theory]
    [MemberData(nameof(Convex), DisableDiscoveryEnumeration = true)]
    public void Inward_undoes_outward_for_convex_outlines(Outline outline)
    {
        Outline back = outline.Offset(0.7).Offset(-0.7);
        Assert.Equal(outline.Area, back.Area, 1e-12);
        Assert.Equal(outline.Pieces.Length, back.Pieces.Length);
    }

    [Fact]
    public void Inward_corners_stay_sharp_and_names_stay_with_their_pieces()
    {
        Outline inner = Outline.Rectangle(O, 3, 2, bottom: "b", right: "r").Offset(-0.25);
        Assert.Equal(2.5 * 1.5, inner.Area, 1e-14);
        Assert.Equal(4, inner.Pieces.Length);
        Assert.Equal(2.5, inner.Pieces.Single(p => p.Boundary == "b").Length, 1e-14);
        Assert.Equal(1.5, inner.Pieces.Single(p => p.Boundary == "r").Length, 1e-14);
        Assert.All(Outline.Rectangle(O, 1, 1).Named("all").Offset(1).Pieces, p => Assert.Equal("all", p.Boundary));
    }

    [Fact]
    public void Notches_close_and_reflex_corners_are_cut()
    {
        // An L of three unit squares: outward by d the one reflex corner is cut sharp, the five others are rounded.
        Outline corner = Outline.Polygon(O, new(2, 0), new(2, 1), new(1, 1), new(1, 2), new(0, 2));
        double d = 0.25;
        Assert.Equal(3 + (8 * d) - (d * d) + (1.25 * Math.PI * d * d), corner.Offset(d).Area, 1e-13);

        // A notch of width 0.2 disappears when both of its sides move by more than half of that.
        Outline notched = Outline.Polygon(O, new(1, 0), new(1, 0.4), new(0.5, 0.4), new(0.5, 0.6), new(1, 0.6), new(1, 1), new(0, 1));
        Outline grown = notched.Offset(0.3);
        Assert.True(grown.Contains(new Point2D(0.9, 0.5)));
        Assert.True(grown.Area < Outline.Rectangle(O, 1, 1).Offset(0.3).Area);
    }

    [Fact]
    public void What_does_not_stay_one_outline_is_refused()
    {
        AssertInvalid("Nothing is left", () => Outline.Circle(O, 1).Offset(-1));
        AssertInvalid("Nothing is left", () => Outline.Circle(O, 1).Offset(-3));
        AssertInvalid("Nothing is left", () => Outline.Rectangle(O, 3, 2).Offset(-1.1));
        Outline dumbbell = Outline.Polygon(O, new(2, 0), new(2, 0.9), new(3, 0.9), new(3, 0), new(5, 0), new(5, 2), new(3, 2), new(3, 1.1), new(2, 1.1), new(2, 2), new(0, 2));
        AssertInvalid("becomes 2 outlines", () => dumbbell.Offset(-0.2));
        Outline hook = Outline.RingSector(O, 1, 2, 0, 6);
        AssertInvalid("becomes 2 outlines", () => hook.Offset(0.2));
        Assert.Throws<ArgumentOutOfRangeException>(() => hook.Offset(double.NaN));
        Assert.Same(hook, hook.Offset(0));
    }

    [Property(Arbitrary = [typeof(GeneralShapes)], MaxTest = 100)]
    public void Every_point_of_an_offset_keeps_the_distance(ShapeSpec[] shapes, bool outward)
    {
        Outline outline = shapes[0].ToShape().Outer;
        double distance = outward ? 0.4 : -0.1;
        Outline offset = outline.Offset(distance);

        // Between samples h apart the nearest one is farther by less than (h / 2)^2 / distance.
        double spacing = outline.Pieces.Max(p => p.Length) / 2000;
        double slack = 0.25 * spacing * spacing / Math.Abs(distance);
        foreach (Point2D p in offset.Pieces.SelectMany(piece => Enumerable.Range(0, 20).Select(i => piece.PointAt(i / 20.0))))
        {
            double nearest = outline.Pieces
                .SelectMany(piece => Enumerable.Range(0, 2001).Select(i => piece.PointAt(i / 2000.0).DistanceTo(p)))
                .Min();
            Assert.InRange(nearest, Math.Abs(distance) - 1e-9, Math.Abs(distance) + slack);
        }

        Assert.Equal(outward, offset.Area > outline.Area);
    }

    private static void AssertInvalid(string cause, Func<object> call) =>
        Assert.Contains(cause, Assert.Throws<InvalidSectionException>(call).Message, StringComparison.Ordinal);
}
