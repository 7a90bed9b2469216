using FemCore2D.Geometry;

namespace FemCore2D.Assembly;

/// <summary>A point of a cell at which a term is evaluated.</summary>
/// <param name="Cell">The cell.</param>
/// <param name="Region">The cell's region, an index into <see cref="Mesh.RegionNames"/>.</param>
/// <param name="Reference">The point in coordinates of the reference cell.</param>
/// <param name="Place">The point in the plane, in metres.</param>
/// <param name="Weight">The area that the point stands for, in m²; for a term that is constant in the cell, the cell's area.</param>
public readonly record struct CellPoint(int Cell, int Region, Point2D Reference, Point2D Place, double Weight);
