namespace FemCore2D.Geometry;

/// <summary>Divides cross-sections into triangles of wanted sizes and good angles.</summary>
/// <remarks>
/// The section's pieces are divided by a graded size field, triangulated under the Delaunay property with the pieces
/// as constraints, and refined until every cell has the wanted size and angle. The same section and options give
/// the same mesh, bit for bit.
/// </remarks>
public static class Mesher
{
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
        triangulation.Reserve((int)Math.Min(estimate * 0.6, plan.Options.CellLimit) + triangulation.VertexCount);

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
