namespace FemCore2D.Solvers;

/// <summary>
/// Turns a separator tree into an order: the vertices of a leaf by minimum degree, with the separators around it as its
/// halo, and each separator after the parts that it separates.
/// </summary>
internal sealed class TreeOrdering(
    Graph graph, SeparatorTree tree, int[] labels, Crew crew, CancellationToken cancellationToken)
{
    private readonly int[] order = GC.AllocateUninitializedArray<int>(graph.Count);
    private readonly Place?[] places = new Place?[crew.Size];
    private int[] members = [];
    private int[] memberStarts = [];
    private int[] positions = [];

    /// <summary>Makes the order.</summary>
    /// <returns>For each position the vertex.</returns>
    public int[] Run()
    {
        int nodes = tree.Count;
        memberStarts = new int[nodes + 1];
        foreach (int label in labels)
            memberStarts[label + 1]++;
        for (int k = 0; k < nodes; k++)
            memberStarts[k + 1] += memberStarts[k];
        members = GC.AllocateUninitializedArray<int>(graph.Count);
        int[] next = memberStarts.AsSpan(0, nodes).ToArray();
        for (int v = 0; v < labels.Length; v++)
            members[next[labels[v]]++] = v;

        // A subtree fills a range of positions, which its root ends.
        positions = new int[nodes];
        List<int> leaves = [];
        for (int node = 0; node < nodes; node++)
        {
            // What comes before in preorder and is not above is left of it.
            int before = memberStarts[node];
            for (int up = tree.Parent(node); up >= 0; up = tree.Parent(up))
                before -= memberStarts[up + 1] - memberStarts[up];
            int inside = memberStarts[tree.End(node)] - memberStarts[node + 1];
            positions[node] = before + inside;
            if (tree.IsLeaf(node))
                leaves.Add(node);
            else
                members.AsSpan(memberStarts[node], memberStarts[node + 1] - memberStarts[node])
                    .CopyTo(order.AsSpan(positions[node]));
        }

        const int Group = 16;
        crew.Run(
            (block, place) =>
            {
                Place own = places[place] ??= new Place(graph.Count);
                for (int k = block * Group; k < Math.Min(leaves.Count, (block + 1) * Group); k++)
                    OrderLeaf(leaves[k], own);
            },
            (leaves.Count + Group - 1) / Group);
        return order;
    }

    private void OrderLeaf(int leaf, Place own)
    {
        cancellationToken.ThrowIfCancellationRequested();
        ReadOnlySpan<int> inside = members.AsSpan(memberStarts[leaf], memberStarts[leaf + 1] - memberStarts[leaf]);
        Span<int> target = order.AsSpan(positions[leaf], inside.Length);
        own.Load(graph, inside);
        own.Degrees.Order(
            own.Count, inside.Length, own.Starts, own.Neighbors, own.Weights(graph), target, CancellationToken.None);
        foreach (ref int position in target)
            position = inside[position];
    }

    /// <summary>The workspace of one thread.</summary>
    private sealed class Place(int graphCount)
    {
        // One more than the local number, and all zeros between leaves.
        private readonly int[] local = new int[graphCount];
        private readonly List<int> halo = [];
        private int[] starts = new int[256];
        private int[] neighbors = new int[4096];
        private int[] weights = [];
        private int[] vertices = new int[256];

        public MinimumDegree Degrees { get; } = new();

        public int Count { get; private set; }

        public ReadOnlySpan<int> Starts => starts.AsSpan(0, Count + 1);

        public ReadOnlySpan<int> Neighbors => neighbors;

        public ReadOnlySpan<int> Weights(Graph graph)
        {
            if (graph.VertexWeights is null)
                return default;
            if (weights.Length < Count)
                weights = new int[2 * Count];
            for (int i = 0; i < Count; i++)
                weights[i] = graph.VertexWeights[vertices[i]];
            return weights.AsSpan(0, Count);
        }

        public void Load(Graph graph, ReadOnlySpan<int> inside)
        {
            halo.Clear();
            int edges = 0;
            for (int i = 0; i < inside.Length; i++)
            {
                local[inside[i]] = i + 1;
                edges += graph.Starts[inside[i] + 1] - graph.Starts[inside[i]];
            }

            int n = inside.Length;
            foreach (int v in inside)
            {
                for (int p = graph.Starts[v]; p < graph.Starts[v + 1]; p++)
                {
                    int u = graph.Neighbors[p];
                    if (local[u] == 0)
                    {
                        local[u] = ++n;
                        halo.Add(u);
                    }
                }
            }

            Count = n;
            if (starts.Length < n + 1)
            {
                starts = new int[2 * n + 1];
                vertices = new int[2 * n + 1];
            }

            if (neighbors.Length < 2 * edges)
                neighbors = new int[3 * edges];
            inside.CopyTo(vertices);
            for (int i = 0; i < halo.Count; i++)
                vertices[inside.Length + i] = halo[i];
            int count = 0;
            for (int i = 0; i < n; i++)
            {
                // Edges between two vertices of the halo play no part.
                int v = vertices[i];
                bool own = i < inside.Length;
                for (int p = graph.Starts[v]; p < graph.Starts[v + 1]; p++)
                {
                    int u = local[graph.Neighbors[p]] - 1;
                    if (u >= 0 && (own || u < inside.Length))
                        neighbors[count++] = u;
                }

                starts[i + 1] = count;
            }

            for (int i = 0; i < n; i++)
                local[vertices[i]] = 0;
        }
    }
}
