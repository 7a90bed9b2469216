using System.Numerics;
using FemCore2D.Sparse;

namespace FemCore2D.Solvers;

/// <summary>The seam through which a host plugs in its own way of factorizing a sparse matrix.</summary>
/// <typeparam name="T">The number type: <see cref="double"/> or <see cref="Complex"/>.</typeparam>
public interface IFactorizer<T>
    where T : unmanaged, INumberBase<T>
{
    /// <summary>Factorizes a square matrix.</summary>
    /// <param name="matrix">The matrix; it is not changed, and not needed any more after the call.</param>
    /// <param name="cancellationToken">Stops the work.</param>
    /// <exception cref="OperationCanceledException">The work was stopped.</exception>
    IFactorization<T> Factorize(SparseMatrix<T> matrix, CancellationToken cancellationToken = default);
}
