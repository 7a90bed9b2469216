namespace FemCore2D.Drawing;

/// <summary>Numbers the edges of facets.</summary>
internal static class FacetEdges
{
    /// <summary>Finds for each side its edge, and for each edge its two sides (-1 for none).</summary>
    /// <param name="facets">Three nodes a facet, counterclockwise.</param>
    /// <param name="nodeSites">The site of each node.</param>
    /// <param name="siteCount">The number of sites.</param>
    public static (int[] SideEdges, int[] EdgeSides) Number(int[] facets, int[] nodeSites, int siteCount)
    {
        int[] first = new int[siteCount];
        Array.Fill(first, -1);
        int[] next = new int[facets.Length];
        int[] higher = new int[facets.Length];
        int[] sideEdges = new int[facets.Length];
        int[] edgeSides = new int[2 * facets.Length];
        int count = 0;
        for (int side = 0; side < facets.Length; side++)
        {
            int start = nodeSites[facets[side]];
            int end = nodeSites[facets[side % 3 == 2 ? side - 2 : side + 1]];
            int low = Math.Min(start, end);
            int high = Math.Max(start, end);
            int place = start == low ? 0 : 1;
            int edge = first[low];
            while (edge >= 0 && (higher[edge] != high || edgeSides[(2 * edge) + place] >= 0))
                edge = next[edge];
            if (edge < 0)
            {
                edge = count++;
                next[edge] = first[low];
                first[low] = edge;
                higher[edge] = high;
                edgeSides[2 * edge] = -1;
                edgeSides[(2 * edge) + 1] = -1;
            }

            edgeSides[(2 * edge) + place] = side;
            sideEdges[side] = edge;
        }

        Array.Resize(ref edgeSides, 2 * count);
        return (sideEdges, edgeSides);
    }
}
