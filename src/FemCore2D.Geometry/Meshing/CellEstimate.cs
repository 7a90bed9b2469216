using System.Globalization;

namespace FemCore2D.Geometry;

/// <summary>Estimates how many cells a size field needs: the integral of one over the area of a cell of that size.</summary>
internal static class CellEstimate
{
    private static readonly double EquilateralArea = Math.Sqrt(3) / 4;

    public static double AreaOfCell(double size) => EquilateralArea * size * size;

    /// <summary>The estimate for all triangles of a triangulation.</summary>
    /// <exception cref="MeshingException">The estimate exceeds the limit.</exception>
    public static double Check(Triangulation triangulation, MeshPlan plan, SizeField field, CancellationToken cancellation)
    {
        double[] cells = new double[plan.RegionCaps.Length];
        double total = 0;
        for (int triangle = 0; triangle < triangulation.TriangleCount; triangle++)
        {
            int region = triangulation.RegionOf(triangle);
            if (region < 0)
                continue;
            cancellation.ThrowIfCancellationRequested();
            double cap = plan.RegionCaps[region];
            double part = Integrate(
                triangulation.PointAt(triangulation.StartOf(4 * triangle)),
                triangulation.PointAt(triangulation.StartOf((4 * triangle) + 1)),
                triangulation.PointAt(triangulation.StartOf((4 * triangle) + 2)),
                field,
                cap,
                0);
            cells[region] += part;
            total += part;
            if (total > plan.CellLimit)
            {
                int worst = Array.IndexOf(cells, cells.Max());
                throw TooMany(plan, worst, plan.RegionCaps[worst], total);
            }
        }

        return total;
    }

    public static MeshingException TooMany(MeshPlan plan, int region, double size, double cells) =>
        new(string.Create(CultureInfo.InvariantCulture,
            $"The sizes need about {cells:G3} cells or more, above the limit of {plan.CellLimit}, most of them in region '{plan.Arrangement.RegionNames[region]}' with sizes of up to {size:G4} m. Ask for larger sizes there and at its boundaries, let sizes grow faster, or raise the limit of cells."));

    private static double Integrate(Point2D a, Point2D b, Point2D c, SizeField field, double cap, int depth)
    {
        Point2D ab = a.Towards(b, 0.5);
        Point2D bc = b.Towards(c, 0.5);
        Point2D ca = c.Towards(a, 0.5);
        double atAb = field.At(ab, cap);
        double atBc = field.At(bc, cap);
        double atCa = field.At(ca, cap);
        double least = Math.Min(atAb, Math.Min(atBc, atCa));
        double greatest = Math.Max(atAb, Math.Max(atBc, atCa));
        double longest = Math.Max(a.DistanceTo(b), Math.Max(b.DistanceTo(c), c.DistanceTo(a)));
        bool hidesDetail = depth < 3 && longest > 8 * greatest;
        if (depth < 24 && longest > least && (greatest > 1.3 * least || hidesDetail))
        {
            return Integrate(a, ab, ca, field, cap, depth + 1)
                + Integrate(ab, b, bc, field, cap, depth + 1)
                + Integrate(ca, bc, c, field, cap, depth + 1)
                + Integrate(bc, ca, ab, field, cap, depth + 1);
        }

        double area = 0.5 * (b - a).Cross(c - a);
        return area / 3 * ((1 / AreaOfCell(atAb)) + (1 / AreaOfCell(atBc)) + (1 / AreaOfCell(atCa)));
    }
}
