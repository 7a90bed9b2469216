using System.Numerics;
using System.Runtime.CompilerServices;
using System.Runtime.Intrinsics;

namespace FemCore2D.Sparse;

/// <summary>
/// The product of a matrix with vectors, row by row. A row's sum runs over its entries in order, whatever the block it
/// falls into and however many vectors are multiplied, so its bits are always the same.
/// </summary>
/// <remarks>
/// The spans of the caller are pinned by the caller for the life of this object. Indices need no checks: a pattern is
/// valid from its creation on.
/// </remarks>
internal sealed unsafe class RowProduct<T>(SparseMatrix<T> matrix, T* x, T* y, int vectorCount) : IBlockWork
    where T : unmanaged, INumberBase<T>
{
    private readonly int[] cuts = matrix.Pattern.RowBlocks;

    /// <inheritdoc/>
    public void Run(int block) => RunRows(cuts[block], cuts[block + 1]);

    /// <summary>Multiplies some rows with all vectors.</summary>
    public void RunRows(int first, int end)
    {
        nint m = matrix.RowCount;
        nint n = matrix.ColumnCount;
        int vector = 0;
        for (; vector + 4 <= vectorCount; vector += 4)
        {
            FourVectors(first, end, x + (vector * n), n, y + (vector * m), m);
        }

        for (; vector < vectorCount; vector++)
        {
            fixed (int* starts = matrix.Pattern.RowStarts, columns = matrix.Pattern.Columns)
            fixed (T* values = matrix.Values)
            {
                OneVector(first, end, starts, columns, values, x + (vector * n), y + (vector * m));
            }
        }
    }

    /// <summary>Multiplies some rows with one vector.</summary>
    public static void OneVector(int first, int end, int* starts, int* columns, T* values, T* x, T* y)
    {
        if (typeof(T) == typeof(Complex))
        {
            ComplexVector(first, end, starts, columns, (double*)values, (double*)x, (double*)y);
            return;
        }

        int k = starts[first];
        for (int row = first; row < end; row++)
        {
            T sum = T.Zero;
            int stop = starts[row + 1];
            for (; k < stop; k++)
            {
                sum = T.MultiplyAddEstimate(values[k], x[columns[k]], sum);
            }

            y[row] = sum;
        }
    }

    /// <summary>
    /// Complex rows: one sum of the products with the real parts and one with the imaginary parts, joined after the
    /// row, which leaves two fused operations an entry.
    /// </summary>
    private static void ComplexVector(
        int first, int end, int* starts, int* columns, double* values, double* x, double* y)
    {
        int k = starts[first];
        for (int row = first; row < end; row++)
        {
            Vector128<double> real = default;
            Vector128<double> imaginary = default;
            int stop = starts[row + 1];
            for (; k < stop; k++)
            {
                Vector128<double> factor = Vector128.Load(x + (2 * (nint)columns[k]));
                real = Vector128.MultiplyAddEstimate(Vector128.Create(values[2 * (nint)k]), factor, real);
                imaginary = Vector128.MultiplyAddEstimate(
                    Vector128.Create(values[(2 * (nint)k) + 1]), factor, imaginary);
            }

            Vector128.Store(Join(real, imaginary), y + (2 * (nint)row));
        }
    }

    /// <summary>From sums of Re(a) b and of Im(a) b, the sum of a b.</summary>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    private static Vector128<double> Join(Vector128<double> real, Vector128<double> imaginary) =>
        Vector128.Create(real[0] - imaginary[1], real[1] + imaginary[0]);

    private void FourVectors(int first, int end, T* from, nint n, T* to, nint m)
    {
        fixed (int* starts = matrix.Pattern.RowStarts, columns = matrix.Pattern.Columns)
        fixed (T* values = matrix.Values)
        {
            if (typeof(T) == typeof(Complex))
            {
                // A tile of rows stays in the cache while the four vectors pass over it.
                const int Tile = 256;
                for (int row = first; row < end; row += Tile)
                {
                    int stop = Math.Min(row + Tile, end);
                    for (int v = 0; v < 4; v++)
                    {
                        OneVector(row, stop, starts, columns, values, from + (v * n), to + (v * m));
                    }
                }

                return;
            }

            for (int row = first; row < end; row++)
            {
                T a = T.Zero;
                T b = T.Zero;
                T c = T.Zero;
                T d = T.Zero;
                for (int k = starts[row]; k < starts[row + 1]; k++)
                {
                    T value = values[k];
                    T* x0 = from + columns[k];
                    a = T.MultiplyAddEstimate(value, x0[0], a);
                    b = T.MultiplyAddEstimate(value, x0[n], b);
                    c = T.MultiplyAddEstimate(value, x0[2 * n], c);
                    d = T.MultiplyAddEstimate(value, x0[3 * n], d);
                }

                to[row] = a;
                to[row + m] = b;
                to[row + (2 * m)] = c;
                to[row + (3 * m)] = d;
            }
        }
    }
}
