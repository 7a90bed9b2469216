using System.Numerics;
using FemCore2D.Sparse;
using FsCheck.Xunit;

namespace FemCore2D.Solvers.Tests;

[Properties(Arbitrary = [typeof(Matrices)])]
public class SeamTests
{
    [Property(MaxTest = 50)]
    public void AForeignFactorizationSolves(Recipe recipe)
    {
        Check<double>();
        Check<Complex>();

        void Check<T>()
            where T : unmanaged, INumberBase<T>
        {
            SparseMatrix<T> matrix = Matrices.PositiveDefinite<T>(recipe);
            T[] expected = Matrices.Vector<T>(recipe.Size, 1);
            T[] solution = matrix.Multiply(expected);
            IFactorization<T> factorization = new DenseFactorizer<T>().Factorize(matrix);
            factorization.Solve(solution, solution);
            Assert.True(Matrices.RelativeDifference<T>(expected, solution) < 1e-11);
        }
    }

    [Property(MaxTest = 50)]
    public void AFactorizationOfTheMatrixItselfIsAPerfectPreconditioner(Recipe recipe)
    {
        SparseMatrix<Complex> matrix = Matrices.PositiveDefinite<Complex>(recipe);
        FactorizationPreconditioner<Complex> preconditioner = new(new DenseFactorizer<Complex>().Factorize(matrix));
        IterationReport report = new ConjugateGradients<Complex>(matrix, preconditioner)
            .Solve(Matrices.Vector<Complex>(recipe.Size, 1), new IterationOptions { RelativeTolerance = 1e-9 }).Report;
        Assert.True(report.HasConverged);
        Assert.Equal(1, report.Iterations);
    }

    [Fact]
    public void NothingIsNotAFactorization() =>
        Assert.Throws<ArgumentNullException>(() => new FactorizationPreconditioner<double>(null!));
}
