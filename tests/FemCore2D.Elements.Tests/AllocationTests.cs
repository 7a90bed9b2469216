using FemCore2D.Geometry;

namespace FemCore2D.Elements.Tests;

public class AllocationTests
{
    private readonly Point2D[] points = QuadratureRule.For(CellKind.Triangle, 8).Points.ToArray();
    private readonly double[] values = new double[1000];
    private readonly Vector2D[] gradients = new Vector2D[1000];
    private readonly Point2D[] places = new Point2D[100];
    private readonly Jacobian[] jacobians = new Jacobian[100];

    [Fact]
    public void ElementsEvaluateWithoutAllocation()
    {
        AssertNothingAllocated(() =>
        {
            Evaluate(new LagrangeTriangle(5));
            Evaluate(new LagrangeQuadrilateral(3));
        });
        foreach (INodeElement element in AllElements.List)
        {
            AssertNothingAllocated(() => Evaluate(element));
        }
    }

    [Fact]
    public void MapsEvaluateAndInvertWithoutAllocation()
    {
        foreach (int degree in new[] { 1, 2, 3 })
        {
            foreach (Mesh mesh in new[] { TestMeshes.Disc(2), TestMeshes.QuarterRing(2) })
            {
                CellMaps maps = new(mesh, degree);
                AssertNothingAllocated(() => Map(maps));
            }
        }
    }

    [Fact]
    public void RulesAndElementsAreFoundWithoutAllocation() =>
        AssertNothingAllocated(() =>
        {
            values[0] = QuadratureRule.For(CellKind.Triangle, 12).Weights[0]
                + QuadratureRule.For(CellKind.Quadrilateral, 4).Weights[0]
                + EdgeRule.For(7).Weights[0]
                + NodeElement.Lagrange(CellKind.Triangle, 3).Degree;
        });

    private void Evaluate<TElement>(TElement element)
        where TElement : INodeElement
    {
        element.Values(points[0], values);
        element.Gradients(points[0], gradients);
        element.Values(points, values);
        element.Gradients(points, gradients);
        element.EdgeValues(1, 0.25, values);
    }

    private void Map(CellMaps maps)
    {
        for (int cell = 0; cell < maps.Mesh.CellCount; cell++)
        {
            maps.PlacesOf(cell, points, places);
            maps.JacobiansAt(cell, points, jacobians);
            Assert.True(maps.TryInvert(cell, places[1], out places[99]));
            places[98] = maps.PlaceOnEdge(cell, 0, 0.5) + maps.OuterNormalOnEdge(cell, 0, 0.5);
            values[0] = maps.LengthOf(maps.Mesh.EdgesOf(cell)[0]);
        }
    }

    private static void AssertNothingAllocated(Action action)
    {
        action();
        long before = GC.GetAllocatedBytesForCurrentThread();
        for (int i = 0; i < 10; i++)
        {
            action();
        }

        Assert.Equal(0, GC.GetAllocatedBytesForCurrentThread() - before);
    }
}
