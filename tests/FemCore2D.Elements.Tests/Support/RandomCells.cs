using FemCore2D.Geometry;
using FsCheck;
using FsCheck.Fluent;

namespace FemCore2D.Elements.Tests;

/// <summary>A triangle in general position, counterclockwise, of any size and place but not needle-thin.</summary>
public sealed record RandomTriangle(Point2D A, Point2D B, Point2D C)
{
    public Point2D[] Vertices => [A, B, C];

    public double Size => Math.Max(A.DistanceTo(B), Math.Max(B.DistanceTo(C), C.DistanceTo(A)));
}

/// <summary>A convex quadrilateral, counterclockwise: a square with each vertex moved by up to a fifth of its side, turned and scaled.</summary>
public sealed record RandomQuadrilateral(Point2D A, Point2D B, Point2D C, Point2D D)
{
    public Point2D[] Vertices => [A, B, C, D];

    public double Size => A.DistanceTo(C);
}

/// <summary>Two numbers from 0 to 1, ends included now and then; stand for points of both reference cells.</summary>
public sealed record RandomPoint(double U, double V)
{
    public Point2D In(CellKind cell) =>
        cell == CellKind.Quadrilateral || U + V <= 1 ? new Point2D(U, V) : new Point2D(1 - U, 1 - V);
}

/// <summary>The angles that the edges of a cell sweep, some of them zero, up to an eighth turn either way.</summary>
public sealed record RandomBends(double First, double Second, double Third, double Fourth)
{
    internal MarkedEdge[] On(int corners) =>
    [
        .. new[] { First, Second, Third, Fourth }.Take(corners)
            .Select((sweep, i) => new MarkedEdge(i, (i + 1) % corners, sweep, -1)),
    ];
}

/// <summary>The generators of the property tests.</summary>
public static class RandomCells
{
    private static Gen<double> Unit => Gen.Frequency(
        (9, Gen.Choose(0, 1_000_000).Select(i => i / 1e6)),
        (1, Gen.Elements(0.0, 1.0, 0.5)));

    private static Gen<double> Signed => Gen.Choose(-1_000_000, 1_000_000).Select(i => i / 1e6);

    private static Gen<double> Scale => Gen.Choose(-3, 3).Select(k => Math.Pow(10, k));

    public static Arbitrary<RandomPoint> Points() =>
        (from u in Unit from v in Unit select new RandomPoint(u, v)).ToArbitrary();

    public static Arbitrary<RandomBends> Bends()
    {
        Gen<double> bend = Gen.Frequency((1, Gen.Constant(0.0)), (3, Signed.Select(s => s * Math.PI / 4)));
        return (from a in bend from b in bend from c in bend from d in bend select new RandomBends(a, b, c, d)).ToArbitrary();
    }

    public static Arbitrary<RandomTriangle> Triangles()
    {
        Gen<RandomTriangle> gen =
            from ax in Signed
            from ay in Signed
            from angle in Signed
            from along in Signed
            from height in Unit
            from length in Scale
            let a = new Point2D(ax * length, ay * length)
            let side = length * Vector2D.AtAngle(Math.PI * angle)
            let b = a + side
            let c = a + (along * side) + ((0.05 + height) * side.LeftNormal)
            select new RandomTriangle(a, b, c);
        return gen.ToArbitrary();
    }

    public static Arbitrary<RandomQuadrilateral> Quadrilaterals()
    {
        Gen<Vector2D> shift = from x in Signed from y in Signed select new Vector2D(0.2 * x, 0.2 * y);
        Gen<RandomQuadrilateral> gen =
            from angle in Signed
            from length in Scale
            from s0 in shift
            from s1 in shift
            from s2 in shift
            from s3 in shift
            let xi = length * Vector2D.AtAngle(Math.PI * angle)
            let eta = xi.LeftNormal
            let at = (Func<double, double, Vector2D, Point2D>)((x, y, s) =>
                Point2D.Origin + ((x + s.X) * xi) + ((y + s.Y) * eta))
            select new RandomQuadrilateral(at(0, 0, s0), at(1, 0, s1), at(1, 1, s2), at(0, 1, s3));
        return gen.ToArbitrary();
    }
}
