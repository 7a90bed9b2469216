using FemCore2D.Sparse;

namespace FemCore2D.Solvers;

/// <summary>
/// An order of elimination in which chunks of consecutive unknowns do not touch one another, so that triangular solves
/// can run over them at the same time. Unknowns that tie a chunk to an earlier one come last, as separators.
/// </summary>
/// <remarks>
/// It is a one-way dissection (George 1980) along the order that the unknowns have. The cut depends on the pattern
/// alone, so the result does not depend on the number of threads. An order without locality would make most unknowns
/// separators; then there is one chunk.
/// </remarks>
internal sealed class ChunkedOrder
{
    private const int UnknownsPerChunk = 32_768;
    private const int MaxChunks = 32;
    private const int LeastUnknownsPerSeparator = 8;

    private ChunkedOrder(int[] order, int[] chunkStarts, int[] rank)
    {
        Order = order;
        ChunkStarts = chunkStarts;
        Rank = rank;
    }

    /// <summary>The unknowns in the order of elimination.</summary>
    public int[] Order { get; }

    /// <summary>For each unknown its place in the order.</summary>
    public int[] Rank { get; }

    /// <summary>For each chunk its first place in the order, and after the last chunk the first separator's.</summary>
    public int[] ChunkStarts { get; }

    /// <summary>The number of chunks.</summary>
    public int ChunkCount => ChunkStarts.Length - 1;

    /// <summary>Finds the order for a square pattern.</summary>
    public static ChunkedOrder Create(SparsePattern pattern, int unknownsPerChunk = UnknownsPerChunk)
    {
        int size = pattern.RowCount;
        int chunks = Math.Clamp(size / unknownsPerChunk, 1, MaxChunks);
        int[] cuts = new int[chunks + 1];
        for (int chunk = 0; chunk <= chunks; chunk++)
        {
            cuts[chunk] = (int)((long)size * chunk / chunks);
        }

        bool[] isSeparator = new bool[size];
        int separators = 0;
        for (int chunk = 1; chunk < chunks; chunk++)
        {
            for (int i = cuts[chunk]; i < cuts[chunk + 1]; i++)
            {
                ReadOnlySpan<int> columns = pattern.ColumnsOf(i);
                isSeparator[i] = !columns.IsEmpty && columns[0] < cuts[chunk];
                separators += isSeparator[i] ? 1 : 0;
            }
        }

        if (separators > size / LeastUnknownsPerSeparator)
        {
            return Create(pattern, int.MaxValue);
        }

        return Sort(cuts, isSeparator, size - separators);
    }

    private static ChunkedOrder Sort(int[] cuts, bool[] isSeparator, int firstSeparator)
    {
        int[] order = new int[isSeparator.Length];
        int[] rank = new int[isSeparator.Length];
        int[] starts = new int[cuts.Length];
        int inside = 0;
        int outside = firstSeparator;
        for (int chunk = 0; chunk + 1 < cuts.Length; chunk++)
        {
            starts[chunk] = inside;
            for (int i = cuts[chunk]; i < cuts[chunk + 1]; i++)
            {
                rank[i] = isSeparator[i] ? outside++ : inside++;
                order[rank[i]] = i;
            }
        }

        starts[^1] = inside;
        return new ChunkedOrder(order, starts, rank);
    }
}
