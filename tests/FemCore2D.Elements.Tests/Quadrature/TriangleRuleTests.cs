using FemCore2D.Geometry;

namespace FemCore2D.Elements.Tests;

public class TriangleRuleTests
{
    public static TheoryData<int> Degrees => [.. Enumerable.Range(0, QuadratureRule.MaximumDegree + 1)];

    [Theory]
    [MemberData(nameof(Degrees))]
    public void EveryMonomialUpToTheDegreeIsIntegratedExactly(int degree)
    {
        QuadratureRule rule = QuadratureRule.For(CellKind.Triangle, degree);
        Assert.True(rule.Degree >= degree);
        for (int i = 0; i <= degree; i++)
        {
            for (int j = 0; i + j <= degree; j++)
            {
                double sum = 0;
                for (int q = 0; q < rule.Count; q++)
                {
                    sum += rule.Weights[q] * Power(rule.Points[q].X, i) * Power(rule.Points[q].Y, j);
                }

                // All terms are positive, so that even the smallest integral can be held to a relative error.
                double exact = Factorial(i) * Factorial(j) / Factorial(i + j + 2);
                Assert.True(Math.Abs(sum - exact) <= 1e-14 * exact, $"x^{i} y^{j}: {sum / exact - 1:E2}");
            }
        }
    }

    [Theory]
    [MemberData(nameof(Degrees))]
    public void WeightsArePositiveAndPointsInside(int degree)
    {
        QuadratureRule rule = QuadratureRule.For(CellKind.Triangle, degree);
        Assert.All(rule.Weights.ToArray(), w => Assert.True(w > 1e-5));
        Assert.All(rule.Points.ToArray(), p => Assert.True(ReferenceCell.Contains(CellKind.Triangle, p, -1e-4)));
    }

    [Theory]
    [MemberData(nameof(Degrees))]
    public void RulesAreTheSameAfterEveryPermutationOfTheVertices(int degree)
    {
        QuadratureRule rule = QuadratureRule.For(CellKind.Triangle, degree);
        for (int q = 0; q < rule.Count; q++)
        {
            (double a, double b) = (rule.Points[q].X, rule.Points[q].Y);
            double c = 1 - a - b;
            foreach (Point2D image in new Point2D[] { new(a, b), new(b, a), new(a, c), new(c, a), new(b, c), new(c, b) })
            {
                int partner = Enumerable.Range(0, rule.Count).MinBy(k => rule.Points[k].DistanceTo(image));
                Assert.True(rule.Points[partner].DistanceTo(image) <= 2e-16);
                Assert.Equal(rule.Weights[q], rule.Weights[partner]);
            }
        }
    }

    [Fact]
    public void RulesNeedNoMorePointsThanTheSmallestPublishedOnes()
    {
        // Counts of fully symmetric rules with positive weights and inner points: Witherden and Vincent, 2015;
        // degree 3 with six points: Strang and Fix, 1973.
        int[] smallest = [1, 1, 3, 6, 6, 7, 12, 15, 16, 19, 25, 28, 33, 37, 42, 49, 55, 60, 67, 73, 79];
        Assert.Equal(smallest, Enumerable.Range(0, 21).Select(d => QuadratureRule.For(CellKind.Triangle, d).Count));
    }

    [Fact]
    public void DegreesWithoutARuleAreRefused()
    {
        Assert.Throws<ArgumentOutOfRangeException>(() => QuadratureRule.For(CellKind.Triangle, 21));
        Assert.Throws<ArgumentOutOfRangeException>(() => QuadratureRule.For(CellKind.Triangle, -1));
        Assert.Throws<ArgumentOutOfRangeException>(() => QuadratureRule.For(CellKind.Quadrilateral, 21));
        Assert.Throws<ArgumentOutOfRangeException>(() => EdgeRule.For(42));
        Assert.Throws<ArgumentOutOfRangeException>(() => EdgeRule.For(-1));
    }

    [Fact]
    public void RulesAreShared() =>
        Assert.Same(QuadratureRule.For(CellKind.Triangle, 7), QuadratureRule.For(CellKind.Triangle, 7));

    private static double Power(double x, int exponent)
    {
        double power = 1;
        for (int i = 0; i < exponent; i++)
        {
            power *= x;
        }

        return power;
    }

    private static double Factorial(int n) => n < 2 ? 1 : n * Factorial(n - 1);
}
