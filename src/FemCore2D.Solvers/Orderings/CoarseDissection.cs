namespace FemCore2D.Solvers;

/// <summary>Cuts a graph into parts, and these again, each cut by a multilevel bisection, down to parts of a least weight.</summary>
internal sealed class CoarseDissection(Graph graph, Crew crew, CancellationToken cancellationToken)
{
    private readonly GraphBisection?[] bisections = new GraphBisection?[crew.Size];
    private readonly int[]?[] localNumbers = new int[]?[crew.Size];

    /// <summary>Dissects the graph.</summary>
    /// <returns>The tree, and for each vertex its node.</returns>
    public (SeparatorTree Tree, int[] Labels) Run()
    {
        int[] all = new int[graph.Count];
        for (int v = 0; v < all.Length; v++)
            all[v] = v;
        Part root = new(all);
        List<Part> pending = [root];
        while (pending.Count > 0)
        {
            List<Part> current = pending;
            crew.Run((block, place) => Cut(current[block], place), current.Count);
            pending = [];
            foreach (Part part in current)
            {
                if (part.Left is not null)
                {
                    pending.Add(part.Left);
                    pending.Add(part.Right!);
                }
            }
        }

        SeparatorTree tree = new();
        int[] labels = new int[graph.Count];
        root.Number(tree, -1, labels);
        return (tree, labels);
    }

    private void Cut(Part part, int place)
    {
        cancellationToken.ThrowIfCancellationRequested();
        long weight = 0;
        foreach (int v in part.Members)
            weight += graph.Weight(v);
        if (weight <= NestedDissection.LeafWeight || part.Members.Length < 4)
            return;
        Graph local = Extract(part.Members, localNumbers[place] ??= new int[graph.Count]);
        int[] sides = (bisections[place] ??= new GraphBisection()).Cut(local);
        int[] counts = new int[3];
        foreach (int side in sides)
            counts[side]++;
        if (counts[1] == 0 || counts[2] == 0)
            return;
        int[][] split = [new int[counts[0]], new int[counts[1]], new int[counts[2]]];
        counts.AsSpan().Clear();
        for (int i = 0; i < sides.Length; i++)
            split[sides[i]][counts[sides[i]]++] = part.Members[i];
        part.Members = split[0];
        part.Left = new Part(split[1]);
        part.Right = new Part(split[2]);
    }

    private Graph Extract(int[] members, int[] local)
    {
        // One more than the local number, and all zeros again at the end.
        for (int i = 0; i < members.Length; i++)
            local[members[i]] = i + 1;
        int room = 0;
        foreach (int v in members)
            room += graph.Starts[v + 1] - graph.Starts[v];
        int[] starts = new int[members.Length + 1];
        int[] neighbors = new int[room];
        int[]? edgeWeights = graph.EdgeWeights is null ? null : new int[room];
        int[]? vertexWeights = graph.VertexWeights is null ? null : new int[members.Length];
        int count = 0;
        for (int i = 0; i < members.Length; i++)
        {
            int v = members[i];
            if (vertexWeights is not null)
                vertexWeights[i] = graph.VertexWeights![v];
            for (int p = graph.Starts[v]; p < graph.Starts[v + 1]; p++)
            {
                int u = local[graph.Neighbors[p]] - 1;
                if (u < 0)
                    continue;
                if (edgeWeights is not null)
                    edgeWeights[count] = graph.EdgeWeights![p];
                neighbors[count++] = u;
            }

            starts[i + 1] = count;
        }

        foreach (int v in members)
            local[v] = 0;
        return new Graph(members.Length, starts, neighbors) { VertexWeights = vertexWeights, EdgeWeights = edgeWeights };
    }

    /// <summary>A part of the graph; once cut, its members are the separator.</summary>
    private sealed class Part(int[] members)
    {
        public int[] Members { get; set; } = members;

        public Part? Left { get; set; }

        public Part? Right { get; set; }

        public void Number(SeparatorTree tree, int parent, int[] labels)
        {
            int node = tree.Open(parent);
            foreach (int v in Members)
                labels[v] = node;
            if (Left is not null)
            {
                Left.Number(tree, node, labels);
                tree.TurnRight(node);
                Right!.Number(tree, node, labels);
            }

            tree.Close(node);
        }
    }
}
