namespace FemCore2D.Elements;

/// <summary>How many unknowns an element puts on each vertex, on each edge and in the interior of a cell.</summary>
/// <param name="PerVertex">The unknowns on each vertex.</param>
/// <param name="PerEdge">The unknowns on each edge, besides those on its ends.</param>
/// <param name="PerInterior">The unknowns that belong to the cell alone.</param>
public readonly record struct UnknownLayout(int PerVertex, int PerEdge, int PerInterior);
