namespace FemCore2D.Geometry;

/// <content>Joining meshes.</content>
public sealed partial class Mesh
{
    /// <summary>Joins meshes whose outer vertices coincide along their common lines into one.</summary>
    /// <remarks>
    /// <para>Regions, boundaries and points of one name become one. Vertices and cells keep their order: first all
    /// triangles, mesh by mesh, then all quadrilaterals; of coinciding vertices the first stays. An edge keeps the
    /// boundary names it has on either side.</para>
    /// <para>Meshes that touch nowhere may be joined too; parts of a single mesh that touch are joined likewise.</para>
    /// </remarks>
    /// <param name="meshes">The meshes, at least one.</param>
    /// <param name="relativeTolerance">
    /// The distance within which two vertices count as one, relative to the diagonal of all meshes together.
    /// </param>
    /// <exception cref="ArgumentException">There is no mesh, or the tolerance is not a small number.</exception>
    /// <exception cref="InvalidMeshException">
    /// A vertex of one mesh hangs in an edge of another, an arc of one lies along an edge of another that is straight or
    /// bent otherwise, the meshes overlap, or one point name stands at two places.
    /// </exception>
    public static Mesh Join(IReadOnlyList<Mesh> meshes, double relativeTolerance = 1e-9)
    {
        ArgumentNullException.ThrowIfNull(meshes);
        if (meshes.Count == 0)
        {
            throw new ArgumentException("There is no mesh to join. Give at least one.", nameof(meshes));
        }

        if (!(relativeTolerance >= 0 && relativeTolerance < 0.1))
        {
            throw new ArgumentException(
                $"The relative tolerance is {relativeTolerance}. Give a small number, such as 1e-9.",
                nameof(relativeTolerance));
        }

        return new MeshJoin(meshes, relativeTolerance).Join();
    }
}
