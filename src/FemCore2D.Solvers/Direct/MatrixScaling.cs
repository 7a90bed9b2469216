using System.Numerics;
using FemCore2D.Sparse;

namespace FemCore2D.Solvers;

/// <summary>
/// Factors for the rows and columns of a matrix that bring its largest entries close to one, so that pivots can be
/// judged by their size. The factors are powers of two: scaling rounds nothing.
/// </summary>
/// <remarks>D. Ruiz (2001), <em>A scaling algorithm to equilibrate both rows and columns norms in matrices</em>.</remarks>
internal sealed class MatrixScaling<T>
    where T : unmanaged, INumberBase<T>
{
    private const int Sweeps = 4;
    private readonly double[] rowLargest;
    private readonly double[] columnLargest;

    /// <summary>Allocates the factors.</summary>
    public MatrixScaling(SparsePattern pattern, bool symmetric)
    {
        Rows = new double[pattern.RowCount];
        Columns = symmetric ? Rows : new double[pattern.RowCount];
        rowLargest = new double[pattern.RowCount];
        columnLargest = symmetric ? rowLargest : new double[pattern.RowCount];
    }

    /// <summary>The factors of the rows.</summary>
    public double[] Rows { get; }

    /// <summary>The factors of the columns; the same array for symmetric matrices.</summary>
    public double[] Columns { get; }

    /// <summary>Finds the factors, and writes the scaled values.</summary>
    public void Run(SparseMatrix<T> matrix, Span<T> scaled, CancellationToken cancellationToken)
    {
        ReadOnlySpan<int> starts = matrix.Pattern.RowStarts;
        ReadOnlySpan<int> columns = matrix.Pattern.Columns;
        ReadOnlySpan<T> values = matrix.Values;
        Rows.AsSpan().Fill(1.0);
        Columns.AsSpan().Fill(1.0);
        for (int sweep = 0; sweep < Sweeps; sweep++)
        {
            cancellationToken.ThrowIfCancellationRequested();
            rowLargest.AsSpan().Clear();
            columnLargest.AsSpan().Clear();
            for (int i = 0; i < Rows.Length; i++)
            {
                for (int k = starts[i]; k < starts[i + 1]; k++)
                {
                    int j = columns[k];
                    double size = Rows[i] * Scalar.Magnitude(values[k]) * Columns[j];
                    rowLargest[i] = Math.Max(rowLargest[i], size);
                    columnLargest[j] = Math.Max(columnLargest[j], size);
                }
            }

            for (int i = 0; i < Rows.Length; i++)
                Rows[i] *= InverseRoot(rowLargest[i]);
            if (Columns != Rows)
            {
                for (int j = 0; j < Columns.Length; j++)
                    Columns[j] *= InverseRoot(columnLargest[j]);
            }
        }

        for (int i = 0; i < Rows.Length; i++)
        {
            for (int k = starts[i]; k < starts[i + 1]; k++)
                scaled[k] = Scalar.Scale(values[k], Rows[i] * Columns[columns[k]]);
        }
    }

    private static double InverseRoot(double size) =>
        size > 0.0 ? Math.ScaleB(1.0, -(int)Math.Round(0.5 * Math.Log2(size))) : 1.0;
}
