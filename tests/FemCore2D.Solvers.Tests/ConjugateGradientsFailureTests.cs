using System.Numerics;
using FemCore2D.Sparse;

namespace FemCore2D.Solvers.Tests;

public class ConjugateGradientsFailureTests
{
    [Fact]
    public void TheLimitOfIterationsIsReportedAndCanBeRaised()
    {
        SparseMatrix<double> matrix = Matrices.Laplacian<double>(20);
        IterationResult<double> result = new ConjugateGradients<double>(matrix)
            .Solve(Matrices.Vector<double>(400, 1), new IterationOptions { IterationLimit = 3 });
        Assert.Equal(StopReason.IterationLimit, result.Report.Reason);
        NotConvergedException e = Assert.Throws<NotConvergedException>(result.EnsureConverged);
        Assert.Same(result.Report, e.Report);
        Assert.Contains("after 3 iterations", e.Message, StringComparison.Ordinal);
        Assert.Contains("Raise the limit", e.Message, StringComparison.Ordinal);
    }

    [Fact]
    public void AnIndefiniteMatrixIsReported()
    {
        // The smallest eigenvalues of the Laplacian of this grid are 0.04 and 0.11.
        SparseMatrix<double> matrix = Matrices.Grid(20, 3.92, (_, _) => -1.0);
        Assert.Equal(StopReason.NotPositiveDefinite, Solve(matrix).Reason);
        Assert.Equal(StopReason.NotPositiveDefinite, Solve(SparseMatrices.Identity<Complex>(3).Multiply(-1)).Reason);
        Assert.Equal(StopReason.NotPositiveDefinite, Solve(new SparseMatrix<double>(SparsePattern.Diagonal(3))).Reason);
    }

    [Fact]
    public void AnIndefinitePreconditionerIsReported()
    {
        SparseMatrix<double> matrix = SparseMatrices.Identity<double>(3);
        JacobiPreconditioner<double> negative = new(matrix.Multiply(-1.0));
        Assert.Equal(StopReason.PreconditionerNotPositiveDefinite, Solve(matrix, negative).Reason);
    }

    [Fact]
    public void ASystemWithoutASolutionDoesNotPassForSolved()
    {
        // A chain that is tied nowhere, under a load that does not balance.
        int[] rows = [0, 0, 1, 1, 1, 2, 2];
        int[] columns = [0, 1, 0, 1, 2, 1, 2];
        SparseMatrix<double> matrix =
            SparseMatrices.FromTriplets<double>(3, 3, rows, columns, [1.0, -1, -1, 2, -1, -1, 1]);
        IterationReport report = new ConjugateGradients<double>(matrix).Solve([1.0, 1, 1.5]).Report;
        Assert.False(report.HasConverged);
        Assert.Contains("fix", report.Describe(), StringComparison.Ordinal);
    }

    [Fact]
    public void AToleranceBelowRoundingStagnatesSoon()
    {
        SparseMatrix<double> matrix = Matrices.Laplacian<double>(30);
        IterationReport report = new ConjugateGradients<double>(matrix, new IncompleteCholesky<double>(matrix))
            .Solve(Matrices.Vector<double>(900, 1), new IterationOptions { RelativeTolerance = 1e-18 }).Report;
        Assert.Equal(StopReason.Stagnation, report.Reason);
        Assert.True(report.RelativeResidual < 1e-14);
        Assert.True(report.Iterations < 300);
    }

    [Fact]
    public void AResidualThatNoLongerFallsEndsAfterTheWindow()
    {
        // Without a preconditioner the residual of this one rises for long at first (all modes are excited alike).
        SparseMatrix<double> matrix = SparseMatrices.Identity<double>(200);
        for (int i = 0; i < 200; i++)
        {
            matrix.Entry(i, i) = Math.Pow(10, i / 20.0);
        }

        IterationReport report = new ConjugateGradients<double>(matrix)
            .Solve(Enumerable.Repeat(1.0, 200).ToArray(), new IterationOptions { StagnationWindow = 5 }).Report;
        Assert.Equal(StopReason.Stagnation, report.Reason);
        double smallest = report.ResidualHistory.Min();
        Assert.Equal(5, report.Iterations - report.ResidualHistory.IndexOf(smallest));
    }

    [Fact]
    public void NumbersThatAreNotFiniteAreReported()
    {
        SparseMatrix<double> matrix = SparseMatrices.Identity<double>(3);
        Assert.Equal(StopReason.NotFinite, new ConjugateGradients<double>(matrix).Solve([1, double.NaN, 1]).Report.Reason);
        Assert.Equal(StopReason.NotFinite, new ConjugateGradients<double>(matrix).Solve([1, 1e200, 1]).Report.Reason);
        ConjugateGradients<double> refilled = new(matrix);
        matrix.Entry(1, 1) = double.NaN;
        Assert.Equal(StopReason.NotFinite, refilled.Solve([1, 1, 1]).Report.Reason);
        Assert.Throws<UnsuitableMatrixException>(() => new ConjugateGradients<double>(matrix));
    }

    [Fact]
    public void SquaresThatVanishDoNotPassForSolved()
    {
        ConjugateGradients<double> solver = new(SparseMatrices.Identity<double>(3));
        IterationReport report = solver.Solve([1e-200, 0, 0]).Report;
        Assert.Equal(StopReason.Underflow, report.Reason);
        Assert.Contains("multiple", report.Describe(), StringComparison.Ordinal);
        Assert.True(solver.Solve([1e-200, 0, 0], new IterationOptions { AbsoluteTolerance = 1e-30 }).Report.HasConverged);
        IterationResult<double> small = solver.Solve([1e-140, 0, 0]).EnsureConverged();
        Assert.Equal(1e-140, small.Solution[0], 1e-150);
    }

    [Fact]
    public void NothingToDoIsDone()
    {
        IterationResult<double> zero = new ConjugateGradients<double>(Matrices.Laplacian<double>(3)).Solve(new double[9]);
        Assert.True(zero.Report.HasConverged);
        Assert.Equal(0, zero.Report.RelativeResidual);
        Assert.All(zero.Solution, value => Assert.Equal(0, value));

        SparseMatrix<double> empty = new(SparsePattern.Diagonal(0));
        Assert.True(new ConjugateGradients<double>(empty, new IncompleteCholesky<double>(empty)).Solve([]).Report.HasConverged);
    }

    [Fact]
    public void CancellationStopsBeforeTheNextIteration()
    {
        SparseMatrix<double> matrix = Matrices.Laplacian<double>(40);
        using CancellationTokenSource source = new();
        int heard = 0;
        Listener listener = new(p =>
        {
            heard = p.Iteration;
            if (p.Iteration == 5)
            {
                source.Cancel();
            }
        });
        ConjugateGradients<double> solver = new(matrix);
        double[] b = Matrices.Vector<double>(1600, 1);
        Assert.Throws<OperationCanceledException>(() => solver.Solve(b, progress: listener, cancellationToken: source.Token));
        Assert.Equal(5, heard);
        Assert.Throws<OperationCanceledException>(() => new IncompleteCholesky<double>(matrix, cancellationToken: source.Token));
        solver.Solve(b).EnsureConverged();
    }

    [Fact]
    public void TwoSolvesAtATimeWithOneObjectAreRefused()
    {
        SparseMatrix<double> matrix = Matrices.Laplacian<double>(10);
        ConjugateGradients<double> solver = new(matrix);
        double[] b = Matrices.Vector<double>(100, 1);
        int refused = 0;
        solver.Solve(b, progress: new Listener(_ =>
        {
            Assert.Throws<InvalidOperationException>(() => solver.Solve(b));
            refused++;
        })).EnsureConverged();
        Assert.True(refused > 0);
    }

    [Fact]
    public void WrongArgumentsAreRefused()
    {
        SparseMatrix<double> matrix = Matrices.Laplacian<double>(2);
        Assert.Throws<ArgumentException>(() => new ConjugateGradients<double>(new(SparsePattern.FromPlaces(2, 3, [], []))));
        Assert.Throws<ArgumentException>(
            () => new ConjugateGradients<double>(matrix, new JacobiPreconditioner<double>(SparseMatrices.Identity<double>(3))));
        ConjugateGradients<double> solver = new(matrix);
        double[] memory = new double[8];
        Assert.Throws<ArgumentException>(() => solver.Solve(new double[3]));
        Assert.Throws<ArgumentException>(() => solver.Solve(memory.AsSpan(0, 4), memory.AsSpan(3, 4)));
        matrix.Entry(0, 1) = 5;
        UnsuitableMatrixException e = Assert.Throws<UnsuitableMatrixException>(() => new ConjugateGradients<double>(matrix));
        Assert.Contains("(0, 1) is 5", e.Message, StringComparison.Ordinal);
        Assert.Throws<UnsuitableMatrixException>(
            () => new ConjugateGradients<Complex>(SparseMatrices.Identity<Complex>(2).Multiply(Complex.ImaginaryOne)));
    }

    [Fact]
    public void WrongOptionsAreRefused()
    {
        Assert.Throws<ArgumentOutOfRangeException>(() => new IterationOptions { RelativeTolerance = -1 });
        Assert.Throws<ArgumentOutOfRangeException>(() => new IterationOptions { RelativeTolerance = 1 });
        Assert.Throws<ArgumentOutOfRangeException>(() => new IterationOptions { RelativeTolerance = double.NaN });
        Assert.Throws<ArgumentOutOfRangeException>(() => new IterationOptions { AbsoluteTolerance = double.PositiveInfinity });
        Assert.Throws<ArgumentOutOfRangeException>(() => new IterationOptions { IterationLimit = -1 });
        Assert.Throws<ArgumentOutOfRangeException>(() => new IterationOptions { StagnationWindow = 0 });
        Assert.Throws<ArgumentOutOfRangeException>(() => new IterationOptions { Threads = -1 });
    }

    private static IterationReport Solve<T>(SparseMatrix<T> matrix, IPreconditioner<T>? preconditioner = null)
        where T : unmanaged, INumberBase<T> =>
        new ConjugateGradients<T>(matrix, preconditioner).Solve(Matrices.Vector<T>(matrix.RowCount, 1)).Report;
}
