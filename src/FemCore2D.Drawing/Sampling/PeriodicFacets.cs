namespace FemCore2D.Drawing;

/// <summary>Unrolls a scalar that returns to where it began, so that no facet reaches across the seam of its range.</summary>
internal static class PeriodicFacets
{
    /// <summary>Shifts the values on each facet by whole periods so that they lie near each other.</summary>
    /// <param name="mesh">The facets.</param>
    /// <param name="low">Where the period begins.</param>
    /// <param name="period">The length of the period.</param>
    public static FacetMesh Unroll(FacetMesh mesh, double low, double period)
    {
        var nodes = new Dictionary<(int Node, double Shift), int>(mesh.Values.Length);
        var sites = new List<int>(mesh.Values.Length);
        var values = new List<double>(mesh.Values.Length);
        int[] facets = new int[mesh.Facets.Length];
        double least = double.NaN;
        double most = double.NaN;
        for (int corner = 0; corner < facets.Length; corner += 3)
        {
            // The middle of the facet decides, so that facets beside each other go the same way.
            double start = mesh.Values[mesh.Facets[corner]];
            double middle = start;
            for (int i = 1; i < 3; i++)
                middle += Near(mesh.Values[mesh.Facets[corner + i]] - start, period) / 3;
            double centre = middle - (period * Math.Floor((middle - low) / period));
            for (int i = 0; i < 3; i++)
            {
                int node = mesh.Facets[corner + i];
                double turns = Math.Round((centre - mesh.Values[node]) / period);
                double value = mesh.Values[node] + (turns * period);
                if (!nodes.TryGetValue((node, turns), out int placed))
                {
                    placed = values.Count;
                    nodes.Add((node, turns), placed);
                    sites.Add(mesh.NodeSites[node]);
                    values.Add(value);
                    least = double.IsNaN(least) ? value : Math.Min(least, value);
                    most = double.IsNaN(most) ? value : Math.Max(most, value);
                }

                facets[corner + i] = placed;
            }
        }

        int[] nodeSites = [.. sites];
        (int[] sideEdges, int[] edgeSides) = FacetEdges.Number(facets, nodeSites, mesh.Sites.Length);
        return new FacetMesh
        {
            Sites = mesh.Sites,
            NodeSites = nodeSites,
            Values = [.. values],
            Facets = facets,
            SideEdges = sideEdges,
            EdgeSides = edgeSides,
            Minimum = least,
            Maximum = most,
        };
    }

    private static double Near(double difference, double period) =>
        difference - (period * Math.Round(difference / period));
}
