using FemCore2D.Testing;
using FsCheck.Xunit;

namespace FemCore2D.Geometry.Tests;

[Properties(Arbitrary = [typeof(FieldArbitraries)], MaxTest = 25)]
public class MeshJoinTests
{
    [Property]
    public void AMeshTornIntoItsRegionsJoinsToItself(Mesh mesh)
    {
        List<Mesh> parts = [];
        foreach (string region in mesh.RegionNames.Where(name => mesh.CellsIn(name).Length > 0))
        {
            parts.Add(Part(mesh, region));
        }

        Mesh joined = Mesh.Join(parts);
        MeshInvariants.Check(joined);
        Assert.Equal(mesh.VertexCount, joined.VertexCount);
        Assert.Equal(mesh.EdgeCount, joined.EdgeCount);
        Assert.Equal(mesh.OuterEdges.Length, joined.OuterEdges.Length);
        foreach (string region in joined.RegionNames)
        {
            MeshInvariants.Near(mesh.AreaOfRegion(region), joined.AreaOfRegion(region));
        }

        foreach (string boundary in joined.BoundaryNames)
        {
            Assert.Equal(mesh.BoundaryEdges(boundary).Length, joined.BoundaryEdges(boundary).Length);
            MeshInvariants.Near(mesh.LengthOfBoundary(boundary), joined.LengthOfBoundary(boundary));
        }
    }

    [Fact]
    public void TrianglesAndQuadrilateralsMeetAlongTheirSharedEdges()
    {
        Mesh joined = Mesh.Join([Square(0, "left", 2), Square(1, "right", 2).CutQuadrilaterals().Mesh]);
        MeshInvariants.Check(joined);
        Assert.Equal((8, 4), (joined.TriangleCount, joined.QuadrilateralCount));
        Assert.Equal(2, joined.EdgesBetween("left", "right").Length);
        Assert.Equal(15, joined.VertexCount);

        // The shared line was named on either side.
        Assert.Equal(joined.EdgesBetween("left", "right"), joined.BoundaryEdges("left.2"));
        Assert.Equal(joined.EdgesBetween("left", "right"), joined.BoundaryEdges("right.4"));
    }

    [Fact]
    public void OffsetsBelowTheToleranceAreOnePlaceAndAboveItAreNot()
    {
        Assert.Equal(15, Mesh.Join([Square(0, "a", 2), Square(1 + 1e-10, "b", 2)]).VertexCount);
        var exception = Assert.Throws<InvalidMeshException>(
            () => Mesh.Join([Square(0, "a", 2), Square(1 - 1e-5, "b", 2)]));
        Assert.NotNull(exception.Place);
        Assert.Equal(18, Mesh.Join([Square(0, "a", 2), Square(1 + 1e-5, "b", 2)]).VertexCount);
    }

    [Fact]
    public void AHangingVertexIsNamedWithItsPlace()
    {
        var exception = Assert.Throws<InvalidMeshException>(
            () => Mesh.Join([Square(0, "a", 2), Square(1, "b", 3)]));
        Assert.Contains("hangs", exception.Message, StringComparison.Ordinal);
        Assert.Equal(1, exception.Place!.Value.X, 1e-12);
    }

    [Fact]
    public void AnArcAlongAChordIsAMismatch()
    {
        Mesh disc = new QuadrilateralPatch(
            new(new(0, 0), new(1, 0)), new(new(1, 0), new(1, 1), 0.5),
            new(new(1, 1), new(0, 1)), new(new(0, 1), new(0, 0)), "bulge").Divide(1, 1);
        var exception = Assert.Throws<InvalidMeshException>(() => Mesh.Join([disc, Square(1, "b", 1)]));
        Assert.Contains("sweeps", exception.Message, StringComparison.Ordinal);
    }

    [Fact]
    public void OverlapsAreFoundWhetherSidesCrossOrOneLiesWithin()
    {
        Assert.Throws<InvalidMeshException>(() => Mesh.Join([Square(0, "a", 2), Square(0.3, "b", 2)]));
        Assert.Throws<InvalidMeshException>(() => Mesh.Join([Square(0, "a", 2), Square(0, "b", 2)]));
        Mesh inner = QuadrilateralPatch.Straight(new(0.1, 0.1), new(0.2, 0.1), new(0.2, 0.2), new(0.1, 0.2), "b").Divide(1, 1);
        Assert.Throws<InvalidMeshException>(() => Mesh.Join([Square(0, "a", 2), inner]));
        Mesh across = QuadrilateralPatch.Straight(new(-1, 0.4), new(2, 0.4), new(2, 0.6), new(-1, 0.6), "b").Divide(1, 1);
        Assert.Throws<InvalidMeshException>(() => Mesh.Join([Square(0, "a", 1), across]));
    }

    [Fact]
    public void PointNamesMustAgree()
    {
        Mesh first = Pointed(0, 1);
        Mesh second = Pointed(1, 0);
        Mesh joined = Mesh.Join([first, second]);
        Assert.Equal(new Point2D(1, 0), joined.Vertices[joined.VertexAt("p")]);
        Assert.Throws<InvalidMeshException>(() => Mesh.Join([first, Pointed(1, 1)]));

        static Mesh Pointed(double x, int vertex) => new MeshDefinition
        {
            Vertices = [new(x, 0), new(x + 1, 0), new(x + 1, 1), new(x, 1)],
            Quadrilaterals = [0, 1, 2, 3],
            RegionNames = ["a"],
            Points = new Dictionary<string, int> { ["p"] = vertex },
        }.ToMesh();
    }

    [Fact]
    public void ThereMustBeAMeshAndASensibleTolerance()
    {
        Assert.Throws<ArgumentException>(() => Mesh.Join([]));
        Assert.Throws<ArgumentException>(() => Mesh.Join([Square(0, "a", 1)], 1));
        Assert.Throws<InvalidMeshException>(() => Mesh.Join([Square(0, "a", 50)], 0.05));
    }

    private static Mesh Square(double x, string region, int count) => new QuadrilateralPatch(
        new(new(x, 0), new(x + 1, 0), 0, region + ".1"), new(new(x + 1, 0), new(x + 1, 1), 0, region + ".2"),
        new(new(x + 1, 1), new(x, 1), 0, region + ".3"), new(new(x, 1), new(x, 0), 0, region + ".4"), region)
        .Divide(count, count);

    /// <summary>One region of a mesh as a mesh of its own.</summary>
    private static Mesh Part(Mesh mesh, string region)
    {
        MeshDefinition whole = MeshInvariants.Redefine(mesh);
        int[] cells = mesh.CellsIn(region).ToArray();
        int[] vertices = [.. cells.SelectMany(cell => mesh.VerticesOf(cell).ToArray()).Distinct().Order()];
        Dictionary<int, int> numbers = vertices.Index().ToDictionary(pair => pair.Item, pair => pair.Index);
        int[] Corners(CellKind kind) =>
        [
            .. cells.Where(cell => mesh.KindOf(cell) == kind)
                .SelectMany(cell => mesh.VerticesOf(cell).ToArray()).Select(vertex => numbers[vertex]),
        ];
        HashSet<(int, int)> edges = [.. cells.SelectMany(cell => mesh.EdgesOf(cell).ToArray()).Select(mesh.EndsOf)];
        return new MeshDefinition
        {
            Vertices = [.. vertices.Select(vertex => mesh.Vertices[vertex])],
            Triangles = Corners(CellKind.Triangle),
            Quadrilaterals = Corners(CellKind.Quadrilateral),
            RegionNames = [region],
            Boundaries = whole.Boundaries.ToDictionary(
                pair => pair.Key,
                pair => (IReadOnlyList<(int, int)>)
                    [.. pair.Value.Where(edges.Contains).Select(edge => (numbers[edge.Start], numbers[edge.End]))]),
            Arcs =
            [
                .. whole.Arcs.Where(arc => edges.Contains((arc.Start, arc.End)))
                    .Select(arc => (numbers[arc.Start], numbers[arc.End], arc.SweepRadians)),
            ],
        }.ToMesh();
    }
}
