namespace FemCore2D.Geometry.Tests;

/// <summary>What must hold of every mesh, seen through its public surface.</summary>
internal static class MeshInvariants
{
    public static void Check(Mesh mesh)
    {
        CheckCells(mesh);
        CheckEdges(mesh);
        CheckVertices(mesh);

        // Rebuilding it as a definition runs all the checks of unfolded, conforming, non-overlapping cells.
        Mesh copy = Redefine(mesh).ToMesh();
        Assert.Equal(mesh.EdgeCount, copy.EdgeCount);
        Assert.Equal(mesh.OuterEdges, copy.OuterEdges);
    }

    public static MeshDefinition Redefine(Mesh mesh) => new()
    {
        Vertices = mesh.Vertices.ToArray(),
        Triangles = mesh.Triangles.ToArray(),
        Quadrilaterals = mesh.Quadrilaterals.ToArray(),
        RegionNames = mesh.RegionNames,
        CellRegions = mesh.CellRegions.ToArray(),
        Boundaries = mesh.BoundaryNames.ToDictionary(
            name => name,
            name => (IReadOnlyList<(int, int)>)[.. mesh.BoundaryEdges(name).ToArray().Select(mesh.EndsOf)]),
        Arcs =
        [
            .. Enumerable.Range(0, mesh.EdgeCount).Where(edge => mesh.SweepRadiansOf(edge) != 0)
                .Select(edge => (mesh.EndsOf(edge).From, mesh.EndsOf(edge).To, mesh.SweepRadiansOf(edge))),
        ],
        Points = mesh.PointNames.ToDictionary(name => name, mesh.VertexAt),
    };

    public static double Area(Mesh mesh) => Enumerable.Range(0, mesh.CellCount).Sum(mesh.AreaOf);

    public static void Near(double expected, double actual, double relative = 1e-12) =>
        Assert.True(
            Math.Abs(expected - actual) <= relative * Math.Abs(expected),
            $"{actual:R} differs from {expected:R} by more than {relative} of it.");

    private static void CheckCells(Mesh mesh)
    {
        for (int cell = 0; cell < mesh.CellCount; cell++)
        {
            ReadOnlySpan<int> corners = mesh.VerticesOf(cell);
            ReadOnlySpan<int> edges = mesh.EdgesOf(cell);
            Assert.Equal(mesh.KindOf(cell) == CellKind.Triangle ? 3 : 4, corners.Length);
            for (int i = 0; i < corners.Length; i++)
            {
                int next = corners[(i + 1) % corners.Length];
                (int from, int to) = mesh.EndsOf(edges[i]);
                Assert.Equal((Math.Min(corners[i], next), Math.Max(corners[i], next)), (from, to));
                (int left, int right) = mesh.CellsOf(edges[i]);
                Assert.Equal(cell, corners[i] == from ? left : right);
            }

            Assert.True(mesh.AreaOf(cell) > 0);
        }
    }

    private static void CheckEdges(Mesh mesh)
    {
        int sides = 0;
        for (int edge = 0; edge < mesh.EdgeCount; edge++)
        {
            (int from, int to) = mesh.EndsOf(edge);
            (int left, int right) = mesh.CellsOf(edge);
            Assert.True(from < to);
            Assert.NotEqual(left, right);
            Assert.Equal(left < 0 || right < 0, mesh.IsOuter(edge));
            Assert.Equal(mesh.IsOuter(edge), mesh.OuterEdges.Contains(edge));
            Assert.Equal(edge, mesh.EdgeBetween(to, from));
            Assert.Equal(mesh.Vertices[from], mesh.PointOnEdge(edge, 0));
            Assert.Equal(mesh.Vertices[to], mesh.PointOnEdge(edge, 1));
            sides += (left < 0 ? 0 : 1) + (right < 0 ? 0 : 1);
        }

        Assert.Equal((3 * mesh.TriangleCount) + (4 * mesh.QuadrilateralCount), sides);
    }

    private static void CheckVertices(Mesh mesh)
    {
        for (int vertex = 0; vertex < mesh.VertexCount; vertex++)
        {
            foreach (int edge in mesh.EdgesAround(vertex))
            {
                (int from, int to) = mesh.EndsOf(edge);
                Assert.True(from == vertex || to == vertex);
            }

            foreach (int cell in mesh.CellsAround(vertex))
            {
                Assert.True(mesh.VerticesOf(cell).Contains(vertex));
            }

            // Around an inner vertex there are as many cells as edges; on the rim each fan has one edge more.
            int outer = mesh.EdgesAround(vertex).ToArray().Count(mesh.IsOuter);
            Assert.Equal(mesh.CellsAround(vertex).Length + (outer / 2), mesh.EdgesAround(vertex).Length);
        }
    }
}
