using FemCore2D.Geometry;

namespace FemCore2D.Solvers;

/// <summary>
/// Nested dissection of a graph whose vertices are points of the plane: cuts at the median across the longer side of
/// what is left, takes as separator the vertices of one half that touch the other, and refines all separators once.
/// </summary>
internal sealed class CoordinateDissection(Graph graph, Crew crew, CancellationToken cancellationToken)
{
    private const byte Left = 1;
    private const byte Right = 2;
    private readonly byte[] sides = new byte[graph.Count];
    private double[] xs = [];
    private double[] ys = [];
    private int[] vertices = [];

    /// <summary>Dissects the graph.</summary>
    /// <param name="points">The point of each vertex.</param>
    /// <returns>The tree, and for each vertex its node.</returns>
    public (SeparatorTree Tree, int[] Labels) Run(ReadOnlySpan<Point2D> points)
    {
        int n = graph.Count;
        xs = new double[n];
        ys = new double[n];
        vertices = new int[n];
        for (int v = 0; v < n; v++)
        {
            xs[v] = points[v].X;
            ys[v] = points[v].Y;
            vertices[v] = v;
        }

        // Each part is a range of the vertices; cutting it puts the halves and then the separator into its range.
        Part root = new(0, n);
        List<Part> pending = [root];
        while (pending.Count > 0)
        {
            List<Part> current = pending;
            crew.Run((block, _) => Cut(current[block]), current.Count);
            pending = [];
            foreach (Part part in current)
            {
                if (part.First is not null)
                {
                    pending.Add(part.First);
                    pending.Add(part.Second!);
                }
            }
        }

        SeparatorTree tree = new();
        int[] labels = new int[n];
        root.Number(tree, -1, vertices, labels);
        TreeRefinement.Refine(graph, tree, labels, crew, cancellationToken);
        return (tree, labels);
    }

    private void Cut(Part part)
    {
        cancellationToken.ThrowIfCancellationRequested();
        Span<int> own = vertices.AsSpan(part.Start, part.Count);
        long weight = 0;
        double lowX = double.MaxValue;
        double highX = double.MinValue;
        double lowY = double.MaxValue;
        double highY = double.MinValue;
        foreach (int v in own)
        {
            weight += graph.Weight(v);
            lowX = Math.Min(lowX, xs[v]);
            highX = Math.Max(highX, xs[v]);
            lowY = Math.Min(lowY, ys[v]);
            highY = Math.Max(highY, ys[v]);
        }

        if (weight <= NestedDissection.LeafWeight || own.Length < 4)
            return;
        double[] keys = highX - lowX >= highY - lowY ? xs : ys;
        int half = own.Length / 2;
        Select(own, keys, half);
        for (int i = 0; i < own.Length; i++)
            sides[own[i]] = i < half ? Left : Right;

        // Of the two borders along the cut the shorter one separates.
        int leftBorder = CountBorder(own[..half], Right);
        int rightBorder = CountBorder(own[half..], Left);
        byte thinner = leftBorder < rightBorder ? Left : Right;
        byte opposite = thinner == Left ? Right : Left;
        int[] separator = new int[Math.Min(leftBorder, rightBorder)];
        int found = 0;
        int at = 0;
        int first = 0;
        Span<int> part1 = own[..half];
        Span<int> part2 = own[half..];
        foreach (int v in part1)
        {
            if (thinner == Left && Touches(v, opposite))
                separator[found++] = v;
            else
                own[at++] = v;
        }

        first = at;
        foreach (int v in part2)
        {
            if (thinner == Right && Touches(v, opposite))
                separator[found++] = v;
            else
                own[at++] = v;
        }

        separator.CopyTo(own[at..]);
        foreach (int v in own)
            sides[v] = 0;
        if (first == 0 || at == first)
            return;
        part.First = new Part(part.Start, first);
        part.Second = new Part(part.Start + first, at - first);
        part.SeparatorStart = part.Start + at;
    }

    private int CountBorder(ReadOnlySpan<int> half, byte opposite)
    {
        int count = 0;
        foreach (int v in half)
            count += Touches(v, opposite) ? 1 : 0;
        return count;
    }

    private bool Touches(int v, byte side)
    {
        for (int p = graph.Starts[v]; p < graph.Starts[v + 1]; p++)
        {
            if (sides[graph.Neighbors[p]] == side)
                return true;
        }

        return false;
    }

    /// <summary>Puts the lowest vertices by key, and by number among equals, into the first places.</summary>
    private static void Select(Span<int> items, double[] keys, int place)
    {
        int low = 0;
        int high = items.Length - 1;
        while (low < high)
        {
            int pivot = MedianOfThree(items[low], items[(low + high) >>> 1], items[high], keys);
            int i = low;
            int j = high;
            while (i <= j)
            {
                while (Less(items[i], pivot, keys))
                    i++;
                while (Less(pivot, items[j], keys))
                    j--;
                if (i <= j)
                {
                    (items[i], items[j]) = (items[j], items[i]);
                    i++;
                    j--;
                }
            }

            if (place <= j)
                high = j;
            else if (place >= i)
                low = i;
            else
                return;
        }
    }

    private static int MedianOfThree(int a, int b, int c, double[] keys)
    {
        if (Less(b, a, keys))
            (a, b) = (b, a);
        if (Less(c, b, keys))
            b = Less(c, a, keys) ? a : c;
        return b;
    }

    private static bool Less(int a, int b, double[] keys) => keys[a] < keys[b] || (keys[a] == keys[b] && a < b);

    /// <summary>A range of the vertices.</summary>
    private sealed class Part(int start, int count)
    {
        public int Start { get; } = start;

        public int Count { get; } = count;

        public Part? First { get; set; }

        public Part? Second { get; set; }

        public int SeparatorStart { get; set; } = start;

        public void Number(SeparatorTree tree, int parent, int[] vertices, int[] labels)
        {
            int node = tree.Open(parent);
            for (int i = SeparatorStart; i < Start + Count; i++)
                labels[vertices[i]] = node;
            if (First is not null)
            {
                First.Number(tree, node, vertices, labels);
                tree.TurnRight(node);
                Second!.Number(tree, node, vertices, labels);
            }

            tree.Close(node);
        }
    }
}
