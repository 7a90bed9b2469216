using System.Numerics;
using FemCore2D.Sparse;

namespace FemCore2D.Solvers;

/// <summary>Factorizes sparse matrices of one class directly: analysis and numbers in one call.</summary>
/// <typeparam name="T">The number type: <see cref="double"/> or <see cref="Complex"/>.</typeparam>
/// <param name="kind">The class of matrices.</param>
/// <param name="options">The options, or null for the defaults.</param>
public sealed class DirectFactorizer<T>(FactorizationKind kind, DirectOptions? options = null) : IFactorizer<T>
    where T : unmanaged, INumberBase<T>
{
    /// <summary>A diagonal entry below this share of the largest in its row is weak.</summary>
    private const double Weak = 0.01;

    /// <summary>The class of matrices.</summary>
    public FactorizationKind Kind => kind;

    /// <summary>The options.</summary>
    public DirectOptions Options { get; } = options ?? new DirectOptions();

    /// <summary>Factorizes a matrix.</summary>
    /// <param name="matrix">The matrix; it is not changed, and not needed any more after the call.</param>
    /// <param name="cancellationToken">Stops the work.</param>
    /// <exception cref="ArgumentException">The matrix is not square, or the options do not fit it.</exception>
    /// <exception cref="UnsuitableMatrixException">The matrix is not of its class, or not finite.</exception>
    /// <exception cref="NotPositiveDefiniteException">The kind is Cholesky and the matrix is not positive definite.</exception>
    /// <exception cref="SingularMatrixException">The matrix is singular.</exception>
    /// <exception cref="FactorTooLargeException">The factorization would need more memory than the options allow.</exception>
    /// <exception cref="OperationCanceledException">The work was stopped.</exception>
    /// <remarks>
    /// Where diagonal entries are zero or weak, as in saddle-point matrices, the symmetric kind eliminates each such
    /// unknown together with the one it is bound to most (in the spirit of I. S. Duff and S. Pralet 2005).
    /// </remarks>
    public DirectFactorization<T> Factorize(SparseMatrix<T> matrix, CancellationToken cancellationToken = default)
    {
        ArgumentNullException.ThrowIfNull(matrix);
        int[]? partners = Kind == FactorizationKind.Symmetric && matrix.RowCount == matrix.ColumnCount
            ? FindPartners(matrix)
            : null;
        return FactorizationPlan<T>.Make(matrix.Pattern, Kind, Options, partners, cancellationToken)
            .Factorize(matrix, cancellationToken);
    }

    /// <inheritdoc/>
    IFactorization<T> IFactorizer<T>.Factorize(SparseMatrix<T> matrix, CancellationToken cancellationToken) =>
        Factorize(matrix, cancellationToken);

    private static int[]? FindPartners(SparseMatrix<T> matrix)
    {
        SparsePattern pattern = matrix.Pattern;
        ReadOnlySpan<int> starts = pattern.RowStarts;
        ReadOnlySpan<int> columns = pattern.Columns;
        ReadOnlySpan<T> values = matrix.Values;
        int[]? partners = null;
        double[] diagonals = new double[pattern.RowCount];
        for (int i = 0; i < diagonals.Length; i++)
        {
            int at = pattern.PositionOf(i, i);
            diagonals[i] = at < 0 ? 0.0 : Scalar.Magnitude(values[at]);
        }

        for (int i = 0; i < diagonals.Length; i++)
        {
            double largest = 0.0;
            for (int k = starts[i]; k < starts[i + 1]; k++)
                largest = Math.Max(largest, Scalar.Magnitude(values[k]));
            if (diagonals[i] >= Weak * largest || (partners is not null && partners[i] >= 0))
                continue;

            // The best pivot of two is the one whose off-diagonal entry outweighs its diagonal most.
            int best = -1;
            double bestShare = 0.0;
            for (int k = starts[i]; k < starts[i + 1]; k++)
            {
                int j = columns[k];
                if (j == i || (partners is not null && partners[j] >= 0))
                    continue;
                double size = Scalar.Magnitude(values[k]);
                double share = size * size / (diagonals[j] + size);
                if (share > bestShare)
                {
                    best = j;
                    bestShare = share;
                }
            }

            if (best < 0)
                continue;
            partners ??= NewPartners(diagonals.Length);
            partners[i] = best;
            partners[best] = i;
        }

        return partners;
    }

    private static int[] NewPartners(int count)
    {
        int[] partners = new int[count];
        partners.AsSpan().Fill(-1);
        return partners;
    }
}
