namespace FemCore2D.Geometry;

/// <content>Refinement: each gives a new mesh and leaves this one as it is.</content>
public sealed partial class Mesh
{
    /// <summary>Divides every cell into four, at the middles of its edges.</summary>
    /// <remarks>
    /// New vertices of curved edges lie on their arcs, and each half carries half the sweep. Names are kept. The lines
    /// that divide a curved quadrilateral bend as the mean of the sides on either hand, so that a ring stays a ring;
    /// those that divide a curved triangle are straight unless it bends too much for them to stay within.
    /// </remarks>
    /// <returns>The mesh, and the parent of each cell: cell <c>i</c> is a part of cell <c>i / 4</c>.</returns>
    /// <exception cref="MeshingException">The result would not fit into arrays.</exception>
    /// <exception cref="InvalidMeshException">An arc sweeps so far that a part of its cell would be folded.</exception>
    public RefinedMesh RefineAll() => UniformRefinement.Refine(this);

    /// <summary>Divides marked cells by bisection, and as many others as it takes to leave no vertex hanging.</summary>
    /// <remarks>
    /// <para>Newest-vertex bisection (W. F. Mitchell 1989; J. M. Maubach 1995): a triangle is cut from the middle of one
    /// edge to the opposite vertex; at first this is its longest edge, afterwards the edge opposite the newest vertex.
    /// The descendants of a triangle fall into few classes of shapes, so angles stay bounded however often it is
    /// repeated. Marks spread until every triangle with a marked edge has its own bisection edge marked too.</para>
    /// <para>A marked quadrilateral, or one whose neighbour is cut at the common edge, becomes two triangles, along the
    /// diagonal that leaves the larger angles, which are bisected like any other; no other quadrilateral is touched. The
    /// dividing lines of a curved cell are straight unless it bends too much for them to stay within.
    /// Refine a mesh as a whole (<see cref="RefineAll"/>) to keep its quadrilaterals.</para>
    /// <para>New vertices of curved edges lie on their arcs, and each half carries half the sweep. Names are kept.</para>
    /// </remarks>
    /// <param name="cells">The marked cells, in any order, repeated or not.</param>
    /// <returns>The mesh, and the parent of each cell.</returns>
    /// <exception cref="ArgumentOutOfRangeException">A cell does not exist.</exception>
    /// <exception cref="MeshingException">The result would not fit into arrays.</exception>
    /// <exception cref="InvalidMeshException">An arc sweeps so far that a part of its cell would be folded.</exception>
    public RefinedMesh RefineCells(params ReadOnlySpan<int> cells)
    {
        foreach (int cell in cells)
        {
            if ((uint)cell >= (uint)CellCount)
            {
                throw new ArgumentOutOfRangeException(
                    nameof(cells), cell, $"The mesh has no cell {cell}; its cells are 0 to {CellCount - 1}.");
            }
        }

        return NewestVertexBisection.Refine(this, cells);
    }

    /// <summary>Cuts every quadrilateral into two triangles along the diagonal that leaves the larger angles.</summary>
    /// <returns>The mesh of triangles, and the parent of each.</returns>
    /// <exception cref="InvalidMeshException">An arc sweeps so far that half of its cell would be folded.</exception>
    public RefinedMesh CutQuadrilaterals() => NewestVertexBisection.CutQuadrilaterals(this);
}
