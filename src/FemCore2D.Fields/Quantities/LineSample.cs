using FemCore2D.Geometry;

namespace FemCore2D.Fields;

/// <summary>Potential and field at a point of a sampled line.</summary>
/// <param name="Distance">The distance from the start of the line, in metres.</param>
/// <param name="Place">The point, in metres.</param>
/// <param name="Potential">The potential, in V; NaN where the point lies outside the mesh.</param>
/// <param name="Field">The electric field, in V/m; NaN where the point lies outside the mesh.</param>
public readonly record struct LineSample(double Distance, Point2D Place, double Potential, Vector2D Field);
