using FemCore2D.Geometry;

namespace FemCore2D.Elements.Tests;

/// <summary>Small meshes, straight and curved.</summary>
internal static class TestMeshes
{
    public static Mesh OfCells(Point2D[] vertices, int[] triangles, int[] quadrilaterals, params MarkedEdge[] arcs) =>
        new MeshBuilder
        {
            Vertices = vertices,
            Triangles = triangles,
            Quadrilaterals = quadrilaterals,
            CellRegions = new int[(triangles.Length / 3) + (quadrilaterals.Length / 4)],
            RegionNames = ["filling"],
            MarkedEdges = arcs,
        }.Build();

    public static Mesh Of(RandomTriangle triangle) => OfCells(triangle.Vertices, [0, 1, 2], []);

    public static Mesh Of(RandomQuadrilateral quadrilateral) => OfCells(quadrilateral.Vertices, [], [0, 1, 2, 3]);

    /// <summary>A disc of rings of triangles; vertices lie on concentric circles, outer edges are arcs.</summary>
    public static Mesh Disc(int rings, double radius = 1, Point2D centre = default)
    {
        List<Point2D> vertices = [centre];
        List<int> triangles = [];
        List<MarkedEdge> arcs = [];
        for (int ring = 1; ring <= rings; ring++)
        {
            for (int k = 0; k < 6 * ring; k++)
            {
                vertices.Add(centre + (radius * ring / rings * Vector2D.AtAngle(2 * Math.PI * k / (6 * ring))));
            }
        }

        int At(int ring, int k) => ring == 0 ? 0 : 1 + (3 * ring * (ring - 1)) + (k % (6 * ring));
        for (int ring = 1; ring <= rings; ring++)
        {
            for (int sector = 0; sector < 6; sector++)
            {
                for (int k = 0; k < ring; k++)
                {
                    int outer = (sector * ring) + k;
                    int inner = (sector * (ring - 1)) + k;
                    triangles.AddRange([At(ring - 1, inner), At(ring, outer), At(ring, outer + 1)]);
                    if (k < ring - 1)
                    {
                        triangles.AddRange([At(ring - 1, inner), At(ring, outer + 1), At(ring - 1, inner + 1)]);
                    }
                }
            }
        }

        for (int k = 0; k < 6 * rings; k++)
        {
            arcs.Add(new MarkedEdge(At(rings, k), At(rings, k + 1), 2 * Math.PI / (6 * rings), -1));
        }

        return OfCells([.. vertices], [.. triangles], [], [.. arcs]);
    }

    /// <summary>A quarter of a ring of n by n quadrilaterals between the radii 1 and 2; both circles are arcs, and so are those between.</summary>
    public static Mesh QuarterRing(int n)
    {
        List<Point2D> vertices = [];
        List<int> quadrilaterals = [];
        List<MarkedEdge> arcs = [];
        double sweep = Math.PI / 2 / n;
        for (int i = 0; i <= n; i++)
        {
            for (int k = 0; k <= n; k++)
            {
                vertices.Add(Point2D.Origin + ((1 + ((double)i / n)) * Vector2D.AtAngle(k * sweep)));
            }
        }

        int At(int i, int k) => (i * (n + 1)) + k;
        for (int i = 0; i < n; i++)
        {
            for (int k = 0; k < n; k++)
            {
                quadrilaterals.AddRange([At(i, k), At(i + 1, k), At(i + 1, k + 1), At(i, k + 1)]);
            }
        }

        for (int i = 0; i <= n; i += n)
        {
            for (int k = 0; k < n; k++)
            {
                // Marked against the edge's own direction on one circle, so that both senses are met.
                arcs.Add(i == 0
                    ? new MarkedEdge(At(i, k + 1), At(i, k), -sweep, -1)
                    : new MarkedEdge(At(i, k), At(i, k + 1), sweep, -1));
            }
        }

        return OfCells([.. vertices], [], [.. quadrilaterals], [.. arcs]);
    }
}
