using System.Numerics;
using FemCore2D.Sparse;
using FsCheck.Xunit;

namespace FemCore2D.Solvers.Tests;

[Properties(Arbitrary = [typeof(Matrices)])]
public class ConjugateGradientsTests
{
    [Property]
    public void SolutionsEqualTheDenseOnes(Recipe recipe)
    {
        Check<double>();
        Check<Complex>();

        void Check<T>()
            where T : unmanaged, INumberBase<T>
        {
            SparseMatrix<T> matrix = Matrices.PositiveDefinite<T>(recipe);
            T[] b = Matrices.Vector<T>(recipe.Size, recipe.Seed);
            T[] expected = matrix.ToMathNetDense().Cholesky().Solve(((ReadOnlySpan<T>)b).ToMathNetVector()).ToArray();
            foreach (IPreconditioner<T>? preconditioner in Preconditioners(matrix))
            {
                IterationResult<T> result = new ConjugateGradients<T>(matrix, preconditioner)
                    .Solve(b, new IterationOptions { RelativeTolerance = 1e-13 }).EnsureConverged();

                // The error is at most the condition number (here below 1e3) times the residual.
                Assert.True(Matrices.RelativeDifference<T>(expected, result.Solution.AsSpan()) < 1e-9);
                Assert.True(Matrices.RelativeResidual(matrix, result.Solution.AsSpan(), b) < 1.01e-13);
            }
        }
    }

    /// <summary>The bound of the theory: in the norm of the energy, <c>2 ((sqrt k - 1) / (sqrt k + 1))^i</c>.</summary>
    [Fact]
    public void TheErrorFallsAsTheConditionNumberAllows()
    {
        const int N = 24;
        SparseMatrix<double> matrix = Matrices.Laplacian<double>(N);
        double cosine = Math.Cos(Math.PI / (N + 1));
        double root = Math.Sqrt((1 + cosine) / (1 - cosine));
        double[] exact = Matrices.Vector<double>(N * N, 5);
        double[] b = matrix.Multiply(exact);
        for (int iterations = 0; iterations <= 60; iterations += 5)
        {
            IterationResult<double> result = new ConjugateGradients<double>(matrix)
                .Solve(b, new IterationOptions { IterationLimit = iterations });
            Assert.Equal(iterations, result.Report.Iterations);
            double[] error = exact.Zip(result.Solution, (e, x) => e - x).ToArray();
            double bound = 2 * Math.Pow((root - 1) / (root + 1), iterations) * Energy(exact);
            Assert.InRange(Energy(error), iterations == 0 ? bound / 2.000001 : 0, bound);
        }

        double Energy(double[] v) => Math.Sqrt(matrix.Multiply(v).Zip(v, (a, c) => a * c).Sum());
    }

    [Fact]
    public void PreconditionersLowerTheNumberOfIterations()
    {
        int[] sizes = [20, 40, 80];
        foreach (int n in sizes)
        {
            SparseMatrix<double> matrix = Matrices.Laplacian<double>(n);
            int plain = Iterations(matrix, null);
            int incomplete = Iterations(matrix, new IncompleteCholesky<double>(matrix));

            // Chandra 1978 and others find about a third for this matrix.
            Assert.True(incomplete < 0.4 * plain, $"{n}: {incomplete} of {plain}");
        }

        // Rows of very different size are what Jacobi cures.
        SparseMatrix<double> scaled = Matrices.Laplacian<double>(30);
        SparseMatrix<double> scale = SparseMatrices.Identity<double>(900);
        for (int i = 0; i < 900; i++)
        {
            scale.Entry(i, i) = Math.Pow(10, i % 4);
        }

        scaled = scale.Multiply(scaled).Multiply(scale);
        int without = Iterations(scaled, null);
        int jacobi = Iterations(scaled, new JacobiPreconditioner<double>(scaled));
        int cholesky = Iterations(scaled, new IncompleteCholesky<double>(scaled));
        Assert.True(jacobi < without / 3 && cholesky < jacobi / 2, $"{without}, {jacobi}, {cholesky}");
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
            SparseMatrix<T> matrix = Matrices.Laplacian<T>(290);
            T[] b = Matrices.Vector<T>(matrix.RowCount, 1);
            Assert.True(matrix.Pattern.RowBlocks.Length > 4);
            Assert.True(ChunkedOrder.Create(matrix.Pattern).ChunkCount > 1);
            IterationResult<T> alone = Solve(1);
            IterationResult<T> many = Solve(threads);
            Assert.Equal(alone.Solution.AsSpan(), many.Solution.AsSpan());
            Assert.Equal(alone.Report.ResidualHistory.AsSpan(), many.Report.ResidualHistory.AsSpan());
            Assert.Equal(12, many.Report.Iterations);

            IterationResult<T> Solve(int count) =>
                new ConjugateGradients<T>(matrix, new IncompleteCholesky<T>(matrix, threads: count))
                    .Solve(b, new IterationOptions { IterationLimit = 12, Threads = count });
        }
    }

    [Fact]
    public void OneObjectSolvesForManyRightHandSides()
    {
        SparseMatrix<Complex> matrix = Matrices.Laplacian<Complex>(12);
        IncompleteCholesky<Complex> preconditioner = new(matrix);
        ConjugateGradients<Complex> solver = new(matrix, preconditioner);
        for (int seed = 0; seed < 5; seed++)
        {
            Complex[] b = Matrices.Vector<Complex>(144, seed);
            Complex[] fresh = [.. new ConjugateGradients<Complex>(matrix, preconditioner).Solve(b).Solution];
            Assert.Equal(fresh, solver.Solve(b).EnsureConverged().Solution);
            solver.Solve(Enumerable.Repeat(new Complex(double.NaN, 1), 144).ToArray());
        }
    }

    [Fact]
    public void TheHistoryTellsTheResiduals()
    {
        SparseMatrix<double> matrix = Matrices.Laplacian<double>(20);
        double[] b = Matrices.Vector<double>(400, 2);
        List<IterationProgress> told = [];
        IterationResult<double> result =
            new ConjugateGradients<double>(matrix).Solve(b, progress: new Listener(told.Add)).EnsureConverged();
        IterationReport report = result.Report;
        Assert.Equal(Matrices.Norm<double>(b), report.RightHandSideNorm, 1e-12);
        Assert.Equal(report.RightHandSideNorm, report.ResidualHistory[0], 1e-12);
        Assert.Equal(report.Iterations, told.Count);
        Assert.Equal(Enumerable.Range(1, told.Count), told.Select(t => t.Iteration));
        Assert.Equal(report.ResidualHistory.Skip(1).Select(r => r / report.RightHandSideNorm), told.Select(t => t.RelativeResidual));
        double last = Matrices.RelativeResidual(matrix, result.Solution.AsSpan(), b);
        Assert.InRange(report.RelativeResidual, last * (1 - 1e-4), last * (1 + 1e-4));
        Assert.True(report.RelativeResidual <= 1e-10);

        IterationReport shorter = new ConjugateGradients<double>(matrix)
            .Solve(b, new IterationOptions { IterationLimit = 7 }).Report;
        Assert.Equal(report.ResidualHistory.Take(8), shorter.ResidualHistory);
    }

    [Fact]
    public void AGoodInitialGuessSavesIterations()
    {
        SparseMatrix<double> matrix = Matrices.Laplacian<double>(20);
        double[] exact = Matrices.Vector<double>(400, 2);
        double[] b = matrix.Multiply(exact);
        ConjugateGradients<double> solver = new(matrix);
        Assert.Equal(0, solver.Solve(b, exact.ToArray()).Iterations);

        double[] near = exact.Select(v => v + 1e-6).ToArray();
        int saved = solver.Solve(b).Report.Iterations - solver.Solve(b, near).Iterations;
        Assert.True(saved > 10);
        Assert.True(Matrices.RelativeDifference<double>(exact, near) < 1e-8);
    }

    [Fact]
    public void TheAbsoluteToleranceStopsToo()
    {
        SparseMatrix<double> matrix = Matrices.Laplacian<double>(20);
        double[] b = Matrices.Vector<double>(400, 2);
        IterationReport report = new ConjugateGradients<double>(matrix)
            .Solve(b, new IterationOptions { RelativeTolerance = 0, AbsoluteTolerance = 1e-3 }).Report;
        Assert.True(report.HasConverged);
        Assert.InRange(report.ResidualHistory[^1], 1e-5, 1e-3);
    }

    private static IEnumerable<IPreconditioner<T>?> Preconditioners<T>(SparseMatrix<T> matrix)
        where T : unmanaged, INumberBase<T> =>
        [null, new JacobiPreconditioner<T>(matrix), new IncompleteCholesky<T>(matrix)];

    private static int Iterations(SparseMatrix<double> matrix, IPreconditioner<double>? preconditioner)
    {
        double[] b = Matrices.Vector<double>(matrix.RowCount, 3);
        return new ConjugateGradients<double>(matrix, preconditioner)
            .Solve(b, new IterationOptions { RelativeTolerance = 1e-8 }).EnsureConverged().Report.Iterations;
    }
}
