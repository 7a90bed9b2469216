namespace FemCore2D.Geometry.Tests;

public class CrossSectionTests
{
    private static readonly Point2D O = Point2D.Origin;

    private static CrossSection Square => CrossSection.Empty.Fill(Outline.Rectangle(O, 4, 4), "plate");

    [Fact]
    public void Later_shapes_cover_earlier_ones()
    {
        CrossSection section = Square
            .Fill(Outline.Circle(new Point2D(2, 2), 1.5), "pipe")
            .Fill(Outline.Circle(new Point2D(2, 2), 1), "water");
        Assert.Equal(["plate", "pipe", "water"], section.Regions);
        Assert.Equal(16 - (2.25 * Math.PI), section.AreaOf("plate"), 1e-14);
        Assert.Equal(1.25 * Math.PI, section.AreaOf("pipe"), 1e-14);
        Assert.Equal(Math.PI, section.AreaOf("water"), 1e-14);
        Assert.Equal("pipe", section.RegionAt(new Point2D(2, 3.2)));
        Assert.Null(section.RegionAt(new Point2D(5, 2)));
    }

    [Fact]
    public void The_section_that_a_call_starts_from_stays_as_it_was()
    {
        CrossSection before = Square;
        _ = before.Fill(Outline.Circle(O, 1), "disc");
        Assert.Equal(["plate"], before.Regions);
        Assert.Equal(16, before.AreaOf("plate"), 1e-14);
    }

    [Fact]
    public void A_region_may_have_many_parts_and_a_hole_lets_nothing_through()
    {
        CrossSection section = Square
            .Fill(Outline.Circle(new Point2D(1, 1), 0.5), "core")
            .Fill(Outline.Circle(new Point2D(3, 1), 0.5), "core")
            .Hole(Outline.Circle(new Point2D(3, 1), 0.25));
        Assert.Equal(0.4375 * Math.PI, section.AreaOf("core"), 1e-14);
        Assert.Null(section.RegionAt(new Point2D(3, 1)));
    }

    [Fact]
    public void A_ring_shows_what_was_painted_in_it_before()
    {
        CrossSection section = Square
            .Fill(Outline.Circle(new Point2D(2, 2), 1.5), "water")
            .Fill(Shape.Ring(new Point2D(2, 2), 1, 1.5), "pipe");
        Assert.Equal(Math.PI, section.AreaOf("water"), 1e-14);
        Assert.Equal(1.25 * Math.PI, section.AreaOf("pipe"), 1e-14);
    }

    [Fact]
    public void Overlapping_discs_share_the_lens()
    {
        // Two circles of radius 1 at distance 1: the lens has the area 2 pi / 3 - sqrt(3) / 2.
        CrossSection section = CrossSection.Empty
            .Fill(Outline.Circle(O, 1), "first")
            .Fill(Outline.Circle(new Point2D(1, 0), 1), "second");
        double lens = (2 * Math.PI / 3) - (Math.Sqrt(3) / 2);
        Assert.Equal(Math.PI - lens, section.AreaOf("first"), 1e-14);
        Assert.Equal(Math.PI, section.AreaOf("second"), 1e-14);
    }

    [Fact]
    public void Named_pieces_are_boundaries_where_nothing_covers_them()
    {
        CrossSection section = CrossSection.Empty
            .Fill(Outline.Rectangle(O, 4, 4, bottom: "ground", left: "symmetry"), "air")
            .Hole(Outline.Circle(O, 1, "wire"))
            .Fill(Outline.Circle(new Point2D(2, 2), 1, "contour"), "air");
        Assert.Equal(["ground", "symmetry", "wire", "contour"], section.Boundaries);
        Assert.Equal(3, section.LengthOf("ground"), 1e-14);
        Assert.Equal(3, section.LengthOf("symmetry"), 1e-14);
        Assert.Equal(Math.PI / 2, section.LengthOf("wire"), 1e-14);
        Assert.Equal(2 * Math.PI, section.LengthOf("contour"), 1e-14);
        Assert.Equal(16 - (Math.PI / 4), section.AreaOf("air"), 1e-14);
    }

    [Fact]
    public void Names_of_coincident_lines_all_hold()
    {
        CrossSection section = CrossSection.Empty
            .Fill(Outline.Rectangle(O, 1, 1, right: "left's right"), "left")
            .Fill(Outline.Rectangle(new Point2D(1, 0.5), 1, 1, left: "right's left"), "right")
            .Sheet(new Point2D(1, 0.25), new Point2D(1, 0.75), "foil");
        Assert.Equal(1, section.LengthOf("left's right"), 1e-14);
        Assert.Equal(1, section.LengthOf("right's left"), 1e-14);
        Assert.Equal(0.5, section.LengthOf("foil"), 1e-14);
        Assert.Contains(section.Arrange().BoundarySets, s => s.Length == 3);
    }

    [Fact]
    public void Sheets_lie_on_top_whenever_they_are_added()
    {
        CrossSection section = Square
            .Sheet(new Point2D(1, 1), new Point2D(3, 1), "strip")
            .Fill(Outline.Rectangle(new Point2D(2, 0), 2, 4), "cover");
        Assert.Equal(2, section.LengthOf("strip"), 1e-14);
        ArrangementAudit.Check(section);
    }

    [Fact]
    public void A_sheet_of_arcs_may_cross_itself_and_the_regions()
    {
        CrossSection section = Square
            .Fill(Outline.Circle(new Point2D(2, 2), 1), "disc")
            .Sheet(
                Outline.StartAt(new Point2D(0.5, 0.5)).StraightTo(new Point2D(3.5, 3.5)).StraightTo(new Point2D(3.5, 0.5))
                    .ArcTo(new Point2D(0.5, 3.5), 0.4),
                "wire");
        ArrangementAudit.Check(section);
        Assert.Equal(3 + (3 * Math.Sqrt(2)) + (3 * Math.Sqrt(2) * 0.2 / Math.Sin(0.2)), section.LengthOf("wire"), 1e-14);
    }

    [Fact]
    public void Fixed_points_become_vertices_on_pieces_and_inside()
    {
        CrossSection section = Square
            .FixedPoint(new Point2D(1, 0), "on the side")
            .FixedPoint(new Point2D(4, 4), "at the corner")
            .FixedPoint(new Point2D(2, 3), "inside");
        Arrangement arrangement = section.Arrange();
        Assert.Equal(section.Points, arrangement.PointNames);
        Assert.Equal(
            [new Point2D(1, 0), new Point2D(4, 4), new Point2D(2, 3)], arrangement.PointVertices.Select(v => arrangement.Vertices[v]));
        Assert.Equal(5, arrangement.Pieces.Length);
        Assert.Equal(6, arrangement.Vertices.Length);
    }

    [Fact]
    public void Hidden_lines_leave_no_vertices_on_visible_ones()
    {
        CrossSection section = Square
            .Fill(Outline.Circle(new Point2D(0, 2), 1.2), "plate")
            .Hole(Outline.Rectangle(new Point2D(-3, 0), 3, 4))
            .Fill(Outline.Rectangle(new Point2D(1, 1), 1, 1), "plate");
        Arrangement arrangement = section.Arrange();
        Assert.Equal(4, arrangement.Pieces.Length);
        Assert.Equal(4, arrangement.Vertices.Length);
        Assert.Equal(16, section.AreaOf("plate"), 1e-14);
    }

    [Fact]
    public void Unknown_names_are_answered_with_the_known_ones()
    {
        Assert.Contains("'plate'", Assert.Throws<UnknownNameException>(() => Square.AreaOf("plat")).Message, StringComparison.Ordinal);
        Assert.Throws<UnknownNameException>(() => Square.LengthOf("plate"));
    }

    public static TheoryData<string, CrossSection> BadSections => new()
    {
        { "no region", CrossSection.Empty },
        { "no region", CrossSection.Empty.Hole(Outline.Circle(O, 1)) },
        { "'plate' at (0, 0) is painted over completely by 'cover'", Square.Fill(Outline.Rectangle(new Point2D(-1, -1), 6, 6), "cover") },
        { "'disc' at (1, 0) is painted over completely by a hole", Square.Fill(Outline.Circle(O, 1), "disc").Hole(Outline.Circle(O, 2)) },
        { "'disc' at (2, 2) is painted over completely by 'right', 'left'", CrossSection.Empty.Fill(Outline.Circle(new Point2D(1, 2), 1), "disc").Fill(Outline.Rectangle(new Point2D(1, 0), 3, 4), "right").Fill(Outline.Rectangle(O, 1, 4), "left") },
        { "'plate' at (0, 0) is painted over completely by 'again'", Square.Fill(Outline.Rectangle(O, 4, 4), "again") },
        { "boundary 'rim' is painted over", Square.Fill(Outline.Circle(new Point2D(2, 2), 1, "rim"), "plate").Fill(Outline.Circle(new Point2D(2, 2), 1.5), "plate") },
        { "boundary 'far' is painted over completely, or lies outside", Square.Hole(Outline.Circle(new Point2D(9, 9), 1, "far")) },
        { "sheet 'strip' leaves the section at (4.5, 1)", Square.Sheet(new Point2D(1, 1), new Point2D(5, 1), "strip") },
        { "'probe' at (5, 5) lies outside", Square.FixedPoint(new Point2D(5, 5), "probe") },
        { "'probe' at (2, 2) lies outside", Square.Hole(Outline.Circle(new Point2D(2, 2), 1)).FixedPoint(new Point2D(2, 2), "probe") },
        { "too small", Square.Fill(Outline.Circle(O, 1e-10), "dot") },
    };

    [Theory]
    [MemberData(nameof(BadSections), DisableDiscoveryEnumeration = true)]
    public void A_section_that_cannot_be_meshed_says_why(string cause, CrossSection section) =>
        Assert.Contains(cause, Assert.Throws<InvalidSectionException>(section.Arrange).Message, StringComparison.Ordinal);

    [Fact]
    public void Bad_calls_are_answered_at_once()
    {
        AssertInvalid("already stands for a region", () => Square.Sheet(O, new Point2D(1, 1), "plate"));
        AssertInvalid("already stands for a region", () => Square.Hole(Outline.Circle(O, 1, "plate")));
        AssertInvalid("already stands for a boundary", () => Square.Fill(Outline.Circle(O, 1, "rim"), "disc").Fill(Outline.Circle(O, 1), "rim"));
        AssertInvalid("already stands for a region", () => Square.FixedPoint(O, "plate"));
        AssertInvalid("two fixed points 'p'", () => Square.FixedPoint(O, "p").FixedPoint(new Point2D(1, 1), "p"));
        AssertInvalid("not finite", () => Square.FixedPoint(new Point2D(double.NaN, 0), "p"));
        AssertInvalid("no pieces", () => Square.Sheet(Outline.StartAt(O), "s"));
        AssertInvalid("no length", () => Square.Sheet(O, O, "s"));
        Assert.Throws<ArgumentException>(() => Square.Fill(Outline.Circle(O, 1), " "));
        Assert.Throws<ArgumentException>(() => Square.Sheet(O, new Point2D(1, 1), ""));
        Assert.Throws<ArgumentNullException>(() => Square.Fill((Outline)null!, "x"));
    }

    private static void AssertInvalid(string cause, Func<object> call) =>
        Assert.Contains(cause, Assert.Throws<InvalidSectionException>(call).Message, StringComparison.Ordinal);
}
