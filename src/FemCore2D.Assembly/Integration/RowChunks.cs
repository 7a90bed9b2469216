using System.Numerics;
using FemCore2D.Geometry;

namespace FemCore2D.Assembly;

/// <summary>
/// The rows of a system cut into chunks of equal length, and for each chunk the cells that touch any of its rows,
/// ascending. Each chunk is worked on by one thread, which computes these cells and keeps only what falls in its own
/// rows: so nothing is shared, and every sum has the order of the cells whatever the number of threads.
/// </summary>
internal sealed class RowChunks
{
    private const int CellsAtBest = 8192;
    private const int ChunksAtBest = 32;
    private const int FewestRows = 256;

    private readonly int shift;
    private readonly int[] starts;
    private readonly int[] cells;

    /// <summary>Cuts the rows; how, depends on the mesh only.</summary>
    public RowChunks(Numbering numbering, ParallelOptions options)
    {
        RowCount = numbering.Count;
        CellCount = numbering.Mesh.CellCount;
        double rowsPerCell = (double)RowCount / Math.Max(1, CellCount);
        double rows = Math.Max(FewestRows, Math.Min(CellsAtBest * rowsPerCell, (double)RowCount / ChunksAtBest));
        shift = BitOperations.Log2((uint)rows);
        Count = (RowCount + (1 << shift) - 1) >> shift;
        (starts, cells) = Distribute(numbering, options);
    }

    /// <summary>The number of chunks.</summary>
    public int Count { get; }

    public int RowCount { get; }

    public int CellCount { get; }

    /// <summary>The largest number of rows of a chunk.</summary>
    public int LongestChunk => Math.Min(1 << shift, RowCount);

    /// <summary>The rows of a chunk.</summary>
    public (int First, int Count) RowsOf(int chunk)
    {
        int first = chunk << shift;
        return (first, Math.Min(1 << shift, RowCount - first));
    }

    /// <summary>The cells that touch the rows of a chunk, ascending.</summary>
    public ReadOnlySpan<int> CellsOf(int chunk) => cells.AsSpan(starts[chunk], starts[chunk + 1] - starts[chunk]);

    /// <summary>The same, parted into triangles and quadrilaterals.</summary>
    public ReadOnlySpan<int> CellsOf(int chunk, CellKind kind, int triangleCount)
    {
        ReadOnlySpan<int> all = CellsOf(chunk);
        int split = all.BinarySearch(triangleCount);
        split = split < 0 ? ~split : split;
        return kind == CellKind.Triangle ? all[..split] : all[split..];
    }

    private (int[] Starts, int[] Cells) Distribute(Numbering numbering, ParallelOptions options)
    {
        // A counting sort in blocks of cells: each block counts, then writes at places that follow from the counts.
        int blocks = Math.Clamp(CellCount / CellsAtBest, 1, 64);
        int[][] counts = new int[blocks][];
        Parallel.For(0, blocks, options, block => counts[block] = Visit(numbering, block, blocks, new int[Count], null));

        int[] chunkStarts = new int[Count + 1];
        long total = 0;
        for (int chunk = 0; chunk < Count; chunk++)
        {
            chunkStarts[chunk] = (int)total;
            for (int block = 0; block < blocks; block++)
            {
                int own = counts[block][chunk];
                counts[block][chunk] = (int)total;
                total += own;
            }
        }

        chunkStarts[Count] = checked((int)total);
        int[] sorted = new int[total];
        Parallel.For(0, blocks, options, block => Visit(numbering, block, blocks, counts[block], sorted));
        return (chunkStarts, sorted);
    }

    private int[] Visit(Numbering numbering, int block, int blocks, int[] cursors, int[]? sorted)
    {
        int first = (int)((long)CellCount * block / blocks);
        int end = (int)((long)CellCount * (block + 1) / blocks);
        int widest = Math.Max(
            numbering.CellUnknownCount(CellKind.Triangle), numbering.CellUnknownCount(CellKind.Quadrilateral));
        int[] unknowns = new int[widest];
        int[] met = new int[widest];
        for (int cell = first; cell < end; cell++)
        {
            int count = numbering.CellUnknowns(cell, unknowns);
            int metCount = 0;
            for (int k = 0; k < count; k++)
            {
                int chunk = unknowns[k] >> shift;
                if (!met.AsSpan(0, metCount).Contains(chunk))
                {
                    met[metCount++] = chunk;
                    int place = cursors[chunk]++;
                    if (sorted is not null)
                    {
                        sorted[place] = cell;
                    }
                }
            }
        }

        return cursors;
    }
}
