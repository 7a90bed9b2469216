namespace FemCore2D.Solvers;

/// <summary>
/// Where every block of a factor and every update between fronts will lie, and which subtrees of fronts are done as one
/// piece of work. All of it is fixed before the first number is computed, and so is the memory that it needs.
/// </summary>
/// <remarks>
/// Within a subtree the updates live on two stacks, one for each parity of depth: when a front is done, its children
/// are the top of the one, and its own update goes onto the other. J. W. H. Liu (1992), <em>The multifrontal method for
/// sparse matrix solution: theory and practice</em>.
/// </remarks>
internal sealed class FrontPlan
{
    private const int Alignment = 8;

    /// <summary>The work that moving one number costs, in multiplications and additions.</summary>
    private const double MoveCost = 6.0;
    private const double FrontCost = 3000.0;

    /// <summary>Makes the plan.</summary>
    /// <param name="structure">The structure of the factor.</param>
    /// <param name="doubles">How many doubles make a number.</param>
    /// <param name="sides">1 for symmetric, 2 for general matrices.</param>
    /// <param name="threads">The threads that will share the work.</param>
    public FrontPlan(FactorStructure structure, int doubles, int sides, int threads)
    {
        Structure = structure;
        Doubles = doubles;
        Sides = sides;
        int count = structure.Tree.Count;
        Strides = new int[count];
        PanelStarts = new long[count + 1];
        UpdateStrides = new int[count];
        UpdateStarts = new long[count];
        double[] work = new double[count];
        Work = new long[count];
        for (int s = 0; s < count; s++)
        {
            long width = structure.Width(s);
            long below = structure.BelowCount(s);
            Strides[s] = RoundUp((width + below) * doubles);
            PanelStarts[s + 1] = PanelStarts[s] + Strides[s] * width;
            UpdateStrides[s] = RoundUp(below * doubles);
            LargestFront = Math.Max(LargestFront, (int)(width + below));
            LargestPanel = Math.Max(LargestPanel, Strides[s] * width);
            FactorEntries += width * (width + 1) / 2 + width * below;
            double flops = 0.0;
            double rows = width + below;

            // The sum of the squares of the heights of the columns.
            flops += rows * (rows + 1.0) * (2.0 * rows + 1.0) / 6.0 - below * (below + 1.0) * (2.0 * below + 1.0) / 6.0;
            Flops += flops;
            work[s] = flops + MoveCost * rows * rows + FrontCost;
            Work[s] = (long)work[s];
            TotalWork += Work[s];
        }

        for (int s = 0; s < count; s++)
        {
            if (structure.Tree.Parents[s] >= 0)
                work[structure.Tree.Parents[s]] += work[s];
        }

        (ChildStarts, Children) = ListChildren(structure.Tree.Parents);
        (Subtrees, TopNodes) = Split(work, threads);
        Place();
    }

    /// <summary>The structure of the factor.</summary>
    public FactorStructure Structure { get; }

    /// <summary>How many doubles make a number.</summary>
    public int Doubles { get; }

    /// <summary>1 for symmetric, 2 for general matrices: the lower and the transposed upper side.</summary>
    public int Sides { get; }

    /// <summary>For each supernode the distance of the columns of its panel, in doubles.</summary>
    public int[] Strides { get; }

    /// <summary>For each supernode where its panel begins, in doubles.</summary>
    public long[] PanelStarts { get; }

    /// <summary>For each supernode the distance of the columns of its update.</summary>
    public int[] UpdateStrides { get; }

    /// <summary>For each supernode where its update lies: in the workspace of a subtree, or in the arena of the top.</summary>
    public long[] UpdateStarts { get; }

    /// <summary>For each supernode where its children begin.</summary>
    public int[] ChildStarts { get; }

    /// <summary>The children of all supernodes, ascending.</summary>
    public int[] Children { get; }

    /// <summary>The pieces of work: first and last supernode, the heaviest first.</summary>
    public (int First, int Root)[] Subtrees { get; }

    /// <summary>The supernodes above the subtrees, ascending; they are done one after another by all threads together.</summary>
    public int[] TopNodes { get; }

    /// <summary>The doubles of workspace that a thread needs for a subtree.</summary>
    public long WorkspaceSize { get; private set; }

    /// <summary>The doubles of the arena that holds the updates of the subtrees' roots and of the top.</summary>
    public long ArenaSize { get; private set; }

    /// <summary>The doubles of the largest panel.</summary>
    public long LargestPanel { get; }

    /// <summary>The rows of the largest front.</summary>
    public int LargestFront { get; }

    /// <summary>The entries of one side of the factor, without the padding.</summary>
    public long FactorEntries { get; }

    /// <summary>The multiplications and additions of one side, in the sense of a symmetric factorization.</summary>
    public double Flops { get; }

    /// <summary>For each supernode an estimate of its work.</summary>
    public long[] Work { get; }

    /// <summary>The sum of these.</summary>
    public long TotalWork { get; }

    /// <summary>The doubles between the two sides of an update.</summary>
    public long UpdateSize(int s) => (long)UpdateStrides[s] * Structure.BelowCount(s);

    private static int RoundUp(long doubles) => checked((int)((doubles + Alignment - 1) / Alignment * Alignment));

    private static (int[] Starts, int[] Children) ListChildren(int[] parents)
    {
        int[] starts = new int[parents.Length + 1];
        foreach (int parent in parents)
        {
            if (parent >= 0)
                starts[parent + 1]++;
        }

        for (int s = 0; s < parents.Length; s++)
            starts[s + 1] += starts[s];
        int[] children = new int[starts[^1]];
        int[] next = starts.AsSpan(0, parents.Length).ToArray();
        for (int s = 0; s < parents.Length; s++)
        {
            if (parents[s] >= 0)
                children[next[parents[s]]++] = s;
        }

        return (starts, children);
    }

    private ((int First, int Root)[] Subtrees, int[] TopNodes) Split(double[] work, int threads)
    {
        int[] parents = Structure.Tree.Parents;
        double total = 0.0;
        PriorityQueue<int, (double, int)> heaviest = new();
        for (int s = 0; s < parents.Length; s++)
        {
            if (parents[s] < 0)
            {
                total += work[s];
                heaviest.Enqueue(s, (-work[s], s));
            }
        }

        double limit = threads == 1 ? double.MaxValue : total / (5.0 * threads);
        List<int> top = [];
        List<int> roots = [];
        while (heaviest.TryDequeue(out int s, out _))
        {
            if (work[s] <= limit || ChildStarts[s] == ChildStarts[s + 1])
            {
                roots.Add(s);
                continue;
            }

            top.Add(s);
            for (int i = ChildStarts[s]; i < ChildStarts[s + 1]; i++)
                heaviest.Enqueue(Children[i], (-work[Children[i]], Children[i]));
        }

        top.Sort();
        roots.Sort();
        (int First, int Root, double Work)[] pieces = new (int, int, double)[roots.Count];
        for (int i = 0; i < roots.Count; i++)
        {
            int first = roots[i];
            while (ChildStarts[first] < ChildStarts[first + 1])
                first = Children[ChildStarts[first]];
            pieces[i] = (first, roots[i], work[roots[i]]);
        }

        Array.Sort(pieces, (a, b) => a.Work != b.Work ? b.Work.CompareTo(a.Work) : a.First.CompareTo(b.First));
        return ([.. pieces.Select(p => (p.First, p.Root))], [.. top]);
    }

    private void Place()
    {
        int[] parents = Structure.Tree.Parents;
        int count = parents.Length;
        byte[] parities = new byte[count];
        for (int s = count - 1; s >= 0; s--)
            parities[s] = parents[s] < 0 ? (byte)0 : (byte)(1 - parities[parents[s]]);
        long[] sizes = new long[2];
        long[] peaks = new long[2];
        foreach ((int first, int root) in Subtrees)
        {
            sizes.AsSpan().Clear();
            peaks.AsSpan().Clear();
            for (int s = first; s < root; s++)
            {
                int parity = parities[s];
                UpdateStarts[s] = sizes[parity];
                sizes[parity] += Sides * UpdateSize(s);
                peaks[parity] = Math.Max(peaks[parity], sizes[parity]);
                for (int i = ChildStarts[s]; i < ChildStarts[s + 1]; i++)
                    sizes[1 - parity] -= Sides * UpdateSize(Children[i]);
            }

            for (int s = first; s < root; s++)
                UpdateStarts[s] += parities[s] == 0 ? 0 : peaks[0];
            WorkspaceSize = Math.Max(WorkspaceSize, peaks[0] + peaks[1]);
        }

        Arena arena = new();
        foreach ((_, int root) in Subtrees.OrderBy(p => p.Root))
            UpdateStarts[root] = arena.Take(Sides * UpdateSize(root));
        foreach (int s in TopNodes)
        {
            UpdateStarts[s] = arena.Take(Sides * UpdateSize(s));
            for (int i = ChildStarts[s]; i < ChildStarts[s + 1]; i++)
                arena.Return(UpdateStarts[Children[i]], Sides * UpdateSize(Children[i]));
        }

        ArenaSize = arena.Size;
    }
}
