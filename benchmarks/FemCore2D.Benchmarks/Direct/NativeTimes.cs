namespace FemCore2D.Benchmarks;

/// <summary>What a native library took.</summary>
internal sealed record NativeTimes(TimeSpan Analysis, TimeSpan Factorization, TimeSpan Solve, TimeSpan Again, long Bytes)
{
    /// <summary>Analysis, first factorization and solve.</summary>
    public TimeSpan Total => Analysis + Factorization + Solve;
}
