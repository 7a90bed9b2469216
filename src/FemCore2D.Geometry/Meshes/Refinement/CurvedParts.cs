namespace FemCore2D.Geometry;

/// <summary>Checks the parts of curved cells: only there can a division fold a cell.</summary>
internal static class CurvedParts
{
    /// <exception cref="InvalidMeshException">A part of a curved cell is turned over or crossed by an arc.</exception>
    public static void Check(Mesh mesh, Mesh refined, ReadOnlySpan<int> parents)
    {
        if (!mesh.HasArcs)
        {
            return;
        }

        var checks = new CellChecks(refined);
        for (int cell = 0; cell < parents.Length; cell++)
        {
            if (mesh.IsCurved(parents[cell]))
            {
                checks.CheckUnfolded(
                    cell,
                    $"It is a part of cell {parents[cell]}, whose arc sweeps too far for its size to be divided. " +
                    "Mesh that arc by more edges before refining.");
            }
        }
    }
}
