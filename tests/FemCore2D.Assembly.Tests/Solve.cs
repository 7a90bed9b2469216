using System.Numerics;
using FemCore2D.Solvers;
using FemCore2D.Sparse;
using MathNet.Numerics.LinearAlgebra;
using DenseVector = MathNet.Numerics.LinearAlgebra.CreateVector;

namespace FemCore2D.Assembly.Tests;

/// <summary>Solves the systems of the tests.</summary>
internal static class Solve
{
    /// <summary>The field that solves a system under constraints.</summary>
    public static NodeField<T> Field<T>(ResolvedConstraints<T> constraints, SparseMatrix<T> matrix, T[] load)
        where T : unmanaged, INumberBase<T>
    {
        T[] free = System(constraints.Reduce(matrix), constraints.Reduce(matrix, load));
        return new NodeField<T>(constraints.Space, constraints.Expand(free));
    }

    /// <summary>The field that solves a positive definite system under constraints, by conjugate gradients.</summary>
    public static NodeField<double> PositiveField(
        ResolvedConstraints<double> constraints, SparseMatrix<double> matrix, double[] load)
    {
        SparseMatrix<double> reduced = constraints.Reduce(matrix);
        IterationResult<double> result = new ConjugateGradients<double>(reduced, new JacobiPreconditioner<double>(reduced))
            .Solve(constraints.Reduce(matrix, load), new IterationOptions { RelativeTolerance = 1e-13 });
        result.EnsureConverged();
        return new NodeField<double>(constraints.Space, constraints.Expand(result.Solution.AsSpan()));
    }

    /// <summary>The solution of a system, by a dense factorization of MathNet.</summary>
    public static T[] System<T>(SparseMatrix<T> matrix, T[] rightHandSide)
        where T : unmanaged, INumberBase<T>
    {
        if (matrix is SparseMatrix<double> real && rightHandSide is double[] load)
        {
            return (T[])(object)DenseOf(real).Solve(DenseVector.Dense(load)).ToArray();
        }

        var complex = (SparseMatrix<Complex>)(object)matrix;
        return (T[])(object)DenseOf(complex)
            .Solve(DenseVector.Dense((Complex[])(object)rightHandSide)).ToArray();
    }

    /// <summary>All entries of a matrix, zeros included.</summary>
    public static Matrix<T> DenseOf<T>(SparseMatrix<T> matrix)
        where T : unmanaged, INumberBase<T>
    {
        Matrix<T> dense = Matrix<T>.Build.Dense(matrix.RowCount, matrix.ColumnCount);
        for (int row = 0; row < matrix.RowCount; row++)
        {
            for (int k = matrix.Pattern.RowStarts[row]; k < matrix.Pattern.RowStarts[row + 1]; k++)
            {
                dense[row, matrix.Pattern.Columns[k]] = matrix.Values[k];
            }
        }

        return dense;
    }
}
