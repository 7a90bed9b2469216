namespace FemCore2D.Geometry;

/// <summary>How far a mesh has come.</summary>
/// <param name="Stage">What is being done.</param>
/// <param name="Cells">The number of cells so far.</param>
/// <param name="EstimatedCells">The number of cells that the sizes need, by estimate; 0 while it is not known.</param>
public readonly record struct MeshingProgress(MeshingStage Stage, int Cells, double EstimatedCells);

/// <summary>The stages of making a mesh, in their order.</summary>
public enum MeshingStage
{
    /// <summary>Boundaries are divided into edges.</summary>
    Dividing,

    /// <summary>The vertices of the boundaries are triangulated.</summary>
    Triangulating,

    /// <summary>Vertices are added for size and angle.</summary>
    Refining,

    /// <summary>Vertices and cells are numbered, and the mesh is completed.</summary>
    Numbering,
}
