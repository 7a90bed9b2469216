using System.Numerics;
using FemCore2D.Sparse;

namespace FemCore2D.Solvers;

/// <summary>Checks that all solvers make of what they are given.</summary>
internal static class MatrixChecks
{
    /// <summary>The difference between mirrored entries, relative to the largest entry, that passes for rounding.</summary>
    private const double MirrorTolerance = 1e-10;

    public static void RequireSquare<T>(SparseMatrix<T> matrix)
        where T : unmanaged, INumberBase<T>
    {
        ArgumentNullException.ThrowIfNull(matrix);
        if (matrix.RowCount != matrix.ColumnCount)
        {
            throw new ArgumentException(
                $"The matrix must be square, not {matrix.RowCount} x {matrix.ColumnCount}.", nameof(matrix));
        }
    }

    public static void RequireHermitian<T>(SparseMatrix<T> matrix)
        where T : unmanaged, INumberBase<T>
    {
        RequireSquare(matrix);
        RequireFinite(matrix);
        if (matrix.FindUnmirrored(MirrorTolerance, conjugate: true) is (int row, int column))
        {
            string property = Scalar.IsComplex<T>() ? "Hermitian" : "symmetric";
            throw new UnsuitableMatrixException(
                $"The matrix is not {property}: entry ({row}, {column}) is {matrix[row, column]}, entry "
                + $"({column}, {row}) is {matrix[column, row]}. Use a solver for matrices of its class.");
        }
    }

    public static void RequireFinite<T>(SparseMatrix<T> matrix)
        where T : unmanaged, INumberBase<T>
    {
        Span<T> values = matrix.Values;
        for (int row = 0; row < matrix.RowCount; row++)
        {
            for (int k = matrix.Pattern.RowStarts[row]; k < matrix.Pattern.RowStarts[row + 1]; k++)
            {
                if (!T.IsFinite(values[k]))
                {
                    throw new UnsuitableMatrixException(
                        $"Entry ({row}, {matrix.Pattern.Columns[k]}) is {values[k]}. Check what acts on this unknown.");
                }
            }
        }
    }

    public static void RequireLengths<T>(ReadOnlySpan<T> input, ReadOnlySpan<T> output, int size)
    {
        if (input.Length != size || output.Length != size)
        {
            throw new ArgumentException(
                $"Both vectors must be {size} long; they are {input.Length} and {output.Length}.");
        }
    }
}
