namespace FemCore2D.Solvers;

/// <summary>An iterative solver stopped before it reached the tolerance asked for.</summary>
public sealed class NotConvergedException : SolverException
{
    /// <summary>Creates the exception from the report of the solver.</summary>
    /// <param name="report">What the solver reports.</param>
    public NotConvergedException(IterationReport report)
        : base(report?.Describe() ?? throw new ArgumentNullException(nameof(report))) => Report = report;

    /// <summary>What the solver reports: why it stopped, and the history of the residual.</summary>
    public IterationReport Report { get; }
}
