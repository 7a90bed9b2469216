using FemCore2D.Testing;
using FsCheck.Xunit;

namespace FemCore2D.Geometry.Tests;

[Properties(Arbitrary = [typeof(FieldArbitraries)], MaxTest = 30)]
public class CellLocatorTests
{
    private static readonly Mesh Ring = Mesh.Join(
    [
        QuadrilateralPatch.RingSector(Point2D.Origin, 1, 2, 0, Math.PI, "ring").Divide(1, 2),
        QuadrilateralPatch.RingSector(Point2D.Origin, 1, 2, Math.PI, Math.PI, "ring").Divide(1, 2),
    ]);

    [Property]
    public void FindsTheCellThatAFinePolygonOfItsOutlineContains(Mesh mesh, SquarePoint[] samples)
    {
        // An independent answer: winding numbers of outlines drawn by 100 chords an arc.
        (Point2D low, Point2D high) = mesh.Bounds;
        double doubt = 1e-4 * low.DistanceTo(high);
        foreach (SquarePoint sample in samples.Take(3))
        {
            Point2D point = new(
                low.X + ((high.X - low.X) * ((1.2 * sample.Place.X) - 0.1)),
                low.Y + ((high.Y - low.Y) * ((1.2 * sample.Place.Y) - 0.1)));
            int found = mesh.Locator.CellAt(point);
            int[] holders = [.. Enumerable.Range(0, mesh.CellCount).Where(cell => PolygonContains(mesh, cell, point))];
            bool isDoubtful = Enumerable.Range(0, mesh.EdgeCount).Any(edge => Distance(mesh, edge, point) < doubt);
            if (!isDoubtful)
            {
                Assert.Equal(holders is [int only] ? only : -1, found);
            }
        }
    }

    [Property]
    public void FindsTheFirstOfAllCellsThatContainAPointOnAnEdge(Mesh mesh, SquarePoint sample)
    {
        for (int edge = 0; edge < mesh.EdgeCount; edge += 1 + (mesh.EdgeCount / 40))
        {
            Point2D point = mesh.PointOnEdge(edge, sample.Place.X);
            int brute = -1;
            for (int cell = mesh.CellCount - 1; cell >= 0; cell--)
            {
                brute = mesh.Contains(cell, point) ? cell : brute;
            }

            Assert.Equal(brute, mesh.Locator.CellAt(point));
            if (!mesh.IsOuter(edge))
            {
                Assert.True(brute >= 0, $"The point {point} on edge {edge} fell into a gap.");
            }
        }
    }

    [Property]
    public void ArraysGiveTheSameCellsAsSinglePointsAndReachTheRim(Mesh mesh, SquarePoint[] samples)
    {
        (Point2D low, Point2D high) = mesh.Bounds;
        double reach = 1e-9 * low.DistanceTo(high);
        Point2D[] points =
        [
            .. samples.Select(sample => new Point2D(
                low.X + ((high.X - low.X) * sample.Place.X), low.Y + ((high.Y - low.Y) * sample.Place.Y))),
            .. mesh.OuterEdges.ToArray().Select(edge => mesh.PointOnEdge(edge, 0.3)),
        ];
        int[] cells = new int[points.Length];
        mesh.Locator.CellsAt(points, cells);
        Assert.Equal(points.Select(mesh.Locator.CellAt), cells);

        mesh.Locator.CellsAt(points, cells, reach);
        Assert.DoesNotContain(-1, cells[samples.Length..]);
    }

    [Property]
    public void NearestCellIsTheNearestOfAll(Mesh mesh, SquarePoint sample)
    {
        (Point2D low, Point2D high) = mesh.Bounds;
        Point2D point = new(
            low.X + ((high.X - low.X) * ((3 * sample.Place.X) - 1)), low.Y + ((high.Y - low.Y) * ((3 * sample.Place.Y) - 1)));
        int cell = mesh.Locator.NearestCell(point, out double distance);
        Assert.InRange(cell, 0, mesh.CellCount - 1);

        double nearest = distance;
        if (mesh.Locator.CellAt(point) < 0)
        {
            nearest = Enumerable.Range(0, mesh.EdgeCount).Min(edge => Distance(mesh, edge, point));
        }

        // The chords of a hundredth of a quarter turn leave their arcs by at most an eighth of their length times
        // their sweep, to either side.
        double chordError = 0.01 * mesh.Bounds.Diagonal * (0.01 * 0.5 * Math.PI) / 8;
        Assert.InRange(distance, nearest - chordError, nearest + chordError);
    }

    [Theory]
    [InlineData(1.000001, 0)] // The inner arcs bend into their cells.
    [InlineData(0.999999, -1)]
    [InlineData(1.999999, 0)] // The outer arcs bend out of theirs.
    [InlineData(2.000001, -1)]
    public void ArcsAndNotChordsBoundACell(double radius, int expected)
    {
        Point2D point = Point2D.Origin + (radius * Vector2D.AtAngle(0.25 * Math.PI));
        Assert.Equal(expected, Ring.Locator.CellAt(point));
        Assert.Equal(expected == 0, Ring.Contains(0, point));
    }

    [Fact]
    public void APointWithinRoundingOfTheRimIsFoundByReach()
    {
        Point2D[] outside = [new(2 + 1e-13, 0), new(2.1, 0)];
        int[] cells = new int[2];
        Ring.Locator.CellsAt(outside, cells, 1e-10);
        Assert.Equal([0, -1], cells);
        Assert.Equal(0, Ring.Locator.NearestCell(outside[1], out double distance));
        MeshInvariants.Near(0.1, distance);
    }

    [Fact]
    public void PointsThatAreNotNumbersAreInNoCell()
    {
        Assert.Equal(-1, Ring.Locator.CellAt(new Point2D(double.NaN, 1.5)));
        Assert.Equal(-1, Ring.Locator.NearestCell(new Point2D(double.NaN, 1.5), out _));
        Assert.Throws<ArgumentException>(() => Ring.Locator.CellsAt(new Point2D[2], new int[1]));
        Assert.Throws<ArgumentOutOfRangeException>(() => Ring.Locator.CellsAt(new Point2D[2], new int[2], -1));
    }

    [Fact]
    public void ManyThreadsGetTheSameAnswersFromAFreshMesh()
    {
        Mesh mesh = QuadrilateralPatch.RingSector(Point2D.Origin, 1, 2, 0, 3, "ring").Divide(30, 100);
        Point2D[] points =
        [
            .. Enumerable.Range(0, 20_000).Select(i =>
                Point2D.Origin + ((0.9 + (1.2 * (i % 997) / 997)) * Vector2D.AtAngle(3.1 * (i % 499) / 499))),
        ];
        int[][] answers = new int[8][];
        Parallel.For(0, answers.Length, i =>
        {
            answers[i] = new int[points.Length];
            mesh.Locator.CellsAt(points, answers[i]);
        });
        Assert.All(answers, answer => Assert.Equal(answers[0], answer));
        Assert.Equal(points.Select(point => IsInRing(point)), answers[0].Select(cell => cell >= 0));

        static bool IsInRing(Point2D point) =>
            point.DistanceTo(Point2D.Origin) is >= 1 and <= 2 && Math.Atan2(point.Y, point.X) is >= 0 and <= 3;
    }

    [Fact]
    public void SearchingAllocatesNothing()
    {
        Mesh mesh = QuadrilateralPatch.RingSector(Point2D.Origin, 1, 2, 0, 3, "ring").Divide(20, 50);
        Point2D[] points = [.. Enumerable.Range(0, 1000).Select(i => new Point2D((i / 250.0) - 2, (i % 37) / 15.0))];
        int[] cells = new int[points.Length];
        CellLocator locator = mesh.Locator;
        locator.CellsAt(points, cells, 0.01);
        long before = GC.GetAllocatedBytesForCurrentThread();
        locator.CellsAt(points, cells, 0.01);
        Assert.Equal(before, GC.GetAllocatedBytesForCurrentThread());
    }

    private static bool PolygonContains(Mesh mesh, int cell, Point2D point)
    {
        double winding = 0;
        ReadOnlySpan<int> edges = mesh.EdgesOf(cell);
        for (int i = 0; i < edges.Length; i++)
        {
            bool isForward = mesh.CellsOf(edges[i]).Left == cell;
            int pieces = mesh.SweepRadiansOf(edges[i]) == 0 ? 1 : 100;
            for (int k = 0; k < pieces; k++)
            {
                double from = k / (double)pieces;
                double to = (k + 1) / (double)pieces;
                Vector2D start = mesh.PointOnEdge(edges[i], isForward ? from : 1 - from) - point;
                Vector2D end = mesh.PointOnEdge(edges[i], isForward ? to : 1 - to) - point;
                winding += Math.Atan2(start.Cross(end), start.Dot(end));
            }
        }

        return winding > Math.PI;
    }

    private static double Distance(Mesh mesh, int edge, Point2D point)
    {
        // The distance from the chords between points of the edge.
        double nearest = double.PositiveInfinity;
        int pieces = mesh.SweepRadiansOf(edge) == 0 ? 1 : 100;
        for (int k = 0; k < pieces; k++)
        {
            Point2D start = mesh.PointOnEdge(edge, k / (double)pieces);
            Vector2D chord = mesh.PointOnEdge(edge, (k + 1) / (double)pieces) - start;
            double fraction = Math.Clamp((point - start).Dot(chord) / chord.LengthSquared, 0, 1);
            nearest = Math.Min(nearest, point.DistanceTo(start + (fraction * chord)));
        }

        return nearest;
    }
}
