using FemCore2D.Geometry;

namespace FemCore2D.Solvers;

/// <summary>How a direct factorization is to be made, and what it may cost.</summary>
public sealed record DirectOptions
{
    /// <summary>How the order of elimination is found, where <see cref="Ordering"/> is not given.</summary>
    public OrderingMethod OrderingMethod { get; init; }

    /// <summary>An order of elimination to use, or null to have one found.</summary>
    public Ordering? Ordering { get; init; }

    /// <summary>The point of each unknown where the caller has them: ordering is then nearly free. Empty by default.</summary>
    public ReadOnlyMemory<Point2D> Points { get; init; }

    /// <summary>The bytes that a factorization may take, checked before they are spent; no limit by default.</summary>
    /// <exception cref="ArgumentOutOfRangeException">The value is not positive.</exception>
    public long MaximumBytes
    {
        get;
        init => field = value > 0
            ? value
            : throw new ArgumentOutOfRangeException(nameof(value), value, "The limit must be positive.");
    } = long.MaxValue;

    /// <summary>The largest number of threads; 0, the default, for one a processor. The bits are the same for any.</summary>
    /// <exception cref="ArgumentOutOfRangeException">The value is negative.</exception>
    public int Threads
    {
        get;
        init => field = value >= 0
            ? value
            : throw new ArgumentOutOfRangeException(nameof(value), value, "The number of threads cannot be negative.");
    }

    /// <summary>
    /// The steps of iterative refinement that a solve may take, where the kind of factorization pivots; 6 by default. It
    /// stops as soon as the backward error is of the size of rounding.
    /// </summary>
    /// <exception cref="ArgumentOutOfRangeException">The value is negative.</exception>
    public int RefinementSteps
    {
        get;
        init => field = value >= 0
            ? value
            : throw new ArgumentOutOfRangeException(nameof(value), value, "The number of steps cannot be negative.");
    } = 6;

    /// <summary>Is told the share of the numeric work that is done, from 0 to 1, by any of the threads.</summary>
    public IProgress<double>? Progress { get; init; }
}
