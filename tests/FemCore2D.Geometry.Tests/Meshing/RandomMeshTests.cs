using FsCheck;
using FsCheck.Fluent;

namespace FemCore2D.Geometry.Tests;

/// <summary>Meshes of random drawings and sections.</summary>
public sealed class RandomMeshTests
{
    [Fact]
    public void MeshesOfRandomDrawingsAreValid() =>
        Check.One(
            Config.QuickThrowOnFailure.WithMaxTest(40),
            Prop.ForAll(RandomArrangements.Fields(), fields => { MeshAudit.Generate(RandomArrangements.Draw(fields)); }));

    [Fact]
    public void MeshesWithRandomOptionsAreValid() =>
        Check.One(
            Config.QuickThrowOnFailure.WithMaxTest(40),
            Prop.ForAll(
                RandomArrangements.Fields(),
                RandomOptions(),
                (fields, options) => { MeshAudit.Generate(RandomArrangements.Draw(fields), options); }));

    [Fact]
    public void MeshesOfRandomSectionsOnALatticeAreValid() =>
        Check.One(
            Config.QuickThrowOnFailure.WithMaxTest(30),
            Prop.ForAll(LatticeShapes.Shapes(), shapes => { MeshAudit.Generate(ShapeLists.Paint(shapes).Arrange()); }));

    [Fact]
    public void MeshesOfRandomSectionsAreValid() =>
        Check.One(
            Config.QuickThrowOnFailure.WithMaxTest(30),
            Prop.ForAll(GeneralShapes.Shapes(), shapes => { MeshAudit.Generate(ShapeLists.Paint(shapes).Arrange()); }));

    private static Arbitrary<MeshOptions> RandomOptions() => Arb.From(
        from size in Gen.Elements(0.07, 0.2, 1.0, 10.0)
        from growth in Gen.Elements(1.05, 1.2, 1.6, 3)
        from angle in Gen.Elements(0.0, 15, 25, 32)
        from arc in Gen.Elements(5.0, 20, 45, 60)
        from edge in Gen.Elements(0.01, 0.1)
        select MeshOptions.Default.WithSize(size).WithGrowth(growth).WithSmallestAngleDegrees(angle)
            .WithLargestArcDegrees(arc).WithBoundarySize("left", edge));
}
