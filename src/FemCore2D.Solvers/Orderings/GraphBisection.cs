namespace FemCore2D.Solvers;

/// <summary>
/// Cuts a graph in two by a light vertex separator: coarsens it to a few vertices, cuts those where smooth
/// coordinates have their median, and refines the separator at each step back to the graph.
/// </summary>
/// <remarks>B. Hendrickson and E. Rothberg (1998), <em>Improving the run time and quality of nested dissection ordering</em>.</remarks>
internal sealed class GraphBisection
{
    private const int SmallestCount = 300;
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
        int start = GraphCoordinates.Spread(graph, [0], distances);
        int end = GraphCoordinates.Spread(graph, [start], distances);
        GraphCoordinates.Difference(graph, start, end, first, distances);
        int side = GraphCoordinates.Widest(graph, start, end, distances);
        int other = GraphCoordinates.Spread(graph, [side], distances);
        GraphCoordinates.Difference(graph, side, other, second, distances);
        GraphCoordinates.Smooth(graph, first);
        GraphCoordinates.Smooth(graph, second);
        int[] best = [];
        double bestScore = double.MaxValue;
        double[] values = new double[n];
        foreach ((double x, double y) in Directions)
        {
            for (int v = 0; v < n; v++)
                values[v] = x * first[v] + y * second[v];
            int[] labels = GraphCoordinates.CutAtMedian(graph, values, total);
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
