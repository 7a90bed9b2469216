using FemCore2D.Geometry;

namespace FemCore2D.Solvers;

/// <summary>Orders a graph in which given pairs of vertices stay together.</summary>
internal static class PairedGraph
{
    /// <summary>Finds an order of the vertices in which partners follow one another.</summary>
    /// <param name="graph">The graph.</param>
    /// <param name="partners">For each vertex its partner, or -1.</param>
    /// <param name="options">How to order.</param>
    /// <param name="crew">Who does the work.</param>
    /// <param name="cancellationToken">Stops the work.</param>
    public static Ordering Order(
        Graph graph, int[] partners, DirectOptions options, Crew crew, CancellationToken cancellationToken)
    {
        int n = graph.Count;
        int[] pairOf = new int[n];
        int[] firsts = new int[n];
        int count = 0;
        for (int v = 0; v < n; v++)
        {
            if (partners[v] >= 0 && partners[v] < v)
            {
                pairOf[v] = pairOf[partners[v]];
            }
            else
            {
                pairOf[v] = count;
                firsts[count++] = v;
            }
        }

        int[] starts = new int[count + 1];
        int[] neighbors = new int[graph.Starts[n]];
        int[] weights = new int[count];
        int[] seen = new int[count];
        Point2D[] points = options.Points.IsEmpty ? [] : new Point2D[count];
        int edges = 0;
        for (int c = 0; c < count; c++)
        {
            seen[c] = c + 1;
            int v = firsts[c];
            if (points.Length > 0)
                points[c] = options.Points.Span[v];
            for (; v >= 0; v = v == firsts[c] ? partners[v] : -1)
            {
                weights[c]++;
                for (int p = graph.Starts[v]; p < graph.Starts[v + 1]; p++)
                {
                    int d = pairOf[graph.Neighbors[p]];
                    if (seen[d] == c + 1)
                        continue;
                    seen[d] = c + 1;
                    neighbors[edges++] = d;
                }
            }

            starts[c + 1] = edges;
        }

        Graph paired = new(count, starts, neighbors) { VertexWeights = weights };
        Ordering pairs = Ordering.Find(paired, options.OrderingMethod, points, crew, cancellationToken);
        int[] order = new int[n];
        int at = 0;
        foreach (int c in pairs.Unknowns)
        {
            order[at++] = firsts[c];
            if (partners[firsts[c]] >= 0)
                order[at++] = partners[firsts[c]];
        }

        return pairs.Expand(order);
    }
}
