using FemCore2D.Testing;
using FsCheck;
using FsCheck.Fluent;
using FsCheck.Xunit;

namespace FemCore2D.Geometry.Tests;

/// <summary>Meshes of the mesher, cusps between touching circles included.</summary>
[Properties(Arbitrary = [typeof(SectionMeshes)], MaxTest = 12)]
public class SectionMeshTests
{
    [Property]
    public void TheyPassTheChecksOfMeshesFromOutside(Mesh mesh) => MeshInvariants.Check(mesh);

    [Property]
    public void TheyRefineInWholeAndInPart(Mesh mesh, int mark)
    {
        Mesh refined = mesh.RefineAll().Mesh.RefineCells(Math.Abs(mark % (4 * mesh.CellCount))).Mesh;
        MeshInvariants.Check(refined);
        foreach (string region in mesh.RegionNames)
        {
            MeshInvariants.Near(mesh.AreaOfRegion(region), refined.AreaOfRegion(region), 1e-11);
        }

        foreach (string boundary in mesh.BoundaryNames)
        {
            MeshInvariants.Near(mesh.LengthOfBoundary(boundary), refined.LengthOfBoundary(boundary), 1e-11);
        }
    }

    [Property]
    public void EveryPointOfAnEdgeIsInACellOfIt(Mesh mesh, SquarePoint sample)
    {
        double rounding = 1e-14 * (mesh.Bounds.Diagonal + mesh.Bounds.Centre.DistanceTo(Point2D.Origin));
        for (int edge = 0; edge < mesh.EdgeCount; edge++)
        {
            Point2D point = mesh.PointOnEdge(edge, sample.Place.X);
            int cell = mesh.Locator.NearestCell(point, out double distance);
            Assert.True(mesh.IsOuter(edge) ? distance <= rounding : distance == 0);
            if (sample.Place.X is > 0.01 and < 0.99)
            {
                (int left, int right) = mesh.CellsOf(edge);
                Assert.True(cell == left || cell == right || mesh.SweepRadiansOf(edge) != 0);
            }
        }
    }

    private static class SectionMeshes
    {
        public static Arbitrary<Mesh> Meshes() => MeshGenerators.OfSections(SectionGenerators.All()).ToArbitrary();

        public static Arbitrary<SquarePoint> Points() => CellGenerators.PointsOfSquare().ToArbitrary();
    }
}
