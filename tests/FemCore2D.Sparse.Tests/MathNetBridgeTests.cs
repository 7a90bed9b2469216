using System.Numerics;
using FsCheck.Xunit;
using MathNet.Numerics.LinearAlgebra;
using MathNet.Numerics.LinearAlgebra.Storage;

namespace FemCore2D.Sparse.Tests;

[Properties(Arbitrary = [typeof(Samples)])]
public class MathNetBridgeTests
{
    [Property]
    public void MatricesComeBackAsTheyWere(Triplets t)
    {
        Check<double>();
        Check<Complex>();

        void Check<T>()
            where T : unmanaged, INumberBase<T>
        {
            SparseMatrix<T> ours = t.Sparse<T>();
            Matrix<T> theirs = ours.ToMathNetSparse();
            Assert.IsType<SparseCompressedRowMatrixStorage<T>>(theirs.Storage);
            Assert.Equal(t.Dense<T>().ToColumnMajorArray(), theirs.ToColumnMajorArray());
            SparseMatrix<T> back = theirs.ToSparseMatrix();
            Assert.True(ours.Pattern.HasSameEntriesAs(back.Pattern));
            Assert.Equal(ours.Values.ToArray(), back.Values.ToArray());

            SparseMatrix<T> fromDense = t.Dense<T>().ToSparseMatrix();
            Assert.Equal(t.Dense<T>().ToColumnMajorArray(), fromDense.ToMathNetDense().ToColumnMajorArray());
            Assert.DoesNotContain(T.Zero, fromDense.Values.ToArray());
        }
    }

    [Fact]
    public void ConversionsCopy()
    {
        SparseMatrix<double> ours = SparseMatrices.Identity<double>(2);
        Matrix<double> theirs = ours.ToMathNetSparse();
        theirs[0, 0] = 5;
        Assert.Equal(1, ours[0, 0]);
    }

    [Theory]
    [InlineData(0, 0)]
    [InlineData(0, 3)]
    [InlineData(3, 0)]
    [InlineData(2, 2)]
    public void MatricesWithoutEntriesPass(int rows, int columns)
    {
        SparseMatrix<double> matrix = new(SparsePattern.FromPlaces(rows, columns, [], []));
        foreach (Matrix<double> foreign in new[] { matrix.ToMathNetSparse(), matrix.ToMathNetDense() })
        {
            Assert.Equal((rows, columns), (foreign.RowCount, foreign.ColumnCount));
            Assert.True(foreign.ToSparseMatrix().Pattern.HasSameEntriesAs(matrix.Pattern));
        }
    }

    [Fact]
    public void DiagonalStorageIsTaken()
    {
        SparseMatrix<Complex> ours = Matrix<Complex>.Build.DiagonalOfDiagonalArray([1, Complex.ImaginaryOne]).ToSparseMatrix();
        Assert.Equal([Complex.One, Complex.ImaginaryOne], ours.Diagonal());
    }

    [Property]
    public void ProductsWithVectorsOfMathNetEqualTheirs(Triplets t)
    {
        var x = ((ReadOnlySpan<Complex>)Samples.Vector<Complex>(t.ColumnCount, 8)).ToMathNetVector();
        Assert.Equal(t.Dense<Complex>() * x, t.Sparse<Complex>().Multiply(x));
    }
}
