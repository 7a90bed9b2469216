using FemCore2D.Geometry;
using FsCheck.Xunit;

namespace FemCore2D.Elements.Tests;

[Properties(Arbitrary = [typeof(RandomCells)])]
public class TableTests
{
    public static TheoryData<CellKind, int> Elements => AllElements.Names();

    [Theory]
    [MemberData(nameof(Elements))]
    public void TablesHoldWhatTheElementGivesAtThePoints(CellKind cell, int degree)
    {
        INodeElement element = NodeElement.Lagrange(cell, degree);
        ShapeTable table = new(element, QuadratureRule.For(cell, 2 * degree));
        Assert.Same(element, table.Element);
        Assert.Equal(table.PointCount * table.UnknownCount, table.Values.Length);
        Assert.Equal(table.PointCount * table.UnknownCount, table.Gradients.Length);
        for (int q = 0; q < table.PointCount; q++)
        {
            Assert.Equal(AllElements.ValuesAt(element, table.Rule.Points[q]), table.ValuesAt(q));
            Assert.Equal(AllElements.GradientsAt(element, table.Rule.Points[q]), table.GradientsAt(q));
        }

        TraceTable traces = new(element, EdgeRule.For(2 * degree));
        double[] expected = new double[degree + 1];
        for (int edge = 0; edge < ReferenceCell.VertexCount(cell); edge++)
        {
            for (int q = 0; q < traces.PointCount; q++)
            {
                element.EdgeValues(edge, traces.Rule.Parameters[q], expected);
                for (int i = 0; i < expected.Length; i++)
                {
                    Assert.Equal(expected[i], traces.ValuesAt(q)[i], 1e-14);
                }
            }
        }
    }

    [Fact]
    public void AnElementAndARuleOfDifferentCellsAreRefused() =>
        Assert.Throws<ArgumentException>(() =>
            new ShapeTable(new LagrangeTriangle(1), QuadratureRule.For(CellKind.Quadrilateral, 2)));

    [Fact]
    public void TheMatricesOfTheLinearTriangleAreThoseOfTheTextbooks()
    {
        // Areas and gradients by hand: mass 1/24 (1 + delta_ij), load 1/6.
        ReferenceMatrices matrices = new(new LagrangeTriangle(1));
        AssertClose([0.5, -0.5, 0, -0.5, 0.5, 0, 0, 0, 0], matrices.StiffnessXiXi);
        AssertClose([0.5, 0, -0.5, 0, 0, 0, -0.5, 0, 0.5], matrices.StiffnessEtaEta);
        AssertClose([0.5, 0, -0.5, -0.5, 0, 0.5, 0, 0, 0], matrices.StiffnessXiEta);
        AssertClose([1, -0.5, -0.5, -0.5, 0, 0.5, -0.5, 0.5, 0], matrices.StiffnessMixed);
        AssertClose([1 / 12.0, 1 / 24.0, 1 / 24.0, 1 / 24.0, 1 / 12.0, 1 / 24.0, 1 / 24.0, 1 / 24.0, 1 / 12.0], matrices.Mass);
        AssertClose([1 / 6.0, 1 / 6.0, 1 / 6.0], matrices.Load);
    }

    [Fact]
    public void TheMassMatrixOfTheQuadraticTriangleIsThatOfTheTextbooks()
    {
        // Silvester 1969: 180 M / A = 6 at vertices, -1 between vertices, 0 and -4 to mid-points, 32 and 16 among these.
        ReferenceMatrices matrices = new(new LagrangeTriangle(2));
        double unit = 0.5 / 180;
        AssertClose(
            [
                .. new double[]
                {
                    6, -1, -1, 0, -4, 0,
                    -1, 6, -1, 0, 0, -4,
                    -1, -1, 6, -4, 0, 0,
                    0, 0, -4, 32, 16, 16,
                    -4, 0, 0, 16, 32, 16,
                    0, -4, 0, 16, 16, 32,
                }.Select(m => m * unit),
            ],
            matrices.Mass);
    }

    [Theory]
    [MemberData(nameof(Elements))]
    public void MatricesAreSymmetricToTheBitAndKnowConstants(CellKind cell, int degree)
    {
        ReferenceMatrices m = new(NodeElement.Lagrange(cell, degree));
        int n = m.Order;
        double area = ReferenceCell.Area(cell);
        Assert.Equal(area, m.Load.ToArray().Sum(), 1e-15);
        Assert.Equal(area, m.Mass.ToArray().Sum(), 1e-15);
        for (int i = 0; i < n; i++)
        {
            double rowOfMass = 0;
            double rowOfXi = 0;
            double rowOfMixed = 0;
            for (int j = 0; j < n; j++)
            {
                int ij = (i * n) + j;
                int ji = (j * n) + i;
                Assert.Equal(m.Mass[ij], m.Mass[ji]);
                Assert.Equal(m.StiffnessXiXi[ij], m.StiffnessXiXi[ji]);
                Assert.Equal(m.StiffnessEtaEta[ij], m.StiffnessEtaEta[ji]);
                Assert.Equal(m.StiffnessMixed[ij], m.StiffnessMixed[ji]);
                Assert.Equal(m.StiffnessXiEta[ij] + m.StiffnessXiEta[ji], m.StiffnessMixed[ij]);
                rowOfMass += m.Mass[ij];
                rowOfXi += m.StiffnessXiXi[ij] + m.StiffnessEtaEta[ij];
                rowOfMixed += m.StiffnessXiEta[ij];
            }

            Assert.Equal(m.Load[i], rowOfMass, 1e-16);
            Assert.Equal(0, rowOfXi, 1e-13);
            Assert.Equal(0, rowOfMixed, 1e-13);
        }
    }

    [Property(MaxTest = 30)]
    public void TheyAddUpToTheLocalMatricesOfAnyTriangle(RandomTriangle t)
    {
        CellMaps maps = new(TestMeshes.Of(t), 1);
        Jacobian jacobian = maps.JacobianAt(0, default);
        double determinant = jacobian.Determinant;
        Vector2D xi = jacobian.ToReferenceStep(new Vector2D(1, 0));
        Vector2D eta = jacobian.ToReferenceStep(new Vector2D(0, 1));

        // The rows of the inverse Jacobian are the gradients of the reference coordinates.
        Vector2D gradientXi = new(xi.X, eta.X);
        Vector2D gradientEta = new(xi.Y, eta.Y);
        for (int degree = 1; degree <= 5; degree++)
        {
            LagrangeTriangle element = new(degree);
            ReferenceMatrices m = new(element);
            ShapeTable table = new(element, QuadratureRule.For(CellKind.Triangle, 2 * degree));
            double scale = determinant * Math.Max(gradientXi.LengthSquared, gradientEta.LengthSquared);
            for (int i = 0; i < m.Order; i++)
            {
                for (int j = 0; j < m.Order; j++)
                {
                    double direct = 0;
                    for (int q = 0; q < table.PointCount; q++)
                    {
                        Vector2D gi = jacobian.ToRealGradient(table.GradientsAt(q)[i]);
                        Vector2D gj = jacobian.ToRealGradient(table.GradientsAt(q)[j]);
                        direct += table.Rule.Weights[q] * determinant * gi.Dot(gj);
                    }

                    int ij = (i * m.Order) + j;
                    double summed = determinant * (
                        (gradientXi.Dot(gradientXi) * m.StiffnessXiXi[ij])
                        + (gradientXi.Dot(gradientEta) * m.StiffnessMixed[ij])
                        + (gradientEta.Dot(gradientEta) * m.StiffnessEtaEta[ij]));
                    Assert.Equal(direct, summed, 1e-13 * scale);
                }
            }
        }
    }

    private static void AssertClose(double[] expected, ReadOnlySpan<double> actual)
    {
        Assert.Equal(expected.Length, actual.Length);
        for (int i = 0; i < expected.Length; i++)
        {
            Assert.Equal(expected[i], actual[i], 1e-15);
        }
    }
}
