namespace FemCore2D.Solvers;

/// <summary>What a direct factorization has used and spent.</summary>
public sealed record DirectReport
{
    /// <summary>How the order of elimination was found.</summary>
    public required OrderingMethod Ordering { get; init; }

    /// <summary>The entries of the factors, with the zeros stored to keep blocks dense.</summary>
    public required long FactorEntries { get; init; }

    /// <summary>The floating-point operations of the factorization; a complex multiplication counts as one.</summary>
    public required double Operations { get; init; }

    /// <summary>The bytes of the factors and of the workspace.</summary>
    public required long Bytes { get; init; }

    /// <summary>The pivots that were too small and were raised; the solves then depend on refinement.</summary>
    public required int RaisedPivots { get; init; }

    /// <summary>The time that the ordering took.</summary>
    public required TimeSpan OrderingTime { get; init; }

    /// <summary>The time that the rest of the analysis took.</summary>
    public required TimeSpan AnalysisTime { get; init; }

    /// <summary>The time that the last numeric factorization took.</summary>
    public required TimeSpan FactorizationTime { get; init; }
}
