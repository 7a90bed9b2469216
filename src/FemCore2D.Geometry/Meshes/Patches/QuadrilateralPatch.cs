namespace FemCore2D.Geometry;

/// <summary>
/// An area within four straight or circular sides that is meshed by rows and columns of quadrilaterals: immutable.
/// </summary>
/// <remarks>
/// The grid is the image of a graded grid of the unit square under the transfinite map of W. J. Gordon and C. A. Hall
/// (1973). Its lines bend with the sides: in a sector of a ring they are the concentric arcs, so that curved cells
/// fill the ring exactly. Join several patches, or patches and other meshes, with <see cref="Mesh.Join"/>.
/// </remarks>
public sealed class QuadrilateralPatch
{
    /// <summary>The most divisions of a patch: its cells must stay countable in the mesh's arrays.</summary>
    private const long MaximumCells = 250_000_000;

    private const double RelativeTolerance = 1e-9;

    private readonly OutlinePiece[] given;

    /// <summary>Creates the patch from its sides, counterclockwise, each beginning where the one before it ends.</summary>
    /// <param name="first">The first side.</param>
    /// <param name="second">The second side.</param>
    /// <param name="third">The third side.</param>
    /// <param name="fourth">The fourth side.</param>
    /// <param name="region">The name of the region that the patch fills.</param>
    /// <exception cref="InvalidMeshException">
    /// A side has no length, sweeps a full turn or more, is not finite, or does not meet the next.
    /// </exception>
    public QuadrilateralPatch(OutlinePiece first, OutlinePiece second, OutlinePiece third, OutlinePiece fourth, string region)
    {
        ArgumentException.ThrowIfNullOrWhiteSpace(region);
        Region = region;
        given = [first, second, third, fourth];
        Box2D box = Box2D.Empty;
        foreach (OutlinePiece side in given)
        {
            box = box.With(side.Start).With(side.End);
        }

        double tolerance = RelativeTolerance * box.Diagonal;
        for (int i = 0; i < given.Length; i++)
        {
            OutlinePiece next = given[(i + 1) % given.Length];
            CheckSide(i + 1, given[i], next, tolerance);
            given[i] = given[i] with { End = next.Start };
        }

        Sides = new FourSides(
            given[0], given[1], given[2].Reversed(), given[3].Reversed());
    }

    /// <summary>The name of the region that the patch fills.</summary>
    public string Region { get; }

    internal FourSides Sides { get; }

    /// <summary>The patch within a straight-sided quadrilateral.</summary>
    /// <param name="first">The first corner, in metres; the others follow counterclockwise.</param>
    /// <param name="second">The second corner.</param>
    /// <param name="third">The third corner.</param>
    /// <param name="fourth">The fourth corner.</param>
    /// <param name="region">The name of the region that the patch fills.</param>
    /// <exception cref="InvalidMeshException">Two corners coincide or one is not finite.</exception>
    public static QuadrilateralPatch Straight(
        Point2D first, Point2D second, Point2D third, Point2D fourth, string region) => new(
        new OutlinePiece(first, second), new OutlinePiece(second, third),
        new OutlinePiece(third, fourth), new OutlinePiece(fourth, first), region);

    /// <summary>The patch that fills a sector of a ring.</summary>
    /// <remarks>Its first direction goes outwards along the radius, its second around the centre.</remarks>
    /// <param name="centre">The centre, in metres.</param>
    /// <param name="innerRadius">The inner radius, in metres, positive.</param>
    /// <param name="outerRadius">The outer radius, in metres.</param>
    /// <param name="startRadians">The direction in which the sector begins.</param>
    /// <param name="sweepRadians">The angle of the sector, counterclockwise; less than a full turn, so that a whole ring takes two.</param>
    /// <param name="region">The name of the region that the patch fills.</param>
    /// <param name="inner">The name of the boundary along the inner arc, or none.</param>
    /// <param name="outer">The name of the boundary along the outer arc, or none.</param>
    /// <param name="start">The name of the boundary along the straight side where the sector begins, or none.</param>
    /// <param name="end">The name of the boundary along the straight side where the sector ends, or none.</param>
    /// <exception cref="InvalidMeshException">The radii do not grow from above zero, or the angle is out of range.</exception>
    public static QuadrilateralPatch RingSector(
        Point2D centre, double innerRadius, double outerRadius, double startRadians, double sweepRadians,
        string region, string? inner = null, string? outer = null, string? start = null, string? end = null)
    {
        if (!(innerRadius > 0 && outerRadius > innerRadius && sweepRadians > 0))
        {
            throw new InvalidMeshException(
                $"The ring sector around {centre} has the radii {innerRadius:G9} and {outerRadius:G9} and the angle " +
                $"{sweepRadians:G9}. Give an inner radius above zero, a larger outer one and a positive angle.", centre);
        }

        Vector2D toStart = Vector2D.AtAngle(startRadians);
        Vector2D toEnd = Vector2D.AtAngle(startRadians + sweepRadians);
        var outerArc = new OutlinePiece(
            centre + (outerRadius * toStart), centre + (outerRadius * toEnd), sweepRadians, outer);
        var innerArc = new OutlinePiece(
            centre + (innerRadius * toEnd), centre + (innerRadius * toStart), -sweepRadians, inner);
        return new QuadrilateralPatch(
            new OutlinePiece(innerArc.End, outerArc.Start, 0, start),
            outerArc,
            new OutlinePiece(outerArc.End, innerArc.Start, 0, end),
            innerArc,
            region);
    }

    /// <summary>The place of a point of the unit square; (0, 0) is the first corner, (1, 0) the second.</summary>
    /// <param name="u">The fraction along the first side.</param>
    /// <param name="v">The fraction along the second side.</param>
    public Point2D PointAt(double u, double v) => Sides.PointAt(u, v);

    /// <summary>Meshes the patch.</summary>
    /// <param name="along">The number of cells along the first side and along the third.</param>
    /// <param name="across">The number of cells along the second side and along the fourth.</param>
    /// <param name="alongGrading">How the cells are spread along the first side; evenly by default.</param>
    /// <param name="acrossGrading">How the cells are spread along the second side; evenly by default.</param>
    /// <exception cref="ArgumentOutOfRangeException">A number is not positive, or not that of its grading.</exception>
    /// <exception cref="MeshingException">There would be more cells than a mesh can hold.</exception>
    /// <exception cref="InvalidMeshException">
    /// The patch is folded: a cell of the grid is turned over, not convex, or crosses itself.
    /// </exception>
    public Mesh Divide(int along, int across, Grading? alongGrading = null, Grading? acrossGrading = null)
    {
        ArgumentOutOfRangeException.ThrowIfNegativeOrZero(along);
        ArgumentOutOfRangeException.ThrowIfNegativeOrZero(across);
        if ((long)along * across > MaximumCells)
        {
            throw new MeshingException(
                $"The patch of region '{Region}' was to be divided into {along} by {across} cells; " +
                $"a mesh holds at most {MaximumCells}. Divide it less.");
        }

        CheckSweeps(along, across);
        double[] u = (alongGrading ?? Grading.Even).Fractions(along);
        double[] v = (acrossGrading ?? Grading.Even).Fractions(across);
        Mesh mesh = new PatchGrid(Sides, [.. given.Select(side => side.Boundary)], u, v).ToMesh(Region);
        var checks = new CellChecks(mesh);
        for (int cell = 0; cell < mesh.CellCount; cell++)
        {
            checks.CheckUnfolded(
                cell, $"The patch of region '{Region}' is folded there: list its sides counterclockwise, bend them " +
                "less, or divide it into several patches.");
        }

        return mesh;
    }

    private static void CheckSide(int number, OutlinePiece side, OutlinePiece next, double tolerance)
    {
        if (!side.Start.IsFinite || !side.End.IsFinite || !(Math.Abs(side.SweepRadians) < 2 * Math.PI))
        {
            throw new InvalidMeshException(
                $"Side {number} of the patch, from {side.Start} to {side.End}, sweeps {side.SweepRadians:G9} rad. " +
                "Give finite points and a sweep of less than a full turn.", side.Start);
        }

        if (side.Start.DistanceTo(side.End) <= tolerance)
        {
            throw new InvalidMeshException(
                $"Side {number} of the patch begins and ends at {side.Start}. Give every side a length; mesh an area " +
                "with three sides by three patches around a point within it.", side.Start);
        }

        if (side.End.DistanceTo(next.Start) > tolerance)
        {
            throw new InvalidMeshException(
                $"Side {number} of the patch ends at {side.End} but the next begins at {next.Start}. " +
                "Let every side begin where the one before it ends.", side.End);
        }
    }

    private void CheckSweeps(int along, int across)
    {
        for (int i = 0; i < given.Length; i++)
        {
            int count = i % 2 == 0 ? along : across;
            if (Math.Abs(given[i].SweepRadians) / count > Math.PI)
            {
                throw new InvalidMeshException(
                    $"Side {i + 1} of the patch, from {given[i].Start} to {given[i].End}, sweeps " +
                    $"{given[i].SweepRadians:G9} rad, more than a half turn a cell. Divide it into at least 2 cells.",
                    given[i].Start);
            }
        }
    }
}
