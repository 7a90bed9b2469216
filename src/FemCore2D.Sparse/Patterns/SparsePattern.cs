namespace FemCore2D.Sparse;

/// <summary>
/// Which entries of a sparse matrix are stored: for each row its columns, ascending. Immutable, and shared by all
/// matrices that have it.
/// </summary>
public sealed partial class SparsePattern
{
    private readonly int[] rowStarts;
    private readonly int[] columns;
    private int[]? rowBlocks;

    /// <summary>Takes over arrays that the caller vouches for and no longer changes.</summary>
    internal SparsePattern(int columnCount, int[] rowStarts, int[] columns)
    {
        ColumnCount = columnCount;
        this.rowStarts = rowStarts;
        this.columns = columns;
    }

    /// <summary>The number of rows.</summary>
    public int RowCount => rowStarts.Length - 1;

    /// <summary>The number of columns.</summary>
    public int ColumnCount { get; }

    /// <summary>The number of stored entries.</summary>
    public int EntryCount => columns.Length;

    /// <summary>For each row the position of its first entry, and after the last row the number of entries.</summary>
    public ReadOnlySpan<int> RowStarts => rowStarts;

    /// <summary>The column of each entry, ascending within each row.</summary>
    public ReadOnlySpan<int> Columns => columns;

    /// <summary>
    /// The first row of each block of rows of about equal work, and after the last block the number of rows. The cut
    /// depends on the pattern alone, never on the number of threads.
    /// </summary>
    internal int[] RowBlocks => rowBlocks ??= CutIntoRowBlocks();

    /// <summary>The columns of the entries of a row, ascending.</summary>
    /// <param name="row">The row, from 0.</param>
    /// <exception cref="ArgumentOutOfRangeException">There is no such row.</exception>
    public ReadOnlySpan<int> ColumnsOf(int row)
    {
        CheckRow(row);
        return columns.AsSpan(rowStarts[row], rowStarts[row + 1] - rowStarts[row]);
    }

    /// <summary>The position of an entry in <see cref="Columns"/>, or -1 where none is stored. Binary search in the row.</summary>
    /// <param name="row">The row, from 0.</param>
    /// <param name="column">The column, from 0.</param>
    /// <exception cref="ArgumentOutOfRangeException">There is no such row or column.</exception>
    public int PositionOf(int row, int column)
    {
        CheckRow(row);
        if ((uint)column >= (uint)ColumnCount)
        {
            throw new ArgumentOutOfRangeException(
                nameof(column), column, $"The columns of this pattern are 0 to {ColumnCount - 1}.");
        }

        int start = rowStarts[row];
        int found = columns.AsSpan(start, rowStarts[row + 1] - start).BinarySearch(column);
        return found < 0 ? -1 : start + found;
    }

    /// <summary>Whether an entry is stored.</summary>
    /// <inheritdoc cref="PositionOf"/>
    public bool Contains(int row, int column) => PositionOf(row, column) >= 0;

    /// <summary>Whether another pattern stores the same entries.</summary>
    /// <param name="other">The other pattern.</param>
    public bool HasSameEntriesAs(SparsePattern other)
    {
        ArgumentNullException.ThrowIfNull(other);
        return ReferenceEquals(this, other)
            || (ColumnCount == other.ColumnCount
                && rowStarts.AsSpan().SequenceEqual(other.rowStarts)
                && columns.AsSpan().SequenceEqual(other.columns));
    }

    /// <summary>Whether for each stored entry the mirrored one is stored too.</summary>
    public bool IsSymmetric()
    {
        if (RowCount != ColumnCount)
        {
            return false;
        }

        // Rows ascend, so the mirrored entries of a row's upper part are met in the order of its stored columns.
        int[] next = rowStarts.AsSpan(0, RowCount).ToArray();
        for (int row = 0; row < RowCount; row++)
        {
            for (int k = next[row]; k < rowStarts[row + 1]; k++)
            {
                int column = columns[k];
                if (column < row)
                {
                    return false;
                }

                if (column > row)
                {
                    int mirror = next[column]++;
                    if (mirror >= rowStarts[column + 1] || columns[mirror] != row)
                    {
                        return false;
                    }
                }
            }
        }

        return true;
    }

    internal void CheckRow(int row)
    {
        if ((uint)row >= (uint)RowCount)
        {
            throw new ArgumentOutOfRangeException(nameof(row), row, $"The rows of this pattern are 0 to {RowCount - 1}.");
        }
    }

    private int[] CutIntoRowBlocks()
    {
        const int Work = 1 << 15;
        int count = (int)Math.Clamp(((long)EntryCount + RowCount) / Work, 1, Math.Max(1, RowCount));
        int[] cuts = new int[count + 1];
        int row = 0;
        for (int block = 1; block < count; block++)
        {
            long target = ((long)EntryCount + RowCount) * block / count;
            while (row < RowCount && (long)rowStarts[row] + row < target)
            {
                row++;
            }

            cuts[block] = row;
        }

        cuts[count] = RowCount;
        return cuts;
    }
}
