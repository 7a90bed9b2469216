using System.Collections.Immutable;
using System.Numerics;
using System.Runtime.InteropServices;
using FemCore2D.Sparse;

namespace FemCore2D.Solvers;

/// <summary>
/// The method of conjugate gradients for a symmetric or Hermitian positive definite matrix, with the memory that it
/// needs, ready for any number of right-hand sides.
/// </summary>
/// <typeparam name="T">The number type: <see cref="double"/> or <see cref="Complex"/>.</typeparam>
/// <remarks>
/// M. R. Hestenes and E. Stiefel 1952. Convergence is decided by the residual computed anew from the solution, never by
/// the recurrence alone. One solve at a time; for solves at the same time, create an object for each, with the same
/// matrix and preconditioner. An iteration allocates nothing, and the result has the same bits for any number of
/// threads.
/// </remarks>
public sealed class ConjugateGradients<T>
    where T : unmanaged, INumberBase<T>
{
    /// <summary>The norm below which the squares of the entries lose their digits.</summary>
    private const double LeastNorm = 1e-145;

    private readonly ConjugateGradientsWork<T> work;
    private double[] history = new double[64];
    private int isBusy;

    /// <summary>Prepares the solution of systems with a matrix.</summary>
    /// <param name="matrix">A symmetric or Hermitian positive definite matrix, that is read at each solve.</param>
    /// <param name="preconditioner">The preconditioner, Hermitian and positive definite; none if it is left out.</param>
    /// <exception cref="ArgumentException">The matrix is not square, or the preconditioner is of another size.</exception>
    /// <exception cref="UnsuitableMatrixException">The matrix is not Hermitian or has entries that are not finite.</exception>
    public ConjugateGradients(SparseMatrix<T> matrix, IPreconditioner<T>? preconditioner = null)
    {
        MatrixChecks.RequireHermitian(matrix);
        if (preconditioner is not null && preconditioner.Size != matrix.RowCount)
        {
            throw new ArgumentException(
                $"The preconditioner is for {preconditioner.Size} unknowns, the matrix for {matrix.RowCount}.",
                nameof(preconditioner));
        }

        work = new ConjugateGradientsWork<T>(matrix, preconditioner);
    }

    /// <summary>The number of unknowns.</summary>
    public int Size => work.Size;

    /// <summary>Solves for one right-hand side, from zero.</summary>
    /// <param name="rightHandSide">The right-hand side, <see cref="Size"/> long.</param>
    /// <param name="options">When to stop; the defaults if left out.</param>
    /// <param name="progress">Is told of each iteration, on the calling thread.</param>
    /// <param name="cancellationToken">Stops the work before the next iteration.</param>
    /// <returns>
    /// The solution and how it went; whether it converged is part of the report. Where only a converged solution is of
    /// use, <see cref="IterationResult{T}.EnsureConverged"/> raises an exception otherwise.
    /// </returns>
    /// <exception cref="ArgumentException">The right-hand side has the wrong length.</exception>
    /// <exception cref="InvalidOperationException">Another solve with this object is under way.</exception>
    /// <exception cref="OperationCanceledException">The work was stopped.</exception>
    public IterationResult<T> Solve(
        ReadOnlySpan<T> rightHandSide,
        IterationOptions? options = null,
        IProgress<IterationProgress>? progress = null,
        CancellationToken cancellationToken = default)
    {
        T[] solution = new T[Size];
        IterationReport report = Solve(rightHandSide, solution, options, progress, cancellationToken);
        return new IterationResult<T>(ImmutableCollectionsMarshal.AsImmutableArray(solution), report);
    }

    /// <summary>Solves for one right-hand side, from an initial guess.</summary>
    /// <param name="rightHandSide">The right-hand side, <see cref="Size"/> long.</param>
    /// <param name="solution">
    /// Holds the initial guess and receives the solution, <see cref="Size"/> long; may not share memory with
    /// <paramref name="rightHandSide"/>.
    /// </param>
    /// <param name="options">When to stop; the defaults if left out.</param>
    /// <param name="progress">Is told of each iteration, on the calling thread.</param>
    /// <param name="cancellationToken">Stops the work before the next iteration; the last iterate is then in <paramref name="solution"/>.</param>
    /// <returns>How it went; whether it converged is part of it.</returns>
    /// <exception cref="ArgumentException">A vector has the wrong length, or they share memory.</exception>
    /// <exception cref="InvalidOperationException">Another solve with this object is under way.</exception>
    /// <exception cref="OperationCanceledException">The work was stopped.</exception>
    public unsafe IterationReport Solve(
        ReadOnlySpan<T> rightHandSide,
        Span<T> solution,
        IterationOptions? options = null,
        IProgress<IterationProgress>? progress = null,
        CancellationToken cancellationToken = default)
    {
        MatrixChecks.RequireLengths(rightHandSide, solution, Size);
        if (rightHandSide.Overlaps(solution))
        {
            throw new ArgumentException("The solution may not share memory with the right-hand side.", nameof(solution));
        }

        if (Interlocked.Exchange(ref isBusy, 1) != 0)
        {
            throw new InvalidOperationException(
                "Another solve with this object is under way. Create an object for each solve at the same time.");
        }

        try
        {
            fixed (T* b = rightHandSide)
            fixed (T* x = solution)
            {
                work.Begin(b, x, (options ?? new()).Threads);
                return Iterate(rightHandSide, options ?? new(), progress, cancellationToken);
            }
        }
        finally
        {
            Volatile.Write(ref isBusy, 0);
        }
    }

    private IterationReport Iterate(
        ReadOnlySpan<T> rightHandSide,
        IterationOptions options,
        IProgress<IterationProgress>? progress,
        CancellationToken cancellationToken)
    {
        double norm = Math.Sqrt(work.RightHandSideSquared());
        double target = Math.Max(options.RelativeTolerance * norm, options.AbsoluteTolerance);
        double residual = Math.Sqrt(work.ComputeResidual());
        double verified = residual;
        double smallest = residual;
        int iteration = 0;
        int smallestAt = 0;
        Record(0, residual);
        if (!double.IsFinite(residual) || !double.IsFinite(norm))
        {
            return Report(StopReason.NotFinite);
        }

        if (Math.Max(norm, options.AbsoluteTolerance) < LeastNorm && rightHandSide.ContainsAnyExcept(T.Zero))
        {
            return Report(StopReason.Underflow);
        }

        if (residual <= target)
        {
            return Report(StopReason.Converged);
        }

        double product = work.Precondition();
        work.Turn(0);
        while (true)
        {
            cancellationToken.ThrowIfCancellationRequested();
            if (iteration == options.IterationLimit)
            {
                return Report(StopReason.IterationLimit);
            }

            if (!(product > 0))
            {
                return Report(Cause(product, StopReason.PreconditionerNotPositiveDefinite));
            }

            double curvature = work.MultiplyDirection();
            if (!(curvature > 0))
            {
                return Report(Cause(curvature, StopReason.NotPositiveDefinite));
            }

            residual = Math.Sqrt(work.Advance(product / curvature));
            iteration++;
            bool isRestart = residual <= target;
            if (isRestart)
            {
                residual = Math.Sqrt(work.ComputeResidual());
            }

            Record(iteration, residual);
            progress?.Report(new IterationProgress(iteration, IterationReport.Relative(residual, norm)));
            if (!double.IsFinite(residual))
            {
                return Report(StopReason.NotFinite);
            }

            if (isRestart)
            {
                if (residual <= target)
                {
                    return Report(StopReason.Converged);
                }

                // The recurrence had converged, the solution has not: go on from it as long as that gains something.
                if (residual > verified / 2)
                {
                    return Report(StopReason.Stagnation);
                }

                verified = residual;
            }

            if (residual < smallest)
            {
                smallest = residual;
                smallestAt = iteration;
            }
            else if (iteration - smallestAt >= options.StagnationWindow)
            {
                return Report(StopReason.Stagnation);
            }

            double next = work.Precondition();
            work.Turn(isRestart ? 0 : next / product);
            product = next;
        }

        IterationReport Report(StopReason reason) =>
            new(reason, norm, ImmutableArray.Create(history.AsSpan(0, iteration + 1)));
    }

    private static StopReason Cause(double value, StopReason whenNegative) =>
        double.IsNaN(value) ? StopReason.NotFinite : whenNegative;

    private void Record(int iteration, double residual)
    {
        if (iteration == history.Length)
        {
            Array.Resize(ref history, 2 * history.Length);
        }

        history[iteration] = residual;
    }
}
