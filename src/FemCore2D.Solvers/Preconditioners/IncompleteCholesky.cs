using System.Numerics;
using FemCore2D.Sparse;

namespace FemCore2D.Solvers;

/// <summary>
/// The incomplete Cholesky factorization with zero fill of a symmetric or Hermitian positive definite matrix, as a
/// preconditioner.
/// </summary>
/// <typeparam name="T">The number type: <see cref="double"/> or <see cref="Complex"/>.</typeparam>
/// <remarks>
/// J. A. Meijerink and H. A. van der Vorst 1977: elimination that keeps the zeros of the matrix. Where a pivot would
/// not be positive, a multiple of the diagonal is added and the factorization begun anew (T. A. Manteuffel 1980).
/// The factors are stored in single precision. Both the factorization and its use run over independent chunks of
/// unknowns, with the same bits for any number of threads.
/// </remarks>
public sealed class IncompleteCholesky<T> : ITeamPreconditioner<T>
    where T : unmanaged, INumberBase<T>
{
    private readonly IncompleteFactor<T> factor;

    /// <summary>Factorizes a matrix.</summary>
    /// <param name="matrix">A symmetric or Hermitian matrix; it is not needed after the call.</param>
    /// <param name="shift">The multiple of the diagonal to begin with; 0 by default.</param>
    /// <param name="threads">The largest number of threads; 0 for one a processor. The result is the same for any.</param>
    /// <param name="cancellationToken">Stops the work.</param>
    /// <exception cref="ArgumentException">The matrix is not square.</exception>
    /// <exception cref="ArgumentOutOfRangeException">The shift is negative or not finite.</exception>
    /// <exception cref="UnsuitableMatrixException">The matrix is not Hermitian or has entries that are not finite.</exception>
    /// <exception cref="NotPositiveDefiniteException">A diagonal entry is not positive.</exception>
    /// <exception cref="OperationCanceledException">The work was stopped.</exception>
    public IncompleteCholesky(
        SparseMatrix<T> matrix, double shift = 0, int threads = 0, CancellationToken cancellationToken = default)
    {
        MatrixChecks.RequireHermitian(matrix);
        if (!(shift >= 0) || !double.IsFinite(shift))
        {
            throw new ArgumentOutOfRangeException(nameof(shift), shift, "The shift must be zero or positive.");
        }

        cancellationToken.ThrowIfCancellationRequested();
        ChunkedOrder order = ChunkedOrder.Create(matrix.Pattern);
        factor = IncompleteFactor<T>.Create(matrix, order, shift, threads, cancellationToken);
    }

    /// <inheritdoc/>
    public int Size => factor.Scale.Length;

    /// <summary>The multiple of the diagonal that was added to keep the pivots positive; 0 where none was needed.</summary>
    public double Shift => factor.Shift;

    /// <inheritdoc/>
    public unsafe void Apply(ReadOnlySpan<T> residual, Span<T> correction)
    {
        MatrixChecks.RequireLengths(residual, correction, Size);
        fixed (T* from = residual)
        fixed (T* to = correction)
        {
            TriangularSweep<T>.Apply(factor, from, to);
        }
    }

    /// <inheritdoc/>
    ITeamApplication<T> ITeamPreconditioner<T>.CreateApplication() => new TriangularSweep<T>(factor);
}
