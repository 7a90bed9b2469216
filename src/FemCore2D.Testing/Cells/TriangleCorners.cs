using FemCore2D.Geometry;

namespace FemCore2D.Testing;

/// <summary>The corners of a random triangle, counterclockwise.</summary>
/// <param name="A">The first corner.</param>
/// <param name="B">The second corner.</param>
/// <param name="C">The third corner.</param>
public readonly record struct TriangleCorners(Point2D A, Point2D B, Point2D C)
{
    /// <summary>The area.</summary>
    public double Area => 0.5 * (B - A).Cross(C - A);

    /// <summary>The corners in their order.</summary>
    public Point2D[] ToArray() => [A, B, C];

    /// <summary>The mesh of this one triangle, in a region named <c>cell</c>.</summary>
    public Mesh ToMesh() => new MeshDefinition
    {
        Vertices = [A, B, C],
        Triangles = [0, 1, 2],
        RegionNames = ["cell"],
    }.ToMesh();
}
