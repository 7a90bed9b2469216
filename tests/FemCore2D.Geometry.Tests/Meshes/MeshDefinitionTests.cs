namespace FemCore2D.Geometry.Tests;

public class MeshDefinitionTests
{
    private static readonly Point2D[] Corners = [new(0, 0), new(1, 0), new(1, 1), new(0, 1)];

    [Fact]
    public void ASquareOfTwoTrianglesAnswersItsQueries()
    {
        Mesh mesh = new MeshDefinition
        {
            Vertices = Corners,
            Triangles = [0, 1, 2, 0, 2, 3],
            RegionNames = ["lower", "upper"],
            CellRegions = [0, 1],
            Boundaries = new Dictionary<string, IReadOnlyList<(int Start, int End)>>
            {
                ["bottom"] = [(0, 1)],
                ["ell"] = [(0, 1), (2, 1)],
            },
            Points = new Dictionary<string, int> { ["top"] = 2 },
        }.ToMesh();
        MeshInvariants.Check(mesh);
        Assert.Equal([mesh.EdgeBetween(0, 2)], mesh.EdgesBetween("upper", "lower"));
        Assert.Equal(2, mesh.VertexAt("top"));
        Assert.Equal(["bottom", "ell"], mesh.BoundaryNames.AsEnumerable());
        Assert.Equal(2, mesh.LengthOfBoundary("ell"));
        Assert.Equal([0, 1], mesh.CellsAround(2).ToArray());
        Assert.Equal([1], mesh.CellsIn("upper").ToArray());
        Assert.Equal(-1, mesh.EdgeBetween(1, 3));
        Assert.Equal(0.5, mesh.AreaOfRegion("upper"));
        Assert.Equal(new Box2D(new(0, 0), new(1, 1)), mesh.Bounds);
        Assert.Throws<UnknownNameException>(() => mesh.CellsIn("middle"));
        Assert.Throws<UnknownNameException>(() => mesh.EdgesBetween("upper", "middle"));
    }

    [Fact]
    public void AnArcIsSeenFromEitherEnd()
    {
        foreach ((int start, int end, double sweep) in new[] { (1, 0, Math.PI / 3), (0, 1, -Math.PI / 3) })
        {
            Mesh mesh = new MeshDefinition
            {
                Vertices = [new(1, 0), new(0, 1), new(0, 0)],
                Triangles = [0, 1, 2],
                RegionNames = ["dent"],
                Arcs = [(start, end, sweep)],
            }.ToMesh();

            // A segment of a sixth of the circle of radius sqrt(2) is cut from the triangle.
            Assert.Equal(-Math.PI / 3, mesh.SweepRadiansOf(mesh.EdgeBetween(0, 1)));
            MeshInvariants.Near(0.5 - ((Math.PI / 3) - (Math.Sqrt(3) / 2)), mesh.AreaOf(0));
            Assert.True(mesh.IsCurved(0));
            Assert.Equal((Math.Sqrt(3) / 2) - 0.5, mesh.PointOnEdge(mesh.EdgeBetween(0, 1), 0.5).X, 1e-15);
        }
    }

    [Fact]
    public void ListsMustFit()
    {
        Assert.Throws<ArgumentException>(() => Define([0, 1]));
        Assert.Throws<ArgumentException>(() => Define([], [0, 1, 2]));
        Assert.Throws<InvalidMeshException>(() => Define([]));
        Assert.Throws<ArgumentException>(() => new MeshDefinition
        {
            Vertices = Corners,
            Quadrilaterals = [0, 1, 2, 3],
            RegionNames = ["a", "b"],
        }.ToMesh());
        Assert.Throws<ArgumentException>(() => new MeshDefinition
        {
            Vertices = Corners,
            Quadrilaterals = [0, 1, 2, 3],
            RegionNames = ["a", "a"],
            CellRegions = [0],
        }.ToMesh());
        Assert.Throws<InvalidMeshException>(() => new MeshDefinition
        {
            Vertices = Corners,
            Quadrilaterals = [0, 1, 2, 3],
            RegionNames = ["a"],
            CellRegions = [1],
        }.ToMesh());
    }

    [Fact]
    public void IndicesMustExist()
    {
        Assert.Contains("vertex 4", Fault([0, 1, 4, 0, 2, 3]), StringComparison.Ordinal);
        Assert.Contains("vertex -1", Fault([0, 1, -1, 0, 2, 3]), StringComparison.Ordinal);
        Assert.Contains("twice", Fault([0, 1, 1, 0, 2, 3]), StringComparison.Ordinal);
        Assert.Contains("Vertex 3", Fault([0, 1, 2]), StringComparison.Ordinal);
        Assert.Throws<InvalidMeshException>(() => new MeshDefinition
        {
            Vertices = Corners,
            Quadrilaterals = [0, 1, 2, 3],
            RegionNames = ["a"],
            Boundaries = new Dictionary<string, IReadOnlyList<(int Start, int End)>> { ["diagonal"] = [(0, 2)] },
        }.ToMesh());
    }

    [Fact]
    public void CellsMustBeCounterclockwiseConvexAndNotFlat()
    {
        Assert.Contains("clockwise", Fault([0, 2, 1, 0, 3, 2]), StringComparison.Ordinal);
        Point2D[] inverted = [new(0, 0), new(1, 0), new(0.2, 0.2), new(0, 1)];
        Assert.Contains("convex", Assert.Throws<InvalidMeshException>(
            () => Define([], [0, 1, 2, 3], inverted)).Message, StringComparison.Ordinal);
        Point2D[] flat = [new(0, 0), new(1, 0), new(2, 1e-13)];
        Assert.Contains("flat", Assert.Throws<InvalidMeshException>(
            () => Define([0, 1, 2], [], flat)).Message, StringComparison.Ordinal);
        Point2D[] infinite = [new(0, 0), new(1, 0), new(double.PositiveInfinity, 1)];
        Assert.Contains("finite", Assert.Throws<InvalidMeshException>(
            () => Define([0, 1, 2], [], infinite)).Message, StringComparison.Ordinal);
    }

    [Theory]
    [InlineData(3.2)] // More than a half turn.
    [InlineData(double.NaN)]
    [InlineData(-1.6)] // Leaves the triangle at its corners.
    public void ArcsMustStayWithinTheirCells(double sweep) => Assert.Throws<InvalidMeshException>(() => new MeshDefinition
    {
        Vertices = [new(0, 0), new(1, 0), new(0.5, 0.3)],
        Triangles = [0, 1, 2],
        RegionNames = ["a"],
        Arcs = [(0, 1, sweep)],
    }.ToMesh());

    [Fact]
    public void CellsMustMeetAlongWholeEdges()
    {
        Point2D[] hanging = [new(0, 0), new(1, 0), new(1, 1), new(0, 1), new(1, 0.5), new(2, 0.5), new(2, 0)];
        var exception = Assert.Throws<InvalidMeshException>(() => Define([1, 6, 4, 6, 5, 4], [0, 1, 2, 3], hanging));
        Assert.Contains("Vertex 4 at (1, 0.5) hangs", exception.Message, StringComparison.Ordinal);
        Assert.Equal(hanging[4], exception.Place);

        Point2D[] doubled = [.. Corners, new(1, 0), new(2, 0), new(2, 1), new(1, 1)];
        exception = Assert.Throws<InvalidMeshException>(() => Define([], [0, 1, 2, 3, 4, 5, 6, 7], doubled));
        Assert.Contains("Vertices 1 and 4", exception.Message, StringComparison.Ordinal);
    }

    [Fact]
    public void CellsMustNotOverlap()
    {
        Assert.Contains("same side", Fault([0, 1, 2, 0, 1, 3]), StringComparison.Ordinal);

        // Two squares that cross without a vertex of one in the other, and one within the other.
        Point2D[] crossing =
        [
            new(0, 1), new(3, 1), new(3, 2), new(0, 2), new(1, 0), new(2, 0), new(2, 3), new(1, 3),
        ];
        Assert.Contains("cross", Assert.Throws<InvalidMeshException>(
            () => Define([], [0, 1, 2, 3, 4, 5, 6, 7], crossing)).Message, StringComparison.Ordinal);
        Point2D[] nested =
        [
            new(0, 0), new(3, 0), new(3, 3), new(0, 3), new(1, 1), new(2, 1), new(2, 2), new(1, 2),
        ];
        Assert.Contains("within another part", Assert.Throws<InvalidMeshException>(
            () => Define([], [0, 1, 2, 3, 4, 5, 6, 7], nested)).Message, StringComparison.Ordinal);

        // A fan of seven triangles that goes twice around its centre.
        Point2D[] spiral =
        [
            Point2D.Origin, .. Enumerable.Range(0, 7).Select(i => Point2D.Origin + Vector2D.AtAngle(4 * Math.PI * i / 7)),
        ];
        int[] fan = [.. Enumerable.Range(0, 7).SelectMany(i => new[] { 0, i + 1, ((i + 1) % 7) + 1 })];
        Assert.Contains("more than once", Assert.Throws<InvalidMeshException>(
            () => Define(fan, [], spiral)).Message, StringComparison.Ordinal);
    }

    private static Mesh Define(int[] triangles, int[]? quadrilaterals = null, Point2D[]? vertices = null) => new MeshDefinition
    {
        Vertices = vertices ?? Corners,
        Triangles = triangles,
        Quadrilaterals = quadrilaterals ?? [],
        RegionNames = ["a"],
    }.ToMesh();

    private static string Fault(int[] triangles) =>
        Assert.Throws<InvalidMeshException>(() => Define(triangles)).Message;
}
