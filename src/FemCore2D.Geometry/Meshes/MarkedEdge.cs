namespace FemCore2D.Geometry;

/// <summary>What a mesh must remember of an edge that is more than a side of a cell.</summary>
/// <param name="Start">A vertex of the edge.</param>
/// <param name="End">The other vertex.</param>
/// <param name="SweepRadians">The sweep of its arc from <paramref name="Start"/> to <paramref name="End"/>, 0 when straight.</param>
/// <param name="Boundaries">An index into the builder's table of sets of boundary names, or -1 for an unnamed edge.</param>
internal readonly record struct MarkedEdge(int Start, int End, double SweepRadians, int Boundaries);
