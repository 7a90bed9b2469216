using System.Numerics;
using FsCheck.Xunit;

namespace FemCore2D.Sparse.Tests;

[Properties(Arbitrary = [typeof(Samples)])]
public class ProductTests
{
    [Property]
    public void ProductsWithVectorsEqualTheDenseOnes(Triplets t)
    {
        Check<double>();
        Check<Complex>();

        void Check<T>()
            where T : unmanaged, INumberBase<T>
        {
            SparseMatrix<T> a = t.Sparse<T>();
            T[] x = Samples.Vector<T>(t.ColumnCount, 3);
            T[] u = Samples.Vector<T>(t.RowCount, 4);
            T[] y = new T[t.ColumnCount];
            Array.Fill(y, Scalar.Create<T>(double.NaN));
            Assert.Equal((t.Dense<T>() * MathNet.Numerics.LinearAlgebra.Vector<T>.Build.Dense(x)).ToArray(), a.Multiply(x));
            a.MultiplyTranspose(u, y);
            Assert.Equal(a.Transpose().Multiply(u), y);
            a.MultiplyConjugateTranspose(u, y);
            Assert.Equal(a.ConjugateTranspose().Multiply(u), y);
        }
    }

    [Theory]
    [InlineData(1)]
    [InlineData(2)]
    [InlineData(7)]
    public void TheBitsDoNotDependOnTheThreads(int threads)
    {
        Check<double>();
        Check<Complex>();

        void Check<T>()
            where T : unmanaged, INumberBase<T>
        {
            SparseMatrix<T> a = Samples.Large<T>(20_000, 3000, 200_000, 11);
            Assert.True(a.Pattern.RowBlocks.Length > 4);
            T[] x = Random<T>(3000, 5);
            T[] y = a.Multiply(x, threads);
            Assert.Equal(a.Multiply(x, 1), y);
            int[] all = Enumerable.Range(0, a.ColumnCount).ToArray();
            for (int row = 0; row < a.RowCount; row += 101)
            {
                Assert.Equal(a.Select([row], all).Multiply(x)[0], y[row]);
            }
        }
    }

    [Theory]
    [InlineData(0)]
    [InlineData(1)]
    [InlineData(3)]
    [InlineData(4)]
    [InlineData(6)]
    [InlineData(9)]
    public void SeveralVectorsGiveTheBitsOfEachAlone(int count)
    {
        Check<double>();
        Check<Complex>();

        void Check<T>()
            where T : unmanaged, INumberBase<T>
        {
            SparseMatrix<T> a = Samples.Large<T>(9000, 700, 90_000, 2);
            T[] x = Random<T>(700 * count, 6);
            T[] y = new T[9000 * count];
            a.Multiply(x, y, count, threads: 3);
            for (int v = 0; v < count; v++)
            {
                Assert.Equal(a.Multiply(x.AsSpan(700 * v, 700)), y[(9000 * v)..(9000 * (v + 1))]);
            }
        }
    }

    [Fact]
    public void WrongVectorsAreRefused()
    {
        SparseMatrix<double> a = SparseMatrices.Identity<double>(3);
        double[] memory = new double[8];
        Assert.Throws<ArgumentException>(() => a.Multiply(memory.AsSpan(0, 2), memory.AsSpan(5, 3)));
        Assert.Throws<ArgumentException>(() => a.Multiply(memory.AsSpan(0, 3), memory.AsSpan(5, 2)));
        Assert.Throws<ArgumentException>(() => a.Multiply(memory.AsSpan(0, 3), memory.AsSpan(2, 3)));
        Assert.Throws<ArgumentException>(() => a.MultiplyTranspose(memory.AsSpan(0, 3), memory.AsSpan(2, 3)));
        Assert.Throws<ArgumentException>(() => a.MultiplyConjugateTranspose(memory.AsSpan(0, 2), memory.AsSpan(3, 3)));
        Assert.Throws<ArgumentOutOfRangeException>(() => a.Multiply(memory.AsSpan(0, 3), memory.AsSpan(5, 3), -2));
    }

    private static T[] Random<T>(int length, int seed)
        where T : unmanaged, INumberBase<T>
    {
        Random random = new(seed);
        return Enumerable.Range(0, length)
            .Select(_ => Scalar.Create<T>(random.NextDouble() - 0.5, random.NextDouble() - 0.5)).ToArray();
    }
}
