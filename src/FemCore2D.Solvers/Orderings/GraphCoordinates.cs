namespace FemCore2D.Solvers;

/// <summary>Functions on the vertices of a small graph that rise smoothly across it, and cuts at their medians.</summary>
internal static class GraphCoordinates
{
    private const int SmoothingSteps = 60;

    /// <summary>Cuts where values have their median: the lower side, the higher one, and what of it touches the lower.</summary>
    public static int[] CutAtMedian(Graph graph, double[] values, long total)
    {
        int n = graph.Count;
        int[] order = new int[n];
        int[] labels = new int[n];
        for (int v = 0; v < n; v++)
            order[v] = v;
        Array.Sort(order, (a, b) => values[a] != values[b] ? values[a].CompareTo(values[b]) : a.CompareTo(b));
        long weight = 0;
        foreach (int v in order)
        {
            labels[v] = 2 * weight < total ? 1 : 2;
            weight += graph.Weight(v);
        }

        for (int v = 0; v < n; v++)
        {
            if (labels[v] != 2)
                continue;
            for (int p = graph.Starts[v]; p < graph.Starts[v + 1] && labels[v] == 2; p++)
            {
                if (labels[graph.Neighbors[p]] == 1)
                    labels[v] = 0;
            }
        }

        return labels;
    }

    /// <summary>Finds the distances from some vertices, pieces out of reach one after another; returns the last vertex.</summary>
    public static int Spread(Graph graph, ReadOnlySpan<int> seeds, int[] distances)
    {
        int[] queue = new int[graph.Count];
        int head = 0;
        int tail = 0;
        int next = 0;
        distances.AsSpan().Fill(-1);
        foreach (int seed in seeds)
        {
            distances[seed] = 0;
            queue[tail++] = seed;
        }

        int last = seeds[0];
        while (true)
        {
            if (head == tail)
            {
                while (next < graph.Count && distances[next] >= 0)
                    next++;
                if (next == graph.Count)
                    return last;
                distances[next] = distances[last] + 1;
                queue[tail++] = next;
            }

            int v = queue[head++];
            last = v;
            for (int p = graph.Starts[v]; p < graph.Starts[v + 1]; p++)
            {
                int u = graph.Neighbors[p];
                if (distances[u] < 0)
                {
                    distances[u] = distances[v] + 1;
                    queue[tail++] = u;
                }
            }
        }
    }

    /// <summary>Finds for each vertex how much farther it is from the start than from the end.</summary>
    public static void Difference(Graph graph, int start, int end, double[] values, int[] distances)
    {
        Spread(graph, [start], distances);
        for (int v = 0; v < values.Length; v++)
            values[v] = distances[v];
        Spread(graph, [end], distances);
        for (int v = 0; v < values.Length; v++)
            values[v] -= distances[v];
    }

    /// <summary>The vertex that lies farthest from both ends.</summary>
    public static int Widest(Graph graph, int start, int end, int[] distances)
    {
        Spread(graph, [start, end], distances);
        int widest = 0;
        for (int v = 1; v < distances.Length; v++)
        {
            if (distances[v] > distances[widest])
                widest = v;
        }

        return widest;
    }

    /// <summary>Averages over neighbours many times, which leaves the slowest waves of the graph.</summary>
    public static void Smooth(Graph graph, double[] values)
    {
        int n = graph.Count;
        double[] old = new double[n];
        for (int step = 0; step < SmoothingSteps; step++)
        {
            values.CopyTo(old, 0);
            for (int v = 0; v < n; v++)
            {
                double sum = 0.0;
                double weight = 0.0;
                for (int p = graph.Starts[v]; p < graph.Starts[v + 1]; p++)
                {
                    double w = graph.EdgeWeights is null ? 1.0 : graph.EdgeWeights[p];
                    sum += w * old[graph.Neighbors[p]];
                    weight += w;
                }

                if (weight > 0.0)
                    values[v] = 0.5 * (old[v] + sum / weight);
            }
        }

        double mean = values.Average();
        double norm = 0.0;
        for (int v = 0; v < n; v++)
        {
            values[v] -= mean;
            norm += values[v] * values[v];
        }

        norm = norm > 0.0 ? 1.0 / Math.Sqrt(norm) : 0.0;
        for (int v = 0; v < n; v++)
            values[v] *= norm;
    }
}
