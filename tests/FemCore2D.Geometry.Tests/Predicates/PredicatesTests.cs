using System.Numerics;
using FsCheck;
using FsCheck.Fluent;

namespace FemCore2D.Geometry.Tests;

/// <summary>The signs of the predicates, against integers of any length.</summary>
public sealed class PredicatesTests
{
    /// <summary>Points of a small grid, each coordinate moved by a few units in the last place.</summary>
    public static Arbitrary<Point2D[]> NearlyDegeneratePoints()
    {
        Gen<double> coordinate =
            from cell in Gen.Choose(-4, 4)
            from ulps in Gen.Frequency((2, Gen.Constant(0)), (3, Gen.Choose(-3, 3)))
            from origin in Gen.Elements(0.0, 0.1, 12.0)
            select Moved(origin + (cell * 0.3), ulps);
        Gen<Point2D> point = from x in coordinate from y in coordinate select new Point2D(x, y);
        return Arb.From(point.ArrayOf(4));
    }

    /// <summary>Points on a circle as well as doubles allow, and points of a line.</summary>
    public static Arbitrary<Point2D[]> RoundedCirclesAndLines()
    {
        Gen<Point2D> onCircle =
            from angle in Gen.Choose(0, 3600)
            select new Point2D(3 + Math.Cos(angle / 572.9), 0.1 + Math.Sin(angle / 572.9));
        Gen<Point2D> onLine =
            from position in Gen.Choose(-1000, 1000)
            select new Point2D(position / 7.0, position / 21.0);
        return Arb.From(Gen.OneOf(onCircle.ArrayOf(4), onLine.ArrayOf(4)));
    }

    [Fact]
    public void SignsOfNearlyDegeneratePointsAreExact() =>
        Check.One(Config.QuickThrowOnFailure.WithMaxTest(20000), Prop.ForAll(NearlyDegeneratePoints(), HasExactSigns));

    [Fact]
    public void SignsOnRoundedCirclesAndLinesAreExact() =>
        Check.One(Config.QuickThrowOnFailure.WithMaxTest(20000), Prop.ForAll(RoundedCirclesAndLines(), HasExactSigns));

    [Fact]
    public void NearlyDegenerateSamplesContainZerosAndBothSigns()
    {
        int[] signs = [.. NearlyDegeneratePoints().Generator.Sample(60000)
            .Select(p => Math.Sign(Predicates.InCircle(p[0], p[1], p[2], p[3])))];
        Assert.Contains(0, signs);
        Assert.Contains(1, signs);
        Assert.Contains(-1, signs);
    }

    [Fact]
    public void CornersOfASquareLieOnOneCircleWhereverTheSquareIs()
    {
        for (int i = 0; i < 200; i++)
        {
            double x = i * 1024.0;
            double y = -i;
            Assert.Equal(0, Predicates.InCircle(new(x, y), new(x + 1, y), new(x + 1, y + 1), new(x, y + 1)));
        }
    }

    [Fact]
    public void OneUnitInTheLastPlaceDecides()
    {
        Point2D a = new(0.1, 0.1);
        Point2D b = new(0.7, 0.7);
        Point2D c = new(0.4, 0.4);
        Assert.Equal(0, Predicates.Orientation(a, b, c));
        Assert.True(Predicates.Orientation(a, b, new(0.4, Math.BitIncrement(0.4))) > 0);
        Assert.True(Predicates.Orientation(a, b, new(0.4, Math.BitDecrement(0.4))) < 0);
    }

    private static bool HasExactSigns(Point2D[] p) =>
        Math.Sign(Predicates.Orientation(p[0], p[1], p[2])) == RationalOrientation(p)
        && Math.Sign(Predicates.InCircle(p[0], p[1], p[2], p[3])) == RationalInCircle(p);

    private static int RationalOrientation(Point2D[] p)
    {
        (BigInteger X, BigInteger Y)[] q = [.. p.Select(Scaled)];
        return Cross(q[0], q[1], q[2]).Sign;
    }

    private static int RationalInCircle(Point2D[] p)
    {
        (BigInteger X, BigInteger Y)[] q = [.. p.Select(Scaled)];
        (BigInteger X, BigInteger Y) d = q[3];
        return ((Lift(q[0], d) * Cross(q[1], q[2], d))
            + (Lift(q[1], d) * Cross(q[2], q[0], d))
            + (Lift(q[2], d) * Cross(q[0], q[1], d))).Sign;
    }

    private static BigInteger Cross(
        (BigInteger X, BigInteger Y) a, (BigInteger X, BigInteger Y) b, (BigInteger X, BigInteger Y) c) =>
        ((a.X - c.X) * (b.Y - c.Y)) - ((a.Y - c.Y) * (b.X - c.X));

    private static BigInteger Lift((BigInteger X, BigInteger Y) a, (BigInteger X, BigInteger Y) d) =>
        ((a.X - d.X) * (a.X - d.X)) + ((a.Y - d.Y) * (a.Y - d.Y));

    private static (BigInteger X, BigInteger Y) Scaled(Point2D p) => (Scaled(p.X), Scaled(p.Y));

    /// <summary>The double times two to the 300th power: a whole number for all values used here.</summary>
    private static BigInteger Scaled(double value)
    {
        long bits = BitConverter.DoubleToInt64Bits(value);
        int exponent = (int)((bits >> 52) & 0x7ff);
        long mantissa = (bits & 0xfffffffffffff) | (exponent == 0 ? 0 : 1L << 52);
        int shift = Math.Max(exponent, 1) - 1075 + 300;
        if (mantissa == 0)
        {
            return BigInteger.Zero;
        }

        Assert.True(shift >= 0 || (mantissa & ((1L << -shift) - 1)) == 0);
        BigInteger scaled = shift >= 0 ? new BigInteger(mantissa) << shift : new BigInteger(mantissa) >> -shift;
        return bits < 0 ? -scaled : scaled;
    }

    private static double Moved(double value, int ulps)
    {
        // The neighbours of zero are subnormal, whose products underflow.
        for (; ulps > 0 && value != 0; ulps--)
        {
            value = Math.BitIncrement(value);
        }

        for (; ulps < 0 && value != 0; ulps++)
        {
            value = Math.BitDecrement(value);
        }

        return value;
    }
}
