using System.Numerics;
using FemCore2D.Sparse;

namespace FemCore2D.Solvers;

/// <summary>Makes plans of direct factorizations.</summary>
public static class FactorizationPlan
{
    /// <summary>Makes a plan.</summary>
    /// <typeparam name="T">The number type: <see cref="double"/> or <see cref="Complex"/>.</typeparam>
    /// <param name="pattern">The pattern; for the symmetric kinds it stores the entries on both sides of the diagonal.</param>
    /// <param name="kind">The class of matrices.</param>
    /// <param name="options">The options, or null for the defaults.</param>
    /// <param name="cancellationToken">Stops the work.</param>
    /// <exception cref="ArgumentException">The pattern is not square, or the options do not fit it.</exception>
    /// <exception cref="UnsuitableMatrixException">The kind is symmetric and the pattern is not.</exception>
    /// <exception cref="FactorTooLargeException">The factorization would need more memory than the options allow.</exception>
    /// <exception cref="OperationCanceledException">The work was stopped.</exception>
    public static FactorizationPlan<T> Make<T>(
        SparsePattern pattern,
        FactorizationKind kind,
        DirectOptions? options = null,
        CancellationToken cancellationToken = default)
        where T : unmanaged, INumberBase<T> =>
        FactorizationPlan<T>.Make(pattern, kind, options ?? new DirectOptions(), null, cancellationToken);
}
