using FemCore2D.Geometry;

namespace FemCore2D.Drawing.Tests;

/// <summary>Meshes made by hand, so that these tests stand without the mesher.</summary>
internal static class TestMeshes
{
    /// <summary>A rectangle of squares, each cut into two triangles; a vertical line splits it into "west" and "east".</summary>
    public static Mesh Rectangle(int columns, int rows, double width, double height)
    {
        Point2D[] vertices = Grid(columns, rows, width, height);
        var triangles = new List<int>();
        var regions = new List<int>();
        for (int j = 0; j < rows; j++)
        {
            for (int i = 0; i < columns; i++)
            {
                int a = (j * (columns + 1)) + i;
                int d = a + columns + 1;
                triangles.AddRange((i + j) % 2 == 0 ? [a, a + 1, d + 1, a, d + 1, d] : [a, a + 1, d, a + 1, d + 1, d]);
                int region = 2 * i < columns ? 0 : 1;
                regions.AddRange([region, region]);
            }
        }

        return new MeshDefinition
        {
            Vertices = vertices,
            Triangles = triangles,
            CellRegions = regions,
            RegionNames = ["west", "east"],
        }.ToMesh();
    }

    /// <summary>A rectangle of quadrilaterals of one region.</summary>
    public static Mesh Quadrilaterals(int columns, int rows, double width, double height)
    {
        var cells = new List<int>();
        for (int j = 0; j < rows; j++)
        {
            for (int i = 0; i < columns; i++)
            {
                int a = (j * (columns + 1)) + i;
                cells.AddRange([a, a + 1, a + columns + 2, a + columns + 1]);
            }
        }

        return new MeshDefinition
        {
            Vertices = Grid(columns, rows, width, height),
            Quadrilaterals = cells,
            CellRegions = new int[columns * rows],
            RegionNames = ["plate"],
        }.ToMesh();
    }

    /// <summary>
    /// Rings around a disc, with arcs. The disc is a fan of triangles, the rings are of triangles or quadrilaterals.
    /// </summary>
    /// <param name="sectors">The number of parts around.</param>
    /// <param name="radii">The radii of all circles, ascending.</param>
    /// <param name="regions">The region of the disc and of each ring.</param>
    /// <param name="ofQuadrilaterals">Whether the rings are of quadrilaterals.</param>
    public static Mesh Rings(int sectors, double[] radii, string[] regions, bool ofQuadrilaterals = false)
    {
        var vertices = new List<Point2D> { Point2D.Origin };
        double sweep = 2 * Math.PI / sectors;
        foreach (double radius in radii)
        {
            for (int i = 0; i < sectors; i++)
                vertices.Add(Point2D.Origin + (radius * Vector2D.AtAngle(i * sweep)));
        }

        List<string> names = [.. regions.Distinct()];
        var triangles = new List<int>();
        var quadrilaterals = new List<int>();
        var triangleRegions = new List<int>();
        var quadrilateralRegions = new List<int>();
        var arcs = new List<(int, int, double)>();
        for (int ring = 0; ring < radii.Length; ring++)
        {
            int region = names.IndexOf(regions[ring]);
            for (int i = 0; i < sectors; i++)
            {
                int next = (i + 1) % sectors;
                int outer = 1 + (ring * sectors);
                arcs.Add((outer + i, outer + next, sweep));
                if (ring == 0)
                {
                    triangles.AddRange([0, outer + i, outer + next]);
                    triangleRegions.Add(region);
                    continue;
                }

                int inner = outer - sectors;
                if (ofQuadrilaterals)
                {
                    quadrilaterals.AddRange([inner + i, outer + i, outer + next, inner + next]);
                    quadrilateralRegions.Add(region);
                }
                else
                {
                    triangles.AddRange([inner + i, outer + i, outer + next, inner + i, outer + next, inner + next]);
                    triangleRegions.AddRange([region, region]);
                }
            }
        }

        return new MeshDefinition
        {
            Vertices = vertices,
            Triangles = triangles,
            Quadrilaterals = quadrilaterals,
            CellRegions = [.. triangleRegions, .. quadrilateralRegions],
            RegionNames = names,
            Arcs = arcs,
        }.ToMesh();
    }

    private static Point2D[] Grid(int columns, int rows, double width, double height)
    {
        var vertices = new Point2D[(columns + 1) * (rows + 1)];
        for (int j = 0; j <= rows; j++)
        {
            for (int i = 0; i <= columns; i++)
                vertices[(j * (columns + 1)) + i] = new Point2D(width * i / columns, height * j / rows);
        }

        return vertices;
    }
}
