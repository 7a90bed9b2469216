using FsCheck.Xunit;

namespace FemCore2D.Geometry.Tests;

public class RandomSectionTests
{
    [Property(Arbitrary = [typeof(LatticeShapes)], MaxTest = 150)]
    public void Shapes_on_a_lattice_arrange_without_a_flaw(ShapeSpec[] shapes) =>
        ArrangementAudit.Check(ShapeLists.Paint(shapes));

    [Property(Arbitrary = [typeof(GeneralShapes)], MaxTest = 150)]
    public void Shapes_in_general_position_arrange_without_a_flaw(ShapeSpec[] shapes) =>
        ArrangementAudit.Check(ShapeLists.Paint(shapes));

    [Property(Arbitrary = [typeof(LatticeShapes)], MaxTest = 150)]
    public void Turned_off_the_axes_the_coincidences_are_still_found(ShapeSpec[] shapes)
    {
        CrossSection turned = ShapeLists.Paint(shapes, s => s.Rotated(new Point2D(0.3, 0.7), 0.7));
        ArrangementAudit.Check(turned);
        AssertAlike(ShapeLists.Paint(shapes), turned, 1);
    }

    [Property(Arbitrary = [typeof(LatticeShapes)], MaxTest = 150)]
    public void Size_and_place_do_not_matter(ShapeSpec[] shapes, bool large)
    {
        // The section is 61 units wide: 1 mm and 1 km across.
        double factor = (large ? 1e3 : 1e-3) / 61;
        AssertAlike(
            ShapeLists.Paint(shapes),
            ShapeLists.Paint(shapes, s => s.Scaled(Point2D.Origin, factor).Moved(new Vector2D(3.7 * factor, -11 * factor))),
            factor);
    }

    [Property(Arbitrary = [typeof(LatticeShapes)], MaxTest = 150)]
    public void A_mirror_image_has_the_same_regions(ShapeSpec[] shapes)
    {
        CrossSection mirrored = ShapeLists.Paint(shapes, s => s.Mirrored(new Point2D(0.1, 0), new Vector2D(1, 0.3)));
        ArrangementAudit.Check(mirrored);
        AssertAlike(ShapeLists.Paint(shapes), mirrored, 1);
    }

    [Property(Arbitrary = [typeof(GeneralShapes)], MaxTest = 150)]
    public void The_regions_fill_the_section_less_its_holes(ShapeSpec[] shapes)
    {
        CrossSection section = ShapeLists.Paint(shapes);
        ShapeSpec[] filled = [.. shapes.Select(s => s with { Region = 0 })];
        double sum = section.Regions.Sum(section.AreaOf);

        // With the holes filled, or left out, nothing is missing.
        ShapeSpec[] unholed = [.. shapes.Where(s => s.Region != 3)];
        Assert.Equal(1600 + 4, ShapeLists.Paint(filled).Regions.Sum(ShapeLists.Paint(filled).AreaOf), 1e-9);
        Assert.Equal(1600 + 4, ShapeLists.Paint(unholed).Regions.Sum(ShapeLists.Paint(unholed).AreaOf), 1e-9);
        Assert.True(sum <= 1604 + 1e-9);
    }

    [Property(Arbitrary = [typeof(LatticeShapes)], MaxTest = 150)]
    public void Lines_at_just_about_the_tolerance_are_arranged_soundly_or_refused(ShapeSpec[] shapes, int seed)
    {
        // Near coincidences from well below the tolerance, here 8e-8, to well above it.
        Random random = new(seed);
        double reach = Math.Pow(10, -random.Next(6, 12));
        CrossSection section = ShapeLists.Paint(
            shapes,
            s => s.Moved(reach * new Vector2D(random.NextDouble() - 0.5, random.NextDouble() - 0.5)).Scaled(Point2D.Origin, 1 + (0.1 * reach * random.NextDouble())));
        try
        {
            Arrangement arrangement = section.Arrange();
            ArrangementAudit.RegionsAgreeRoundVertices(arrangement, [.. arrangement.Pieces.Select(p => ArrangementAudit.Line(arrangement, p))]);
        }
        catch (InvalidSectionException fault)
        {
            Assert.Contains("pass each other at just about", fault.Message, StringComparison.Ordinal);
        }
    }

    private static void AssertAlike(CrossSection one, CrossSection other, double factor)
    {
        Assert.Equal(one.Arrange().Pieces.Length, other.Arrange().Pieces.Length);
        Assert.Equal(one.Arrange().Vertices.Length, other.Arrange().Vertices.Length);
        foreach (string region in one.Regions)
        {
            Assert.Equal(one.AreaOf(region), other.AreaOf(region) / (factor * factor), 1e-9);
        }
    }
}
