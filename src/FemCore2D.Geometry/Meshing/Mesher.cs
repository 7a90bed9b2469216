namespace FemCore2D.Geometry;

/// <summary>Divides cross-sections into triangles of wanted sizes and good angles.</summary>
/// <remarks>
/// The section's pieces are divided by a graded size field, triangulated under the Delaunay property with the pieces
/// as constraints, and refined until every cell has the wanted size and angle. The same section and options give
/// the same mesh, bit for bit.
/// </remarks>
/// <example>
/// <code>
/// MeshingResult result = Mesher.Generate(
///     section, MeshOptions.Default.WithSize(2e-4).WithBoundarySize("inner", 5e-5));
/// Console.WriteLine(result.Report);
/// </code>
/// </example>
public static class Mesher
{
    /// <summary>Meshes a cross-section.</summary>
    /// <param name="section">The cross-section.</param>
    /// <param name="options">Sizes, angles and divisions; null for the default ones.</param>
    /// <param name="progress">Hears how far the mesh has come.</param>
    /// <param name="cancellation">Ends the work early.</param>
    /// <returns>The mesh and a report about it.</returns>
    /// <exception cref="InvalidSectionException">The section cannot be meshed; the message tells why.</exception>
    /// <exception cref="MeshingException">The sizes need more cells than the limit, paired boundaries do not match, or a division is impossible.</exception>
    /// <exception cref="UnknownNameException">The options name a region, boundary or point that the section does not have.</exception>
    /// <exception cref="OperationCanceledException">The work was cancelled.</exception>
    public static MeshingResult Generate(
        CrossSection section,
        MeshOptions? options = null,
        IProgress<MeshingProgress>? progress = null,
        CancellationToken cancellation = default)
    {
        ArgumentNullException.ThrowIfNull(section);
        return Generate(section.Arrange(), options ?? MeshOptions.Default, progress, cancellation);
    }

    internal static MeshingResult Generate(
        Arrangement arrangement,
        MeshOptions options,
        IProgress<MeshingProgress>? progress = null,
        CancellationToken cancellation = default)
    {
        ArgumentNullException.ThrowIfNull(options);
        if (arrangement.RegionNames.IsEmpty || arrangement.Pieces.IsEmpty)
            throw new MeshingException("The section has no region, so there is nothing to mesh. Fill an outline with a region.");
        MeshPlan plan = new(arrangement, options);
        plan.RefuseHopelessSizes();
        progress?.Report(new MeshingProgress(MeshingStage.Dividing, 0, 0));
        SizeField field = plan.MakeSizeField();
        BoundaryDivision division = new(plan, field, cancellation);

        progress?.Report(new MeshingProgress(MeshingStage.Triangulating, 0, 0));
        Triangulation triangulation = BoundaryTriangulation.Make(
            plan, division, Scaffold.Make(plan, field, cancellation), cancellation);
        double estimate = CellEstimate.Check(triangulation, plan, field, cancellation);
        triangulation.Reserve((int)Math.Min(estimate * 0.6, plan.CellLimit) + triangulation.VertexCount);

        Refiner refiner = new(plan, field, triangulation, division, estimate, progress, cancellation);
        refiner.Refine();

        progress?.Report(new MeshingProgress(MeshingStage.Numbering, triangulation.TriangleCount, estimate));
        cancellation.ThrowIfCancellationRequested();
        MeshExtraction extraction = new(triangulation, plan, refiner);
        MeshReport report = MeshReporter.Measure(
            extraction.Mesh, extraction.Sizes, extraction.BoundaryVertices, plan, refiner.Corners, estimate);
        return new MeshingResult(extraction.Mesh, report);
    }
}
