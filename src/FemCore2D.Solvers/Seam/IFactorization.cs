using System.Numerics;

namespace FemCore2D.Solvers;

/// <summary>A matrix made ready for solving: any object that turns a right-hand side into a solution.</summary>
/// <typeparam name="T">The number type: <see cref="double"/> or <see cref="Complex"/>.</typeparam>
public interface IFactorization<T>
    where T : unmanaged, INumberBase<T>
{
    /// <summary>The number of unknowns.</summary>
    int Size { get; }

    /// <summary>Solves for one right-hand side. Safe to call from many threads with different spans.</summary>
    /// <param name="rightHandSide">The right-hand side, <see cref="Size"/> long.</param>
    /// <param name="solution">Receives the solution, <see cref="Size"/> long; may be the same memory as <paramref name="rightHandSide"/>.</param>
    void Solve(ReadOnlySpan<T> rightHandSide, Span<T> solution);
}
