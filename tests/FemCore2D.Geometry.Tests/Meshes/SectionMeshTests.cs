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

    [Fact]
    public void TenRoundsTowardsAnArcKeepTheAnglesOfACurvedMesh()
    {
        CrossSection section = CrossSection.Empty
            .Fill(Outline.Circle(Point2D.Origin, 2, "rim"), "air")
            .Fill(Outline.Circle(new(0.3, 0.1), 1, "wire"), "copper");
        Mesh mesh = Mesher.Generate(section).Mesh;
        int coarse = mesh.CellCount;
        double first = SmallestAngle(mesh);
        for (int round = 0; round < 10; round++)
        {
            // Cells on both sides of the inner circle, in which it bends in and out, and one on the rim.
            mesh = mesh.RefineCells(
                mesh.Locator.CellAt(new(0.3, 1.0999)), mesh.Locator.CellAt(new(0.3, 1.1001)),
                mesh.Locator.NearestCell(new(2.0001, 0), out _)).Mesh;

            // Bisection brings no angle below half the smallest of a triangle; the rest is the bend of the arcs.
            Assert.True(SmallestAngle(mesh) > 0.4 * first);
        }

        MeshInvariants.Check(mesh);
        MeshInvariants.Near(3 * Math.PI, mesh.AreaOfRegion("air"));
        MeshInvariants.Near(Math.PI, mesh.AreaOfRegion("copper"));
        MeshInvariants.Near(2 * Math.PI, mesh.LengthOfBoundary("wire"));
        Assert.InRange(mesh.CellCount - coarse, 60, 200);
    }

    private static double SmallestAngle(Mesh mesh) => Enumerable.Range(0, 3 * mesh.TriangleCount).Min(corner =>
    {
        ReadOnlySpan<int> corners = mesh.VerticesOf(corner / 3);
        Point2D place = mesh.Vertices[corners[corner % 3]];
        Vector2D next = mesh.Vertices[corners[(corner + 1) % 3]] - place;
        Vector2D previous = mesh.Vertices[corners[(corner + 2) % 3]] - place;
        return Math.Atan2(next.Cross(previous), next.Dot(previous));
    });

    private static class SectionMeshes
    {
        public static Arbitrary<Mesh> Meshes() => MeshGenerators.OfSections(SectionGenerators.All()).ToArbitrary();

        public static Arbitrary<SquarePoint> Points() => CellGenerators.PointsOfSquare().ToArbitrary();
    }
}
