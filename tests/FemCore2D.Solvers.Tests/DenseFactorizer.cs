using System.Numerics;
using FemCore2D.Sparse;
using MathNet.Numerics.LinearAlgebra.Factorization;

namespace FemCore2D.Solvers.Tests;

/// <summary>A foreign factorization behind the seam: the dense LU factorization of MathNet.Numerics.</summary>
public sealed class DenseFactorizer<T> : IFactorizer<T>
    where T : unmanaged, INumberBase<T>
{
    public IFactorization<T> Factorize(SparseMatrix<T> matrix, CancellationToken cancellationToken = default)
    {
        cancellationToken.ThrowIfCancellationRequested();
        return new Factors(matrix.ToMathNetDense().LU(), matrix.RowCount);
    }

    private sealed class Factors(LU<T> factors, int size) : IFactorization<T>
    {
        public int Size => size;

        public void Solve(ReadOnlySpan<T> rightHandSide, Span<T> solution) =>
            factors.Solve(rightHandSide.ToMathNetVector()).ToArray().CopyTo(solution);
    }
}
