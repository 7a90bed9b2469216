using System.Numerics;

namespace FemCore2D.Sparse;

public sealed partial class SparseMatrix<T>
    where T : unmanaged, INumberBase<T>
{
    /// <summary>The product with a vector, <c>y = A x</c>.</summary>
    /// <param name="x">The vector, <see cref="ColumnCount"/> long.</param>
    /// <param name="threads">The largest number of threads; 0 for one a processor. The result is the same for any.</param>
    /// <exception cref="ArgumentException">The vector has the wrong length.</exception>
    public T[] Multiply(ReadOnlySpan<T> x, int threads = 0)
    {
        T[] y = new T[RowCount];
        Multiply(x, y, threads);
        return y;
    }

    /// <summary>The product with a vector, <c>y = A x</c>, into memory of the caller.</summary>
    /// <param name="x">The vector, <see cref="ColumnCount"/> long.</param>
    /// <param name="y">Receives the product, <see cref="RowCount"/> long; may not share memory with <paramref name="x"/>.</param>
    /// <param name="threads">The largest number of threads; 0 for one a processor. The result is the same for any.</param>
    /// <exception cref="ArgumentException">A vector has the wrong length, or they share memory.</exception>
    public void Multiply(ReadOnlySpan<T> x, Span<T> y, int threads = 0) => Multiply(x, y, 1, threads);

    /// <summary>The product with several vectors, each contiguous and one after the other.</summary>
    /// <param name="x">The vectors, <paramref name="vectorCount"/> times <see cref="ColumnCount"/> long.</param>
    /// <param name="y">
    /// Receives the products, <paramref name="vectorCount"/> times <see cref="RowCount"/> long; may not share memory
    /// with <paramref name="x"/>.
    /// </param>
    /// <param name="vectorCount">The number of vectors.</param>
    /// <param name="threads">The largest number of threads; 0 for one a processor. The result is the same for any.</param>
    /// <exception cref="ArgumentException">A span has the wrong length, or they share memory.</exception>
    /// <remarks>Each product has the same bits as a product with that vector alone; the matrix is read once for four.</remarks>
    public unsafe void Multiply(ReadOnlySpan<T> x, Span<T> y, int vectorCount, int threads)
    {
        ArgumentOutOfRangeException.ThrowIfNegative(vectorCount);
        CheckVectors(x, y, ColumnCount, RowCount, vectorCount);
        fixed (T* from = x)
        fixed (T* to = y)
        {
            RowProduct<T> product = new(this, from, to, vectorCount);
            int blocks = Pattern.RowBlocks.Length - 1;
            int count = ThreadTeam.CountOf(threads);
            if (blocks == 1 || count == 1)
            {
                product.RunRows(0, RowCount);
            }
            else
            {
                new ThreadTeam(count).Run(product, blocks);
            }
        }
    }

    /// <summary>The product of the transpose with a vector, <c>y = A^T x</c>.</summary>
    /// <param name="x">The vector, <see cref="RowCount"/> long.</param>
    /// <param name="y">Receives the product, <see cref="ColumnCount"/> long; may not share memory with <paramref name="x"/>.</param>
    /// <exception cref="ArgumentException">A vector has the wrong length, or they share memory.</exception>
    /// <remarks>One thread scatters the rows. Where it is needed often, multiply with <see cref="Transpose"/>.</remarks>
    public void MultiplyTranspose(ReadOnlySpan<T> x, Span<T> y)
    {
        CheckVectors(x, y, RowCount, ColumnCount, 1);
        ReadOnlySpan<int> starts = Pattern.RowStarts;
        ReadOnlySpan<int> columns = Pattern.Columns;
        y.Clear();
        for (int row = 0; row < x.Length; row++)
        {
            T factor = x[row];
            for (int k = starts[row]; k < starts[row + 1]; k++)
            {
                y[columns[k]] += values[k] * factor;
            }
        }
    }

    /// <summary>The product of the conjugate transpose with a vector, <c>y = A^H x</c>.</summary>
    /// <inheritdoc cref="MultiplyTranspose"/>
    public void MultiplyConjugateTranspose(ReadOnlySpan<T> x, Span<T> y)
    {
        if (!Scalar.IsComplex<T>())
        {
            MultiplyTranspose(x, y);
            return;
        }

        CheckVectors(x, y, RowCount, ColumnCount, 1);
        ReadOnlySpan<int> starts = Pattern.RowStarts;
        ReadOnlySpan<int> columns = Pattern.Columns;
        y.Clear();
        for (int row = 0; row < x.Length; row++)
        {
            T factor = x[row];
            for (int k = starts[row]; k < starts[row + 1]; k++)
            {
                y[columns[k]] += Scalar.Conjugate(values[k]) * factor;
            }
        }
    }

    /// <summary>The product with a matrix.</summary>
    /// <param name="right">A matrix with as many rows as this one has columns.</param>
    /// <returns>The product; it stores each place that any term touches, zero or not.</returns>
    /// <exception cref="ArgumentException">The sizes do not fit.</exception>
    /// <exception cref="SizeLimitException">The product has more entries than a matrix can store.</exception>
    /// <remarks>Row by row with a dense accumulator (Gustavson 1978).</remarks>
    public SparseMatrix<T> Multiply(SparseMatrix<T> right)
    {
        ArgumentNullException.ThrowIfNull(right);
        return MatrixProduct.Multiply(this, right);
    }

    private static void CheckVectors(ReadOnlySpan<T> x, ReadOnlySpan<T> y, int xLength, int yLength, int count)
    {
        if (x.Length != (long)xLength * count)
        {
            throw new ArgumentException($"The span must hold {count} x {xLength} numbers, not {x.Length}.", nameof(x));
        }

        if (y.Length != (long)yLength * count)
        {
            throw new ArgumentException($"The span must hold {count} x {yLength} numbers, not {y.Length}.", nameof(y));
        }

        if (x.Overlaps(y))
        {
            throw new ArgumentException("The product may not share memory with the vector.", nameof(y));
        }
    }
}
