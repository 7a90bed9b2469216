using FemCore2D.Geometry;

namespace FemCore2D.Elements;

/// <summary>
/// The maps from the reference cells to all cells of a mesh, of a chosen geometric degree: cells with an edge on an
/// arc bend with it from degree 2 on, all others are straight.
/// </summary>
public sealed class CellMaps
{
    /// <summary>Prepares the maps of a mesh.</summary>
    /// <param name="mesh">The mesh.</param>
    /// <param name="degree">The degree of the polynomials that describe curved cells: 1 (all straight) to 3.</param>
    public CellMaps(Mesh mesh, int degree) => throw new NotImplementedException();

    /// <summary>The mesh.</summary>
    public Mesh Mesh => throw new NotImplementedException();

    /// <summary>The degree of the maps of curved cells.</summary>
    public int Degree => throw new NotImplementedException();

    /// <summary>Whether the map of a cell is affine (a straight triangle or a parallelogram), so that its Jacobian is the same everywhere.</summary>
    public bool IsAffine(int cell) => throw new NotImplementedException();

    /// <summary>The place in the real cell of a point of the reference cell.</summary>
    public Point2D PlaceOf(int cell, Point2D reference) => throw new NotImplementedException();

    /// <summary>The derivative of the map at a point of the reference cell.</summary>
    public Jacobian JacobianAt(int cell, Point2D reference) => throw new NotImplementedException();

    /// <summary>Finds the reference point that a map sends to a place in (or near) a real cell.</summary>
    /// <returns>Whether the iteration converged; the point may lie outside the reference cell.</returns>
    public bool TryInvert(int cell, Point2D place, out Point2D reference) => throw new NotImplementedException();
}
