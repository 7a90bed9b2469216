using FemCore2D.Geometry;

namespace FemCore2D.Elements.Tests;

public class GaussRuleTests
{
    public static TheoryData<int> EdgeDegrees => [.. Enumerable.Range(0, EdgeRule.MaximumDegree + 1)];

    public static TheoryData<int> SquareDegrees => [.. Enumerable.Range(0, QuadratureRule.MaximumDegree + 1)];

    [Theory]
    [MemberData(nameof(EdgeDegrees))]
    public void EdgeRulesIntegrateEveryPowerExactlyAndTheNextEvenOneNot(int degree)
    {
        EdgeRule rule = EdgeRule.For(degree);
        Assert.Equal((degree / 2) + 1, rule.Count);
        Assert.True(rule.Degree >= degree);
        for (int i = 0; i <= rule.Degree; i++)
        {
            Assert.Equal(1, Sum(rule, t => Math.Pow(t, i)) * (i + 1), 4e-15);
        }

        // The square of the polynomial whose roots are the points is integrated to nothing.
        double missed = Sum(rule, t =>
        {
            double product = 1;
            foreach (double root in rule.Parameters)
            {
                product *= 2 * (t - root);
            }

            return product * product;
        });
        Assert.Equal(0, missed, 1e-30);
    }

    [Theory]
    [MemberData(nameof(EdgeDegrees))]
    public void EdgeRulesAreSymmetricPositiveAscendingAndInside(int degree)
    {
        EdgeRule rule = EdgeRule.For(degree);
        for (int i = 0; i < rule.Count; i++)
        {
            int mirror = rule.Count - 1 - i;
            Assert.Equal(1, rule.Parameters[i] + rule.Parameters[mirror]);
            Assert.Equal(rule.Weights[i], rule.Weights[mirror]);
            Assert.True(rule.Weights[i] > 0);
            Assert.True(rule.Parameters[i] > (i == 0 ? 0 : rule.Parameters[i - 1]) && rule.Parameters[i] < 1);
        }
    }

    [Fact]
    public void ThePointsOfThreeAreThoseOfTheClosedForm()
    {
        // NIST Digital Library of Mathematical Functions, table 3.5.1 and closed form: sqrt(3/5), weights 5/9 and 8/9.
        EdgeRule rule = EdgeRule.For(5);
        Assert.Equal((1 - Math.Sqrt(0.6)) / 2, rule.Parameters[0], 1e-16);
        Assert.Equal(0.5, rule.Parameters[1]);
        Assert.Equal(5.0 / 18, rule.Weights[0], 1e-16);
        Assert.Equal(4.0 / 9, rule.Weights[1], 1e-16);
    }

    [Theory]
    [MemberData(nameof(SquareDegrees))]
    public void SquareRulesIntegrateEveryProductOfPowersExactly(int degree)
    {
        QuadratureRule rule = QuadratureRule.For(CellKind.Quadrilateral, degree);
        Assert.True(rule.Degree >= degree);
        Assert.All(rule.Weights.ToArray(), w => Assert.True(w > 0));
        Assert.All(rule.Points.ToArray(), p => Assert.True(ReferenceCell.Contains(CellKind.Quadrilateral, p, -1e-4)));
        for (int i = 0; i <= degree; i++)
        {
            for (int j = 0; j <= degree; j++)
            {
                double sum = 0;
                for (int q = 0; q < rule.Count; q++)
                {
                    sum += rule.Weights[q] * Math.Pow(rule.Points[q].X, i) * Math.Pow(rule.Points[q].Y, j);
                }

                Assert.Equal(1, sum * (i + 1) * (j + 1), 1e-14);
            }
        }
    }

    private static double Sum(EdgeRule rule, Func<double, double> function)
    {
        double sum = 0;
        for (int q = 0; q < rule.Count; q++)
        {
            sum += rule.Weights[q] * function(rule.Parameters[q]);
        }

        return sum;
    }
}
