using FemCore2D.Geometry;
using FsCheck.Xunit;
using static FemCore2D.Elements.Tests.AllElements;

namespace FemCore2D.Elements.Tests;

[Properties(Arbitrary = [typeof(RandomCells)])]
public class LagrangeTests
{
    public static TheoryData<CellKind, int> Elements => Names();

    [Property]
    public void ShapeFunctionsSumToOneAndTheirGradientsToZero(RandomPoint p)
    {
        foreach (INodeElement element in List)
        {
            Point2D point = p.In(element.Cell);
            Assert.Equal(1, ValuesAt(element, point).Sum(), 1e-14);
            Vector2D sum = GradientsAt(element, point).Aggregate((a, b) => a + b);
            Assert.True(sum.Length <= 2e-13, $"{element.Cell} {element.Degree} at {point}: {sum}");
        }
    }

    [Theory]
    [MemberData(nameof(Elements))]
    public void EachIsOneAtItsOwnNodeAndZeroAtAllOthers(CellKind cell, int degree)
    {
        INodeElement element = NodeElement.Lagrange(cell, degree);
        for (int j = 0; j < element.UnknownCount; j++)
        {
            double[] values = ValuesAt(element, element.NodePoints[j]);
            for (int i = 0; i < values.Length; i++)
            {
                Assert.Equal(i == j ? 1 : 0, values[i], 1e-14);
            }
        }
    }

    [Property]
    public void FunctionsVanishOnEdgesThatDoNotHoldTheirNode(RandomPoint p)
    {
        foreach (INodeElement element in List)
        {
            int[] held = new int[element.Layout.OnClosedEdge];
            for (int edge = 0; edge < ReferenceCell.VertexCount(element.Cell); edge++)
            {
                element.Layout.UnknownsOnEdge(element.Cell, edge, held);
                double[] values = ValuesAt(element, ReferenceCell.PointOnEdge(element.Cell, edge, p.U));
                for (int i = 0; i < values.Length; i++)
                {
                    Assert.True(held.Contains(i) || Math.Abs(values[i]) <= 1e-14);
                }
            }
        }
    }

    [Property]
    public void ElementsReproduceTheirPolynomialsAndTheirGradients(RandomPoint p)
    {
        foreach (INodeElement element in List)
        {
            Point2D point = p.In(element.Cell);
            double[] values = ValuesAt(element, point);
            Vector2D[] gradients = GradientsAt(element, point);
            foreach ((int i, int j) in Monomials(element.Cell, element.Degree))
            {
                double value = 0;
                Vector2D gradient = default;
                for (int k = 0; k < values.Length; k++)
                {
                    Point2D node = element.NodePoints[k];
                    double atNode = Math.Pow(node.X, i) * Math.Pow(node.Y, j);
                    value += atNode * values[k];
                    gradient += atNode * gradients[k];
                }

                Assert.Equal(Math.Pow(point.X, i) * Math.Pow(point.Y, j), value, 1e-14);
                Assert.Equal(i == 0 ? 0 : i * Math.Pow(point.X, i - 1) * Math.Pow(point.Y, j), gradient.X, 2e-13);
                Assert.Equal(j == 0 ? 0 : j * Math.Pow(point.X, i) * Math.Pow(point.Y, j - 1), gradient.Y, 2e-13);
            }
        }
    }

    [Property]
    public void GradientsAgreeWithDifferences(RandomPoint p)
    {
        foreach (INodeElement element in List)
        {
            GradientsAgreeWithDifferencesAt(element, p.In(element.Cell));
        }
    }

    [Theory]
    [MemberData(nameof(Elements))]
    public void GradientsAgreeWithDifferencesAtNodesWhereFactorsVanish(CellKind cell, int degree)
    {
        INodeElement element = NodeElement.Lagrange(cell, degree);
        foreach (Point2D node in element.NodePoints)
        {
            GradientsAgreeWithDifferencesAt(element, node);
        }
    }

    [Theory]
    [MemberData(nameof(Elements))]
    public void NodesFollowTheLayout(CellKind cell, int degree)
    {
        INodeElement element = NodeElement.Lagrange(cell, degree);
        Assert.Equal(cell, element.Cell);
        Assert.Equal(degree, element.Degree);
        Assert.Equal(element.UnknownCount, element.Layout.CountOn(cell));
        Assert.Equal(element.UnknownCount, element.NodePoints.Length);
        int corners = ReferenceCell.VertexCount(cell);
        Assert.Equal(ReferenceCell.Vertices(cell), element.NodePoints[..corners]);

        int[] held = new int[element.Layout.OnClosedEdge];
        for (int edge = 0; edge < corners; edge++)
        {
            element.Layout.UnknownsOnEdge(cell, edge, held);
            for (int k = 1; k < degree; k++)
            {
                Point2D expected = ReferenceCell.PointOnEdge(cell, edge, (double)k / degree);
                Assert.True(expected.DistanceTo(element.NodePoints[held[k + 1]]) <= 1e-15);
            }
        }

        int onBoundary = element.UnknownCount - element.Layout.PerInterior;
        foreach (Point2D node in element.NodePoints[onBoundary..])
        {
            Assert.True(ReferenceCell.Contains(cell, node, -0.1));
        }
    }

    [Fact]
    public void TheDefaultElementsAreOfDegreeOne()
    {
        Assert.Equal(new LagrangeTriangle(1), default);
        Assert.Equal(new LagrangeQuadrilateral(1), default);
        Assert.Equal(1, default(LagrangeTriangle).Degree);
        Assert.NotEqual(new LagrangeTriangle(2), default);
    }

    [Fact]
    public void DegreesWithoutAnElementAndShortSpansAreRefused()
    {
        Assert.Throws<ArgumentOutOfRangeException>(() => new LagrangeTriangle(0));
        Assert.Throws<ArgumentOutOfRangeException>(() => new LagrangeTriangle(6));
        Assert.Throws<ArgumentOutOfRangeException>(() => new LagrangeQuadrilateral(4));
        Assert.Throws<ArgumentOutOfRangeException>(() => NodeElement.Lagrange(CellKind.Quadrilateral, 4));
        Assert.Throws<ArgumentOutOfRangeException>(() => NodeElement.Lagrange(CellKind.Triangle, 0));
        foreach (INodeElement element in List)
        {
            int tooShort = element.UnknownCount - 1;
            Assert.Throws<ArgumentOutOfRangeException>(() => element.Values(default, new double[tooShort]));
            Assert.Throws<ArgumentOutOfRangeException>(() => element.Gradients(default, new Vector2D[tooShort]));
        }
    }

    private static void GradientsAgreeWithDifferencesAt(INodeElement element, Point2D point)
    {
        // Fourth-order central differences: exact for degree 4, off by h^4 f'''''/30 beyond.
        const double H = 5e-4;
        Vector2D[] gradients = GradientsAt(element, point);
        double[] alongXi = Difference(new Vector2D(H, 0));
        double[] alongEta = Difference(new Vector2D(0, H));
        for (int i = 0; i < gradients.Length; i++)
        {
            Assert.Equal(alongXi[i], gradients[i].X, 1e-10);
            Assert.Equal(alongEta[i], gradients[i].Y, 1e-10);
        }

        double[] Difference(Vector2D step)
        {
            double[] ahead = ValuesAt(element, point + step);
            double[] back = ValuesAt(element, point - step);
            double[] farAhead = ValuesAt(element, point + (2 * step));
            double[] farBack = ValuesAt(element, point - (2 * step));
            return [.. ahead.Select((_, i) => ((8 * (ahead[i] - back[i])) - (farAhead[i] - farBack[i])) / (12 * H))];
        }
    }
}
