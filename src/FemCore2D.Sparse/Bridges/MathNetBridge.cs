using System.Numerics;
using MathNet.Numerics.LinearAlgebra;
using MathNet.Numerics.LinearAlgebra.Storage;

namespace FemCore2D.Sparse;

/// <summary>Conversions from and to the matrices and vectors of MathNet.Numerics.</summary>
/// <remarks>All conversions copy, so that later changes on one side do not reach the other.</remarks>
public static class MathNetBridge
{
    /// <summary>The same matrix in the compressed rows of MathNet.Numerics.</summary>
    /// <typeparam name="T">The number type: <see cref="double"/> or <see cref="Complex"/>.</typeparam>
    /// <param name="matrix">The matrix.</param>
    public static Matrix<T> ToMathNetSparse<T>(this SparseMatrix<T> matrix)
        where T : unmanaged, INumberBase<T>
    {
        ArgumentNullException.ThrowIfNull(matrix);
        return Matrix<T>.Build.SparseFromCompressedSparseRowFormat(
            matrix.RowCount,
            matrix.ColumnCount,
            matrix.Pattern.EntryCount,
            matrix.Pattern.RowStarts.ToArray(),
            matrix.Pattern.Columns.ToArray(),
            matrix.Values.ToArray());
    }

    /// <summary>The same matrix in a dense array of MathNet.Numerics.</summary>
    /// <typeparam name="T">The number type: <see cref="double"/> or <see cref="Complex"/>.</typeparam>
    /// <param name="matrix">The matrix.</param>
    /// <exception cref="SizeLimitException">The dense array would have more numbers than an array can have.</exception>
    public static Matrix<T> ToMathNetDense<T>(this SparseMatrix<T> matrix)
        where T : unmanaged, INumberBase<T>
    {
        ArgumentNullException.ThrowIfNull(matrix);
        SizeLimitException.CheckEntries((long)matrix.RowCount * matrix.ColumnCount, "The dense matrix");
        Matrix<T> dense = Matrix<T>.Build.Dense(matrix.RowCount, matrix.ColumnCount);
        for (int row = 0; row < matrix.RowCount; row++)
        {
            int k = matrix.Pattern.RowStarts[row];
            foreach (int column in matrix.Pattern.ColumnsOf(row))
            {
                dense[row, column] = matrix.Values[k++];
            }
        }

        return dense;
    }

    /// <summary>The same matrix in compressed rows of ours.</summary>
    /// <typeparam name="T">The number type: <see cref="double"/> or <see cref="Complex"/>.</typeparam>
    /// <param name="matrix">A matrix of any storage. Sparse storage keeps its entries, zero or not; other storage gives those that are not zero.</param>
    /// <exception cref="NotSupportedException"><typeparamref name="T"/> is neither <see cref="double"/> nor <see cref="Complex"/>.</exception>
    public static SparseMatrix<T> ToSparseMatrix<T>(this Matrix<T> matrix)
        where T : unmanaged, INumberBase<T>
    {
        ArgumentNullException.ThrowIfNull(matrix);
        List<int> rows = [];
        List<int> columns = [];
        List<T> values = [];
        if (matrix.Storage is SparseCompressedRowMatrixStorage<T> storage)
        {
            for (int row = 0; row < storage.RowCount; row++)
            {
                for (int k = storage.RowPointers[row]; k < storage.RowPointers[row + 1]; k++)
                {
                    rows.Add(row);
                    columns.Add(storage.ColumnIndices[k]);
                    values.Add(storage.Values[k]);
                }
            }
        }
        else
        {
            foreach ((int row, int column, T value) in matrix.EnumerateIndexed(Zeros.AllowSkip))
            {
                if (!T.IsZero(value))
                {
                    rows.Add(row);
                    columns.Add(column);
                    values.Add(value);
                }
            }
        }

        return SparseMatrices.FromTriplets<T>(
            matrix.RowCount, matrix.ColumnCount, rows.ToArray(), columns.ToArray(), values.ToArray());
    }

    /// <summary>The same numbers as a dense vector of MathNet.Numerics.</summary>
    /// <typeparam name="T">The number type: <see cref="double"/> or <see cref="Complex"/>.</typeparam>
    /// <param name="numbers">The numbers, at least one, as MathNet.Numerics asks.</param>
    public static MathNet.Numerics.LinearAlgebra.Vector<T> ToMathNetVector<T>(this ReadOnlySpan<T> numbers)
        where T : unmanaged, INumberBase<T> =>
        MathNet.Numerics.LinearAlgebra.Vector<T>.Build.Dense(numbers.ToArray());

    /// <summary>The product of a matrix with a vector of MathNet.Numerics.</summary>
    /// <typeparam name="T">The number type: <see cref="double"/> or <see cref="Complex"/>.</typeparam>
    /// <param name="matrix">The matrix.</param>
    /// <param name="vector">A vector as long as the matrix has columns.</param>
    /// <exception cref="ArgumentException">The vector has the wrong length.</exception>
    public static MathNet.Numerics.LinearAlgebra.Vector<T> Multiply<T>(
        this SparseMatrix<T> matrix, MathNet.Numerics.LinearAlgebra.Vector<T> vector)
        where T : unmanaged, INumberBase<T>
    {
        ArgumentNullException.ThrowIfNull(matrix);
        ArgumentNullException.ThrowIfNull(vector);
        return MathNet.Numerics.LinearAlgebra.Vector<T>.Build.Dense(matrix.Multiply(vector.AsArray() ?? vector.ToArray()));
    }
}
