namespace FemCore2D.Geometry.Tests;

/// <summary>What options do to a mesh, and what happens to options that cannot be met.</summary>
public sealed class MeshOptionsTests
{
    [Theory]
    [InlineData(double.NaN)]
    [InlineData(0)]
    [InlineData(-1)]
    [InlineData(double.PositiveInfinity)]
    public void SizesMustBePositive(double size)
    {
        Assert.Throws<ArgumentOutOfRangeException>(nameof(size), () => MeshOptions.Default.WithSize(size));
        Assert.Throws<ArgumentOutOfRangeException>(nameof(size), () => MeshOptions.Default.WithRegionSize("a", size));
        Assert.Throws<ArgumentOutOfRangeException>(nameof(size), () => MeshOptions.Default.WithBoundarySize("a", size));
        Assert.Throws<ArgumentOutOfRangeException>(nameof(size), () => MeshOptions.Default.WithPointSize("a", size));
        Assert.Throws<ArgumentOutOfRangeException>("degrees", () => MeshOptions.Default.WithLargestArcDegrees(size));
    }

    [Theory]
    [InlineData(double.NaN)]
    [InlineData(1)]
    [InlineData(0.5)]
    [InlineData(double.PositiveInfinity)]
    public void GrowthMustExceedOne(double growth) =>
        Assert.Throws<ArgumentOutOfRangeException>(nameof(growth), () => MeshOptions.Default.WithGrowth(growth));

    [Theory]
    [InlineData(double.NaN)]
    [InlineData(-1)]
    [InlineData(34)]
    public void AngleMustBePossible(double degrees) =>
        Assert.Throws<ArgumentOutOfRangeException>(nameof(degrees), () => MeshOptions.Default.WithSmallestAngleDegrees(degrees));

    [Fact]
    public void CountsMustBePositive()
    {
        Assert.Throws<ArgumentOutOfRangeException>("count", () => MeshOptions.Default.WithDivision("a", 0));
        Assert.Throws<ArgumentOutOfRangeException>("cells", () => MeshOptions.Default.WithCellLimit(0));
        Assert.Throws<ArgumentException>("region", () => MeshOptions.Default.WithRegionSize("", 1));
        Assert.Throws<ArgumentException>("second", () => MeshOptions.Default.WithPair("a", "a"));
    }

    [Fact]
    public void UnknownNamesAreRefusedWithTheKnownOnes()
    {
        Arrangement square = new Drawn().Rectangle(0, 0, 1, 1, "copper").Point("tip", 0.5, 0.5).Done();
        Assert.Contains("'copper'", Refused(MeshOptions.Default.WithRegionSize("iron", 0.1)), StringComparison.Ordinal);
        Assert.Contains("'left'", Refused(MeshOptions.Default.WithBoundarySize("iron", 0.1)), StringComparison.Ordinal);
        Assert.Contains("'tip'", Refused(MeshOptions.Default.WithPointSize("iron", 0.1)), StringComparison.Ordinal);
        Assert.Contains("'left'", Refused(MeshOptions.Default.WithDivision("iron", 3)), StringComparison.Ordinal);
        Assert.Contains("'left'", Refused(MeshOptions.Default.WithPair("iron", "left")), StringComparison.Ordinal);

        string Refused(MeshOptions options) => Assert.Throws<UnknownNameException>(() => Mesher.Generate(square, options)).Message;
    }

    [Fact]
    public void SizesOfRegionsBoundariesAndPointsHold()
    {
        Drawn drawn = new Drawn().Rectangle(0, 0, 4, 2, "a").Circle(1, 1, 0.5, "fine", "a", 0, 2, "rim")
            .Circle(3, 1, 0.5, "coarse", "a").Point("p", 2, 1.8);
        Mesh mesh = MeshAudit.Generate(drawn.Done(), MeshOptions.Default.WithSize(0.2)
            .WithRegionSize("fine", 0.05).WithRegionSize("coarse", 0.4).WithBoundarySize("left", 0.04).WithPointSize("p", 0.01)).Mesh;
        Assert.Equal(50, mesh.BoundaryEdges("left").Length);
        Assert.InRange(mesh.BoundaryEdges("rim").Length, 60, 75);
        Assert.InRange(MeanEdge(mesh, cell => mesh.CellRegions[cell] == mesh.RegionIndex("fine")), 0.042, 0.06);
        int tip = mesh.VertexAt("p");
        Assert.InRange(MeanEdge(mesh, cell => mesh.VerticesOf(cell).Contains(tip)), 0.007, 0.02);
        Assert.InRange(MeanEdge(mesh, cell => mesh.VerticesOf(cell).ToArray().All(v => mesh.Vertices[v].X > 2.4 && mesh.CellRegions[cell] == mesh.RegionIndex("a"))), 0.16, 0.24);
    }

    [Theory]
    [InlineData(1.1)]
    [InlineData(1.5)]
    public void CellsGrowNoFasterThanAsked(double growth)
    {
        Drawn drawn = new Drawn().Rectangle(-1, -1, 1, 1, "a").Point("p", 0.1, 0.2);
        Mesh mesh = MeshAudit.Generate(
            drawn.Done(), MeshOptions.Default.WithSize(0.3).WithPointSize("p", 1e-3).WithGrowth(growth)).Mesh;
        for (int cell = 0; cell < mesh.CellCount; cell++)
        {
            ReadOnlySpan<int> v = mesh.VerticesOf(cell);
            Point2D[] p = [mesh.Vertices[v[0]], mesh.Vertices[v[1]], mesh.Vertices[v[2]]];
            double longest = Enumerable.Range(0, 3).Max(i => p[i].DistanceTo(p[(i + 1) % 3]));
            double nearest = p.Max(q => q.DistanceTo(new(0.1, 0.2)));
            double allowed = Math.Min(0.3, 1e-3 + ((growth - 1) * nearest));
            Assert.True(longest <= 2 * allowed, $"An edge of {longest} where {allowed} was allowed.");
        }
    }

    [Fact]
    public void DivisionsAreKept()
    {
        Drawn drawn = new Drawn().Rectangle(0, 0, 1, 1, "a").Circle(0.5, 0.5, 0.2, "b", "a", 0, 4, "rim");
        Mesh mesh = MeshAudit.Generate(
            drawn.Done(), MeshOptions.Default.WithSize(0.2).WithDivision("left", 37).WithDivision("right", 8).WithDivision("rim", 5)).Mesh;
        Assert.Equal(37, mesh.BoundaryEdges("left").Length);
        Assert.Equal(8, mesh.BoundaryEdges("right").Length);
        Assert.Equal(20, mesh.BoundaryEdges("rim").Length);
        foreach (int edge in mesh.BoundaryEdges("left"))
        {
            (int from, int to) = mesh.EndsOf(edge);
            Assert.Equal(1.0 / 37, mesh.Vertices[from].DistanceTo(mesh.Vertices[to]), 1e-15);
        }
    }

    [Fact]
    public void DivisionThatForcesSmallAnglesIsReported()
    {
        // Cells as small as those on the left cannot grow to the size of the undivided right side over this width.
        Arrangement strip = new Drawn().Rectangle(0, 0, 0.02, 1, "a").Done();
        MeshingResult result = Mesher.Generate(strip, MeshOptions.Default.WithDivision("right", 1).WithDivision("left", 100));
        Assert.Equal(1, result.Mesh.BoundaryEdges("right").Length);
        Assert.Contains(result.Report.ForcedAngles, forced => forced.InputDegrees is null && forced.SmallestDegrees < 5);
        Assert.Contains("a narrow place or a fixed division", result.Report.ToString(), StringComparison.Ordinal);
    }

    [Fact]
    public void DivisionTooCoarseForAnArcIsRefused()
    {
        Arrangement disc = new Drawn().Circle(0, 0, 1, "a", null, 0, 2, "rim").Done();
        MeshingException error = Assert.Throws<MeshingException>(() => Mesher.Generate(disc, MeshOptions.Default.WithDivision("rim", 3)));
        Assert.Contains("'rim'", error.Message, StringComparison.Ordinal);
        Assert.Contains("Divide it into 6", error.Message, StringComparison.Ordinal);
    }

    [Theory]
    [InlineData(1e-5)]
    [InlineData(1e-9)]
    [InlineData(1e-300)]
    public void SizesThatNeedTooManyCellsAreRefusedBeforeMemoryIsSpent(double size)
    {
        Arrangement square = new Drawn().Rectangle(0, 0, 1, 1, "air").Done();
        long before = GC.GetAllocatedBytesForCurrentThread();
        MeshingException error = Assert.Throws<MeshingException>(() => Mesher.Generate(square, MeshOptions.Default.WithSize(size)));
        Assert.True(GC.GetAllocatedBytesForCurrentThread() - before < 10_000_000);
        Assert.Contains("20000000", error.Message, StringComparison.Ordinal);
    }

    [Theory]
    [InlineData(1e-12)]
    [InlineData(1e-300)]
    public void SizesFinerThanTheToleranceAreRefused(double size)
    {
        Arrangement square = new Drawn().Rectangle(0, 0, 1, 1, "air").Point("tip", 0, 0).Done();
        Assert.Contains("'tip'", Refused(MeshOptions.Default.WithPointSize("tip", size)), StringComparison.Ordinal);
        Assert.Contains("'left'", Refused(MeshOptions.Default.WithBoundarySize("left", size)), StringComparison.Ordinal);

        string Refused(MeshOptions options) => Assert.Throws<MeshingException>(() => Mesher.Generate(square, options)).Message;
    }

    [Fact]
    public void RefusalNamesRegionSizeCellsAndRemedy()
    {
        Arrangement square = new Drawn().Rectangle(0, 0, 1, 1, "air").Circle(0.5, 0.5, 0.1, "wire", "air").Done();
        MeshingException error = Assert.Throws<MeshingException>(() =>
            Mesher.Generate(square, MeshOptions.Default.WithRegionSize("wire", 1e-4).WithCellLimit(1_000_000)));
        Assert.Contains("'wire'", error.Message, StringComparison.Ordinal);
        Assert.Contains("0.0001 m", error.Message, StringComparison.Ordinal);
        Assert.Contains("7.26E+06", error.Message, StringComparison.Ordinal);
        Assert.Contains("raise the limit", error.Message, StringComparison.Ordinal);
    }

    [Fact]
    public void GradedSizesCountTowardsTheLimit()
    {
        // The fine boundary alone, growing slowly, needs most of the cells.
        Arrangement square = new Drawn().Rectangle(0, 0, 1, 1, "air").Done();
        MeshOptions options = MeshOptions.Default.WithBoundarySize("left", 1e-4).WithGrowth(1.02);
        MeshingException error = Assert.Throws<MeshingException>(() => Mesher.Generate(square, options.WithCellLimit(100_000)));
        Assert.Contains("'air'", error.Message, StringComparison.Ordinal);
    }

    [Fact]
    public void EstimateIsNearTheCount()
    {
        Drawn drawn = new Drawn().Circle(0, 0, 1, "a", null).Circle(0.2, 0.1, 0.3, "b", "a", 0, 2, "rim");
        MeshReport report = Mesher.Generate(drawn.Done(), MeshOptions.Default.WithSize(0.04).WithBoundarySize("rim", 0.004)).Report;
        Assert.InRange(report.Cells / report.EstimatedCells, 0.85, 1.2);
    }

    [Fact]
    public void WorkCanBeCancelledAndWatched()
    {
        Arrangement square = new Drawn().Rectangle(0, 0, 1, 1, "air").Done();
        using CancellationTokenSource source = new();
        List<MeshingProgress> heard = [];
        Listener listener = new(progress =>
        {
            heard.Add(progress);
            if (progress.Cells > 20_000)
                source.Cancel();
        });
        Assert.ThrowsAny<OperationCanceledException>(() =>
            Mesher.Generate(square, MeshOptions.Default.WithSize(1e-3), listener, source.Token));
        Assert.InRange(heard[^1].Cells, 20_000, 200_000);
        Assert.Equal([MeshingStage.Dividing, MeshingStage.Triangulating, MeshingStage.Refining], heard.Select(p => p.Stage).Distinct());
        Assert.InRange(heard[^1].EstimatedCells, 2e6, 2.6e6);
    }

    private static double MeanEdge(Mesh mesh, Func<int, bool> isMeant) =>
        Enumerable.Range(0, mesh.CellCount).Where(isMeant).SelectMany(cell => mesh.EdgesOf(cell).ToArray()).Average(edge =>
            mesh.Vertices[mesh.EndsOf(edge).From].DistanceTo(mesh.Vertices[mesh.EndsOf(edge).To]));

    private sealed class Listener(Action<MeshingProgress> hear) : IProgress<MeshingProgress>
    {
        public void Report(MeshingProgress value) => hear(value);
    }
}
