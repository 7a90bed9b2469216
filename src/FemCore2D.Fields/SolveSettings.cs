using FemCore2D.Solvers;

namespace FemCore2D.Fields;

/// <summary>How a problem is solved. The defaults suit almost all.</summary>
public sealed record SolveSettings
{
    private readonly double relativeTolerance = 1e-11;
    private readonly int iterationLimit = 20_000;

    /// <summary>The residual, relative to the right-hand side, at which iterations stop.</summary>
    /// <exception cref="ArgumentOutOfRangeException">The tolerance is not above 0 and below 1.</exception>
    public double RelativeTolerance
    {
        get => relativeTolerance;
        init => relativeTolerance = value is > 0 and < 1
            ? value
            : throw new ArgumentOutOfRangeException(
                nameof(RelativeTolerance), value, "A tolerance lies above 0 and below 1, such as 1e-11.");
    }

    /// <summary>The largest number of iterations for one right-hand side.</summary>
    /// <exception cref="ArgumentOutOfRangeException">The number is not positive.</exception>
    public int IterationLimit
    {
        get => iterationLimit;
        init => iterationLimit = value > 0
            ? value
            : throw new ArgumentOutOfRangeException(nameof(IterationLimit), value, "At least one iteration is needed.");
    }

    /// <summary>
    /// A factorization to solve with instead of iterations; it receives symmetric positive definite matrices.
    /// </summary>
    public IFactorizer<double>? Factorizer { get; init; }
}
