using System.Numerics;
using FsCheck.Xunit;

namespace FemCore2D.Sparse.Tests;

[Properties(Arbitrary = [typeof(Samples)])]
public class MeasureTests
{
    [Property]
    public void NormsEqualTheDenseOnes(Triplets t)
    {
        Check(t.Dense<double>(), t.Sparse<double>());
        Check(t.Dense<Complex>(), t.Sparse<Complex>());

        static void Check<T>(MathNet.Numerics.LinearAlgebra.Matrix<T> dense, SparseMatrix<T> sparse)
            where T : unmanaged, INumberBase<T>
        {
            AssertClose(dense.L1Norm(), sparse.OneNorm());
            AssertClose(dense.InfinityNorm(), sparse.InfinityNorm());
            AssertClose(dense.FrobeniusNorm(), sparse.FrobeniusNorm());
            AssertClose(dense.Enumerate().Max(Scalar.Magnitude), sparse.LargestMagnitude());
        }
    }

    [Fact]
    public void TheFrobeniusNormNeitherOverflowsNorUnderflows()
    {
        SparsePattern pattern = SparsePattern.Diagonal(4);
        AssertClose(2e300, new SparseMatrix<double>(pattern, [1e300, 1e300, 1e300, 1e300]).FrobeniusNorm());
        AssertClose(2e-300, new SparseMatrix<double>(pattern, [1e-300, 1e-300, 1e-300, 1e-300]).FrobeniusNorm());
        Assert.Equal(0, new SparseMatrix<double>(pattern).FrobeniusNorm());
        Assert.True(double.IsNaN(new SparseMatrix<double>(pattern, [1, double.NaN, 2, 3]).LargestMagnitude()));
    }

    [Property(MaxTest = 300)]
    public void SymmetryIsRecognized(Triplets t)
    {
        SparseMatrix<Complex> a = t.Sparse<Complex>();
        bool isSquare = a.RowCount == a.ColumnCount;
        Assert.Equal(isSquare && a.ToMathNetDense().IsSymmetric(), a.IsSymmetric());
        Assert.Equal(isSquare && a.ToMathNetDense().IsHermitian(), a.IsHermitian());
        if (isSquare)
        {
            Assert.True(a.Add(a.Transpose()).IsSymmetric());
            Assert.True(a.Add(a.ConjugateTranspose()).IsHermitian());
            Assert.True(a.Multiply(a.ConjugateTranspose()).IsHermitian());
        }
    }

    [Property]
    public void OneDisturbedEntryIsNoticedDownToTheTolerance(Triplets t)
    {
        int size = Math.Max(t.RowCount, t.ColumnCount);
        SparseMatrix<double> half = SparseMatrices.FromTriplets<double>(
            size, size, t.Rows, t.Columns, t.Quarters.Select(q => 20.0 + q.Re).ToArray());
        SparseMatrix<double> whole = half.Add(half.Transpose());
        double largest = whole.LargestMagnitude();
        for (int row = 0; row < size; row++)
        {
            foreach (int column in whole.Pattern.ColumnsOf(row))
            {
                if (column != row)
                {
                    SparseMatrix<double> disturbed = whole.Copy();
                    disturbed.Entry(row, column) += 1e-6 * largest;
                    Assert.False(disturbed.IsSymmetric());
                    Assert.False(disturbed.IsSymmetric(0.9e-6));
                    Assert.True(disturbed.IsSymmetric(1.1e-6));
                }
            }
        }
    }

    [Fact]
    public void AStoredZeroNeedsNoMirror()
    {
        Assert.True(SparseMatrices.FromTriplets<double>(3, 3, [0, 2], [1, 0], [0.0, 0.0]).IsSymmetric());
        Assert.False(SparseMatrices.FromTriplets<double>(3, 3, [0, 2], [1, 0], [0.0, 1.0]).IsSymmetric());
        Assert.Throws<ArgumentOutOfRangeException>(() => SparseMatrices.Identity<double>(2).IsSymmetric(double.NaN));
    }

    private static void AssertClose(double expected, double actual) =>
        Assert.True(Math.Abs(expected - actual) <= 1e-14 * expected, $"{expected} and {actual}");
}
