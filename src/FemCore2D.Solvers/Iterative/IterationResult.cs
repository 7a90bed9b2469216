using System.Collections.Immutable;
using System.Numerics;

namespace FemCore2D.Solvers;

/// <summary>An iterative solution, and how it went.</summary>
/// <typeparam name="T">The number type: <see cref="double"/> or <see cref="Complex"/>.</typeparam>
/// <param name="Solution">The last iterate, converged or not.</param>
/// <param name="Report">Why the solver stopped, and the history of the residual.</param>
public sealed record IterationResult<T>(ImmutableArray<T> Solution, IterationReport Report)
    where T : unmanaged, INumberBase<T>
{
    /// <summary>Returns this result after convergence, and raises an exception otherwise.</summary>
    /// <exception cref="NotConvergedException">The tolerance was not reached.</exception>
    public IterationResult<T> EnsureConverged()
    {
        Report.EnsureConverged();
        return this;
    }
}
