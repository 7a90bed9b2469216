using FemCore2D.Testing;
using FsCheck.Xunit;

namespace FemCore2D.Geometry.Tests;

[Properties(Arbitrary = [typeof(FieldArbitraries)], MaxTest = 25)]
public class RefinementTests
{
    [Property]
    public void RefiningAllKeepsAreasNamesAndConformity(Mesh mesh)
    {
        RefinedMesh refined = mesh.RefineAll();
        Assert.Equal(4 * mesh.TriangleCount, refined.Mesh.TriangleCount);
        Assert.Equal(4 * mesh.QuadrilateralCount, refined.Mesh.QuadrilateralCount);
        Assert.Equal(2 * mesh.OuterEdges.Length, refined.Mesh.OuterEdges.Length);
        CheckKept(mesh, refined);
    }

    [Property]
    public void RefiningCellsKeepsAreasNamesAndConformity(Mesh mesh, int[] marks)
    {
        int[] cells = [.. marks.Select(mark => Math.Abs(mark % mesh.CellCount))];
        RefinedMesh refined = mesh.RefineCells(cells);
        CheckKept(mesh, refined);
        int[] parts = new int[mesh.CellCount];
        foreach (int parent in refined.Parents)
        {
            parts[parent]++;
        }

        Assert.All(cells, cell => Assert.True(parts[cell] >= 2));
        Assert.All(parts.Take(mesh.TriangleCount), count => Assert.InRange(count, 1, 4));
        Assert.All(parts.Skip(mesh.TriangleCount), count => Assert.InRange(count, 1, 8));
    }

    [Property]
    public void CuttingQuadrilateralsKeepsAreasNamesAndConformity(Mesh mesh)
    {
        RefinedMesh cut = mesh.CutQuadrilaterals();
        Assert.Equal(mesh.TriangleCount + (2 * mesh.QuadrilateralCount), cut.Mesh.TriangleCount);
        Assert.Equal(0, cut.Mesh.QuadrilateralCount);
        Assert.Equal(mesh.VertexCount, cut.Mesh.VertexCount);
        CheckKept(mesh, cut);
    }

    [Property]
    public void NewVerticesOfArcsLieOnThem(Mesh mesh)
    {
        Mesh refined = mesh.RefineAll().Mesh;
        foreach (string name in mesh.BoundaryNames)
        {
            foreach (int edge in refined.BoundaryEdges(name))
            {
                // Its ends are an old vertex and the middle of an old edge.
                (int from, int middle) = refined.EndsOf(edge);
                int parent = middle - mesh.VertexCount;
                Assert.Equal(mesh.PointOnEdge(parent, 0.5), refined.Vertices[middle]);
                double sign = mesh.EndsOf(parent).From == from ? 1 : -1;
                Assert.Equal(0.5 * sign * mesh.SweepRadiansOf(parent), refined.SweepRadiansOf(edge), 1e-15);
            }
        }
    }

    [Property(MaxTest = 15)]
    public void BisectionNeverFallsBelowABoundOfItsAngles(TriangleCorners corners)
    {
        // All descendants of a straight triangle fall into a few classes of shape, which three rounds bring forth.
        Mesh mesh = corners.ToMesh();
        double bound = Enumerable.Range(0, 3).Aggregate(
            (Mesh: mesh, Least: SmallestAngle(mesh)),
            (state, _) =>
            {
                Mesh next = state.Mesh.RefineCells([.. Enumerable.Range(0, state.Mesh.CellCount)]).Mesh;
                return (next, Math.Min(state.Least, SmallestAngle(next)));
            }).Least;
        for (int round = 0; round < 10; round++)
        {
            mesh = mesh.RefineCells([mesh.Locator.NearestCell(corners.A, out _), mesh.CellCount / 2]).Mesh;
            Assert.True(SmallestAngle(mesh) > bound * (1 - 1e-6));
        }

        MeshInvariants.Check(mesh);
        MeshInvariants.Near(corners.Area, MeshInvariants.Area(mesh), 1e-11);
    }

    [Fact]
    public void TenRoundsTowardsAPointOfTheRimKeepShapesOfACurvedMixedMesh()
    {
        Mesh mesh = Mesh.Join(
        [
            QuadrilateralPatch.RingSector(Point2D.Origin, 1, 2, 0, Math.PI, "ring", "inner", "outer").Divide(2, 8),
            QuadrilateralPatch.RingSector(Point2D.Origin, 1, 2, Math.PI, Math.PI, "ring", "inner", "outer").Divide(2, 8),
        ]);
        double first = SmallestAngle(mesh.CutQuadrilaterals().Mesh);
        for (int round = 0; round < 10; round++)
        {
            mesh = mesh.RefineCells(mesh.Locator.NearestCell(new Point2D(0, 1.000001), out _)).Mesh;
            Assert.True(SmallestAngle(mesh.CutQuadrilaterals().Mesh) > 0.4 * first);
        }

        MeshInvariants.Check(mesh);
        Assert.True(mesh.QuadrilateralCount > 0);
        Assert.InRange(mesh.CellCount, 60, 250);
        MeshInvariants.Near(3 * Math.PI, mesh.AreaOfRegion("ring"));
        MeshInvariants.Near(4 * Math.PI, mesh.LengthOfBoundary("outer"));
        MeshInvariants.Near(2 * Math.PI, mesh.LengthOfBoundary("inner"));
    }

    [Fact]
    public void ARefinedRingIsTheRingOfTheRefinedGrid()
    {
        QuadrilateralPatch patch = QuadrilateralPatch.RingSector(new(1, 2), 1, 2, 0.3, 2.4, "ring");
        Mesh refined = patch.Divide(2, 3).RefineAll().Mesh;
        Mesh direct = patch.Divide(4, 6);
        foreach (Point2D vertex in direct.Vertices)
        {
            Assert.Contains(refined.Vertices.ToArray(), other => other.DistanceTo(vertex) < 1e-14);
        }

        double[] refinedSweeps = [.. Sweeps(refined)];
        double[] directSweeps = [.. Sweeps(direct)];
        Assert.Equal(directSweeps.Length, refinedSweeps.Length);
        Assert.All(directSweeps.Zip(refinedSweeps), pair => Assert.Equal(pair.First, pair.Second, 1e-14));

        static IEnumerable<double> Sweeps(Mesh mesh) =>
            Enumerable.Range(0, mesh.EdgeCount).Select(edge => Math.Abs(mesh.SweepRadiansOf(edge))).Order();
    }

    [Fact]
    public void NeighboursOfMarkedCellsFollowAndFarCellsStay()
    {
        Mesh mesh = QuadrilateralPatch.Straight(new(0, 0), new(8, 0), new(8, 8), new(0, 8), "a").Divide(8, 8);
        RefinedMesh refined = mesh.RefineCells(0);
        int[] touched = [.. refined.Parents.ToArray().GroupBy(parent => parent).Where(g => g.Count() > 1).Select(g => g.Key).Order()];
        Assert.Equal([0], touched); // The diagonal of a square is its longest line: no neighbour is cut.
        Assert.Equal(4, refined.Mesh.TriangleCount);
        Assert.Equal(63, refined.Mesh.QuadrilateralCount);

        RefinedMesh again = refined.Mesh.RefineCells(0, 1, 2, 3);
        MeshInvariants.Check(again.Mesh);
        Assert.InRange(again.Mesh.QuadrilateralCount, 59, 62);
    }

    [Fact]
    public void NothingMarkedChangesNothing()
    {
        Mesh mesh = QuadrilateralPatch.RingSector(Point2D.Origin, 1, 2, 0, 2, "a").Divide(2, 2);
        RefinedMesh refined = mesh.RefineCells();
        Assert.Equal(mesh.Vertices, refined.Mesh.Vertices);
        Assert.Equal(mesh.Quadrilaterals, refined.Mesh.Quadrilaterals);
        Assert.Equal([0, 1, 2, 3], refined.Parents.ToArray());
        Assert.Throws<ArgumentOutOfRangeException>(() => mesh.RefineCells(4));
        Assert.Throws<ArgumentOutOfRangeException>(() => mesh.RefineCells(-1));
    }

    [Fact]
    public void AThinLayerUnderAWideArcRefines()
    {
        // The inner arc rises far above the chords of the outer one.
        Mesh mesh = QuadrilateralPatch.RingSector(Point2D.Origin, 1, 1.05, 0, 1.2, "layer").Divide(1, 1);
        for (int round = 0; round < 3; round++)
        {
            mesh = mesh.RefineAll().Mesh;
            MeshInvariants.Check(mesh);
        }

        MeshInvariants.Near(0.6 * ((1.05 * 1.05) - 1), mesh.AreaOfRegion("layer"), 1e-11);
    }

    private static void CheckKept(Mesh mesh, RefinedMesh refined)
    {
        MeshInvariants.Check(refined.Mesh);
        Assert.Equal(mesh.RegionNames.AsEnumerable(), refined.Mesh.RegionNames);
        Assert.Equal(mesh.BoundaryNames.AsEnumerable(), refined.Mesh.BoundaryNames);
        foreach (string region in mesh.RegionNames)
        {
            MeshInvariants.Near(mesh.AreaOfRegion(region), refined.Mesh.AreaOfRegion(region), 1e-11);
        }

        foreach (string boundary in mesh.BoundaryNames)
        {
            MeshInvariants.Near(mesh.LengthOfBoundary(boundary), refined.Mesh.LengthOfBoundary(boundary));
        }

        // Parts fill their parents, arcs included.
        double[] areas = new double[mesh.CellCount];
        Assert.Equal(refined.Mesh.CellCount, refined.Parents.Length);
        for (int cell = 0; cell < refined.Parents.Length; cell++)
        {
            int parent = refined.Parents[cell];
            areas[parent] += refined.Mesh.AreaOf(cell);
            Assert.Equal(mesh.CellRegions[parent], refined.Mesh.CellRegions[cell]);
        }

        for (int cell = 0; cell < areas.Length; cell++)
        {
            MeshInvariants.Near(mesh.AreaOf(cell), areas[cell], 1e-11);
        }
    }

    private static double SmallestAngle(Mesh mesh)
    {
        double least = Math.PI;
        for (int cell = 0; cell < mesh.TriangleCount; cell++)
        {
            ReadOnlySpan<int> corners = mesh.VerticesOf(cell);
            for (int i = 0; i < 3; i++)
            {
                Vector2D next = mesh.Vertices[corners[(i + 1) % 3]] - mesh.Vertices[corners[i]];
                Vector2D previous = mesh.Vertices[corners[(i + 2) % 3]] - mesh.Vertices[corners[i]];
                least = Math.Min(least, Math.Atan2(next.Cross(previous), next.Dot(previous)));
            }
        }

        return least;
    }
}
