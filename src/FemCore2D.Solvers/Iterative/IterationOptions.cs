namespace FemCore2D.Solvers;

/// <summary>When an iterative solver is to stop, and on how many threads it may run.</summary>
public sealed record IterationOptions
{
    /// <summary>
    /// The residual to reach, relative to the right-hand side, both in the Euclidean norm; 1e-10 by default. It is met
    /// where either tolerance is.
    /// </summary>
    /// <exception cref="ArgumentOutOfRangeException">The value is negative, one or more, or not a number.</exception>
    public double RelativeTolerance
    {
        get;
        init => field = value is >= 0 and < 1
            ? value
            : throw new ArgumentOutOfRangeException(nameof(value), value, "The tolerance must lie in [0, 1).");
    } = 1e-10;

    /// <summary>The Euclidean norm of the residual to reach, in the unit of the right-hand side; 0 by default.</summary>
    /// <exception cref="ArgumentOutOfRangeException">The value is negative or not finite.</exception>
    public double AbsoluteTolerance
    {
        get;
        init => field = value >= 0 && double.IsFinite(value)
            ? value
            : throw new ArgumentOutOfRangeException(nameof(value), value, "The tolerance must be zero or positive.");
    }

    /// <summary>The largest number of iterations; 10 000 by default.</summary>
    /// <exception cref="ArgumentOutOfRangeException">The value is negative.</exception>
    public int IterationLimit
    {
        get;
        init => field = value >= 0
            ? value
            : throw new ArgumentOutOfRangeException(nameof(value), value, "The limit must be zero or positive.");
    } = 10_000;

    /// <summary>The iterations without a new smallest residual after which the solver gives up; 1000 by default.</summary>
    /// <exception cref="ArgumentOutOfRangeException">The value is not positive.</exception>
    public int StagnationWindow
    {
        get;
        init => field = value > 0
            ? value
            : throw new ArgumentOutOfRangeException(nameof(value), value, "The window must be positive.");
    } = 1000;

    /// <summary>The largest number of threads; 0, the default, for one a processor. The result is the same for any.</summary>
    /// <exception cref="ArgumentOutOfRangeException">The value is negative.</exception>
    public int Threads
    {
        get;
        init => field = value >= 0
            ? value
            : throw new ArgumentOutOfRangeException(nameof(value), value, "The number of threads cannot be negative.");
    }
}
