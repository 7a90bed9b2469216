using System.Numerics;

namespace FemCore2D.Solvers;

/// <summary>A cheap stand-in for the inverse of a matrix, which makes an iterative solver converge faster.</summary>
/// <typeparam name="T">The number type: <see cref="double"/> or <see cref="Complex"/>.</typeparam>
/// <remarks>It must be linear, and the same at each call. For conjugate gradients it must be Hermitian and positive definite.</remarks>
public interface IPreconditioner<T>
    where T : unmanaged, INumberBase<T>
{
    /// <summary>The number of unknowns.</summary>
    int Size { get; }

    /// <summary>Turns a residual into a correction. Safe to call from many threads with different spans.</summary>
    /// <param name="residual">The residual, <see cref="Size"/> long.</param>
    /// <param name="correction">Receives the correction, <see cref="Size"/> long; may be the same memory as <paramref name="residual"/>.</param>
    void Apply(ReadOnlySpan<T> residual, Span<T> correction);
}
