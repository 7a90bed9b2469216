using FemCore2D.Geometry;

namespace FemCore2D.Testing;

/// <summary>A point of the reference triangle with the vertices (0, 0), (1, 0), (0, 1), its edges included.</summary>
/// <param name="Place">The point.</param>
public readonly record struct TrianglePoint(Point2D Place);

/// <summary>A point of the reference square from (0, 0) to (1, 1), its edges included.</summary>
/// <param name="Place">The point.</param>
public readonly record struct SquarePoint(Point2D Place);
