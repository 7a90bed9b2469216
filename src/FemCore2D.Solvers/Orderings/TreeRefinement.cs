namespace FemCore2D.Solvers;

/// <summary>Refines all separators of a tree, from the root down, those of one depth at the same time.</summary>
internal static class TreeRefinement
{
    /// <summary>Refines the labels in place.</summary>
    public static void Refine(Graph graph, SeparatorTree tree, int[] labels, Crew crew, CancellationToken cancellationToken)
    {
        long[] weights = new long[tree.Count];
        List<int>[] lists = new List<int>[tree.Count];
        List<int>[] depths = new List<int>[tree.Height + 1];
        for (int d = 0; d < depths.Length; d++)
            depths[d] = [];
        bool[] inner = new bool[tree.Count];
        for (int node = 0; node < tree.Count; node++)
        {
            inner[node] = !tree.IsLeaf(node);
            lists[node] = [];
            if (inner[node])
                depths[tree.Depth(node)].Add(node);
        }

        for (int v = 0; v < labels.Length; v++)
        {
            int label = labels[v];
            weights[label] += graph.Weight(v);
            if (inner[label])
                lists[label].Add(v);
        }

        bool[] locks = new bool[graph.Count];
        SeparatorRefiner?[] refiners = new SeparatorRefiner?[crew.Size];
        foreach (List<int> nodes in depths)
        {
            crew.Run(
                (block, place) =>
                {
                    cancellationToken.ThrowIfCancellationRequested();
                    (refiners[place] ??= new SeparatorRefiner())
                        .Refine(graph, tree, nodes[block], labels, weights, locks, lists);
                },
                nodes.Count);
        }
    }
}
