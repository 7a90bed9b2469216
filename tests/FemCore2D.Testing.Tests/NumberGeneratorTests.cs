using FemCore2D.Geometry;
using FsCheck.Fluent;
using FsCheck.Xunit;

namespace FemCore2D.Testing.Tests;

[Properties(Arbitrary = [typeof(FieldArbitraries)])]
public class NumberGeneratorTests
{
    [Fact]
    public void RangesAreFilledWithTheirEnds()
    {
        double[] numbers = NumberGenerators.Between(-2, 3).Sample(1000);
        Assert.All(numbers, number => Assert.InRange(number, -2, 3));
        Assert.Contains(-2.0, numbers);
        Assert.Contains(3.0, numbers);
        Assert.InRange(numbers.Average(), 0.2, 0.8);
    }

    [Fact]
    public void MagnitudesSpreadOverDecades()
    {
        double[] numbers = NumberGenerators.MagnitudeBetween(1e-4, 1e4).Sample(1000);
        Assert.InRange(numbers.Count(number => number < 1), 400, 600);
        Assert.All(numbers, number => Assert.InRange(number, 0.99e-4, 1.01e4));
        Assert.Throws<ArgumentOutOfRangeException>(() => NumberGenerators.MagnitudeBetween(0, 1));
    }

    [Property]
    public void GradientIsTheLimitOfDifferences(Polynomial2D polynomial, SquarePoint point)
    {
        const double Step = 1e-5;
        Point2D p = point.Place;
        double x = (polynomial.ValueAt(new(p.X + Step, p.Y)) - polynomial.ValueAt(new(p.X - Step, p.Y))) / (2 * Step);
        double y = (polynomial.ValueAt(new(p.X, p.Y + Step)) - polynomial.ValueAt(new(p.X, p.Y - Step))) / (2 * Step);
        Vector2D gradient = polynomial.GradientAt(p);
        Assert.Equal(x, gradient.X, 1e-7);
        Assert.Equal(y, gradient.Y, 1e-7);
    }

    [Fact]
    public void CoefficientsGoByRisingDegreeAndFallingPowerOfX()
    {
        var polynomial = new Polynomial2D(1, 2, 3, 4, 5, 6);
        Assert.Equal(2, polynomial.Degree);
        Assert.Equal(1 + (2 * 3) + (3 * 5) + (4 * 9) + (5 * 15) + (6 * 25), polynomial.ValueAt(new Point2D(3, 5)));
        Assert.Equal(new Polynomial2D(1, 2, 3, 4, 5, 6), polynomial);
        Assert.NotEqual(new Polynomial2D(1, 2, 3), polynomial);
        Assert.Throws<ArgumentException>(() => new Polynomial2D(1, 2));
        Assert.Throws<ArgumentException>(() => new Polynomial2D());
    }
}
