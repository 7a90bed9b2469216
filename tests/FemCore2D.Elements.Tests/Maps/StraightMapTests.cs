using FemCore2D.Geometry;
using FsCheck.Xunit;

namespace FemCore2D.Elements.Tests;

[Properties(Arbitrary = [typeof(RandomCells)])]
public class StraightMapTests
{
    [Property]
    public void VerticesAndEdgesOfTheReferenceCellMeetThoseOfTheRealCell(RandomTriangle t, RandomQuadrilateral q, RandomPoint p)
    {
        foreach ((CellMaps maps, Point2D[] vertices, double size) in Cases(t, q))
        {
            CellKind kind = maps.Mesh.KindOf(0);
            for (int i = 0; i < vertices.Length; i++)
            {
                Point2D next = vertices[(i + 1) % vertices.Length];
                Assert.True(maps.PlaceOf(0, ReferenceCell.Vertices(kind)[i]).DistanceTo(vertices[i]) <= 1e-15 * size);
                Assert.True(maps.PlaceOnEdge(0, i, p.U).DistanceTo(vertices[i].Towards(next, p.U)) <= 1e-14 * size);
                Assert.True((maps.TangentOnEdge(0, i, p.U) - (next - vertices[i])).Length <= 1e-14 * size);
            }
        }
    }

    [Property]
    public void JacobiansAgreeWithDifferencesOfTheMap(RandomTriangle t, RandomQuadrilateral q, RandomPoint p)
    {
        foreach ((CellMaps maps, _, double size) in Cases(t, q))
        {
            Point2D at = p.In(maps.Mesh.KindOf(0));
            MapChecks.JacobianAgreesWithDifferences(maps, 0, at, 1e-10 * size);
        }
    }

    [Property]
    public void TheInverseLeadsBack(RandomTriangle t, RandomQuadrilateral q, RandomPoint p)
    {
        foreach ((CellMaps maps, _, _) in Cases(t, q))
        {
            Point2D at = p.In(maps.Mesh.KindOf(0));
            Assert.True(maps.TryInvert(0, maps.PlaceOf(0, at), out Point2D back));
            Assert.True(back.DistanceTo(at) <= 1e-12, $"{back} instead of {at}");
        }
    }

    [Property]
    public void QuadratureOfTheDeterminantGivesTheShoelaceArea(RandomTriangle t, RandomQuadrilateral q)
    {
        foreach ((CellMaps maps, Point2D[] vertices, double size) in Cases(t, q))
        {
            double shoelace = 0;
            for (int i = 0; i < vertices.Length; i++)
            {
                shoelace += (vertices[i] - vertices[0]).Cross(vertices[(i + 1) % vertices.Length] - vertices[0]) / 2;
            }

            Assert.Equal(shoelace, MapChecks.Area(maps), 1e-14 * size * size);
        }
    }

    [Property]
    public void StepsAndGradientsTurnWithTheMap(RandomQuadrilateral q, RandomPoint p, RandomPoint s)
    {
        Jacobian jacobian = new CellMaps(TestMeshes.Of(q), 1).JacobianAt(0, p.In(CellKind.Quadrilateral));
        Vector2D step = new(s.U, s.V - 0.5);
        Assert.True((jacobian.ToReferenceStep(jacobian.ToRealStep(step)) - step).Length <= 1e-13);

        // A gradient along a step is the same change, whichever coordinates both are written in.
        Vector2D gradient = new(s.V, 1 - s.U);
        Assert.Equal(gradient.Dot(step), jacobian.ToRealGradient(gradient).Dot(jacobian.ToRealStep(step)), 1e-12);
    }

    [Fact]
    public void OnlyTrianglesAndParallelogramsAreAffine()
    {
        Point2D[] vertices = [new(0, 0), new(2, 1), new(3, 3), new(1, 2), new(3.001, 3)];
        Assert.True(new CellMaps(TestMeshes.OfCells(vertices, [0, 1, 2], []), 3).IsAffine(0));
        Assert.True(new CellMaps(TestMeshes.OfCells(vertices, [], [0, 1, 2, 3]), 3).IsAffine(0));
        Assert.False(new CellMaps(TestMeshes.OfCells(vertices, [], [0, 1, 4, 3]), 3).IsAffine(0));
    }

    [Fact]
    public void SmallCellsFarFromTheOriginKeepTheirDigits()
    {
        Point2D far = new(1024 * 1024, -1024 * 1024);
        double side = Math.ScaleB(1, -20);
        Point2D[] vertices = [far, far + new Vector2D(side, 0), far + new Vector2D(1.25 * side, side), far + new Vector2D(0, side)];
        CellMaps maps = new(TestMeshes.OfCells(vertices, [], [0, 1, 2, 3]), 1);
        Assert.Equal(side * side * 1.125, MapChecks.Area(maps), 1e-15 * side * side);

        // Places near the cell are multiples of 2^-32, a fraction 2^-12 of its side: the inverse gets that far.
        Assert.True(maps.TryInvert(0, far + new Vector2D(0.625 * side, 0.5 * side), out Point2D back));
        Assert.True(back.DistanceTo(new Point2D(0.5555555555555556, 0.5)) <= 1e-15);
    }

    [Fact]
    public void PlacesOutsideAreInvertedOrRefusedButNeverWrong()
    {
        CellMaps maps = new(TestMeshes.OfCells([new(0, 0), new(2, 0), new(1.5, 1), new(0, 1.25)], [], [0, 1, 2, 3]), 1);
        int converged = 0;
        for (int i = -40; i <= 40; i++)
        {
            for (int j = -40; j <= 40; j++)
            {
                Point2D place = new(0.25 * i, 0.25 * j);
                if (maps.TryInvert(0, place, out Point2D back))
                {
                    converged++;
                    Assert.True(maps.PlaceOf(0, back).DistanceTo(place) <= 1e-12);
                    Assert.True(maps.JacobianAt(0, back).Determinant > 0);
                }
            }
        }

        Assert.True(converged > 1000);
        Assert.False(maps.TryInvert(0, new Point2D(double.NaN, 0), out _));
        Assert.False(maps.TryInvert(0, new Point2D(0, double.PositiveInfinity), out _));
    }

    private static IEnumerable<(CellMaps Maps, Point2D[] Vertices, double Size)> Cases(RandomTriangle t, RandomQuadrilateral q)
    {
        yield return (new CellMaps(TestMeshes.Of(t), 1), t.Vertices, t.Size);
        yield return (new CellMaps(TestMeshes.Of(q), 2), q.Vertices, q.Size);
    }
}
