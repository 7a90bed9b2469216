namespace FemCore2D.Solvers;

/// <summary>The rows of every supernode, and where they are found in the block of its parent.</summary>
internal sealed class FactorStructure
{
    /// <summary>Fills the structure.</summary>
    public FactorStructure(Graph graph, SupernodeTree tree)
    {
        Tree = tree;
        int n = graph.Count;
        int count = tree.Count;
        Positions = GC.AllocateUninitializedArray<int>(n);
        for (int k = 0; k < n; k++)
            Positions[tree.Order[k]] = k;
        SupernodeOf = GC.AllocateUninitializedArray<int>(n);
        RowStarts = new long[count + 1];
        for (int s = 0; s < count; s++)
        {
            int width = tree.Starts[s + 1] - tree.Starts[s];
            SupernodeOf.AsSpan(tree.Starts[s], width).Fill(s);
            RowStarts[s + 1] = RowStarts[s] + tree.RowCounts[s] - width;
        }

        if (RowStarts[count] > Array.MaxLength)
            throw new FactorTooLargeException(sizeof(int) * RowStarts[count], sizeof(int) * (long)Array.MaxLength);
        Rows = GC.AllocateUninitializedArray<int>((int)RowStarts[count]);
        ParentPlaces = GC.AllocateUninitializedArray<int>(Rows.Length);
        FillRows(graph);
        FillPlaces();
    }

    /// <summary>The supernodes.</summary>
    public SupernodeTree Tree { get; }

    /// <summary>For each vertex its position in the order.</summary>
    public int[] Positions { get; }

    /// <summary>For each column its supernode.</summary>
    public int[] SupernodeOf { get; }

    /// <summary>For each supernode where its rows below its own columns begin.</summary>
    public long[] RowStarts { get; }

    /// <summary>The rows below, ascending within a supernode.</summary>
    public int[] Rows { get; }

    /// <summary>For each such row its place in the block of the parent.</summary>
    public int[] ParentPlaces { get; }

    /// <summary>The columns of a supernode.</summary>
    public int Width(int s) => Tree.Starts[s + 1] - Tree.Starts[s];

    /// <summary>The rows of a supernode below its own columns.</summary>
    public int BelowCount(int s) => (int)(RowStarts[s + 1] - RowStarts[s]);

    /// <summary>The rows of a supernode below its own columns.</summary>
    public ReadOnlySpan<int> Below(int s) => Rows.AsSpan((int)RowStarts[s], BelowCount(s));

    private void FillRows(Graph graph)
    {
        int[] starts = graph.Starts;
        int[] neighbors = graph.Neighbors;
        int[] parents = Tree.Parents;
        int count = Tree.Count;
        int[] next = new int[count];
        int[] seen = new int[count];
        for (int s = 0; s < count; s++)
        {
            next[s] = (int)RowStarts[s];
            seen[s] = -1;
        }

        // Row by row, so that the rows of every supernode come out ascending.
        for (int i = 0; i < graph.Count; i++)
        {
            int own = SupernodeOf[i];
            int v = Tree.Order[i];
            for (int p = starts[v]; p < starts[v + 1]; p++)
            {
                int j = Positions[neighbors[p]];
                if (j >= i)
                    continue;
                for (int s = SupernodeOf[j]; s != own && seen[s] != i; s = parents[s])
                {
                    seen[s] = i;
                    Rows[next[s]++] = i;
                }
            }
        }
    }

    private void FillPlaces()
    {
        for (int s = 0; s < Tree.Count; s++)
        {
            int parent = Tree.Parents[s];
            if (parent < 0)
                continue;
            int first = Tree.Starts[parent];
            int width = Width(parent);
            ReadOnlySpan<int> rows = Below(s);
            ReadOnlySpan<int> parentRows = Below(parent);
            Span<int> places = ParentPlaces.AsSpan((int)RowStarts[s], rows.Length);
            int at = 0;
            for (int i = 0; i < rows.Length; i++)
            {
                int row = rows[i];
                if (row < first + width)
                {
                    places[i] = row - first;
                    continue;
                }

                while (parentRows[at] != row)
                    at++;
                places[i] = width + at;
            }
        }
    }
}
