using FemCore2D.Geometry;

namespace FemCore2D.Benchmarks;

/// <summary>What the benchmarks of the assembly share: a structured mesh, and the local matrices one by one.</summary>
internal static class AssemblyInput
{
    /// <summary>A sheared rectangle of about a number of triangles, none of them with a right angle.</summary>
    public static Mesh Triangles(int count)
    {
        int side = Math.Max(1, (int)Math.Round(Math.Sqrt(count / 2.0)));
        return QuadrilateralPatch
            .Straight(new(0, 0), new(1, 0), new(1.3, 1), new(0.3, 1), "all")
            .Divide(side, side)
            .CutQuadrilaterals()
            .Mesh;
    }

    /// <summary>The entries of all local stiffness matrices of degree 1, cell by cell, as an indexed builder takes them.</summary>
    public static IEnumerable<(int Row, int Column, double Value)> LocalEntries(Mesh mesh)
    {
        int[] triangles = mesh.Triangles.ToArray();
        Point2D[] vertices = mesh.Vertices.ToArray();
        var edges = new Vector2D[3];
        for (int first = 0; first < triangles.Length; first += 3)
        {
            Point2D a = vertices[triangles[first]];
            Point2D b = vertices[triangles[first + 1]];
            Point2D c = vertices[triangles[first + 2]];
            edges[0] = c - b;
            edges[1] = a - c;
            edges[2] = b - a;
            double scale = 0.5 / edges[2].Cross(c - a);
            for (int i = 0; i < 3; i++)
            {
                for (int j = 0; j < 3; j++)
                {
                    yield return (triangles[first + i], triangles[first + j], scale * edges[i].Dot(edges[j]));
                }
            }
        }
    }
}
