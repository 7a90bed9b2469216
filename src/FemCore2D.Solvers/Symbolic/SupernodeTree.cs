namespace FemCore2D.Solvers;

/// <summary>
/// Groups of columns of a factor that are stored and eliminated as one dense block, and their tree. Columns with the
/// same pattern below them belong together; small groups are joined with their parents although that stores zeros.
/// </summary>
/// <remarks>C. Ashcraft and R. Grimes (1989), <em>The influence of relaxed supernode partitions on the multifrontal method</em>.</remarks>
internal sealed class SupernodeTree
{
    private SupernodeTree(int[] order, int[] starts, int[] parents, int[] rowCounts)
    {
        Order = order;
        Starts = starts;
        Parents = parents;
        RowCounts = rowCounts;
    }

    /// <summary>For each position in the final order the vertex.</summary>
    public int[] Order { get; }

    /// <summary>For each supernode, in postorder, its first column, and after the last the number of columns.</summary>
    public int[] Starts { get; }

    /// <summary>For each supernode its parent, or -1.</summary>
    public int[] Parents { get; }

    /// <summary>For each supernode the rows of its block, those of its own columns included.</summary>
    public int[] RowCounts { get; }

    /// <summary>The number of supernodes.</summary>
    public int Count => Parents.Length;

    /// <summary>Finds the supernodes.</summary>
    /// <param name="graph">The pattern.</param>
    /// <param name="order">For each position the vertex.</param>
    /// <param name="partners">For each vertex one that follows or precedes it in the order and must share its
    /// supernode, or -1; empty for none.</param>
    public static SupernodeTree Build(Graph graph, ReadOnlySpan<int> order, ReadOnlySpan<int> partners = default)
    {
        int n = graph.Count;
        int[] current = order.ToArray();
        int[] positions = new int[n];
        for (int k = 0; k < n; k++)
            positions[current[k]] = k;
        int[] parents = EliminationTree.Parents(graph, current, positions);
        int[] post = EliminationTree.Postorder(parents);
        int[] rank = GC.AllocateUninitializedArray<int>(n);
        for (int k = 0; k < n; k++)
            rank[post[k]] = k;
        int[] moved = GC.AllocateUninitializedArray<int>(n);
        int[] movedParents = GC.AllocateUninitializedArray<int>(n);
        for (int k = 0; k < n; k++)
        {
            int old = post[k];
            moved[k] = current[old];
            positions[moved[k]] = k;
            movedParents[k] = parents[old] < 0 ? -1 : rank[parents[old]];
        }

        int[] counts = EliminationTree.ColumnCounts(graph, moved, positions, movedParents);
        return Join(moved, movedParents, counts, partners);
    }

    private static SupernodeTree Join(int[] order, int[] parents, int[] counts, ReadOnlySpan<int> partners)
    {
        int n = order.Length;
        List<int> starts = [];
        int[] superOf = GC.AllocateUninitializedArray<int>(n);
        for (int j = 0; j < n; j++)
        {
            bool chained = j > 0 && parents[j - 1] == j;
            bool paired = chained && !partners.IsEmpty && partners[order[j - 1]] == order[j];
            if (!paired && (!chained || counts[j - 1] != counts[j] + 1))
                starts.Add(j);
            superOf[j] = starts.Count - 1;
        }

        int m = starts.Count;
        starts.Add(n);
        int[] up = new int[m];
        int[] widths = new int[m];
        int[] rows = new int[m];
        for (int s = 0; s < m; s++)
        {
            int parent = parents[starts[s + 1] - 1];
            up[s] = parent < 0 ? -1 : superOf[parent];
            widths[s] = starts[s + 1] - starts[s];
            rows[s] = counts[starts[s + 1] - 1] + widths[s] - 1;
        }

        // A joined supernode hangs on the one that took it in.
        int[] takenBy = new int[m];
        takenBy.AsSpan().Fill(-1);
        TakeChildren(up, widths, rows, takenBy);
        return Number(order, starts, up, widths, rows, takenBy);
    }

    private static void TakeChildren(int[] up, int[] widths, int[] rows, int[] takenBy)
    {
        int m = up.Length;
        int[] firstChild = new int[m];
        int[] sibling = new int[m];
        long[] zeros = new long[m];
        firstChild.AsSpan().Fill(-1);

        // Children are complete when their parent is reached; the one with most rows, that fits best, is tried first.
        List<int> children = [];
        for (int s = 0; s < m; s++)
        {
            children.Clear();
            for (int c = firstChild[s]; c >= 0; c = sibling[c])
                children.Add(c);
            if (children.Count > 1)
                children.Sort((a, b) => rows[a] != rows[b] ? rows[b].CompareTo(rows[a]) : a.CompareTo(b));
            firstChild[s] = -1;
            foreach (int c in children)
            {
                long width = widths[c] + widths[s];
                long height = widths[c] + rows[s];
                long entries = Trapezoid(width, height);
                long empty = entries - Trapezoid(widths[c], rows[c]) - Trapezoid(widths[s], rows[s])
                    + zeros[c] + zeros[s];
                if (!IsWorthwhile(width, empty, entries))
                    continue;
                widths[s] = (int)width;
                rows[s] = (int)height;
                zeros[s] = empty;
                takenBy[c] = s;
            }

            if (up[s] >= 0)
            {
                sibling[s] = firstChild[up[s]];
                firstChild[up[s]] = s;
            }
        }
    }

    private static long Trapezoid(long width, long height) => width * height - width * (width - 1) / 2;

    private static bool IsWorthwhile(long width, long zeros, long entries)
    {
        double share = (double)zeros / entries;
        return width <= 4
            || (width <= 16 && share < 0.6)
            || (width <= 32 && share < 0.3)
            || (width <= 64 && share < 0.1)
            || share < 0.05;
    }

    private static SupernodeTree Number(
        int[] order, List<int> starts, int[] up, int[] widths, int[] rows, int[] takenBy)
    {
        int m = up.Length;
        int[] owner = new int[m];
        for (int s = m - 1; s >= 0; s--)
            owner[s] = takenBy[s] < 0 ? s : owner[takenBy[s]];
        int[] kept = new int[m];
        int count = 0;
        for (int s = 0; s < m; s++)
        {
            if (takenBy[s] < 0)
                kept[s] = count++;
        }

        int[] parents = new int[count];
        for (int s = 0; s < m; s++)
        {
            if (takenBy[s] < 0)
                parents[kept[s]] = up[s] < 0 ? -1 : kept[owner[up[s]]];
        }

        // Members of an owner in ascending order: descendants come before ancestors.
        int[] memberStarts = new int[count + 1];
        for (int s = 0; s < m; s++)
            memberStarts[kept[owner[s]] + 1]++;
        for (int k = 0; k < count; k++)
            memberStarts[k + 1] += memberStarts[k];
        int[] next = memberStarts.AsSpan(0, count).ToArray();
        int[] members = new int[m];
        for (int s = 0; s < m; s++)
            members[next[kept[owner[s]]]++] = s;
        int[] post = EliminationTree.Postorder(parents);
        int[] rank = new int[count];
        for (int k = 0; k < count; k++)
            rank[post[k]] = k;
        int[] finalOrder = GC.AllocateUninitializedArray<int>(order.Length);
        int[] finalStarts = new int[count + 1];
        int[] finalParents = new int[count];
        int[] finalRows = new int[count];
        int column = 0;
        for (int k = 0; k < count; k++)
        {
            int old = post[k];
            for (int i = memberStarts[old]; i < memberStarts[old + 1]; i++)
            {
                int s = members[i];
                for (int j = starts[s]; j < starts[s + 1]; j++)
                    finalOrder[column++] = order[j];
                if (takenBy[s] < 0)
                    finalRows[k] = rows[s];
            }

            finalStarts[k + 1] = column;
            finalParents[k] = parents[old] < 0 ? -1 : rank[parents[old]];
        }

        return new SupernodeTree(finalOrder, finalStarts, finalParents, finalRows);
    }
}
