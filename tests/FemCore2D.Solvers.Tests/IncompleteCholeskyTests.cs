using System.Numerics;
using FemCore2D.Sparse;
using FsCheck.Xunit;
using MathNet.Numerics.LinearAlgebra;

namespace FemCore2D.Solvers.Tests;

[Properties(Arbitrary = [typeof(Matrices)])]
public class IncompleteCholeskyTests
{
    /// <summary>The matrix on which D. S. Kershaw 1978 shows that a positive definite matrix can have a negative pivot.</summary>
    private static readonly double[] kershaw = [3, -2, 0, 2, -2, 3, -2, 0, 0, -2, 3, -2, 2, 0, -2, 3];

    /// <summary>What defines the factorization: the product of the factors equals the matrix on its own pattern.</summary>
    [Theory]
    [InlineData(int.MaxValue, 1)]
    [InlineData(60, 2)]
    public void TheProductOfTheFactorsEqualsTheMatrixOnItsPattern(int unknownsPerChunk, int leastChunks)
    {
        Check<double>();
        Check<Complex>();

        void Check<T>()
            where T : unmanaged, INumberBase<T>
        {
            SparseMatrix<T> matrix = Matrices.Laplacian<T>(11);
            ChunkedOrder order = ChunkedOrder.Create(matrix.Pattern, unknownsPerChunk);
            Assert.True(order.ChunkCount >= leastChunks);
            IncompleteFactor<T> factor = IncompleteFactor<T>.Create(matrix, order, 0, 2, default);
            Matrix<T> product = ProductOf(factor);
            double left = 0;
            for (int row = 0; row < matrix.RowCount; row++)
            {
                for (int column = 0; column < matrix.ColumnCount; column++)
                {
                    double difference = Scalar.Magnitude(product[row, column] - matrix[row, column]);
                    if (matrix.Pattern.Contains(row, column))
                    {
                        // Single precision, times the four of the diagonal and the entries of a row.
                        Assert.True(difference < 2e-6, $"({row}, {column}) differs by {difference}");
                    }

                    left = Math.Max(left, difference);
                }
            }

            Assert.True(left > 0.1);
        }
    }

    [Property]
    public void TheApplicationInvertsTheProductOfTheFactors(Recipe recipe)
    {
        Check<double>();
        Check<Complex>();

        void Check<T>()
            where T : unmanaged, INumberBase<T>
        {
            SparseMatrix<T> matrix = Matrices.PositiveDefinite<T>(recipe);
            IncompleteCholesky<T> preconditioner = new(matrix);
            IncompleteFactor<T> factor = IncompleteFactor<T>.Create(
                matrix, ChunkedOrder.Create(matrix.Pattern), preconditioner.Shift, 1, default);
            T[] expected = Matrices.Vector<T>(recipe.Size, 7);
            T[] vector = (ProductOf(factor) * ((ReadOnlySpan<T>)expected).ToMathNetVector()).ToArray();
            preconditioner.Apply(vector, vector);
            Assert.True(Matrices.RelativeDifference<T>(expected, vector) < 1e-10);
        }
    }

    [Fact]
    public void AMatrixWithoutFillIsFactorizedCompletely()
    {
        SparseMatrix<double> chain = Matrices.Grid(60, 4, (dx, _) => dx == 0 ? 0.0 : -1);
        double[] expected = Matrices.Vector<double>(3600, 2);
        double[] vector = chain.Multiply(expected);
        new IncompleteCholesky<double>(chain).Apply(vector, vector);
        Assert.True(Matrices.RelativeDifference<double>(expected, vector) < 1e-6);
    }

    [Fact]
    public void ABreakdownIsCuredByAShift()
    {
        SparseMatrix<double> matrix = Matrix<double>.Build.Dense(4, 4, kershaw).ToSparseMatrix();
        IncompleteCholesky<double> preconditioner = new(matrix);
        Assert.True(preconditioner.Shift > 0);
        IterationReport report = new ConjugateGradients<double>(matrix, preconditioner).Solve([1, 2, 3, 4]).Report;
        Assert.True(report.HasConverged);

        // The shift is the first of its series that suffices.
        Assert.Equal(preconditioner.Shift, new IncompleteCholesky<double>(matrix, preconditioner.Shift).Shift);
        Assert.True(new IncompleteCholesky<double>(matrix, preconditioner.Shift / 2).Shift >= preconditioner.Shift);
        Assert.Equal(0, new IncompleteCholesky<double>(Matrices.Laplacian<double>(9)).Shift);
    }

    [Fact]
    public void AnUnknownThatCannotBePositiveIsNamed()
    {
        SparseMatrix<double> matrix = SparseMatrices.Identity<double>(5);
        matrix.Entry(3, 3) = -2;
        NotPositiveDefiniteException e =
            Assert.Throws<NotPositiveDefiniteException>(() => new IncompleteCholesky<double>(matrix));
        Assert.Equal(3, e.Unknown);
        Assert.Contains("unknown 3 is -2", e.Message, StringComparison.Ordinal);

        int[] rows = [0, 1, 2, 1, 2];
        int[] columns = [0, 1, 2, 2, 1];
        SparseMatrix<double> large =
            SparseMatrices.FromTriplets<double>(3, 3, rows, columns, [1.0, 1, 1, 1e9, 1e9]);
        Assert.Equal(2, Assert.Throws<NotPositiveDefiniteException>(() => new IncompleteCholesky<double>(large)).Unknown);
    }

    [Fact]
    public void RowsOfVeryDifferentSizeDoNotOverflow()
    {
        SparseMatrix<double> matrix = Matrices.Laplacian<double>(10);
        SparseMatrix<double> scale = SparseMatrices.Identity<double>(100);
        for (int i = 0; i < 100; i++)
        {
            scale.Entry(i, i) = Math.Pow(10, (i * 37 % 101) - 50);
        }

        SparseMatrix<double> scaled = scale.Multiply(matrix).Multiply(scale);
        double[] plain = Matrices.Vector<double>(100, 1);
        double[] residual = scale.Multiply(plain);
        new IncompleteCholesky<double>(scaled).Apply(residual, residual);
        double[] expected = new double[100];
        new IncompleteCholesky<double>(matrix).Apply(plain, expected);
        Assert.True(Matrices.RelativeDifference<double>(expected, scale.Multiply(residual)) < 1e-6);
    }

    [Fact]
    public void WrongArgumentsAreRefused()
    {
        SparseMatrix<double> matrix = Matrices.Laplacian<double>(2);
        Assert.Throws<ArgumentOutOfRangeException>(() => new IncompleteCholesky<double>(matrix, -1));
        Assert.Throws<ArgumentException>(() => new IncompleteCholesky<double>(matrix).Apply(new double[4], new double[3]));
        Assert.Throws<ArgumentException>(() => new JacobiPreconditioner<double>(matrix).Apply(new double[3], new double[4]));
        matrix.Entry(2, 0) = 3;
        Assert.Throws<UnsuitableMatrixException>(() => new IncompleteCholesky<double>(matrix));
        matrix.Entry(1, 1) = 0;
        Assert.Throws<UnsuitableMatrixException>(() => new JacobiPreconditioner<double>(matrix));
    }

    private static Matrix<T> ProductOf<T>(IncompleteFactor<T> factor)
        where T : unmanaged, INumberBase<T>
    {
        int size = factor.Scale.Length;
        Matrix<T> lower = Matrix<T>.Build.DenseIdentity(size);
        for (int place = 0; place < size; place++)
        {
            for (int k = factor.Starts[place]; k < factor.Starts[place + 1]; k++)
            {
                lower[factor.Order.Order[place], factor.Columns[k]] = Scalar.IsComplex<T>()
                    ? Scalar.Create<T>(factor.Lower[2 * k], factor.Lower[(2 * k) + 1])
                    : Scalar.Create<T>(factor.Lower[k]);
            }
        }

        Matrix<T> outer = Matrix<T>.Build.Diagonal(size, size, i => Scalar.Create<T>(1 / factor.Scale[i]));
        return outer * lower * lower.ConjugateTranspose() * outer;
    }
}
