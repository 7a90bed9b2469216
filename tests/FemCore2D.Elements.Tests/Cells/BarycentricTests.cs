using FemCore2D.Geometry;
using FsCheck.Xunit;

namespace FemCore2D.Elements.Tests;

[Properties(Arbitrary = [typeof(RandomCells)])]
public class BarycentricTests
{
    [Property]
    public void CoordinatesAreRatiosOfAreas(RandomTriangle t, RandomPoint p)
    {
        Point2D place = Barycentric.OfReference(p.In(CellKind.Triangle)).PlaceIn(t.A, t.B, t.C);
        Barycentric at = Barycentric.Of(t.A, t.B, t.C, place);

        // Heron's formula knows nothing of vector products.
        double whole = Heron(t.A, t.B, t.C);
        Assert.Equal(Heron(place, t.B, t.C) / whole, at.First, 1e-6);
        Assert.Equal(Heron(t.A, place, t.C) / whole, at.Second, 1e-6);
        Assert.Equal(Heron(t.A, t.B, place) / whole, at.Third, 1e-6);
        Assert.Equal(1, at.First + at.Second + at.Third, 1e-13);
        Assert.True(at.PlaceIn(t.A, t.B, t.C).DistanceTo(place) <= 1e-13 * t.Size);
    }

    [Property]
    public void EachIsOneAtItsVertexAndZeroAlongTheOppositeEdge(RandomTriangle t, RandomPoint p)
    {
        Barycentric first = Barycentric.Of(t.A, t.B, t.C, t.A);
        Assert.Equal(1, first.First, 1e-13);
        Assert.Equal((0, 0), (first.Second, first.Third));
        Barycentric onEdge = Barycentric.Of(t.A, t.B, t.C, t.B.Towards(t.C, p.U));
        Assert.Equal(0, onEdge.First, 1e-13);
        Assert.Equal(p.U, onEdge.Third, 1e-13);
    }

    [Property]
    public void GradientsGiveTheChangeBetweenAnyTwoPlaces(RandomTriangle t, RandomPoint p, RandomPoint q)
    {
        Point2D from = Barycentric.OfReference(p.In(CellKind.Triangle)).PlaceIn(t.A, t.B, t.C);
        Point2D to = Barycentric.OfReference(q.In(CellKind.Triangle)).PlaceIn(t.A, t.B, t.C);
        Barycentric before = Barycentric.Of(t.A, t.B, t.C, from);
        Barycentric after = Barycentric.Of(t.A, t.B, t.C, to);
        (Vector2D first, Vector2D second, Vector2D third) = Barycentric.Gradients(t.A, t.B, t.C);
        Assert.Equal(after.First - before.First, first.Dot(to - from), 1e-12);
        Assert.Equal(after.Second - before.Second, second.Dot(to - from), 1e-12);
        Assert.Equal(after.Third - before.Third, third.Dot(to - from), 1e-12);
        Assert.True((first + second + third).Length <= 1e-13 * first.Length * 40);
    }

    [Fact]
    public void TrianglesWithoutAreaAreRefused()
    {
        ArgumentException line = Assert.Throws<ArgumentException>(() =>
            Barycentric.Of(new(0, 0), new(1, 1), new(2, 2), new(0, 0)));
        Assert.Contains("(2, 2)", line.Message, StringComparison.Ordinal);
        Assert.Throws<ArgumentException>(() => Barycentric.Gradients(new(0, 0), new(double.NaN, 1), new(2, 0)));
    }

    private static double Heron(Point2D a, Point2D b, Point2D c)
    {
        double x = a.DistanceTo(b);
        double y = b.DistanceTo(c);
        double z = c.DistanceTo(a);
        double half = (x + y + z) / 2;
        return Math.Sqrt(Math.Max(0, half * (half - x) * (half - y) * (half - z)));
    }
}
