namespace FemCore2D.Solvers;

/// <summary>
/// Cuts a graph in two by a light vertex separator: coarsens it to a few vertices, cuts those where smooth
/// coordinates have their median, and refines the separator at each step back to the graph.
/// </summary>
/// <remarks>B. Hendrickson and E. Rothberg (1998), <em>Improving the run time and quality of nested dissection ordering</em>.</remarks>
internal sealed class GraphBisection
{
    private const int SmallestCount = 300;
    private const int SmoothingSteps = 60;
    private const int ClusterSize = 3;
    private static readonly (double X, double Y)[] Directions = [(1.0, 0.0), (0.0, 1.0), (1.0, 1.0), (1.0, -1.0)];
    private static readonly SeparatorTree Halves = SeparatorTree.OfOneCut();
    private readonly SeparatorRefiner refiner = new();
    private readonly List<int>[] lists = [[], [], []];
    private readonly long[] weights = new long[3];
    private bool[] locks = [];

    /// <summary>Cuts a graph.</summary>
    /// <param name="graph">The graph.</param>
    /// <returns>For each vertex 0 in the separator, 1 or 2 on its sides.</returns>
    public int[] Cut(Graph graph)
    {
        if (locks.Length < graph.Count)
            locks = new bool[Math.Max(graph.Count, 2 * locks.Length)];
        long total = graph.TotalWeight;
        List<(Graph Fine, int[] Clusters)> levels = [];
        Graph coarse = graph;
        while (coarse.Count > SmallestCount)
        {
            int[] clusters = new int[coarse.Count];
            Graph next = GraphCoarsening.Coarsen(
                coarse, ClusterSize, (int)Math.Max(4, Math.Min(total / 30, 8 * total / coarse.Count)), clusters, null);
            if (next.Count > 0.9 * coarse.Count)
                break;
            levels.Add((coarse, clusters));
            coarse = next;
        }

        int[] labels = CutCoarsest(coarse, total);
        for (int level = levels.Count - 1; level >= 0; level--)
        {
            (Graph fine, int[] clusters) = levels[level];
            int[] projected = new int[fine.Count];
            for (int v = 0; v < projected.Length; v++)
                projected[v] = labels[clusters[v]];
            labels = projected;
            Refine(fine, labels);
        }

        return labels;
    }

    /// <summary>
    /// Cuts the coarsest graph: two smooth functions that rise from one end of the graph to the other, along two ways,
    /// serve as coordinates; the medians of both and of their sum and difference are the candidates.
    /// </summary>
    private int[] CutCoarsest(Graph graph, long total)
    {
        int n = graph.Count;
        double[] first = new double[n];
        double[] second = new double[n];
        int[] distances = new int[n];
        int start = Spread(graph, [0], distances);
        int end = Spread(graph, [start], distances);
        Difference(graph, start, end, first, distances);
        int side = Widest(graph, start, end, distances);
        int other = Spread(graph, [side], distances);
        Difference(graph, side, other, second, distances);
        Smooth(graph, first);
        Smooth(graph, second);
        int[] best = [];
        double bestScore = double.MaxValue;
        double[] values = new double[n];
        foreach ((double x, double y) in Directions)
        {
            for (int v = 0; v < n; v++)
                values[v] = x * first[v] + y * second[v];
            int[] labels = CutAtMedian(graph, values, total);
            Refine(graph, labels);
            double score = weights[0] * (1.0 + 0.5 * Math.Abs(weights[1] - weights[2]) / Math.Max(1.0, total));
            if (Math.Min(weights[1], weights[2]) == 0)
                score += total;
            if (score < bestScore)
            {
                bestScore = score;
                best = labels;
            }
        }

        return best;
    }

    private static int[] CutAtMedian(Graph graph, double[] values, long total)
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
    private static int Spread(Graph graph, ReadOnlySpan<int> seeds, int[] distances)
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

    private static void Difference(Graph graph, int start, int end, double[] values, int[] distances)
    {
        Spread(graph, [start], distances);
        for (int v = 0; v < values.Length; v++)
            values[v] = distances[v];
        Spread(graph, [end], distances);
        for (int v = 0; v < values.Length; v++)
            values[v] -= distances[v];
    }

    /// <summary>The vertex that lies farthest from both ends.</summary>
    private static int Widest(Graph graph, int start, int end, int[] distances)
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
    private static void Smooth(Graph graph, double[] values)
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

    private void Refine(Graph graph, int[] labels)
    {
        weights.AsSpan().Clear();
        lists[0].Clear();
        for (int v = 0; v < graph.Count; v++)
        {
            weights[labels[v]] += graph.Weight(v);
            if (labels[v] == 0)
                lists[0].Add(v);
        }

        refiner.Refine(graph, Halves, 0, labels, weights, locks, lists);
    }
}
