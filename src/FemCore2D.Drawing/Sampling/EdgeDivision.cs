using FemCore2D.Geometry;

namespace FemCore2D.Drawing;

/// <summary>In how many steps each edge of a mesh is divided so that a picture of a given fineness looks smooth.</summary>
internal static class EdgeDivision
{
    private const double TargetPixels = 6;
    private const double LargestSagitta = 0.12;
    private const int MostSteps = 32;

    /// <summary>Chooses the steps, a power of two for each edge.</summary>
    /// <param name="mesh">The mesh.</param>
    /// <param name="degree">The degree of what is drawn; with a degree of at most 1 only arcs are divided.</param>
    /// <param name="pixelsPerMetre">The scale of the picture.</param>
    public static int[] Choose(Mesh mesh, int degree, double pixelsPerMetre)
    {
        int[] steps = new int[mesh.EdgeCount];
        for (int edge = 0; edge < steps.Length; edge++)
        {
            (int from, int to) = mesh.EndsOf(edge);
            double pixels = mesh.Vertices[from].DistanceTo(mesh.Vertices[to]) * pixelsPerMetre;
            double sweep = Math.Abs(mesh.SweepRadiansOf(edge));

            // The sagitta of a short arc of sweep s over a chord c is c s / 8, and falls with the square of the steps.
            double wanted = Math.Sqrt(pixels * sweep / (8 * LargestSagitta));
            if (degree > 1 || (degree == 1 && mesh.QuadrilateralCount > 0))
                wanted = Math.Max(wanted, Math.Min(MostSteps, pixels / TargetPixels));
            int count = 1;
            while (count < wanted && count < 64)
                count *= 2;
            steps[edge] = count;
        }

        return steps;
    }
}
