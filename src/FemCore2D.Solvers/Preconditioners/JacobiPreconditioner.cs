using System.Numerics;
using FemCore2D.Sparse;

namespace FemCore2D.Solvers;

/// <summary>Division by the diagonal of a matrix: the cheapest preconditioner.</summary>
/// <typeparam name="T">The number type: <see cref="double"/> or <see cref="Complex"/>.</typeparam>
/// <remarks>C. G. J. Jacobi 1845.</remarks>
public sealed class JacobiPreconditioner<T> : IPreconditioner<T>
    where T : unmanaged, INumberBase<T>
{
    private readonly T[] inverse;

    /// <summary>Takes the diagonal of a matrix.</summary>
    /// <param name="matrix">A square matrix; it is not needed after the call.</param>
    /// <exception cref="ArgumentException">The matrix is not square.</exception>
    /// <exception cref="UnsuitableMatrixException">A diagonal entry is zero or not finite.</exception>
    public JacobiPreconditioner(SparseMatrix<T> matrix)
    {
        MatrixChecks.RequireSquare(matrix);
        inverse = matrix.Diagonal();
        for (int i = 0; i < inverse.Length; i++)
        {
            if (inverse[i] == T.Zero || !T.IsFinite(inverse[i]))
            {
                throw new UnsuitableMatrixException(
                    $"The diagonal entry of unknown {i} is {inverse[i]}; division by it is not possible. Check what "
                    + "acts on this unknown, or use another preconditioner.");
            }

            inverse[i] = T.One / inverse[i];
        }
    }

    /// <inheritdoc/>
    public int Size => inverse.Length;

    /// <inheritdoc/>
    public void Apply(ReadOnlySpan<T> residual, Span<T> correction)
    {
        MatrixChecks.RequireLengths(residual, correction, inverse.Length);
        for (int i = 0; i < inverse.Length; i++)
        {
            correction[i] = inverse[i] * residual[i];
        }
    }
}
