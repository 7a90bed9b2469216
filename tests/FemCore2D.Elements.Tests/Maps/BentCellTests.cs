using FemCore2D.Geometry;
using FsCheck.Xunit;

namespace FemCore2D.Elements.Tests;

/// <summary>Single cells whose edges all bend at random, many of them too far.</summary>
[Properties(Arbitrary = [typeof(RandomCells)])]
public class BentCellTests
{
    [Property(MaxTest = 200)]
    public void ACellIsRefusedExactlyWhenItFolds(RandomTriangle t, RandomQuadrilateral q, RandomBends bends)
    {
        foreach (Mesh mesh in Cells(t, q, bends))
        {
            foreach (int degree in new[] { 2, 3 })
            {
                CurvedCells curved = new(mesh, degree);
                CellKind kind = mesh.KindOf(0);
                double largest = 0;
                double smallest = double.PositiveInfinity;
                for (int i = 0; curved.Any && i <= 40; i++)
                {
                    for (int j = 0; j <= (kind == CellKind.Triangle ? 40 - i : 40); j++)
                    {
                        double determinant = curved.JacobianAt(0, kind, new Point2D(i / 40.0, j / 40.0)).Determinant;
                        largest = Math.Max(largest, determinant);
                        smallest = Math.Min(smallest, determinant);
                    }
                }

                InvalidCellException? fold = Refusal(mesh, degree);
                if (smallest <= 0)
                {
                    Assert.NotNull(fold);
                }
                else if (smallest > 0.005 * largest)
                {
                    Assert.Null(fold);
                }
            }
        }
    }

    [Property(MaxTest = 200)]
    public void TheInverseLeadsBackInEveryCellThatDoesNotFold(
        RandomTriangle t, RandomQuadrilateral q, RandomBends bends, RandomPoint p)
    {
        foreach (Mesh mesh in Cells(t, q, bends))
        {
            foreach (int degree in new[] { 2, 3 })
            {
                if (Refusal(mesh, degree) is not null)
                {
                    continue;
                }

                CellMaps maps = new(mesh, degree);
                Point2D at = p.In(mesh.KindOf(0));
                Point2D place = maps.PlaceOf(0, at);
                Assert.True(maps.TryInvert(0, place, out Point2D back), $"lost at {at}");
                double size = mesh.Vertices[0].DistanceTo(mesh.Vertices[1]);
                Assert.True(maps.PlaceOf(0, back).DistanceTo(place) <= 1e-13 * size * 20);
                Assert.True(maps.JacobianAt(0, back).Determinant > 0);
            }
        }
    }

    private static IEnumerable<Mesh> Cells(RandomTriangle t, RandomQuadrilateral q, RandomBends bends)
    {
        yield return TestMeshes.OfCells(t.Vertices, [0, 1, 2], [], bends.On(3));
        yield return TestMeshes.OfCells(q.Vertices, [], [0, 1, 2, 3], bends.On(4));
    }

    private static InvalidCellException? Refusal(Mesh mesh, int degree)
    {
        try
        {
            _ = new CellMaps(mesh, degree);
            return null;
        }
        catch (InvalidCellException fold)
        {
            return fold;
        }
    }
}
