using FemCore2D.Geometry;
using FsCheck.Xunit;

namespace FemCore2D.Elements.Tests;

[Properties(Arbitrary = [typeof(RandomCells)])]
public class ReferenceCellTests
{
    [Theory]
    [InlineData(CellKind.Triangle)]
    [InlineData(CellKind.Quadrilateral)]
    public void EdgesLeadFromVertexToVertexWithTheCellOnTheirLeft(CellKind cell)
    {
        int count = ReferenceCell.VertexCount(cell);
        ReadOnlySpan<Point2D> vertices = ReferenceCell.Vertices(cell);
        Assert.Equal(count, vertices.Length);
        double doubleArea = 0;
        for (int edge = 0; edge < count; edge++)
        {
            Point2D start = ReferenceCell.PointOnEdge(cell, edge, 0);
            Point2D end = ReferenceCell.PointOnEdge(cell, edge, 1);
            Assert.Equal(vertices[edge], start);
            Assert.Equal(vertices[(edge + 1) % count], end);
            Assert.Equal(end - start, ReferenceCell.EdgeVector(cell, edge));
            Assert.True(ReferenceCell.EdgeVector(cell, edge).Cross(ReferenceCell.Centre(cell) - start) > 0);
            doubleArea += (start - Point2D.Origin).Cross(end - Point2D.Origin);
        }

        Assert.Equal(2 * ReferenceCell.Area(cell), doubleArea);
        Assert.Throws<ArgumentOutOfRangeException>(() => ReferenceCell.PointOnEdge(cell, count, 0));
        Assert.Throws<ArgumentOutOfRangeException>(() => ReferenceCell.PointOnEdge(cell, -1, 0));
    }

    [Property]
    public void ContainsInnerAndEdgePointsAndNoOthers(RandomPoint p)
    {
        foreach (CellKind cell in Enum.GetValues<CellKind>())
        {
            Assert.True(ReferenceCell.Contains(cell, p.In(cell), 1e-15));
            for (int edge = 0; edge < ReferenceCell.VertexCount(cell); edge++)
            {
                Point2D onEdge = ReferenceCell.PointOnEdge(cell, edge, p.U);
                Vector2D outward = -ReferenceCell.EdgeVector(cell, edge).LeftNormal;
                Assert.True(ReferenceCell.Contains(cell, onEdge, 1e-15));
                Assert.False(ReferenceCell.Contains(cell, onEdge + (1e-9 * outward)));
                Assert.True(ReferenceCell.Contains(cell, onEdge + (1e-9 * outward), 1e-8));
            }
        }
    }

    [Fact]
    public void AClosedEdgeListsStartEndAndItsOwnUnknowns()
    {
        UnknownLayout layout = new(2, 3, 4);
        int[] unknowns = new int[layout.OnClosedEdge];
        layout.UnknownsOnEdge(CellKind.Triangle, 2, unknowns);
        Assert.Equal([4, 5, 0, 1, 12, 13, 14], unknowns);
        Assert.Equal(19, layout.CountOn(CellKind.Triangle));
        Assert.Throws<ArgumentOutOfRangeException>(() => layout.UnknownsOnEdge(CellKind.Triangle, 3, new int[7]));
        Assert.Throws<ArgumentOutOfRangeException>(() => layout.UnknownsOnEdge(CellKind.Triangle, 0, new int[6]));
    }
}
