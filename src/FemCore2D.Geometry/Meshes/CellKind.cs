namespace FemCore2D.Geometry;

/// <summary>The shape of a cell.</summary>
public enum CellKind
{
    /// <summary>Three vertices and three edges.</summary>
    Triangle,

    /// <summary>Four vertices and four edges.</summary>
    Quadrilateral,
}
