namespace FemCore2D.Sparse;

public sealed partial class SparsePattern
{
    /// <summary>Creates a pattern from compressed rows, which are checked and copied.</summary>
    /// <param name="columnCount">The number of columns.</param>
    /// <param name="rowStarts">For each row the position of its first entry, and after the last row the number of entries.</param>
    /// <param name="columns">The column of each entry, ascending within each row.</param>
    /// <exception cref="ArgumentOutOfRangeException">The number of columns is negative.</exception>
    /// <exception cref="ArgumentException">
    /// The row starts do not begin with 0, do not end with the number of entries or descend; or the columns of a row
    /// do not ascend or lie outside the matrix.
    /// </exception>
    /// <exception cref="SizeLimitException">There are more columns than a matrix can have.</exception>
    public static SparsePattern FromCompressedRows(
        int columnCount, ReadOnlySpan<int> rowStarts, ReadOnlySpan<int> columns)
    {
        ArgumentOutOfRangeException.ThrowIfNegative(columnCount);
        SizeLimitException.CheckLines(columnCount);
        if (rowStarts.IsEmpty || rowStarts[0] != 0 || rowStarts[^1] != columns.Length)
        {
            throw new ArgumentException(
                $"The row starts must begin with 0 and end with the number of entries, {columns.Length}.",
                nameof(rowStarts));
        }

        for (int row = 0; row + 1 < rowStarts.Length; row++)
        {
            int start = rowStarts[row];
            int end = rowStarts[row + 1];
            if (end < start || end > columns.Length)
            {
                throw new ArgumentException(
                    $"The row starts must ascend up to {columns.Length}, but row {row} runs from {start} to {end}.",
                    nameof(rowStarts));
            }

            int last = -1;
            foreach (int column in columns[start..end])
            {
                if (column <= last || column >= columnCount)
                {
                    throw new ArgumentException(
                        $"Row {row} has column {column} after column {last}; the columns of a row must ascend and "
                        + $"lie in 0 to {columnCount - 1}.",
                        nameof(columns));
                }

                last = column;
            }
        }

        return new SparsePattern(columnCount, rowStarts.ToArray(), columns.ToArray());
    }

    /// <summary>Creates a pattern from places in any order; a place named more than once is stored once.</summary>
    /// <param name="rowCount">The number of rows.</param>
    /// <param name="columnCount">The number of columns.</param>
    /// <param name="rows">The row of each place.</param>
    /// <param name="columns">The column of each place, as many as <paramref name="rows"/>.</param>
    /// <exception cref="ArgumentOutOfRangeException">A count is negative.</exception>
    /// <exception cref="ArgumentException">The spans differ in length, or a place lies outside the matrix.</exception>
    /// <exception cref="SizeLimitException">A count is larger than a matrix can have.</exception>
    public static SparsePattern FromPlaces(
        int rowCount, int columnCount, ReadOnlySpan<int> rows, ReadOnlySpan<int> columns)
    {
        return TripletSort.Build(rowCount, columnCount, rows, columns).Pattern;
    }

    /// <summary>The pattern of a diagonal matrix.</summary>
    /// <param name="size">The number of rows and of columns.</param>
    /// <exception cref="ArgumentOutOfRangeException">The size is negative.</exception>
    public static SparsePattern Diagonal(int size)
    {
        ArgumentOutOfRangeException.ThrowIfNegative(size);
        SizeLimitException.CheckLines(size);
        int[] starts = new int[size + 1];
        int[] places = new int[size];
        for (int i = 0; i < size; i++)
        {
            places[i] = i;
            starts[i + 1] = i + 1;
        }

        return new SparsePattern(size, starts, places);
    }
}
