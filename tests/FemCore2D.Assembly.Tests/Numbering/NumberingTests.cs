using FemCore2D.Elements;
using FemCore2D.Geometry;
using FemCore2D.Testing;
using FsCheck.Xunit;

namespace FemCore2D.Assembly.Tests;

public class NumberingTests
{
    [Property(MaxTest = 50, Arbitrary = [typeof(FieldArbitraries)])]
    public void EveryUnknownBelongsToOneVertexEdgeOrInterior(Mesh mesh, byte layout)
    {
        UnknownLayout triangle = new(layout % 3, layout / 3 % 4, layout / 12 % 4);
        UnknownLayout quadrilateral = triangle with { PerInterior = layout / 48 };
        var numbering = new Numbering(mesh, triangle, quadrilateral);
        int[] seen = new int[numbering.Count];
        for (int vertex = 0; vertex < mesh.VertexCount; vertex++)
        {
            Mark(numbering.PerVertex, () => numbering.FirstOfVertex(vertex));
        }

        for (int edge = 0; edge < mesh.EdgeCount; edge++)
        {
            Mark(numbering.PerEdge, () => numbering.FirstOfEdge(edge));
        }

        for (int cell = 0; cell < mesh.CellCount; cell++)
        {
            Mark(numbering.LayoutOf(mesh.KindOf(cell)).PerInterior, () => numbering.FirstOfInterior(cell));
        }

        Assert.All(seen, count => Assert.Equal(1, count));

        void Mark(int count, Func<int> first)
        {
            for (int k = 0; k < count; k++)
            {
                seen[first() + k]++;
            }
        }
    }

    [Property(MaxTest = 50, Arbitrary = [typeof(FieldArbitraries)])]
    public void NeighboursAgreeOnTheNodesOfTheirCommonEdge(Mesh mesh)
    {
        for (int degree = 1; degree <= (mesh.QuadrilateralCount > 0 ? 3 : 5); degree++)
        {
            var space = new NodeSpace(mesh, degree);
            int[] unknowns = new int[64];
            for (int cell = 0; cell < mesh.CellCount; cell++)
            {
                int count = space.Numbering.CellUnknowns(cell, unknowns);
                INodeElement element = space.ElementOn(mesh.KindOf(cell));
                Assert.Equal(element.UnknownCount, count);
                Assert.Equal(count, unknowns.AsSpan(0, count).ToArray().Distinct().Count());
                for (int i = 0; i < count; i++)
                {
                    // The places come from whichever cell was last; all cells must put the node there.
                    Point2D own = space.Maps.PlaceOf(cell, element.NodePoints[i]);
                    Assert.Equal(0, own.DistanceTo(space.NodePlaces[unknowns[i]]), 1e-12 * (1 + mesh.Vertices[0].DistanceTo(own)));
                }
            }
        }
    }

    [Fact]
    public void VerticesNumberTheUnknownsOfDegreeOne()
    {
        Mesh mesh = TestMeshes.Square(3, triangles: true);
        var space = new NodeSpace(mesh, 1);
        Span<int> unknowns = stackalloc int[3];
        for (int cell = 0; cell < mesh.CellCount; cell++)
        {
            space.Numbering.CellUnknowns(cell, unknowns);
            Assert.Equal(mesh.VerticesOf(cell).ToArray(), unknowns.ToArray());
        }
    }

    [Theory]
    [InlineData(1)]
    [InlineData(3)]
    public void SetsAreAscendingAndLieWhereTheyShould(int degree)
    {
        var space = new NodeSpace(TestMeshes.Square(3, triangles: false), degree);
        int[] left = [.. space.Numbering.UnknownsOfBoundary("left")];
        int[] middle = [.. space.Numbering.UnknownsOfBoundary("middle")];
        int[] region = [.. space.Numbering.UnknownsOfRegion("a")];
        Assert.Equal(left.Order().Distinct(), left);
        Assert.Equal(region.Order().Distinct(), region);
        Assert.Equal(Where(space, p => p.X == 0), left);
        Assert.Equal(Where(space, p => Math.Abs(p.X - 0.5) < 1e-12), middle);
        Assert.Equal(Where(space, p => p.X < 0.5 + 1e-12), region);
    }

    [Fact]
    public void MomentsKeepTheirOrderAndTellWhichEdgesAreReversed()
    {
        Mesh mesh = TestMeshes.Square(2, triangles: true);
        var moments = new Numbering(mesh, new(0, 3, 0), new(0, 3, 0), EdgeUnknownKind.Moments);
        int[] unknowns = new int[9];
        for (int cell = 0; cell < mesh.CellCount; cell++)
        {
            Assert.Equal(9, moments.CellUnknowns(cell, unknowns));
            ReadOnlySpan<int> vertices = mesh.VerticesOf(cell);
            for (int i = 0; i < 3; i++)
            {
                int first = moments.FirstOfEdge(mesh.EdgesOf(cell)[i]);
                Assert.Equal([first, first + 1, first + 2], unknowns[(3 * i)..((3 * i) + 3)]);
                Assert.Equal(vertices[i] > vertices[(i + 1) % 3], (moments.ReversedEdges(cell) >> i & 1) == 1);
            }
        }
    }

    [Fact]
    public void LayoutsThatDoNotFitAreRefused()
    {
        Mesh mixed = Mesh.Join(
        [
            QuadrilateralPatch.Straight(new(0, 0), new(1, 0), new(1, 1), new(0, 1), "a").Divide(1, 1),
            QuadrilateralPatch.Straight(new(1, 0), new(2, 0), new(2, 1), new(1, 1), "b").Divide(1, 1).CutQuadrilaterals().Mesh,
        ]);
        Assert.Throws<ArgumentException>(() => new Numbering(mixed, new(1, 1, 0), new(1, 2, 0)));
        Assert.Throws<ArgumentException>(() => new Numbering(mixed, new(-1, 1, 0), new(-1, 1, 0)));
        Assert.Throws<ArgumentOutOfRangeException>(() => new NodeSpace(mixed, 4));
        Assert.Equal(3, new NodeSpace(mixed, 3).Degree);
    }

    private static int[] Where(NodeSpace space, Func<Point2D, bool> condition) =>
        [.. Enumerable.Range(0, space.UnknownCount).Where(i => condition(space.NodePlaces[i]))];
}
