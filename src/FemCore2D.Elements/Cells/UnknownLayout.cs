using FemCore2D.Geometry;

namespace FemCore2D.Elements;

/// <summary>How many unknowns an element puts on each vertex, on each edge and in the interior of a cell.</summary>
/// <param name="PerVertex">The unknowns on each vertex.</param>
/// <param name="PerEdge">The unknowns on each edge, besides those on its ends.</param>
/// <param name="PerInterior">The unknowns that belong to the cell alone.</param>
public readonly record struct UnknownLayout(int PerVertex, int PerEdge, int PerInterior)
{
    /// <summary>The number of unknowns that an edge holds together with its two ends.</summary>
    public int OnClosedEdge => (2 * PerVertex) + PerEdge;

    /// <summary>The number of unknowns of a cell.</summary>
    public int CountOn(CellKind cell) =>
        (ReferenceCell.VertexCount(cell) * (PerVertex + PerEdge)) + PerInterior;

    /// <summary>Lists the unknowns of a cell that a local edge holds: those of its start, of its end, then its own.</summary>
    /// <param name="cell">The shape of the cell.</param>
    /// <param name="edge">The local edge.</param>
    /// <param name="unknowns">Receives the local numbers; at least <see cref="OnClosedEdge"/> long.</param>
    /// <exception cref="ArgumentOutOfRangeException">The cell has no such edge, or the span is too short.</exception>
    public void UnknownsOnEdge(CellKind cell, int edge, Span<int> unknowns)
    {
        int vertexCount = ReferenceCell.VertexCount(cell);
        ArgumentOutOfRangeException.ThrowIfNegative(edge);
        ArgumentOutOfRangeException.ThrowIfGreaterThanOrEqual(edge, vertexCount);
        unknowns = unknowns[..OnClosedEdge];
        int end = edge + 1 < vertexCount ? edge + 1 : 0;
        for (int i = 0; i < PerVertex; i++)
        {
            unknowns[i] = (edge * PerVertex) + i;
            unknowns[PerVertex + i] = (end * PerVertex) + i;
        }

        for (int i = 0; i < PerEdge; i++)
        {
            unknowns[(2 * PerVertex) + i] = (vertexCount * PerVertex) + (edge * PerEdge) + i;
        }
    }
}
