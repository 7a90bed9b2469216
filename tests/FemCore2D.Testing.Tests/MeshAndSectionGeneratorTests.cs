using FemCore2D.Geometry;
using FsCheck;
using FsCheck.Fluent;
using FsCheck.Xunit;

namespace FemCore2D.Testing.Tests;

[Properties(Arbitrary = [typeof(FieldArbitraries)], MaxTest = 50)]
public class MeshAndSectionGeneratorTests
{
    [Property]
    public void SectionsHaveAreasWithinTheirBounds(CrossSection section)
    {
        Assert.NotEmpty(section.Regions);
        double sum = section.Regions.Sum(section.AreaOf);
        Assert.InRange(sum, 1e-3 * section.Bounds.Width * section.Bounds.Height, section.Bounds.Width * section.Bounds.Height);
        Assert.All(section.Boundaries, name => Assert.True(section.LengthOf(name) > 0));
    }

    [Property(MaxTest = 15)]
    public void MeshesOfSectionsCoverThem(CrossSection section)
    {
        Mesh mesh = MeshGenerators.OfSections(Gen.Constant(section)).Sample(1)[0];
        Assert.All(section.Regions, name => Assert.Equal(section.AreaOf(name), mesh.AreaOfRegion(name), 1e-9 * section.AreaOf(name)));
    }

    [Fact]
    public void EveryKindOfMeshComesUp()
    {
        Mesh[] meshes = MeshGenerators.All().Sample(100);
        Assert.Contains(meshes, mesh => mesh.TriangleCount > 0 && mesh.QuadrilateralCount > 0);
        Assert.Contains(meshes, mesh => mesh.QuadrilateralCount == 0);
        Assert.Contains(meshes, mesh => mesh.TriangleCount == 0);
        Assert.Contains(meshes, mesh => mesh.HasArcs);
        Assert.Contains(meshes, mesh => !mesh.HasArcs);
        Assert.Contains(meshes, mesh => mesh.RegionNames.Length > 1);
        Assert.All(meshes, mesh => Assert.InRange(mesh.CellCount, 1, 20_000));
    }

    [Fact]
    public void StraightMeshesHaveNoArcs() =>
        Assert.All(MeshGenerators.Straight().Sample(30), mesh => Assert.False(mesh.HasArcs));

    [Fact]
    public void TheSameSeedGivesTheSameMeshes()
    {
        Mesh[] first = MeshGenerators.All().Sample(20, new Rnd(7, 9), 50);
        Mesh[] second = MeshGenerators.All().Sample(20, new Rnd(7, 9), 50);
        Assert.Equal(first.Select(mesh => mesh.Vertices.ToArray()), second.Select(mesh => mesh.Vertices.ToArray()));
    }
}
