namespace FemCore2D.Geometry.Tests;

/// <summary>Boundaries that are one another moved get one another's vertices moved.</summary>
public sealed class PairedBoundaryTests
{
    [Fact]
    public void OppositeSidesMatchThoughOneIsFiner()
    {
        Drawn drawn = new Drawn().Rectangle(0, 0, 2, 1, "a").Circle(1.95, 0.4, 0.04, "b", "a");
        Mesh mesh = MeshAudit.Generate(drawn.Done(), MeshOptions.Default.WithPair("left", "right").WithPair("bottom", "top")).Mesh;
        double[] left = [.. VerticesOf(mesh, "left").Select(p => p.Y).Order()];
        double[] right = [.. VerticesOf(mesh, "right").Select(p => p.Y).Order()];
        Assert.Equal(left.Length, right.Length);
        Assert.True(left.Length > 18);
        Assert.All(left.Zip(right), pair => Assert.Equal(pair.First, pair.Second, 1e-15));
        Assert.Equal(VerticesOf(mesh, "top").Length, VerticesOf(mesh, "bottom").Length);
    }

    [Theory]
    [InlineData(30)]
    [InlineData(60)]
    [InlineData(90)]
    public void SidesOfASectorMatchByATurnAboutItsTip(double degrees)
    {
        (double sine, double cosine) = Math.SinCos(degrees * Math.PI / 180);
        Drawn drawn = new Drawn().Line(0, 0, 1, 0, "a", null, "first").Line(cosine, sine, 0, 0, "a", null, "second");
        drawn.Piece(drawn.Vertex(1, 0), drawn.Vertex(cosine, sine), degrees * Math.PI / 180, "a", null);
        drawn.Circle(0.6, 0.1, 0.05, "b", "a");
        MeshOptions options = MeshOptions.Default.WithPair("first", "second").WithBoundarySize("first", 0.05);
        Mesh mesh = MeshAudit.Generate(drawn.Done(), options).Mesh;
        double[] first = [.. VerticesOf(mesh, "first").Select(Point2D.Origin.DistanceTo).Order()];
        double[] second = [.. VerticesOf(mesh, "second").Select(Point2D.Origin.DistanceTo).Order()];
        Assert.Equal(first.Length, second.Length);
        Assert.All(first.Zip(second), pair => Assert.Equal(pair.First, pair.Second, 1e-14));
    }

    [Fact]
    public void CurvedChainsMatchPieceByPiece()
    {
        // A wavy strip: both long sides are one chain of a line and an arc, shifted upwards and run the other way.
        Drawn drawn = new();
        int[] low = [drawn.Vertex(0, 0), drawn.Vertex(1, 0), drawn.Vertex(2, 0.25)];
        int[] high = [drawn.Vertex(0, 1), drawn.Vertex(1, 1), drawn.Vertex(2, 1.25)];
        drawn.Piece(low[0], low[1], 0, "a", null, "low").Piece(low[1], low[2], 1.2, "a", null, "low")
            .Piece(low[2], high[2], 0, "a", null)
            .Piece(high[2], high[1], -1.2, "a", null, "high").Piece(high[1], high[0], 0, "a", null, "high")
            .Piece(high[0], low[0], 0, "a", null)
            .Circle(1.2, 0.9, 0.02, "b", "a");
        Mesh mesh = MeshAudit.Generate(drawn.Done(), MeshOptions.Default.WithPair("low", "high")).Mesh;
        Point2D[] lower = [.. VerticesOf(mesh, "low").OrderBy(p => p.X)];
        Point2D[] upper = [.. VerticesOf(mesh, "high").OrderBy(p => p.X)];
        Assert.Equal(lower.Length, upper.Length);
        Assert.All(lower.Zip(upper), pair => Assert.True(pair.Second.DistanceTo(pair.First + new Vector2D(0, 1)) < 1e-14));
    }

    [Fact]
    public void CirclesCanBePaired()
    {
        Drawn drawn = new Drawn().Rectangle(0, 0, 4, 2, "a").Circle(1, 1, 0.5, null, "a", 0, 3, "one")
            .Circle(3, 1, 0.5, null, "a", 0, 3, "other").Circle(1.6, 1, 0.05, "b", "a");
        Mesh mesh = MeshAudit.Generate(drawn.Done(), MeshOptions.Default.WithPair("one", "other")).Mesh;
        HashSet<(int, int)> other = [.. VerticesOf(mesh, "other").Select(Rounded)];
        Assert.Equal(mesh.BoundaryEdges("one").Length, mesh.BoundaryEdges("other").Length);
        Assert.All(VerticesOf(mesh, "one"), p => Assert.Contains(Rounded(p + new Vector2D(2, 0)), other));

        static (int, int) Rounded(Point2D p) => ((int)Math.Round(p.X * 1e9), (int)Math.Round(p.Y * 1e9));
    }

    [Fact]
    public void BoundariesOfDifferentShapeAreRefused()
    {
        Arrangement trapezoid = new Drawn().Line(0, 0, 2, 0, "a", null, "bottom").Line(2, 0, 2, 1, "a", null, "right")
            .Line(2, 1, 0, 2, "a", null, "top").Line(0, 2, 0, 0, "a", null, "left").Done();
        MeshingException error = Assert.Throws<MeshingException>(() =>
            Mesher.Generate(trapezoid, MeshOptions.Default.WithPair("left", "right")));
        Assert.Contains("'left' (1 pieces, 2 m", error.Message, StringComparison.Ordinal);
        Assert.Contains("'right' (1 pieces, 1 m", error.Message, StringComparison.Ordinal);
    }

    [Fact]
    public void DifferentDivisionsOfAPairAreRefused()
    {
        Arrangement square = new Drawn().Rectangle(0, 0, 1, 1, "a").Done();
        MeshOptions options = MeshOptions.Default.WithPair("left", "right").WithDivision("left", 3);
        Assert.Contains(
            "same division",
            Assert.Throws<MeshingException>(() => Mesher.Generate(square, options)).Message,
            StringComparison.Ordinal);
        Assert.Equal(3, Mesher.Generate(square, options.WithDivision("right", 3)).Mesh.BoundaryEdges("right").Length);
    }

    private static Point2D[] VerticesOf(Mesh mesh, string boundary) =>
        [.. mesh.BoundaryEdges(boundary).ToArray()
            .SelectMany(edge => new[] { mesh.EndsOf(edge).From, mesh.EndsOf(edge).To }).Distinct()
            .Select(vertex => mesh.Vertices[vertex])];
}
