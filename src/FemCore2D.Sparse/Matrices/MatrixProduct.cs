using System.Numerics;

namespace FemCore2D.Sparse;

/// <summary>The product of two sparse matrices.</summary>
/// <remarks>F. G. Gustavson, two fast algorithms for sparse matrices (1978): rows are gathered in a dense accumulator.</remarks>
internal static class MatrixProduct
{
    /// <summary>Multiplies two matrices.</summary>
    public static SparseMatrix<T> Multiply<T>(SparseMatrix<T> left, SparseMatrix<T> right)
        where T : unmanaged, INumberBase<T>
    {
        if (left.ColumnCount != right.RowCount)
        {
            throw new ArgumentException(
                $"A matrix of {left.ColumnCount} columns cannot be multiplied with one of {right.RowCount} rows.",
                nameof(right));
        }

        SparsePattern pattern = PatternOf(left.Pattern, right.Pattern);
        SparseMatrix<T> product = new(pattern);
        T[] sums = new T[right.ColumnCount];
        for (int row = 0; row < left.RowCount; row++)
        {
            int start = left.Pattern.RowStarts[row];
            ReadOnlySpan<int> inner = left.Pattern.ColumnsOf(row);
            for (int k = 0; k < inner.Length; k++)
            {
                T factor = left.Values[start + k];
                ReadOnlySpan<int> columns = right.Pattern.ColumnsOf(inner[k]);
                ReadOnlySpan<T> values = right.Values.Slice(right.Pattern.RowStarts[inner[k]], columns.Length);
                for (int j = 0; j < columns.Length; j++)
                {
                    sums[columns[j]] += factor * values[j];
                }
            }

            int place = pattern.RowStarts[row];
            foreach (int column in pattern.ColumnsOf(row))
            {
                product.Values[place++] = sums[column];
                sums[column] = T.Zero;
            }
        }

        return product;
    }

    private static SparsePattern PatternOf(SparsePattern left, SparsePattern right)
    {
        // Counted before it is stored, so that the limit is checked before memory is spent.
        int[] seen = new int[right.ColumnCount];
        Array.Fill(seen, -1);
        int[] starts = new int[left.RowCount + 1];
        long count = 0;
        for (int row = 0; row < left.RowCount; row++)
        {
            foreach (int k in left.ColumnsOf(row))
            {
                foreach (int column in right.ColumnsOf(k))
                {
                    count += seen[column] == row ? 0 : 1;
                    seen[column] = row;
                }
            }

            starts[row + 1] = SizeLimitException.CheckEntries(count, "The product of two matrices");
        }

        int[] columns = new int[count];
        Array.Fill(seen, -1);
        for (int row = 0; row < left.RowCount; row++)
        {
            int place = starts[row];
            foreach (int k in left.ColumnsOf(row))
            {
                foreach (int column in right.ColumnsOf(k))
                {
                    if (seen[column] != row)
                    {
                        seen[column] = row;
                        columns[place++] = column;
                    }
                }
            }

            columns.AsSpan(starts[row], place - starts[row]).Sort();
        }

        return new SparsePattern(right.ColumnCount, starts, columns);
    }
}
