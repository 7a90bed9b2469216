using FemCore2D.Sparse;

namespace FemCore2D.Solvers;

/// <summary>
/// An undirected graph in compressed form: each edge is stored from both its ends, and no vertex is its own neighbour.
/// </summary>
internal sealed class Graph(int count, int[] starts, int[] neighbors)
{
    /// <summary>The number of vertices.</summary>
    public int Count { get; } = count;

    /// <summary>For each vertex where its neighbours begin, and after the last where all end.</summary>
    public int[] Starts { get; } = starts;

    /// <summary>The neighbours of all vertices; may be longer than is used.</summary>
    public int[] Neighbors { get; } = neighbors;

    /// <summary>The weight of each vertex, or null where all are 1.</summary>
    public int[]? VertexWeights { get; init; }

    /// <summary>The weight of each stored edge, or null where all are 1.</summary>
    public int[]? EdgeWeights { get; init; }

    /// <summary>The sum of the weights of the vertices.</summary>
    public long TotalWeight => VertexWeights is null ? Count : VertexWeights.Sum(w => (long)w);

    /// <summary>The weight of a vertex.</summary>
    public int Weight(int vertex) => VertexWeights is null ? 1 : VertexWeights[vertex];

    /// <summary>The graph of a square pattern and its transpose together, without the diagonal.</summary>
    public static Graph Of(SparsePattern pattern) =>
        IsSymmetric(pattern) ? OfSymmetric(pattern) : OfUnion(pattern);

    /// <summary>Whether the transpose of a square pattern stores the same entries.</summary>
    public static bool IsSymmetric(SparsePattern pattern)
    {
        ReadOnlySpan<int> starts = pattern.RowStarts;
        ReadOnlySpan<int> columns = pattern.Columns;
        int n = pattern.RowCount;
        int[] next = starts[..n].ToArray();

        // Row by row, each entry (i, j) above the diagonal must be the next one of row j below it.
        for (int i = 0; i < n; i++)
        {
            int k = starts[i];
            int end = starts[i + 1];
            while (k < end && columns[k] < i)
                k++;
            if (next[i] != k)
                return false;
            for (; k < end; k++)
            {
                int j = columns[k];
                if (j == i)
                    continue;
                int at = next[j]++;
                if (at >= starts[j + 1] || columns[at] != i)
                    return false;
            }
        }

        return true;
    }

    private static Graph OfSymmetric(SparsePattern pattern)
    {
        ReadOnlySpan<int> rows = pattern.RowStarts;
        ReadOnlySpan<int> columns = pattern.Columns;
        int n = pattern.RowCount;
        int[] starts = new int[n + 1];
        int[] neighbors = GC.AllocateUninitializedArray<int>(columns.Length);
        int count = 0;
        for (int i = 0; i < n; i++)
        {
            for (int k = rows[i]; k < rows[i + 1]; k++)
            {
                int j = columns[k];
                neighbors[count] = j;
                count += j == i ? 0 : 1;
            }

            starts[i + 1] = count;
        }

        return new Graph(n, starts, neighbors);
    }

    private static Graph OfUnion(SparsePattern pattern)
    {
        ReadOnlySpan<int> rows = pattern.RowStarts;
        ReadOnlySpan<int> columns = pattern.Columns;
        int n = pattern.RowCount;
        int[] transposedStarts = new int[n + 1];
        foreach (int j in columns)
            transposedStarts[j + 1]++;
        for (int j = 0; j < n; j++)
            transposedStarts[j + 1] += transposedStarts[j];
        int[] transposed = new int[columns.Length];
        int[] next = transposedStarts[..n];
        for (int i = 0; i < n; i++)
        {
            for (int k = rows[i]; k < rows[i + 1]; k++)
                transposed[next[columns[k]]++] = i;
        }

        // Merges row i and column i, both ascending.
        int[] starts = new int[n + 1];
        List<int> neighbors = new(columns.Length + columns.Length / 2);
        for (int i = 0; i < n; i++)
        {
            int p = rows[i];
            int q = transposedStarts[i];
            while (p < rows[i + 1] || q < transposedStarts[i + 1])
            {
                int a = p < rows[i + 1] ? columns[p] : int.MaxValue;
                int b = q < transposedStarts[i + 1] ? transposed[q] : int.MaxValue;
                int j = Math.Min(a, b);
                p += a == j ? 1 : 0;
                q += b == j ? 1 : 0;
                if (j != i)
                    neighbors.Add(j);
            }

            starts[i + 1] = neighbors.Count;
        }

        return new Graph(n, starts, [.. neighbors]);
    }
}
