namespace FemCore2D.Solvers;

/// <summary>The elimination tree of a symmetric pattern in an order, and what is counted on it.</summary>
/// <remarks>
/// J. W. H. Liu (1990), <em>The role of elimination trees in sparse factorization</em>; column counts by J. R. Gilbert,
/// E. G. Ng and B. W. Peyton (1994), <em>An efficient algorithm to compute row and column counts for sparse Cholesky
/// factorization</em>.
/// </remarks>
internal static class EliminationTree
{
    /// <summary>Finds for each position its parent, or -1 for a root.</summary>
    /// <param name="graph">The pattern.</param>
    /// <param name="order">For each position the vertex.</param>
    /// <param name="positions">For each vertex its position.</param>
    public static int[] Parents(Graph graph, int[] order, int[] positions)
    {
        int n = graph.Count;
        int[] parents = new int[n];
        int[] ancestors = new int[n];
        for (int k = 0; k < n; k++)
        {
            parents[k] = -1;
            ancestors[k] = -1;
            int v = order[k];
            for (int p = graph.Starts[v]; p < graph.Starts[v + 1]; p++)
            {
                int i = positions[graph.Neighbors[p]];
                while (i < k)
                {
                    // Every ancestor met on the way is pointed to k, which shortens later ways.
                    int up = ancestors[i];
                    if (up == k)
                        break;
                    ancestors[i] = k;
                    if (up < 0)
                    {
                        parents[i] = k;
                        break;
                    }

                    i = up;
                }
            }
        }

        return parents;
    }

    /// <summary>Lists the nodes of a forest so that every subtree is a range which its root ends.</summary>
    /// <param name="parents">For each node its parent, or -1.</param>
    public static int[] Postorder(ReadOnlySpan<int> parents)
    {
        int n = parents.Length;
        int[] firstChild = new int[n];
        int[] sibling = new int[n];
        firstChild.AsSpan().Fill(-1);
        int roots = -1;
        for (int j = n - 1; j >= 0; j--)
        {
            int parent = parents[j];
            if (parent < 0)
            {
                sibling[j] = roots;
                roots = j;
            }
            else
            {
                sibling[j] = firstChild[parent];
                firstChild[parent] = j;
            }
        }

        int[] post = GC.AllocateUninitializedArray<int>(n);
        int count = 0;
        for (int root = roots; root >= 0; root = sibling[root])
        {
            int node = root;
            while (true)
            {
                while (firstChild[node] >= 0)
                    node = firstChild[node];
                post[count++] = node;
                while (node != root && sibling[node] < 0)
                {
                    node = parents[node];
                    post[count++] = node;
                }

                if (node == root)
                    break;
                node = sibling[node];
            }
        }

        return post;
    }

    /// <summary>Counts the entries of each column of the factor, the diagonal included.</summary>
    /// <param name="graph">The pattern.</param>
    /// <param name="order">For each position the vertex, in postorder.</param>
    /// <param name="positions">For each vertex its position.</param>
    /// <param name="parents">The tree, in which every parent comes after its children.</param>
    public static int[] ColumnCounts(Graph graph, int[] order, int[] positions, int[] parents)
    {
        int n = graph.Count;
        int[] firstDescendants = new int[n];
        int[] counts = new int[n];
        for (int j = 0; j < n; j++)
            firstDescendants[j] = j;
        for (int j = 0; j < n; j++)
        {
            counts[j] += firstDescendants[j] == j ? 1 : 0;
            int parent = parents[j];
            if (parent >= 0)
                firstDescendants[parent] = Math.Min(firstDescendants[parent], firstDescendants[j]);
        }

        int[] latestFirst = new int[n];
        int[] previousLeaf = new int[n];
        int[] sets = new int[n];
        latestFirst.AsSpan().Fill(-1);
        previousLeaf.AsSpan().Fill(-1);
        for (int j = 0; j < n; j++)
            sets[j] = j;
        for (int j = 0; j < n; j++)
        {
            if (parents[j] >= 0)
                counts[parents[j]]--;
            int first = firstDescendants[j];
            int v = order[j];
            for (int p = graph.Starts[v]; p < graph.Starts[v + 1]; p++)
            {
                // Only where j is a leaf of the subtree of row i does anything change.
                int i = positions[graph.Neighbors[p]];
                if (i <= j || first <= latestFirst[i])
                    continue;
                latestFirst[i] = first;
                counts[j]++;
                int before = previousLeaf[i];
                previousLeaf[i] = j;
                if (before < 0)
                    continue;
                int root = before;
                while (sets[root] != root)
                    root = sets[root];
                while (sets[before] != root)
                {
                    int up = sets[before];
                    sets[before] = root;
                    before = up;
                }

                counts[root]--;
            }

            if (parents[j] >= 0)
                sets[j] = parents[j];
        }

        for (int j = 0; j < n; j++)
        {
            if (parents[j] >= 0)
                counts[parents[j]] += counts[j];
        }

        return counts;
    }
}
