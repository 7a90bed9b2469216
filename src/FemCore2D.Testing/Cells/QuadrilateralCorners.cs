using FemCore2D.Geometry;

namespace FemCore2D.Testing;

/// <summary>The corners of a random convex quadrilateral, counterclockwise.</summary>
/// <param name="A">The first corner.</param>
/// <param name="B">The second corner.</param>
/// <param name="C">The third corner.</param>
/// <param name="D">The fourth corner.</param>
public readonly record struct QuadrilateralCorners(Point2D A, Point2D B, Point2D C, Point2D D)
{
    /// <summary>The area.</summary>
    public double Area => 0.5 * (C - A).Cross(D - B);

    /// <summary>The corners in their order.</summary>
    public Point2D[] ToArray() => [A, B, C, D];

    /// <summary>The mesh of this one quadrilateral, in a region named <c>cell</c>.</summary>
    public Mesh ToMesh() => new MeshDefinition
    {
        Vertices = [A, B, C, D],
        Quadrilaterals = [0, 1, 2, 3],
        RegionNames = ["cell"],
    }.ToMesh();
}
