using FemCore2D.Geometry;

namespace FemCore2D.Fields;

/// <summary>The strongest field found in a region.</summary>
/// <param name="Region">The region.</param>
/// <param name="Magnitude">The magnitude of the field, in V/m.</param>
/// <param name="Place">Where it was found, in metres.</param>
/// <param name="Field">The field there, in V/m.</param>
public readonly record struct FieldPeak(string Region, double Magnitude, Point2D Place, Vector2D Field);
