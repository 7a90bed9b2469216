namespace FemCore2D.Geometry;

/// <summary>A mesh and the report about it.</summary>
/// <param name="Mesh">The mesh.</param>
/// <param name="Report">What it is like.</param>
public sealed record MeshingResult(Mesh Mesh, MeshReport Report);
