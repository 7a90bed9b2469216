using System.Numerics;
using FsCheck.Xunit;
using MathNet.Numerics.LinearAlgebra;

namespace FemCore2D.Sparse.Tests;

[Properties(Arbitrary = [typeof(Samples)])]
public class AlgebraTests
{
    [Property]
    public void TripletsOfOnePlaceAreAddedUp(Triplets t)
    {
        Check<double>();
        Check<Complex>();

        void Check<T>()
            where T : unmanaged, INumberBase<T>
        {
            SparseMatrix<T> matrix = t.Sparse<T>();
            AssertEqual(t.Dense<T>(), matrix);
            for (int row = 0; row < t.RowCount; row++)
            {
                for (int column = 0; column < t.ColumnCount; column++)
                {
                    Assert.Equal(t.Dense<T>()[row, column], matrix[row, column]);
                }
            }
        }
    }

    [Fact]
    public void TripletsAreAddedUpInTheOrderGiven()
    {
        double[] values = [1e16, 1, 1, -1e16, 3];
        SparseMatrix<double> matrix = SparseMatrices.FromTriplets<double>(1, 1, new int[5], new int[5], values);
        Assert.Equal((((1e16 + 1) + 1) - 1e16) + 3, matrix[0, 0]);

        Array.Reverse(values);
        matrix.Refill(new int[5], new int[5], values);
        Assert.Equal((((3 - 1e16) + 1) + 1) + 1e16, matrix[0, 0]);
    }

    [Property]
    public void RefillReplacesTheValuesBitByBit(Triplets t)
    {
        SparseMatrix<Complex> matrix = t.Sparse<Complex>();
        Complex[] values = Samples.Vector<Complex>(t.Rows.Length, 5);
        matrix.Refill(t.Rows, t.Columns, values);
        SparseMatrix<Complex> fresh =
            SparseMatrices.FromTriplets<Complex>(t.RowCount, t.ColumnCount, t.Rows, t.Columns, values);
        Assert.Equal(fresh.Values.ToArray(), matrix.Values.ToArray());
    }

    [Property]
    public void SumsAndMultiplesEqualTheDenseOnes(SameSize pair)
    {
        Check<double>();
        Check<Complex>();

        void Check<T>()
            where T : unmanaged, INumberBase<T>
        {
            (SparseMatrix<T> a, SparseMatrix<T> b) = (pair.First.Sparse<T>(), pair.Second.Sparse<T>());
            (Matrix<T> x, Matrix<T> y) = (pair.First.Dense<T>(), pair.Second.Dense<T>());
            T f = Scalar.Create<T>(-1.5, 2);
            AssertEqual(x + y, a.Add(b));
            AssertEqual(x - y, a.Subtract(b));
            AssertEqual(x * f, a.Multiply(f));
            AssertEqual((x * f) + (y * (T.One + f)), a.Combine(f, b, T.One + f));
            Assert.True(a.Add(b).Pattern.HasSameEntriesAs(b.Add(a).Pattern));
        }
    }

    [Property]
    public void ProductsOfMatricesEqualTheDenseOnes(Chain chain)
    {
        AssertEqual(
            chain.First.Dense<double>() * chain.Second.Dense<double>(),
            chain.First.Sparse<double>().Multiply(chain.Second.Sparse<double>()));
        AssertEqual(
            chain.First.Dense<Complex>() * chain.Second.Dense<Complex>(),
            chain.First.Sparse<Complex>().Multiply(chain.Second.Sparse<Complex>()));
    }

    [Property]
    public void TransposesEqualTheDenseOnes(Triplets t)
    {
        AssertEqual(t.Dense<double>().Transpose(), t.Sparse<double>().Transpose());
        AssertEqual(t.Dense<double>().Transpose(), t.Sparse<double>().ConjugateTranspose());
        AssertEqual(t.Dense<Complex>().Transpose(), t.Sparse<Complex>().Transpose());
        AssertEqual(t.Dense<Complex>().ConjugateTranspose(), t.Sparse<Complex>().ConjugateTranspose());
    }

    [Property]
    public void SelectionsEqualTheDenseOnes(Triplets t, int seed)
    {
        Random random = new(seed);
        int[] rows = Shuffle(t.RowCount)[random.Next(t.RowCount)..];
        int[] columns = Shuffle(t.ColumnCount)[random.Next(t.ColumnCount)..];
        SparseMatrix<Complex> part = t.Sparse<Complex>().Select(rows, columns);
        Matrix<Complex> dense = t.Dense<Complex>();
        AssertEqual(Matrix<Complex>.Build.Dense(rows.Length, columns.Length, (i, j) => dense[rows[i], columns[j]]), part);

        int[] allRows = Shuffle(t.RowCount);
        int[] allColumns = Shuffle(t.ColumnCount);
        SparseMatrix<Complex> permuted = t.Sparse<Complex>().Permute(allRows, allColumns);
        AssertEqual(
            Matrix<Complex>.Build.Dense(t.RowCount, t.ColumnCount, (i, j) => dense[allRows[i], allColumns[j]]), permuted);

        int[] Shuffle(int count)
        {
            int[] items = Enumerable.Range(0, count).ToArray();
            random.Shuffle(items);
            return items;
        }
    }

    [Property]
    public void DiagonalAndPartsEqualTheDenseOnes(Triplets t)
    {
        Assert.Equal(t.Dense<Complex>().Diagonal().ToArray(), t.Sparse<Complex>().Diagonal());
        AssertEqual(t.Dense<double>().ToComplex(), t.Sparse<double>().ToComplex());
        AssertEqual(t.Dense<Complex>().Real(), t.Sparse<Complex>().RealPart());
        AssertEqual(t.Dense<Complex>().Imaginary(), t.Sparse<Complex>().ImaginaryPart());
    }

    [Fact]
    public void WrongSizesAreRefused()
    {
        SparseMatrix<double> a = new(SparsePattern.FromPlaces(2, 3, [], []));
        SparseMatrix<double> b = new(SparsePattern.FromPlaces(3, 2, [], []));
        Assert.Throws<ArgumentException>(() => a.Add(b));
        Assert.Throws<ArgumentException>(() => a.Multiply(a));
        Assert.Throws<ArgumentException>(() => a.Permute([0, 1]));
        Assert.Throws<ArgumentException>(() => a.Permute([0, 1], [0, 1]));
        Assert.Throws<ArgumentException>(() => a.Entry(0, 0) = 1);
        Assert.Throws<ArgumentOutOfRangeException>(() => a[2, 0]);
        Assert.Throws<ArgumentException>(() => new SparseMatrix<double>(SparsePattern.Diagonal(2), [1.0]));
        Assert.Throws<ArgumentException>(() => SparseMatrices.FromTriplets<double>(2, 2, [0], [0], []));
        Assert.Throws<NotSupportedException>(() => new SparseMatrix<float>(SparsePattern.Diagonal(2)));
        Assert.Throws<ArgumentException>(() => SparseMatrices.Identity<double>(2).Refill([0], [1], [1.0]));
    }

    [Fact]
    public void AProductBeyondTheLimitIsRefusedBeforeItIsStored()
    {
        // A column times a row of 60 000 entries each: 3.6e9 entries.
        const int Size = 60_000;
        int[] all = Enumerable.Range(0, Size).ToArray();
        SparseMatrix<double> column = new(SparsePattern.FromPlaces(Size, 1, all, new int[Size]));
        SparseMatrix<double> row = new(SparsePattern.FromPlaces(1, Size, new int[Size], all));
        long before = GC.GetAllocatedBytesForCurrentThread();
        Assert.Throws<SizeLimitException>(() => column.Multiply(row));
        Assert.True(GC.GetAllocatedBytesForCurrentThread() - before < 1 << 20);
    }

    internal static void AssertEqual<T>(Matrix<T> expected, SparseMatrix<T> actual)
        where T : unmanaged, INumberBase<T>
    {
        Assert.Equal((expected.RowCount, expected.ColumnCount), (actual.RowCount, actual.ColumnCount));
        _ = SparsePattern.FromCompressedRows(actual.ColumnCount, actual.Pattern.RowStarts, actual.Pattern.Columns);
        Assert.Equal(expected.ToColumnMajorArray(), actual.ToMathNetDense().ToColumnMajorArray());
    }
}
