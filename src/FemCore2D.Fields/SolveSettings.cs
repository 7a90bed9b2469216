using FemCore2D.Solvers;

namespace FemCore2D.Fields;

/// <summary>How a problem is solved. The defaults suit almost all.</summary>
public sealed record SolveSettings
{
    /// <summary>The residual, relative to the right-hand side, at which iterations stop.</summary>
    public double RelativeTolerance { get; init; } = 1e-11;

    /// <summary>The largest number of iterations for one right-hand side.</summary>
    public int IterationLimit { get; init; } = 20_000;

    /// <summary>
    /// A factorization to solve with instead of iterations; it receives symmetric positive definite matrices.
    /// </summary>
    public IFactorizer<double>? Factorizer { get; init; }
}
