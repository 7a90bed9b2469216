namespace FemCore2D.Solvers;

/// <summary>
/// Makes the separators of a tree lighter by moving vertices out of them and what this lays bare into them, one vertex
/// at a time and also uphill, and going back to the best state met. All separators of a tree are refined in one sweep
/// from the root down; those of one depth do not touch one another.
/// </summary>
/// <remarks>
/// C. M. Fiduccia and R. M. Mattheyses (1982), <em>A linear-time heuristic for improving network partitions</em>, in
/// its form for vertex separators (C. Ashcraft and J. W. H. Liu 1997). The object is one thread's workspace.
/// </remarks>
internal sealed class SeparatorRefiner
{
    private const int MostPasses = 6;

    /// <summary>The larger side may have this share of both.</summary>
    private const double Balance = 0.58;

    private readonly List<(int Vertex, int Label)> log = [];
    private readonly List<int> members = [];
    private long[] heap = new long[64];
    private int heapCount;

    /// <summary>Refines one separator.</summary>
    /// <param name="graph">The graph.</param>
    /// <param name="tree">The tree.</param>
    /// <param name="node">The separator, an inner node.</param>
    /// <param name="labels">For each vertex its node.</param>
    /// <param name="weights">For each node the weight of its own vertices.</param>
    /// <param name="locks">A mark for each vertex, all false.</param>
    /// <param name="lists">For each node its vertices, if there are more than those given; changed along.</param>
    public void Refine(
        Graph graph, SeparatorTree tree, int node, int[] labels, long[] weights, bool[] locks, List<int>[] lists)
    {
        int left = node + 1;
        int right = tree.Right(node);
        long leftWeight = 0;
        long rightWeight = 0;
        for (int k = left; k < right; k++)
            leftWeight += weights[k];
        for (int k = right; k < tree.End(node); k++)
            rightWeight += weights[k];
        Cut cut = new(graph, tree, node, left, right, tree.End(node), labels, weights, locks)
        {
            LeftWeight = leftWeight,
            RightWeight = rightWeight,
        };
        members.Clear();
        foreach (int v in lists[node])
        {
            if (labels[v] == node && !locks[v])
            {
                locks[v] = true;
                members.Add(v);
            }
        }

        foreach (int v in members)
            locks[v] = false;
        for (int pass = 0; pass < MostPasses && Pass(cut); pass++)
        {
            // Until a pass brings nothing.
        }

        List<int> own = lists[node];
        own.Clear();
        foreach (int v in members)
        {
            int label = labels[v];
            if (label != node && !tree.IsLeaf(label))
            {
                lists[label].Add(v);
            }
            else if (label == node && !locks[v])
            {
                locks[v] = true;
                own.Add(v);
            }
        }

        foreach (int v in own)
            locks[v] = false;
    }

    private bool Pass(Cut cut)
    {
        int[] labels = cut.Labels;
        heapCount = 0;
        log.Clear();
        foreach (int v in members)
        {
            // Those that left in an earlier pass stay in the list, so that their new nodes learn of them.
            if (labels[v] == cut.Node)
                Push(cut, v);
        }

        long startWeight = cut.Weights[cut.Node];
        long bestWeight = startWeight;
        long bestSkew = Math.Abs(cut.LeftWeight - cut.RightWeight);
        bool startBalanced = cut.Balanced;
        bool bestBalanced = startBalanced;
        long startSkew = bestSkew;
        int bestLog = 0;
        int patience = Math.Clamp(members.Count, 50, 400);
        int idle = 0;
        while (heapCount > 0 && idle < patience)
        {
            long key = Pop();
            int code = (int)~(uint)key;
            int v = code >> 1;
            bool toLeft = (code & 1) == 0;
            if (labels[v] != cut.Node || cut.Locks[v] || cut.Gain(v, toLeft) != (int)(key >> 32))
                continue;
            if (!cut.Allows(v, toLeft))
                continue;
            Move(cut, v, toLeft);
            idle++;
            long weight = cut.Weights[cut.Node];
            long skew = Math.Abs(cut.LeftWeight - cut.RightWeight);
            bool balanced = cut.Balanced;
            if ((balanced && !bestBalanced)
                || (balanced == bestBalanced
                    && (weight < bestWeight || (weight == bestWeight && skew < bestSkew))))
            {
                bestWeight = weight;
                bestSkew = skew;
                bestBalanced = balanced;
                bestLog = log.Count;
                idle = 0;
            }
        }

        for (int i = log.Count - 1; i >= bestLog; i--)
        {
            (int v, int label) = log[i];
            cut.Relabel(v, label);
        }

        foreach ((int v, _) in log)
            cut.Locks[v] = false;
        return bestWeight < startWeight || (bestBalanced && !startBalanced)
            || (bestWeight == startWeight && bestSkew < startSkew / 2);
    }

    private void Move(Cut cut, int v, bool toLeft)
    {
        int[] starts = cut.Graph.Starts;
        int[] neighbors = cut.Graph.Neighbors;
        int[] labels = cut.Labels;
        log.Add((v, cut.Node));
        int home = cut.HomeOf(v, toLeft);
        cut.Relabel(v, home);
        cut.Locks[v] = true;
        for (int p = starts[v]; p < starts[v + 1]; p++)
        {
            int u = neighbors[p];
            if (labels[u] == cut.Node)
            {
                Push(cut, u);
            }
            else if (cut.IsOn(u, !toLeft))
            {
                log.Add((u, labels[u]));
                cut.Relabel(u, cut.Node);
                members.Add(u);
                for (int q = starts[u]; q < starts[u + 1]; q++)
                {
                    if (labels[neighbors[q]] == cut.Node)
                        Push(cut, neighbors[q]);
                }

                Push(cut, u);
            }
        }
    }

    private void Push(Cut cut, int v)
    {
        if (cut.Locks[v])
            return;
        Push(((long)cut.Gain(v, true) << 32) | ~((uint)v << 1));
        Push(((long)cut.Gain(v, false) << 32) | ~(((uint)v << 1) | 1u));
    }

    private void Push(long key)
    {
        if (heapCount == heap.Length)
            Array.Resize(ref heap, 2 * heapCount);
        int i = heapCount++;
        while (i > 0)
        {
            int up = (i - 1) >> 1;
            if (heap[up] >= key)
                break;
            heap[i] = heap[up];
            i = up;
        }

        heap[i] = key;
    }

    private long Pop()
    {
        long top = heap[0];
        long key = heap[--heapCount];
        int i = 0;
        while (true)
        {
            int down = 2 * i + 1;
            if (down >= heapCount)
                break;
            if (down + 1 < heapCount && heap[down + 1] > heap[down])
                down++;
            if (heap[down] <= key)
                break;
            heap[i] = heap[down];
            i = down;
        }

        heap[i] = key;
        return top;
    }

    /// <summary>One separator and its two sides.</summary>
    private sealed class Cut(
        Graph graph, SeparatorTree tree, int node, int left, int right, int end, int[] labels, long[] weights, bool[] locks)
    {
        public Graph Graph => graph;

        public int Node => node;

        public int[] Labels => labels;

        public long[] Weights => weights;

        public bool[] Locks => locks;

        public long LeftWeight { get; set; }

        public long RightWeight { get; set; }

        public bool Balanced => Math.Max(LeftWeight, RightWeight) <= Limit;

        private double Limit => Balance * (LeftWeight + RightWeight + weights[node]) + 1.0;

        public bool IsOn(int v, bool leftSide)
        {
            int label = labels[v];
            return leftSide ? label >= left && label < right : label >= right && label < end;
        }

        /// <summary>By how much the separator gets lighter when a vertex of it goes to a side.</summary>
        public int Gain(int v, bool toLeft)
        {
            int low = toLeft ? right : left;
            int high = toLeft ? end : right;
            int gain = graph.Weight(v);
            for (int p = graph.Starts[v]; p < graph.Starts[v + 1]; p++)
            {
                int u = graph.Neighbors[p];
                if (labels[u] >= low && labels[u] < high)
                    gain -= graph.Weight(u);
            }

            return gain;
        }

        public bool Allows(int v, bool toLeft)
        {
            long grown = (toLeft ? LeftWeight : RightWeight) + graph.Weight(v);
            return grown <= Limit || grown <= (toLeft ? RightWeight : LeftWeight);
        }

        public void Relabel(int v, int label)
        {
            int weight = graph.Weight(v);
            Count(labels[v], -weight);
            Count(label, weight);
            labels[v] = label;
        }

        /// <summary>The node of a side where a vertex fits: below or above all its neighbours there.</summary>
        public int HomeOf(int v, bool toLeft)
        {
            int low = toLeft ? left : right;
            int high = toLeft ? right : end;
            int home = -1;
            bool forced = false;
            for (int p = graph.Starts[v]; p < graph.Starts[v + 1]; p++)
            {
                int label = labels[graph.Neighbors[p]];
                if (label < low || label >= high)
                    continue;
                if (home < 0)
                {
                    home = label;
                }
                else if (tree.Contains(home, label))
                {
                    home = forced ? home : label;
                }
                else if (!tree.Contains(label, home))
                {
                    home = tree.Meet(home, label);
                    forced = true;
                }
            }

            if (home < 0)
            {
                home = low;
                while (!tree.IsLeaf(home))
                    home++;
            }

            return home;
        }

        private void Count(int label, int weight)
        {
            weights[label] += weight;
            if (label >= right)
                RightWeight += weight;
            else if (label >= left)
                LeftWeight += weight;
        }
    }
}
