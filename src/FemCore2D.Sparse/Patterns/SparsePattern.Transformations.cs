namespace FemCore2D.Sparse;

public sealed partial class SparsePattern
{
    /// <summary>The pattern mirrored at the diagonal.</summary>
    public SparsePattern Transpose() => Transpose(out _);

    /// <summary>The entries that either of two patterns stores.</summary>
    /// <param name="other">A pattern of the same size.</param>
    /// <exception cref="ArgumentException">The sizes differ.</exception>
    /// <exception cref="SizeLimitException">The union has more entries than a matrix can store.</exception>
    public SparsePattern Union(SparsePattern other)
    {
        ArgumentNullException.ThrowIfNull(other);
        CheckSameSize(other);
        if (HasSameEntriesAs(other))
        {
            return this;
        }

        int[] starts = new int[RowCount + 1];
        long count = 0;
        for (int row = 0; row < RowCount; row++)
        {
            count += Merge(ColumnsOf(row), other.ColumnsOf(row), default);
            starts[row + 1] = (int)Math.Min(count, int.MaxValue);
        }

        int[] merged = new int[SizeLimitException.CheckEntries(count, "The union of two patterns")];
        for (int row = 0; row < RowCount; row++)
        {
            Merge(ColumnsOf(row), other.ColumnsOf(row), merged.AsSpan(starts[row]));
        }

        return new SparsePattern(ColumnCount, starts, merged);
    }

    /// <summary>The pattern of chosen rows and columns.</summary>
    /// <param name="selectedRows">The rows to keep, in the order they are to have; each at most once.</param>
    /// <param name="selectedColumns">The columns to keep, in the order they are to have; each at most once.</param>
    /// <exception cref="ArgumentException">A row or column lies outside the pattern or is chosen twice.</exception>
    public SparsePattern Select(ReadOnlySpan<int> selectedRows, ReadOnlySpan<int> selectedColumns) =>
        Select(selectedRows, selectedColumns, out _);

    /// <summary>The transpose, with the position here of each of its entries.</summary>
    internal SparsePattern Transpose(out int[] source)
    {
        int[] starts = new int[ColumnCount + 1];
        foreach (int column in columns)
        {
            starts[column + 1]++;
        }

        for (int column = 0; column < ColumnCount; column++)
        {
            starts[column + 1] += starts[column];
        }

        int[] next = starts.AsSpan(0, ColumnCount).ToArray();
        int[] rows = new int[EntryCount];
        source = new int[EntryCount];
        for (int row = 0; row < RowCount; row++)
        {
            for (int k = rowStarts[row]; k < rowStarts[row + 1]; k++)
            {
                int place = next[columns[k]]++;
                rows[place] = row;
                source[place] = k;
            }
        }

        return new SparsePattern(RowCount, starts, rows);
    }

    /// <summary>A selection, with the position here of each of its entries.</summary>
    internal SparsePattern Select(
        ReadOnlySpan<int> selectedRows, ReadOnlySpan<int> selectedColumns, out int[] source)
    {
        int[] newColumn = InverseOf(selectedColumns, ColumnCount, "column", nameof(selectedColumns));
        _ = InverseOf(selectedRows, RowCount, "row", nameof(selectedRows));
        int[] starts = new int[selectedRows.Length + 1];
        for (int i = 0; i < selectedRows.Length; i++)
        {
            int count = 0;
            foreach (int column in ColumnsOf(selectedRows[i]))
            {
                count += newColumn[column] >= 0 ? 1 : 0;
            }

            starts[i + 1] = starts[i] + count;
        }

        int[] selected = new int[starts[^1]];
        source = new int[starts[^1]];
        bool ascending = IsAscending(selectedColumns);
        for (int i = 0; i < selectedRows.Length; i++)
        {
            int place = starts[i];
            for (int k = rowStarts[selectedRows[i]]; k < rowStarts[selectedRows[i] + 1]; k++)
            {
                if (newColumn[columns[k]] >= 0)
                {
                    selected[place] = newColumn[columns[k]];
                    source[place++] = k;
                }
            }

            if (!ascending)
            {
                selected.AsSpan(starts[i], place - starts[i]).Sort(source.AsSpan(starts[i], place - starts[i]));
            }
        }

        return new SparsePattern(selectedColumns.Length, starts, selected);
    }

    internal void CheckSameSize(SparsePattern other)
    {
        if (RowCount != other.RowCount || ColumnCount != other.ColumnCount)
        {
            throw new ArgumentException(
                $"The sizes differ: {RowCount} x {ColumnCount} and {other.RowCount} x {other.ColumnCount}.",
                nameof(other));
        }
    }

    /// <summary>For each old index its place in the selection, or -1.</summary>
    private static int[] InverseOf(ReadOnlySpan<int> selection, int count, string what, string parameter)
    {
        int[] inverse = new int[count];
        Array.Fill(inverse, -1);
        for (int i = 0; i < selection.Length; i++)
        {
            int old = selection[i];
            if ((uint)old >= (uint)count)
            {
                throw new ArgumentException(
                    $"Item {i} of the selection is {what} {old}; there are {what}s 0 to {count - 1}.", parameter);
            }

            if (inverse[old] >= 0)
            {
                throw new ArgumentException(
                    $"Items {inverse[old]} and {i} of the selection are both {what} {old}; each may be chosen once.",
                    parameter);
            }

            inverse[old] = i;
        }

        return inverse;
    }

    private static bool IsAscending(ReadOnlySpan<int> items)
    {
        for (int i = 1; i < items.Length; i++)
        {
            if (items[i] < items[i - 1])
            {
                return false;
            }
        }

        return true;
    }

    /// <summary>Counts the union of two ascending rows, and writes it if there is a target.</summary>
    private static int Merge(ReadOnlySpan<int> first, ReadOnlySpan<int> second, Span<int> target)
    {
        int i = 0;
        int j = 0;
        int count = 0;
        while (i < first.Length || j < second.Length)
        {
            int a = i < first.Length ? first[i] : int.MaxValue;
            int b = j < second.Length ? second[j] : int.MaxValue;
            if (!target.IsEmpty)
            {
                target[count] = Math.Min(a, b);
            }

            count++;
            i += a <= b ? 1 : 0;
            j += b <= a ? 1 : 0;
        }

        return count;
    }
}
