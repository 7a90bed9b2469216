namespace FemCore2D.Geometry;

/// <summary>A mesh made by dividing cells of another, with the parent of each cell: immutable.</summary>
public sealed class RefinedMesh
{
    private readonly int[] parents;

    internal RefinedMesh(Mesh mesh, int[] parents)
    {
        Mesh = mesh;
        this.parents = parents;
    }

    /// <summary>The new mesh. Vertices of the old one keep their numbers; new ones follow.</summary>
    public Mesh Mesh { get; }

    /// <summary>For each cell of the new mesh the cell of the old mesh of which it is a part, or the whole.</summary>
    public ReadOnlySpan<int> Parents => parents;
}
