using System.Numerics;

namespace FemCore2D.Sparse;

public sealed partial class SparseMatrix<T>
    where T : unmanaged, INumberBase<T>
{
    /// <summary>The matrix times a number.</summary>
    /// <param name="factor">The number.</param>
    public SparseMatrix<T> Multiply(T factor)
    {
        T[] scaled = new T[values.Length];
        for (int i = 0; i < scaled.Length; i++)
        {
            scaled[i] = factor * values[i];
        }

        return new SparseMatrix<T>(Pattern, scaled);
    }

    /// <summary>The sum with another matrix.</summary>
    /// <param name="other">A matrix of the same size.</param>
    /// <returns>The sum; it stores what either of the two stores.</returns>
    /// <exception cref="ArgumentException">The sizes differ.</exception>
    /// <exception cref="SizeLimitException">The sum has more entries than a matrix can store.</exception>
    public SparseMatrix<T> Add(SparseMatrix<T> other) => Combine(T.One, other, T.One);

    /// <summary>The difference to another matrix.</summary>
    /// <param name="other">A matrix of the same size.</param>
    /// <returns>The difference; it stores what either of the two stores.</returns>
    /// <inheritdoc cref="Add" path="/exception"/>
    public SparseMatrix<T> Subtract(SparseMatrix<T> other) => Combine(T.One, other, -T.One);

    /// <summary>The combination <c>factor A + otherFactor B</c>.</summary>
    /// <param name="factor">The factor of this matrix, A.</param>
    /// <param name="other">The other matrix, B, of the same size.</param>
    /// <param name="otherFactor">Its factor.</param>
    /// <returns>The combination; it stores what either of the two stores.</returns>
    /// <inheritdoc cref="Add" path="/exception"/>
    public SparseMatrix<T> Combine(T factor, SparseMatrix<T> other, T otherFactor)
    {
        ArgumentNullException.ThrowIfNull(other);
        SparseMatrix<T> sum = new(Pattern.Union(other.Pattern));
        sum.Accumulate(factor, this);
        sum.Accumulate(otherFactor, other);
        return sum;
    }

    /// <summary>The transpose.</summary>
    public SparseMatrix<T> Transpose() => Gather(Pattern.Transpose(out int[] source), source);

    /// <summary>The conjugate transpose; of a real matrix, the transpose.</summary>
    public SparseMatrix<T> ConjugateTranspose()
    {
        SparseMatrix<T> result = Transpose();
        if (Scalar.IsComplex<T>())
        {
            foreach (ref T value in result.Values)
            {
                value = Scalar.Conjugate(value);
            }
        }

        return result;
    }

    /// <summary>The matrix of chosen rows and columns.</summary>
    /// <param name="rows">The rows to keep, in the order they are to have; each at most once.</param>
    /// <param name="columns">The columns to keep, in the order they are to have; each at most once.</param>
    /// <exception cref="ArgumentException">A row or column lies outside the matrix or is chosen twice.</exception>
    public SparseMatrix<T> Select(ReadOnlySpan<int> rows, ReadOnlySpan<int> columns) =>
        Gather(Pattern.Select(rows, columns, out int[] source), source);

    /// <summary>The matrix with its rows and its columns brought into the same new order.</summary>
    /// <param name="order">For each new row and column the old one; every old one exactly once.</param>
    /// <exception cref="ArgumentException">The matrix is not square, or the order is not a permutation.</exception>
    public SparseMatrix<T> Permute(ReadOnlySpan<int> order)
    {
        if (RowCount != ColumnCount)
        {
            throw new ArgumentException(
                $"One order for both needs a square matrix, not {RowCount} x {ColumnCount}. Permute rows and columns apart.");
        }

        return Permute(order, order);
    }

    /// <summary>The matrix with its rows and its columns brought into new orders.</summary>
    /// <param name="rowOrder">For each new row the old one; every old one exactly once.</param>
    /// <param name="columnOrder">For each new column the old one; every old one exactly once.</param>
    /// <exception cref="ArgumentException">An order is not a permutation.</exception>
    public SparseMatrix<T> Permute(ReadOnlySpan<int> rowOrder, ReadOnlySpan<int> columnOrder)
    {
        if (rowOrder.Length != RowCount || columnOrder.Length != ColumnCount)
        {
            throw new ArgumentException(
                $"The orders name {rowOrder.Length} rows and {columnOrder.Length} columns; the matrix has {RowCount} "
                + $"and {ColumnCount}.");
        }

        return Select(rowOrder, columnOrder);
    }

    private SparseMatrix<T> Gather(SparsePattern pattern, int[] source)
    {
        T[] gathered = new T[source.Length];
        for (int i = 0; i < gathered.Length; i++)
        {
            gathered[i] = values[source[i]];
        }

        return new SparseMatrix<T>(pattern, gathered);
    }

    /// <summary>Adds a multiple of a matrix whose entries this one all stores.</summary>
    private void Accumulate(T factor, SparseMatrix<T> other)
    {
        for (int row = 0; row < RowCount; row++)
        {
            int place = Pattern.RowStarts[row];
            int source = other.Pattern.RowStarts[row];
            foreach (int column in other.Pattern.ColumnsOf(row))
            {
                while (Pattern.Columns[place] != column)
                {
                    place++;
                }

                values[place] += factor * other.values[source++];
            }
        }
    }
}
