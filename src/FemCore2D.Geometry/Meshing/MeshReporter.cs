using System.Collections.Immutable;

namespace FemCore2D.Geometry;

/// <summary>Measures a finished mesh for its report.</summary>
internal static class MeshReporter
{
    /// <param name="mesh">The mesh.</param>
    /// <param name="sizes">The wanted edge length at every vertex.</param>
    /// <param name="boundaryVertices">The number of vertices on pieces.</param>
    /// <param name="plan">What was asked for.</param>
    /// <param name="corners">The small angles between the pieces.</param>
    /// <param name="estimatedCells">The estimate made before.</param>
    public static MeshReport Measure(
        Mesh mesh, double[] sizes, int boundaryVertices, MeshPlan plan, InputCorners corners, double estimatedCells)
    {
        int[] angleHistogram = new int[12];
        int[] sizeHistogram = new int[MeshReport.SizeClasses.Length];
        int[] cells = new int[mesh.RegionNames.Length];
        double[] areas = new double[cells.Length];
        double smallestRatio = double.PositiveInfinity;
        Point2D smallestAt = default;
        double shortest = double.PositiveInfinity;
        double longest = 0;
        Dictionary<int, ForcedAngle> byCorner = [];
        List<ForcedAngle> others = [];
        double[] classLimits = [.. Enumerable.Range(1, 11).Select(i => Square(Math.Sin(5 * i * Math.PI / 180)))];
        double[] sizeLimits = [.. MeshReport.SizeClasses.Skip(1).Select(Square)];
        double wanted = Square(Math.Sin(plan.Options.SmallestAngleDegrees * Math.PI / 180)) * (1 - 1e-12);
        double equilateral = CellEstimate.AreaOfCell(1);

        ReadOnlySpan<Point2D> vertices = mesh.Vertices;
        ReadOnlySpan<int> triangles = mesh.Triangles;
        ReadOnlySpan<int> regions = mesh.CellRegions;
        for (int cell = 0; cell < regions.Length; cell++)
        {
            int a = triangles[3 * cell];
            int b = triangles[(3 * cell) + 1];
            int c = triangles[(3 * cell) + 2];
            Point2D pa = vertices[a];
            Point2D pb = vertices[b];
            Point2D pc = vertices[c];
            double ab = (pb - pa).LengthSquared;
            double bc = (pc - pb).LengthSquared;
            double ca = (pa - pc).LengthSquared;
            double cross = (pb - pa).Cross(pc - pa);
            double least = Math.Min(ab, Math.Min(bc, ca));
            shortest = Math.Min(shortest, least);
            longest = Math.Max(longest, Math.Max(ab, Math.Max(bc, ca)));
            cells[regions[cell]]++;
            areas[regions[cell]] += 0.5 * cross;

            // The square of the sine of the smallest angle.
            double ratio = cross * cross * least / (ab * bc * ca);
            int sharpest = least == ab ? c : least == bc ? a : b;
            angleHistogram[ClassOf(ratio, classLimits)]++;
            double size = Math.Min((sizes[a] + sizes[b] + sizes[c]) / 3, plan.RegionCaps[regions[cell]]);
            sizeHistogram[ClassOf(0.5 * cross / (equilateral * size * size), sizeLimits)]++;
            if (ratio < smallestRatio)
            {
                smallestRatio = ratio;
                smallestAt = vertices[sharpest];
            }

            if (ratio < wanted)
                NoteForced(pa, pb, pc, vertices[sharpest], Degrees(ratio), corners, byCorner, others);
        }

        return new MeshReport
        {
            Vertices = mesh.VertexCount,
            Edges = mesh.EdgeCount,
            Cells = mesh.CellCount,
            BoundaryVertices = boundaryVertices,
            EstimatedCells = estimatedCells,
            CellsByRegion = [.. mesh.RegionNames.Zip(cells)],
            AreaByRegion = [.. mesh.RegionNames.Zip(areas)],
            WantedDegrees = plan.Options.SmallestAngleDegrees,
            SmallestDegrees = Degrees(smallestRatio),
            SmallestAt = smallestAt,
            AngleHistogram = [.. angleHistogram],
            SizeHistogram = [.. sizeHistogram],
            ShortestEdge = Math.Sqrt(shortest),
            LongestEdge = Math.Sqrt(longest),
            ForcedAngles = [.. byCorner.Values.Concat(others).OrderBy(forced => forced.SmallestDegrees)],
        };
    }

    private static void NoteForced(
        Point2D a, Point2D b, Point2D c, Point2D sharpest, double degrees, InputCorners corners, Dictionary<int, ForcedAngle> byCorner, List<ForcedAngle> others)
    {
        int corner = corners.NearestSmall(a, b, c);
        if (corner < 0)
        {
            others.Add(new ForcedAngle(sharpest, null, degrees, 1));
            return;
        }

        ForcedAngle known = byCorner.GetValueOrDefault(
            corner, new ForcedAngle(corners.PlaceOf(corner), corners.DegreesAt(corner), degrees, 0));
        byCorner[corner] = known with
        {
            SmallestDegrees = Math.Min(known.SmallestDegrees, degrees),
            Cells = known.Cells + 1,
        };
    }

    private static int ClassOf(double value, double[] limits)
    {
        int index = 0;
        while (index < limits.Length && value >= limits[index])
        {
            index++;
        }

        return index;
    }

    private static double Degrees(double sineSquared) => Math.Asin(Math.Sqrt(Math.Min(1, sineSquared))) * 180 / Math.PI;

    private static double Square(double value) => value * value;
}
