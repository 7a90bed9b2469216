using System.Collections.Immutable;

namespace FemCore2D.Solvers;

/// <summary>How an iterative solution went.</summary>
public sealed class IterationReport
{
    internal IterationReport(StopReason reason, double rightHandSideNorm, ImmutableArray<double> residualHistory)
    {
        Reason = reason;
        RightHandSideNorm = rightHandSideNorm;
        ResidualHistory = residualHistory;
    }

    /// <summary>Why the solver stopped.</summary>
    public StopReason Reason { get; }

    /// <summary>Whether the tolerance was reached.</summary>
    public bool HasConverged => Reason == StopReason.Converged;

    /// <summary>The number of iterations done.</summary>
    public int Iterations => ResidualHistory.Length - 1;

    /// <summary>
    /// The Euclidean norm of the residual before the first iteration and after each one, in the unit of the right-hand
    /// side. The first is computed from the initial guess, the last of a converged solution from that solution; those
    /// between follow from the recurrence of the method.
    /// </summary>
    public ImmutableArray<double> ResidualHistory { get; }

    /// <summary>The Euclidean norm of the right-hand side.</summary>
    public double RightHandSideNorm { get; }

    /// <summary>The last residual relative to the right-hand side; 0 where both are zero.</summary>
    public double RelativeResidual => Relative(ResidualHistory[^1], RightHandSideNorm);

    /// <summary>Does nothing after convergence, and raises an exception otherwise.</summary>
    /// <exception cref="NotConvergedException">The tolerance was not reached.</exception>
    public void EnsureConverged()
    {
        if (!HasConverged)
        {
            throw new NotConvergedException(this);
        }
    }

    /// <summary>A sentence that says how it went, and what to do where it failed.</summary>
    public string Describe()
    {
        string state = $"after {Iterations} iterations with a relative residual of {RelativeResidual:E2}";
        return Reason switch
        {
            StopReason.Converged => $"Converged {state}.",
            StopReason.IterationLimit =>
                $"Stopped {state}: the limit of iterations was reached. Raise the limit, loosen the tolerance or use a "
                + "stronger preconditioner.",
            StopReason.NotPositiveDefinite =>
                $"Stopped {state}: the matrix is not positive definite. Often no value is fixed anywhere, so that the "
                + "solution is free up to a constant; fix one, or use a solver for indefinite matrices.",
            StopReason.PreconditionerNotPositiveDefinite =>
                $"Stopped {state}: the preconditioner is not positive definite. Use another one.",
            StopReason.NotFinite =>
                $"Stopped {state}: a number is infinite or not a number. Check the matrix, the right-hand side and the "
                + "initial guess.",
            StopReason.Underflow =>
                $"Stopped {state}: the right-hand side is so small that its squares vanish in double precision. Solve "
                + "for a multiple of it, or set an absolute tolerance.",
            _ =>
                $"Stopped {state}: the residual no longer falls. Either the tolerance lies below what rounding allows, "
                + "or the system has no solution; loosen the tolerance, or check that a value is fixed.",
        };
    }

    internal static double Relative(double residual, double rightHandSide) =>
        residual == 0 ? 0 : residual / rightHandSide;
}
