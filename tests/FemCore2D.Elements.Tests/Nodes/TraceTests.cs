using FemCore2D.Geometry;
using FsCheck.Xunit;

namespace FemCore2D.Elements.Tests;

/// <summary>Two cells that share an edge, in every way in which their vertices can be listed.</summary>
[Properties(Arbitrary = [typeof(RandomCells)])]
public class TraceTests
{
    [Property]
    public void BothCellsGiveTheSameValueOnTheSharedEdge(RandomTriangle t, RandomPoint far, RandomPoint at, int seed)
    {
        // The second triangle lies across the edge from B to C.
        Vector2D outward = -(t.C - t.B).LeftNormal;
        Point2D d = t.B.Towards(t.C, far.U) + ((0.1 + far.V) * outward);
        for (int degree = 1; degree <= LagrangeTriangle.MaximumDegree; degree++)
        {
            LagrangeTriangle element = new(degree);
            double[] onEdge = RandomValues(element.Layout.OnClosedEdge, seed);
            Point2D place = t.B.Towards(t.C, at.U);
            foreach (bool lowerFirst in new[] { true, false })
            {
                double expected = double.NaN;
                for (int turn = 0; turn < 3; turn++)
                {
                    // Unknowns off the edge are different in each cell: they must not matter.
                    double first = Evaluate(element, [t.A, t.B, t.C], turn, t.B, t.C, lowerFirst, onEdge, seed + turn, place);
                    double second = Evaluate(element, [d, t.C, t.B], turn, t.B, t.C, lowerFirst, onEdge, seed - turn, place);
                    expected = turn == 0 ? first : expected;
                    Assert.Equal(expected, first, 1e-12);
                    Assert.Equal(expected, second, 1e-12);
                }
            }
        }
    }

    [Property]
    public void ATriangleAndAQuadrilateralGiveTheSameTraces(RandomPoint at)
    {
        for (int degree = 1; degree <= LagrangeQuadrilateral.MaximumDegree; degree++)
        {
            int count = degree + 1;
            double[] inTriangle = new double[count];
            double[] inQuadrilateral = new double[count];
            for (int i = 0; i < 3; i++)
            {
                for (int j = 0; j < 4; j++)
                {
                    new LagrangeTriangle(degree).EdgeValues(i, at.U, inTriangle);
                    new LagrangeQuadrilateral(degree).EdgeValues(j, 1 - at.U, inQuadrilateral);

                    // Seen from the other side start and end change places, and the nodes between are met backwards.
                    (inQuadrilateral[0], inQuadrilateral[1]) = (inQuadrilateral[1], inQuadrilateral[0]);
                    inQuadrilateral.AsSpan(2).Reverse();
                    for (int k = 0; k < count; k++)
                    {
                        Assert.Equal(inTriangle[k], inQuadrilateral[k], 1e-14);
                    }
                }
            }
        }
    }

    private static double Evaluate(
        LagrangeTriangle element,
        Point2D[] listed,
        int turn,
        Point2D b,
        Point2D c,
        bool fromBToC,
        double[] onEdge,
        int seed,
        Point2D place)
    {
        Point2D[] vertices = [listed[turn], listed[(turn + 1) % 3], listed[(turn + 2) % 3]];
        int edge = Enumerable.Range(0, 3).Single(i =>
            (vertices[i] == b && vertices[(i + 1) % 3] == c) || (vertices[i] == c && vertices[(i + 1) % 3] == b));

        double[] unknowns = RandomValues(element.UnknownCount, seed * 31);
        int[] held = new int[element.Layout.OnClosedEdge];
        element.Layout.UnknownsOnEdge(CellKind.Triangle, edge, held);
        bool along = vertices[edge] == (fromBToC ? b : c);
        unknowns[held[0]] = onEdge[along ? 0 : 1];
        unknowns[held[1]] = onEdge[along ? 1 : 0];
        for (int k = 2; k < held.Length; k++)
        {
            unknowns[held[k]] = onEdge[along ? k : held.Length + 1 - k];
        }

        Barycentric at = Barycentric.Of(vertices[0], vertices[1], vertices[2], place);
        double[] shapes = AllElements.ValuesAt(element, new Point2D(at.Second, at.Third));
        return shapes.Zip(unknowns, (s, u) => s * u).Sum();
    }

    private static double[] RandomValues(int count, int seed)
    {
        Random random = new(seed);
        return [.. Enumerable.Range(0, count).Select(_ => (2 * random.NextDouble()) - 1)];
    }
}
