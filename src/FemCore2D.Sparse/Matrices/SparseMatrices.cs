using System.Numerics;

namespace FemCore2D.Sparse;

/// <summary>Creation of matrices, and changes from real to complex numbers and back.</summary>
public static class SparseMatrices
{
    /// <summary>Creates a matrix from values at places in any order.</summary>
    /// <typeparam name="T">The number type: <see cref="double"/> or <see cref="Complex"/>.</typeparam>
    /// <param name="rowCount">The number of rows.</param>
    /// <param name="columnCount">The number of columns.</param>
    /// <param name="rows">The row of each value.</param>
    /// <param name="columns">The column of each value.</param>
    /// <param name="values">The values; those of the same place are added up in the order they are given in.</param>
    /// <exception cref="ArgumentOutOfRangeException">A count is negative.</exception>
    /// <exception cref="ArgumentException">The spans differ in length, or a place lies outside the matrix.</exception>
    /// <exception cref="SizeLimitException">A count is larger than a matrix can have.</exception>
    /// <exception cref="NotSupportedException"><typeparamref name="T"/> is neither <see cref="double"/> nor <see cref="Complex"/>.</exception>
    public static SparseMatrix<T> FromTriplets<T>(
        int rowCount, int columnCount, ReadOnlySpan<int> rows, ReadOnlySpan<int> columns, ReadOnlySpan<T> values)
        where T : unmanaged, INumberBase<T>
    {
        CheckTriplets(rows, columns, values);
        TripletSort.Result sort = TripletSort.Build(rowCount, columnCount, rows, columns);
        SparseMatrix<T> matrix = new(sort.Pattern);
        Span<T> sums = matrix.Values;
        for (int i = 0; i < values.Length; i++)
        {
            sums[sort.Position[i]] += values[i];
        }

        return matrix;
    }

    /// <summary>The identity matrix.</summary>
    /// <typeparam name="T">The number type: <see cref="double"/> or <see cref="Complex"/>.</typeparam>
    /// <param name="size">The number of rows and of columns.</param>
    /// <exception cref="ArgumentOutOfRangeException">The size is negative.</exception>
    /// <exception cref="NotSupportedException"><typeparamref name="T"/> is neither <see cref="double"/> nor <see cref="Complex"/>.</exception>
    public static SparseMatrix<T> Identity<T>(int size)
        where T : unmanaged, INumberBase<T>
    {
        SparseMatrix<T> identity = new(SparsePattern.Diagonal(size));
        identity.Values.Fill(T.One);
        return identity;
    }

    /// <summary>The same matrix in complex numbers. It shares the pattern.</summary>
    /// <param name="matrix">The real matrix.</param>
    public static SparseMatrix<Complex> ToComplex(this SparseMatrix<double> matrix)
    {
        ArgumentNullException.ThrowIfNull(matrix);
        return Convert<double, Complex>(matrix, value => value);
    }

    /// <summary>The real parts of the entries. The result shares the pattern.</summary>
    /// <param name="matrix">The complex matrix.</param>
    public static SparseMatrix<double> RealPart(this SparseMatrix<Complex> matrix)
    {
        ArgumentNullException.ThrowIfNull(matrix);
        return Convert(matrix, value => value.Real);
    }

    /// <summary>The imaginary parts of the entries. The result shares the pattern.</summary>
    /// <param name="matrix">The complex matrix.</param>
    public static SparseMatrix<double> ImaginaryPart(this SparseMatrix<Complex> matrix)
    {
        ArgumentNullException.ThrowIfNull(matrix);
        return Convert(matrix, value => value.Imaginary);
    }

    internal static void CheckTriplets<T>(ReadOnlySpan<int> rows, ReadOnlySpan<int> columns, ReadOnlySpan<T> values)
    {
        if (rows.Length != columns.Length || rows.Length != values.Length)
        {
            throw new ArgumentException(
                $"There are {rows.Length} rows, {columns.Length} columns and {values.Length} values.", nameof(values));
        }
    }

    private static SparseMatrix<TTo> Convert<TFrom, TTo>(SparseMatrix<TFrom> matrix, Func<TFrom, TTo> convert)
        where TFrom : unmanaged, INumberBase<TFrom>
        where TTo : unmanaged, INumberBase<TTo>
    {
        SparseMatrix<TTo> result = new(matrix.Pattern);
        for (int i = 0; i < result.Values.Length; i++)
        {
            result.Values[i] = convert(matrix.Values[i]);
        }

        return result;
    }
}
