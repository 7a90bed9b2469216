namespace FemCore2D.Geometry.Tests;

/// <summary>Sections that are hard to mesh, one difficulty each.</summary>
public sealed class MesherTests
{
    [Fact]
    public void SquareHasThePlainShapeOfADisc()
    {
        Mesh mesh = MeshAudit.Generate(new Drawn().Rectangle(0, 0, 1, 1, "a").Done()).Mesh;
        Assert.Equal(1, mesh.VertexCount - mesh.EdgeCount + mesh.CellCount);
        Assert.InRange(mesh.CellCount, 1700, 2600);
    }

    [Theory]
    [InlineData(1, 1)]
    [InlineData(3, 1)]
    [InlineData(3, -2)]
    public void HolesShowInTheEulerCount(int holes, double size)
    {
        Drawn drawn = new Drawn().Rectangle(0, 0, 4, 4, "a");
        for (int i = 0; i < holes; i++)
        {
            drawn.Circle(0.8 + i, 1.1 + (0.7 * i), 0.3, null, "a");
        }

        MeshOptions options = size > 0 ? MeshOptions.Default.WithSize(size) : MeshOptions.Default;
        Mesh mesh = MeshAudit.Generate(drawn.Done(), options).Mesh;
        Assert.Equal(1 - holes, mesh.VertexCount - mesh.EdgeCount + mesh.CellCount);
    }

    [Theory]
    [InlineData(2)]
    [InlineData(3)]
    [InlineData(7)]
    public void CircleHasItsVerticesOnTheArc(int arcs)
    {
        Mesh mesh = MeshAudit.Generate(new Drawn().Circle(0.3, -0.1, 2, "a", null, 11, arcs, "rim").Done()).Mesh;
        foreach (int edge in mesh.BoundaryEdges("rim"))
        {
            Assert.Equal(2, mesh.Vertices[mesh.EndsOf(edge).From].DistanceTo(new(0.3, -0.1)), 4e-15);
        }
    }

    [Fact]
    public void CoarsestMeshOfACircleKeepsTheArcLimit()
    {
        Drawn drawn = new Drawn().Circle(0, 0, 1, "a", null, 0, 2, "rim");
        MeshOptions options = MeshOptions.Default.WithSize(100).WithLargestArcDegrees(45);
        Assert.InRange(MeshAudit.Generate(drawn.Done(), options).Mesh.BoundaryEdges("rim").Length, 8, 16);
    }

    [Theory]
    [InlineData(1e-2)]
    [InlineData(1e-3)]
    public void ThinRingIsMeshed(double width)
    {
        Drawn drawn = new Drawn().Circle(0, 0, 1, "ring", null).Circle(0, 0, 1 - width, null, "ring", 17);
        Mesh mesh = MeshAudit.Generate(drawn.Done()).Mesh;
        Assert.Equal(0, mesh.VertexCount - mesh.EdgeCount + mesh.CellCount);
    }

    [Fact]
    public void CirclesThatTouchFromInsideAndOutsideAreMeshed()
    {
        Drawn drawn = new Drawn().Rectangle(-4, -4, 4, 4, "around")
            .Circle(0, 0, 1, "large", "around").Circle(0.5, 0, 0.5, "inside", "large").Circle(2, 0, 1, "outside", "around", 180);
        MeshingResult result = MeshAudit.Generate(drawn.Done());
        Assert.InRange(result.Mesh.CellCount, 2000, 4000);
        ForcedAngle forced = Assert.Single(result.Report.ForcedAngles);
        Assert.Equal(new Point2D(1, 0), forced.Place);
        Assert.Equal(0, forced.InputDegrees!.Value, 1e-9);
    }

    [Fact]
    public void CirclesThatTouchAVoidAreMeshed()
    {
        Drawn drawn = new Drawn().Circle(0, 0, 1, "large", null).Circle(0.5, 0, 0.5, null, "large");
        MeshAudit.Generate(drawn.Done());
    }

    [Theory]
    [InlineData(0.3)]
    [InlineData(1)]
    [InlineData(5)]
    [InlineData(20)]
    [InlineData(29)]
    public void WedgeHasSmallAnglesAtItsTipOnly(double degrees)
    {
        Drawn drawn = new Drawn().Polygon("a", null, (0, 0), (1, 0), (1, Math.Tan(degrees * Math.PI / 180)));
        MeshingResult result = MeshAudit.Generate(drawn.Done());
        ForcedAngle forced = Assert.Single(result.Report.ForcedAngles);
        Assert.Equal(degrees, forced.InputDegrees!.Value, 1e-9);

        // The bound of Miller, Pav and Walkington (2005) for refinement near an input angle.
        (double sine, double cosine) = Math.SinCos(degrees * Math.PI / 180);
        Assert.InRange(result.Report.SmallestDegrees, (Math.Atan(sine / (2 - cosine)) * 180 / Math.PI) - 1e-6, degrees + 1e-9);
        Assert.Equal(Point2D.Origin, forced.Place);
        Assert.InRange(result.Mesh.CellCount, 10, 2000);
    }

    [Fact]
    public void WedgesBetweenManyLinesOfOnePointAreMeshed()
    {
        Drawn drawn = new();
        int corner = drawn.Vertex(0, 0);
        (double X, double Y)[] ends = [.. Enumerable.Range(0, 24).Select(i => (Math.Cos(i * Math.PI / 12), Math.Sin(i * Math.PI / 12)))];
        for (int i = 0; i < 24; i++)
        {
            int next = (i + 1) % 24;
            drawn.Piece(corner, drawn.Vertex(ends[i].X, ends[i].Y), 0, $"r{i % 3}", $"r{(i + 2) % 3}");
            drawn.Line(ends[i].X, ends[i].Y, ends[next].X, ends[next].Y, $"r{i % 3}", null);
        }

        MeshAudit.Generate(drawn.Done());
    }

    [Fact]
    public void LineThatTouchesAnArcIsMeshed()
    {
        // A straight line tangent to a circle at a vertex of both.
        Drawn drawn = new Drawn().Polygon("a", null, (-2, -1), (0, -1), (2, -1), (2, 3), (-2, 3)).Circle(0, 0, 1, "b", "a", 270);
        MeshAudit.Generate(drawn.Done());
    }

    [Fact]
    public void SizesMayDifferByTenThousand()
    {
        Drawn drawn = new Drawn().Rectangle(-1, -1, 1, 1, "a").Point("p", 0.3, 0.2);
        MeshingResult result = MeshAudit.Generate(drawn.Done(), MeshOptions.Default.WithSize(0.1).WithPointSize("p", 1e-5));
        Assert.InRange(result.Report.ShortestEdge, 0.4e-5, 1.5e-5);
        Assert.InRange(result.Report.LongestEdge, 0.08, 0.2);
        Assert.Equal(new Point2D(0.3, 0.2), result.Mesh.Vertices[result.Mesh.VertexAt("p")]);
    }

    [Fact]
    public void SheetsDivideTheCellsAndNothingElse()
    {
        Drawn drawn = new Drawn().Rectangle(0, 0, 2, 1, "a")
            .Line(0.5, 0.5, 1, 0.5, "a", "a", "sheet").Line(1, 0.5, 1.5, 0.5, "a", "a", "sheet")
            .Line(1, 0.5, 1, 0.8, "a", "a", "fin");
        Mesh mesh = MeshAudit.Generate(drawn.Done()).Mesh;
        Assert.Equal(1, mesh.VertexCount - mesh.EdgeCount + mesh.CellCount);
        Assert.Equal(1.0, mesh.BoundaryEdges("sheet").ToArray().Sum(edge => LengthOf(mesh, edge)), 1e-14);
        Assert.All(mesh.BoundaryEdges("fin").ToArray(), edge => Assert.False(mesh.IsOuter(edge)));
    }

    [Fact]
    public void LongNarrowGapsAreFilledWithoutForcedAngles()
    {
        Drawn drawn = new Drawn().Rectangle(0, 0, 1, 1, "a").Polygon("b", "a", (0.1, 0.5), (0.9, 0.5), (0.9, 0.501), (0.1, 0.501));
        MeshingResult result = MeshAudit.Generate(drawn.Done());
        Assert.Empty(result.Report.ForcedAngles);
    }

    private static double LengthOf(Mesh mesh, int edge)
    {
        (int from, int to) = mesh.EndsOf(edge);
        return mesh.Vertices[from].DistanceTo(mesh.Vertices[to]);
    }
}
