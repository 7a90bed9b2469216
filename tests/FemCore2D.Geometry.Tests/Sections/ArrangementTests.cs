
namespace FemCore2D.Geometry.Tests;

public class ArrangementTests
{
    private static readonly Point2D O = Point2D.Origin;

    [Theory]
    [InlineData(1e-3)]
    [InlineData(1)]
    [InlineData(1e3)]
    public void Circles_that_touch_from_outside_share_one_vertex(double size)
    {
        // The sum of the radii is the distance only but for rounding.
        CrossSection section = CrossSection.Empty
            .Fill(Outline.Circle(O, 0.3 * size).Rotated(O, 0.2), "first")
            .Fill(Outline.Circle(new Point2D(0.8 * size * Math.Cos(1), 0.8 * size * Math.Sin(1)), 0.5 * size), "second");
        Arrangement arrangement = Audited(section);
        Assert.Equal(9, arrangement.Vertices.Length);
        Assert.Equal(10, arrangement.Pieces.Length);
        Assert.Contains(arrangement.Vertices, v => v.DistanceTo(new Point2D(0.3 * size * Math.Cos(1), 0.3 * size * Math.Sin(1))) < 1e-14 * size);
    }

    [Fact]
    public void Circles_that_touch_from_inside_share_one_vertex()
    {
        CrossSection section = CrossSection.Empty
            .Fill(Outline.Circle(O, 1), "outer")
            .Fill(Outline.Circle(new Point2D(0.6 * Math.Cos(0.3), 0.6 * Math.Sin(0.3)), 0.4), "inner");
        Arrangement arrangement = Audited(section);
        Assert.Equal(9, arrangement.Vertices.Length);
        Assert.Equal(10, arrangement.Pieces.Length);
        Assert.Equal(0.84 * Math.PI, section.AreaOf("outer"), 1e-14);
    }

    [Fact]
    public void A_circle_touches_the_sides_of_its_square()
    {
        CrossSection section = CrossSection.Empty
            .Fill(Outline.Rectangle(new Point2D(-1, -1), 2, 2), "corners")
            .Fill(Outline.Circle(O, 1).Rotated(O, 0.4), "disc");
        Arrangement arrangement = Audited(section);

        // Four corners, four touching points, four quarter points of the turned circle.
        Assert.Equal(12, arrangement.Vertices.Length);
        Assert.Equal(16, arrangement.Pieces.Length);
        Assert.Equal(4 - Math.PI, section.AreaOf("corners"), 1e-14);
    }

    [Fact]
    public void Coincident_circles_become_one()
    {
        CrossSection section = CrossSection.Empty
            .Fill(Outline.Circle(O, 1, "first"), "under")
            .Fill(Outline.Circle(new Point2D(0.5, 0), 0.25), "core")
            .Fill(Shape.Ring(O, 0.9, 1, outerBoundary: "second").Rotated(O, 1), "shell");
        Arrangement arrangement = Audited(section);
        Assert.Equal(4 + 4 + 4, arrangement.Pieces.Length);
        Assert.Equal(2 * Math.PI, section.LengthOf("first"), 1e-14);
        Assert.Equal(2 * Math.PI, section.LengthOf("second"), 1e-14);
    }

    [Fact]
    public void One_outline_painted_twice_is_one()
    {
        Outline outline = Outline.RoundedRectangle(O, 2, 1, 0.3);
        CrossSection section = CrossSection.Empty.Fill(outline, "twice").Fill(outline.Reversed(), "twice");
        Assert.Equal(8, Audited(section).Pieces.Length);
        Assert.Equal(outline.Area, section.AreaOf("twice"), 1e-15);
    }

    [Fact]
    public void Rectangles_share_parts_of_edges()
    {
        CrossSection section = CrossSection.Empty
            .Fill(Outline.Rectangle(O, 1, 3), "left")
            .Fill(Outline.Rectangle(new Point2D(1, -1), 1, 2), "lower")
            .Fill(Outline.Rectangle(new Point2D(1, 1), 1, 1), "upper");
        Arrangement arrangement = Audited(section);
        Assert.Equal(10, arrangement.Vertices.Length);
        Assert.Equal(12, arrangement.Pieces.Length);
    }

    [Fact]
    public void Regions_that_touch_in_a_point_share_the_vertex()
    {
        CrossSection section = CrossSection.Empty
            .Fill(Outline.Rectangle(O, 1, 1), "one")
            .Fill(Outline.Rectangle(new Point2D(1, 1), 1, 1), "other");
        Arrangement arrangement = Audited(section);
        Assert.Equal(7, arrangement.Vertices.Length);
        Assert.Equal(8, arrangement.Pieces.Length);
    }

    [Theory]
    [InlineData(1e-3)]
    [InlineData(1e-5)]
    [InlineData(1e-7)]
    public void Thin_rings_keep_both_sides(double thickness)
    {
        CrossSection section = CrossSection.Empty
            .Fill(Outline.Circle(O, 1), "inside")
            .Fill(Shape.Ring(O, 1, 1 + thickness), "coating")
            .Fill(Shape.Ring(O, 1 + thickness, 1.5).Rotated(O, 0.7), "outside");
        Audited(section);
        Assert.Equal(1, section.AreaOf("coating") / (Math.PI * thickness * (2 + thickness)), 1e-14 / thickness);
    }

    [Fact]
    public void A_level_piece_may_be_the_chord_of_an_arc()
    {
        // The middle of the chord lies on the chord of the arc to the last digit.
        CrossSection section = CrossSection.Empty
            .Fill(Outline.Rectangle(new Point2D(-20, -20), 40, 40), "base")
            .Fill(Outline.Polygon(new(1, -5), new(5, -5), new(1, -1)), "triangle")
            .Fill(Outline.RingSector(new Point2D(3, -6), 2, 6, 0, 3), "sector");
        Arrangement arrangement = Audited(section);
        Assert.Contains(arrangement.Pieces, p => p.SweepRadians == 0 && ArrangementAudit.Line(arrangement, p).Midpoint.DistanceTo(new(3, -5)) < 1e-9);
    }

    [Fact]
    public void A_sheet_may_follow_an_arc_in_part()
    {
        CrossSection section = CrossSection.Empty
            .Fill(Outline.Circle(O, 1), "disc")
            .Sheet(Outline.StartAt(new Point2D(Math.Cos(0.3), Math.Sin(0.3))).ArcAround(O, 2), "electrode")
            .Sheet(Outline.StartAt(O).StraightTo(new Point2D(Math.Cos(1), Math.Sin(1))), "fin");
        Audited(section);
        Assert.Equal(2, section.LengthOf("electrode"), 1e-14);
        Assert.Equal(1, section.LengthOf("fin"), 1e-14);
    }

    [Fact]
    public void Vertices_cut_into_a_circle_lie_on_it_to_rounding()
    {
        CrossSection section = CrossSection.Empty.Fill(Outline.Circle(O, 1), "disc");
        for (int i = 0; i < 40; i++)
        {
            section = section.Fill(Outline.Circle(new Point2D(Math.Cos(i), Math.Sin(i)), 0.01 + (0.002 * i)), $"bead {i}");
        }

        Arrangement arrangement = section.Arrange();
        Point2D[] onCircle = [.. arrangement.Vertices.Where(v => Math.Abs((v - O).Length - 1) < 1e-6)];
        Assert.True(onCircle.Length > 40);
        Assert.All(onCircle, v => Assert.InRange(Math.Abs((v - O).Length - 1), 0, 1e-15));

        // Every arc between them is still a part of that circle.
        foreach (ArrangedPiece piece in arrangement.Pieces)
        {
            OutlinePiece line = ArrangementAudit.Line(arrangement, piece);
            if (onCircle.Contains(line.Start) && onCircle.Contains(line.End) && Math.Abs(line.Radius - 1) < 1e-3)
            {
                Assert.InRange(Math.Abs((line.Midpoint - O).Length - 1), 0, 1e-15);
            }
        }
    }

    [Fact]
    public void A_thousand_overlapping_outlines_arrange() => Assert.True(Thousand().Arrange().Pieces.Length > 6000);

    private static CrossSection Thousand()
    {
        CrossSection section = CrossSection.Empty.Fill(Outline.Rectangle(new Point2D(-1, -1), 34, 34), "base");
        for (int i = 0; i < 1000; i++)
        {
            section = section.Fill(Outline.Circle(new Point2D(i % 32, i / 32), 0.55), $"disc {i % 7}");
        }

        return section;
    }

    private static Arrangement Audited(CrossSection section)
    {
        ArrangementAudit.Check(section);
        return section.Arrange();
    }
}
