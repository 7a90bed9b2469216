using System.Numerics;
using FemCore2D.Sparse;

namespace FemCore2D.Assembly;

/// <summary>
/// How the entries of a full matrix K come together in the reduced one, <c>C^H K C</c>: for each reduced entry the
/// full entries that it sums, in an order that is the same for an entry and its mirror image, so that symmetric and
/// Hermitian matrices stay so to the bit. Made once for a pattern, used by every refill.
/// </summary>
internal sealed class MatrixReduction<T>
    where T : unmanaged, INumberBase<T>
{
    private const int RowsPerBlock = 4096;

    private readonly ConstraintRows<T> rows;

    // For each reduced entry where its full entries begin; null when each has exactly one.
    private readonly int[]? sourceStarts;
    private readonly int[] sources;

    // The factor of each source; null when all are one.
    private readonly T[]? weights;

    public MatrixReduction(ConstraintRows<T> rows, SparsePattern full)
    {
        this.rows = rows;
        Full = full;
        int count = rows.ColumnCount;
        int[] rowStarts = new int[count + 1];
        int blocks = BlockCount(count);
        var parts = new Part[blocks];
        Parallel.For(0, blocks, block => parts[block] = BuildBlock(block, rowStarts));

        // Each source is an entry of the full matrix and counted once, so that no sum below can overflow.
        int entries = 0;
        int contributions = 0;
        int[] entryOffsets = new int[blocks];
        int[] sourceOffsets = new int[blocks];
        for (int block = 0; block < blocks; block++)
        {
            entryOffsets[block] = entries;
            sourceOffsets[block] = contributions;
            entries += parts[block].Columns.Count;
            contributions += parts[block].Sources.Count;
        }

        for (int row = 0; row < count; row++)
        {
            rowStarts[row + 1] += rowStarts[row];
        }

        int[] columns = new int[entries];
        sources = new int[contributions];
        sourceStarts = contributions == entries ? null : new int[entries + 1];
        weights = rows.Weights is null ? null : new T[contributions];
        Parallel.For(0, blocks, block =>
        {
            Part part = parts[block];
            part.Columns.CopyTo(columns, entryOffsets[block]);
            part.Sources.CopyTo(sources, sourceOffsets[block]);
            if (weights is not null)
            {
                part.Weights.CopyTo(weights, sourceOffsets[block]);
            }

            for (int entry = 0; sourceStarts is not null && entry < part.Columns.Count; entry++)
            {
                sourceStarts[entryOffsets[block] + entry] = sourceOffsets[block] + part.Starts[entry];
            }
        });
        if (sourceStarts is not null)
        {
            sourceStarts[entries] = contributions;
        }

        Pattern = new SparsePattern(count, rowStarts, columns);
    }

    public SparsePattern Full { get; }

    public SparsePattern Pattern { get; }

    /// <summary>Computes the reduced matrix in place.</summary>
    public void Refill(SparseMatrix<T> full, SparseMatrix<T> reduced) => Parallel.For(
        0, BlockCount(Pattern.RowCount), block => RefillBlock(block, full.Values, reduced.Values));

    private static int BlockCount(int count) => (count + RowsPerBlock - 1) / RowsPerBlock;

    private void RefillBlock(int block, ReadOnlySpan<T> from, Span<T> to)
    {
        (int first, int end) = RowsOf(block, Pattern.RowCount);
        int firstEntry = Pattern.RowStarts[first];
        int endEntry = Pattern.RowStarts[end];
        if (sourceStarts is null)
        {
            for (int entry = firstEntry; entry < endEntry; entry++)
            {
                T value = from[sources[entry]];
                to[entry] = weights is null ? value : weights[entry] * value;
            }

            return;
        }

        for (int entry = firstEntry; entry < endEntry; entry++)
        {
            T sum = T.Zero;
            for (int k = sourceStarts[entry]; k < sourceStarts[entry + 1]; k++)
            {
                T value = from[sources[k]];
                sum += weights is null ? value : weights[k] * value;
            }

            to[entry] = sum;
        }
    }

    private static (int First, int End) RowsOf(int block, int count) =>
        (block * RowsPerBlock, Math.Min(count, (block + 1) * RowsPerBlock));

    private Part BuildBlock(int block, int[] rowLengths)
    {
        (int first, int end) = RowsOf(block, rows.ColumnCount);
        var part = new Part();
        var found = new List<Source>();
        ReadOnlySpan<int> rowStarts = Full.RowStarts;
        ReadOnlySpan<int> columns = Full.Columns;
        for (int row = first; row < end; row++)
        {
            found.Clear();
            bool sorted = true;
            foreach (int member in rows.MembersOf(row))
            {
                for (int position = rowStarts[member]; position < rowStarts[member + 1]; position++)
                {
                    int column = columns[position];
                    if (rows.Columns[column] >= 0)
                    {
                        var source = new Source(rows.Columns[column], member, column, position);
                        sorted &= found.Count == 0 || found[^1].CompareTo(source) < 0;
                        found.Add(source);
                    }
                }
            }

            if (!sorted)
            {
                found.Sort();
            }

            int before = part.Columns.Count;
            foreach (Source source in found)
            {
                if (part.Columns.Count == before || part.Columns[^1] != source.Reduced)
                {
                    part.Columns.Add(source.Reduced);
                    part.Starts.Add(part.Sources.Count);
                }

                part.Sources.Add(source.Position);
                if (rows.Weights is not null)
                {
                    part.Weights.Add(Scalar.Conjugate(rows.Weights[source.Row]) * rows.Weights[source.Column]);
                }
            }

            rowLengths[row + 1] = part.Columns.Count - before;
        }

        return part;
    }

    /// <summary>A full entry that goes into a reduced one.</summary>
    private readonly record struct Source(int Reduced, int Row, int Column, int Position) : IComparable<Source>
    {
        // By the unordered pair of row and column first: mirror images then have the same order.
        public int CompareTo(Source other)
        {
            int order = Reduced.CompareTo(other.Reduced);
            order = order != 0 ? order : Math.Min(Row, Column).CompareTo(Math.Min(other.Row, other.Column));
            order = order != 0 ? order : Math.Max(Row, Column).CompareTo(Math.Max(other.Row, other.Column));
            return order != 0 ? order : Row.CompareTo(other.Row);
        }
    }

    /// <summary>What one block of rows finds.</summary>
    private sealed class Part
    {
        public List<int> Columns { get; } = [];

        public List<int> Starts { get; } = [];

        public List<int> Sources { get; } = [];

        public List<T> Weights { get; } = [];
    }
}
