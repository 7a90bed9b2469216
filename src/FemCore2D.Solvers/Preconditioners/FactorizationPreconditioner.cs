using System.Numerics;

namespace FemCore2D.Solvers;

/// <summary>A factorization, of a nearby or a simpler matrix, that serves as a preconditioner.</summary>
/// <typeparam name="T">The number type: <see cref="double"/> or <see cref="Complex"/>.</typeparam>
/// <param name="factorization">The factorization.</param>
public sealed class FactorizationPreconditioner<T>(IFactorization<T> factorization) : IPreconditioner<T>
    where T : unmanaged, INumberBase<T>
{
    private readonly IFactorization<T> factorization =
        factorization ?? throw new ArgumentNullException(nameof(factorization));

    /// <inheritdoc/>
    public int Size => factorization.Size;

    /// <inheritdoc/>
    public void Apply(ReadOnlySpan<T> residual, Span<T> correction) => factorization.Solve(residual, correction);
}
