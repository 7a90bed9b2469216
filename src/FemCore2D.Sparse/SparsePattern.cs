namespace FemCore2D.Sparse;

/// <summary>
/// Which entries of a sparse matrix are stored: for each row its columns, ascending. Immutable, and shared by all
/// matrices that have it.
/// </summary>
public sealed class SparsePattern
{
    private readonly int[] rowStarts;
    private readonly int[] columns;

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

    /// <summary>The columns of the entries of a row, ascending.</summary>
    public ReadOnlySpan<int> ColumnsOf(int row) =>
        columns.AsSpan(rowStarts[row], rowStarts[row + 1] - rowStarts[row]);
}
