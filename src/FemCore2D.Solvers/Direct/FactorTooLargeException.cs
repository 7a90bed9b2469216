namespace FemCore2D.Solvers;

/// <summary>A factorization would need more memory than it may take. It is raised before the memory is asked for.</summary>
public sealed class FactorTooLargeException : SolverException
{
    /// <summary>Creates the exception.</summary>
    /// <param name="requiredBytes">The bytes that are needed.</param>
    /// <param name="limitBytes">The bytes that are allowed.</param>
    public FactorTooLargeException(long requiredBytes, long limitBytes)
        : base(
            $"The factorization needs {requiredBytes / 1048576.0:F0} MiB; {limitBytes / 1048576.0:F0} MiB are allowed. "
            + "Raise the limit, give the points of the unknowns for a better order, or use an iterative solver.")
    {
        RequiredBytes = requiredBytes;
        LimitBytes = limitBytes;
    }

    /// <summary>The bytes that are needed.</summary>
    public long RequiredBytes { get; }

    /// <summary>The bytes that are allowed.</summary>
    public long LimitBytes { get; }
}
