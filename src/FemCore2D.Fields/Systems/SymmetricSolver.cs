using System.Diagnostics;
using FemCore2D.Solvers;
using FemCore2D.Sparse;

namespace FemCore2D.Fields;

/// <summary>
/// Solves one symmetric positive definite matrix for several right-hand sides, by iterations or by the factorization
/// of the settings, and keeps count.
/// </summary>
internal sealed class SymmetricSolver
{
    /// <summary>What a factorization may leave over before its solution counts as wrong.</summary>
    private const double LargestResidual = 1e-6;

    private readonly SparseMatrix<double> matrix;
    private readonly SolveSettings settings;
    private readonly IProgress<SolveProgress>? progress;
    private readonly int rightHandSides;
    private readonly Stopwatch clock = new();
    private ConjugateGradients<double>? iterations;
    private IFactorization<double>? factorization;
    private int done;

    public SymmetricSolver(
        SparseMatrix<double> matrix, int rightHandSides, SolveSettings settings, IProgress<SolveProgress>? progress)
    {
        this.matrix = matrix;
        this.rightHandSides = rightHandSides;
        this.settings = settings;
        this.progress = progress;
    }

    public string Name => settings.Factorizer is null
        ? "conjugate gradients with incomplete Cholesky"
        : settings.Factorizer.GetType().Name;

    public int Iterations { get; private set; }

    public double RelativeResidual { get; private set; }

    public TimeSpan Time => clock.Elapsed;

    /// <exception cref="NotConvergedException">The iterations stopped before the tolerance was reached.</exception>
    public double[] Solve(ReadOnlySpan<double> rightHandSide, CancellationToken cancellationToken)
    {
        double[] solution = new double[matrix.RowCount];
        if (solution.Length == 0)
        {
            return solution;
        }

        clock.Start();
        try
        {
            progress?.Report(new SolveProgress(SolveStage.Solver, done, rightHandSides, 0, 1));
            if (settings.Factorizer is null)
            {
                Iterate(rightHandSide, solution, cancellationToken);
            }
            else
            {
                factorization ??= settings.Factorizer.Factorize(matrix, cancellationToken);
                factorization.Solve(rightHandSide, solution);
                RelativeResidual = Math.Max(RelativeResidual, CheckedResidual(rightHandSide, solution));
            }
        }
        finally
        {
            clock.Stop();
        }

        done++;
        return solution;
    }

    private void Iterate(ReadOnlySpan<double> rightHandSide, double[] solution, CancellationToken cancellationToken)
    {
        iterations ??= new ConjugateGradients<double>(matrix, new IncompleteCholesky<double>(matrix, cancellationToken: cancellationToken));
        IterationOptions options = new()
        {
            RelativeTolerance = settings.RelativeTolerance,
            IterationLimit = settings.IterationLimit,
        };
        Relay? relay = progress is null ? null : new Relay(progress, done, rightHandSides);
        IterationReport report = iterations.Solve(rightHandSide, solution, options, relay, cancellationToken);
        report.EnsureConverged();
        Iterations += report.Iterations;
        RelativeResidual = Math.Max(RelativeResidual, report.RelativeResidual);
    }

    /// <exception cref="IllPosedProblemException">The factorization did not solve the system.</exception>
    private double CheckedResidual(ReadOnlySpan<double> rightHandSide, double[] solution)
    {
        double residual = ResidualOf(rightHandSide, solution);
        return residual <= LargestResidual
            ? residual
            : throw new IllPosedProblemException(
                $"{Name} left a relative residual of {residual:G2}, so its solution is of no use. Check that it takes "
                + "symmetric positive definite matrices, or leave it out.");
    }

    private double ResidualOf(ReadOnlySpan<double> rightHandSide, double[] solution)
    {
        double[] product = matrix.Multiply(solution);
        double sum = 0;
        double norm = 0;
        for (int i = 0; i < product.Length; i++)
        {
            double difference = product[i] - rightHandSide[i];
            sum += difference * difference;
            norm += rightHandSide[i] * rightHandSide[i];
        }

        return norm > 0 ? Math.Sqrt(sum / norm) : Math.Sqrt(sum);
    }

    private sealed class Relay(IProgress<SolveProgress> progress, int rightHandSide, int rightHandSides)
        : IProgress<IterationProgress>
    {
        public void Report(IterationProgress value) => progress.Report(new SolveProgress(
            SolveStage.Solver, rightHandSide, rightHandSides, value.Iteration, value.RelativeResidual));
    }
}
