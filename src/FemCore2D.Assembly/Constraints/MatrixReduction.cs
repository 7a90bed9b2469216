using System.Numerics;
using FemCore2D.Sparse;

namespace FemCore2D.Assembly;

/// <summary>
/// Where each entry of a full matrix goes in the reduced matrix <c>C^H K C</c>. Found once; refilling adds each row's
/// entries in the order of the full matrix, so the result does not depend on the number of threads.
/// </summary>
internal sealed class MatrixReduction<T>
    where T : unmanaged, INumberBase<T>
{
    private const int RowsPerTask = 4096;

    private readonly ConstraintRows<T> rows;
    private readonly int[] positions;

    public MatrixReduction(ConstraintRows<T> rows, SparsePattern full)
    {
        this.rows = rows;
        Full = full;
        Pattern = FindPattern();
        positions = new int[full.EntryCount];
        InTasks(FindPositions);
    }

    public SparsePattern Full { get; }

    public SparsePattern Pattern { get; }

    public void Refill(SparseMatrix<T> full, SparseMatrix<T> reduced) => InTasks((first, end) =>
    {
        Span<T> target = reduced.Values;
        ReadOnlySpan<T> source = full.Values;
        ReadOnlySpan<int> starts = Full.RowStarts;
        ReadOnlySpan<int> columns = Full.Columns;
        target[Pattern.RowStarts[first]..Pattern.RowStarts[end]].Clear();
        for (int row = first; row < end; row++)
        {
            foreach (int member in rows.MembersOf(row))
            {
                for (int entry = starts[member]; entry < starts[member + 1]; entry++)
                {
                    int position = positions[entry];
                    if (position < 0)
                    {
                        continue;
                    }

                    target[position] += rows.Weights is null
                        ? source[entry]
                        : Scalar.Conjugate(rows.Weights[member]) * source[entry] * rows.Weights[columns[entry]];
                }
            }
        }
    });

    private SparsePattern FindPattern()
    {
        int[] starts = new int[rows.ColumnCount + 1];
        InTasks((first, end) =>
        {
            List<int> scratch = [];
            for (int row = first; row < end; row++)
            {
                CollectRow(row, scratch);
                starts[row + 1] = scratch.Count;
            }
        });

        // The reduced matrix has no more entries than the full one, so the sum cannot overflow.
        for (int row = 0; row < rows.ColumnCount; row++)
        {
            starts[row + 1] += starts[row];
        }

        int[] columns = new int[starts[^1]];
        InTasks((first, end) =>
        {
            List<int> scratch = [];
            for (int row = first; row < end; row++)
            {
                CollectRow(row, scratch);
                scratch.CopyTo(columns, starts[row]);
            }
        });

        return SparsePattern.FromCompressedRows(rows.ColumnCount, starts, columns);
    }

    /// <summary>The columns of a reduced row, ascending and each once.</summary>
    private void CollectRow(int row, List<int> columns)
    {
        columns.Clear();
        bool ascending = true;
        foreach (int member in rows.MembersOf(row))
        {
            foreach (int fullColumn in Full.ColumnsOf(member))
            {
                int column = rows.Columns[fullColumn];
                if (column >= 0)
                {
                    ascending &= columns.Count == 0 || columns[^1] < column;
                    columns.Add(column);
                }
            }
        }

        if (ascending)
        {
            return;
        }

        columns.Sort();
        int kept = 1;
        for (int i = 1; i < columns.Count; i++)
        {
            if (columns[i] != columns[kept - 1])
            {
                columns[kept++] = columns[i];
            }
        }

        columns.RemoveRange(kept, columns.Count - kept);
    }

    private void FindPositions(int first, int end)
    {
        for (int row = first; row < end; row++)
        {
            ReadOnlySpan<int> reduced = Pattern.ColumnsOf(row);
            int start = Pattern.RowStarts[row];
            foreach (int member in rows.MembersOf(row))
            {
                int entry = Full.RowStarts[member];
                foreach (int fullColumn in Full.ColumnsOf(member))
                {
                    int column = rows.Columns[fullColumn];
                    positions[entry++] = column < 0 ? -1 : start + reduced.BinarySearch(column);
                }
            }
        }
    }

    private void InTasks(Action<int, int> work)
    {
        int tasks = (rows.ColumnCount + RowsPerTask - 1) / RowsPerTask;
        Parallel.For(0, tasks, task => work(
            task * RowsPerTask, Math.Min((task + 1) * RowsPerTask, rows.ColumnCount)));
    }
}
