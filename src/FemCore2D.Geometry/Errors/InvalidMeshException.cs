namespace FemCore2D.Geometry;

/// <summary>
/// A mesh is not one: a cell is turned over, flat or folded, cells overlap or leave a vertex hanging, an index is out
/// of range; or a patch, a join or a refinement would give such a mesh.
/// </summary>
public sealed class InvalidMeshException : FemCoreException
{
    /// <summary>Creates the exception with its message.</summary>
    public InvalidMeshException(string message)
        : base(message)
    {
    }

    /// <summary>Creates the exception with its message and cause.</summary>
    public InvalidMeshException(string message, Exception innerException)
        : base(message, innerException)
    {
    }

    /// <summary>Creates the exception for a fault at a place of the plane.</summary>
    /// <param name="message">What is wrong, where, and how to mend it.</param>
    /// <param name="place">The place, in metres.</param>
    public InvalidMeshException(string message, Point2D place)
        : base(message) => Place = place;

    /// <summary>The place of the fault, in metres, where it has one.</summary>
    public Point2D? Place { get; }

    internal static InvalidMeshException SameSide(
        int cell, int other, int start, int end, ReadOnlySpan<Point2D> vertices) =>
        new($"Cells {cell} and {other} lie on the same side of the edge from vertex {start} at {vertices[start]} to " +
            $"vertex {end} at {vertices[end]}, so they overlap. List the vertices of every cell counterclockwise " +
            "and every cell once.",
            vertices[start].Towards(vertices[end], 0.5));
}
