using FemCore2D.Geometry;

namespace FemCore2D.Elements;

/// <summary>What every element on a reference cell tells of itself, whatever the nature of its unknowns.</summary>
/// <remarks>
/// The unknowns of a cell are ordered: first those of its vertices, vertex by vertex; then those of its edges, edge
/// by edge, along each edge from its local start to its local end; then those of the interior.
/// Local edge <c>i</c> leads from vertex <c>i</c> to vertex <c>i + 1</c>, cyclically.
/// The reference triangle has the vertices (0,0), (1,0), (0,1); the reference quadrilateral is the unit square with
/// the vertices (0,0), (1,0), (1,1), (0,1).
/// </remarks>
public interface IElement
{
    /// <summary>The shape of the cell.</summary>
    CellKind Cell { get; }

    /// <summary>The degree of the complete polynomials that the element reproduces.</summary>
    int Degree { get; }

    /// <summary>The number of unknowns of a cell.</summary>
    int UnknownCount { get; }

    /// <summary>Where the unknowns live.</summary>
    UnknownLayout Layout { get; }
}
