using FemCore2D.Geometry;

namespace FemCore2D.Assembly;

/// <summary>A point of an edge at which a term is evaluated.</summary>
/// <remarks>
/// The edge is seen from one of its cells: the only one on the rim of the mesh, the one on the left of the edge's
/// direction inside it.
/// </remarks>
/// <param name="Edge">The edge.</param>
/// <param name="Cell">The cell from which the edge is seen.</param>
/// <param name="Region">That cell's region, an index into <see cref="Mesh.RegionNames"/>.</param>
/// <param name="Reference">The point in coordinates of the cell's reference cell.</param>
/// <param name="Place">The point in the plane, in metres.</param>
/// <param name="Normal">The unit normal that points out of the cell.</param>
/// <param name="Weight">The length that the point stands for, in metres.</param>
public readonly record struct EdgePoint(
    int Edge, int Cell, int Region, Point2D Reference, Point2D Place, Vector2D Normal, double Weight)
{
    /// <summary>The same point as one of the cell, so that coefficients of cells serve on edges; its weight is still a length.</summary>
    public CellPoint InCell => new(Cell, Region, Reference, Place, Weight);
}
