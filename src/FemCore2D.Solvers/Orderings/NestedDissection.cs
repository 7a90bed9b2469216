namespace FemCore2D.Solvers;

/// <summary>
/// Nested dissection of a graph that is known only as a graph: coarsens it once, dissects the coarse graph all the way,
/// and brings the whole tree of separators back to the graph, refining all of them at each step; the leaves are ordered
/// by minimum degree.
/// </summary>
/// <remarks>
/// A. George (1973), <em>Nested dissection of a regular finite element mesh</em>. That the whole tree is refined on the
/// way back, rather than one cut after another, keeps the work in proportion to the separators instead of to the graph
/// times the depth.
/// </remarks>
internal static class NestedDissection
{
    private const int CoarseShare = 12;
    private const int LeastCoarseCount = 2000;
    private const int ClusterSize = 4;

    /// <summary>The weight below which a part is not cut.</summary>
    internal const int LeafWeight = 8000;

    /// <summary>Dissects a graph.</summary>
    /// <param name="graph">The graph.</param>
    /// <param name="crew">Who does the work.</param>
    /// <param name="cancellationToken">Stops the work.</param>
    /// <returns>The tree, and for each vertex its node.</returns>
    public static (SeparatorTree Tree, int[] Labels) Dissect(Graph graph, Crew crew, CancellationToken cancellationToken)
    {
        List<(Graph Fine, int[] Clusters)> levels = [];
        Graph coarse = graph;
        while (coarse.Count > LeastCoarseCount && coarse.Count > graph.Count / CoarseShare)
        {
            cancellationToken.ThrowIfCancellationRequested();
            int[] clusters = GC.AllocateUninitializedArray<int>(coarse.Count);
            int heaviest = (int)Math.Min(int.MaxValue, Math.Max(4, 8 * graph.TotalWeight / coarse.Count));
            Graph next = GraphCoarsening.Coarsen(coarse, ClusterSize, heaviest, clusters, crew);
            if (next.Count > 0.9 * coarse.Count)
                break;
            levels.Add((coarse, clusters));
            coarse = next;
        }

        (SeparatorTree tree, int[] labels) = new CoarseDissection(coarse, crew, cancellationToken).Run();
        for (int level = levels.Count - 1; level >= 0; level--)
        {
            cancellationToken.ThrowIfCancellationRequested();
            (Graph fine, int[] clusters) = levels[level];
            int[] projected = GC.AllocateUninitializedArray<int>(fine.Count);
            for (int v = 0; v < projected.Length; v++)
                projected[v] = labels[clusters[v]];
            labels = projected;
            TreeRefinement.Refine(fine, tree, labels, crew, cancellationToken);
        }

        return (tree, labels);
    }
}
