namespace FemCore2D.Sparse;

/// <summary>Brings places given in any order into compressed rows by two stable counting sorts, in linear time.</summary>
internal static class TripletSort
{
    /// <summary>A pattern, and how the given places fall onto it.</summary>
    /// <param name="Pattern">The pattern, each place stored once.</param>
    /// <param name="Order">The given places sorted by row, then by column, then by the order they were given in.</param>
    /// <param name="Position">For each place, in the order given, its position in the pattern.</param>
    public readonly record struct Result(SparsePattern Pattern, int[] Order, int[] Position);

    /// <summary>Checks and sorts places.</summary>
    public static Result Build(int rowCount, int columnCount, ReadOnlySpan<int> rows, ReadOnlySpan<int> columns)
    {
        ArgumentOutOfRangeException.ThrowIfNegative(rowCount);
        ArgumentOutOfRangeException.ThrowIfNegative(columnCount);
        SizeLimitException.CheckLines(rowCount);
        SizeLimitException.CheckLines(columnCount);
        if (rows.Length != columns.Length)
        {
            throw new ArgumentException($"There are {rows.Length} rows but {columns.Length} columns.", nameof(columns));
        }

        for (int i = 0; i < rows.Length; i++)
        {
            if ((uint)rows[i] >= (uint)rowCount || (uint)columns[i] >= (uint)columnCount)
            {
                throw new ArgumentException(
                    $"Place {i} is row {rows[i]}, column {columns[i]}, which lies outside a matrix of {rowCount} rows "
                    + $"and {columnCount} columns.",
                    nameof(rows));
            }
        }

        int[] byColumn = Sort(columns, columnCount, order: null);
        int[] order = Sort(rows, rowCount, byColumn);
        return Merge(rowCount, columnCount, rows, columns, order);
    }

    private static int[] Sort(ReadOnlySpan<int> keys, int keyCount, int[]? order)
    {
        int[] next = new int[keyCount + 1];
        foreach (int key in keys)
        {
            next[key + 1]++;
        }

        for (int key = 0; key < keyCount; key++)
        {
            next[key + 1] += next[key];
        }

        int[] sorted = new int[keys.Length];
        for (int i = 0; i < keys.Length; i++)
        {
            int item = order is null ? i : order[i];
            sorted[next[keys[item]]++] = item;
        }

        return sorted;
    }

    private static Result Merge(
        int rowCount, int columnCount, ReadOnlySpan<int> rows, ReadOnlySpan<int> columns, int[] order)
    {
        int[] position = new int[order.Length];
        int[] merged = new int[order.Length];
        int[] starts = new int[rowCount + 1];
        int count = 0;
        int lastRow = -1;
        foreach (int item in order)
        {
            if (rows[item] != lastRow || columns[item] != merged[count - 1])
            {
                merged[count++] = columns[item];
                lastRow = rows[item];
                starts[lastRow + 1]++;
            }

            position[item] = count - 1;
        }

        for (int row = 0; row < rowCount; row++)
        {
            starts[row + 1] += starts[row];
        }

        Array.Resize(ref merged, count);
        return new Result(new SparsePattern(columnCount, starts, merged), order, position);
    }
}
