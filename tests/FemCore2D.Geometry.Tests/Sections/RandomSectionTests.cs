using FsCheck.Xunit;

namespace FemCore2D.Geometry.Tests;

public class RandomSectionTests
{
    [Property(Arbitrary = [typeof(LatticeShapes)], MaxTest = 300)]
    public void Shapes_on_a_lattice_arrange_without_a_flaw(ShapeSpec[] shapes) =>
        ArrangementAudit.Check(ShapeLists.Paint(shapes));

    [Property(Arbitrary = [typeof(GeneralShapes)], MaxTest = 300)]
    public void Shapes_in_general_position_arrange_without_a_flaw(ShapeSpec[] shapes) =>
        ArrangementAudit.Check(ShapeLists.Paint(shapes));
}
