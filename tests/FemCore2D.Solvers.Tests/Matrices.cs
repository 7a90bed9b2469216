using System.Numerics;
using FemCore2D.Sparse;
using FsCheck;
using FsCheck.Fluent;

namespace FemCore2D.Solvers.Tests;

/// <summary>A random sparse matrix of a size and an amount of entries, told by its seed.</summary>
public sealed record Recipe(int Size, int Entries, int Seed);

/// <summary>Matrices to solve with.</summary>
public static class Matrices
{
    public static Arbitrary<Recipe> Recipes() => Arb.From(
        from size in Gen.Choose(1, 40)
        from entries in Gen.Choose(0, 120)
        from seed in Gen.Choose(0, int.MaxValue - 1)
        select new Recipe(size, entries, seed));

    /// <summary>The five-point Laplacian on a square grid with zero values around.</summary>
    /// <remarks>
    /// In complex numbers each coupling carries a phase that grows along the rows, as for a charge in a magnetic field;
    /// the matrix stays Hermitian and positive definite.
    /// </remarks>
    public static SparseMatrix<T> Laplacian<T>(int n, double fieldPerCell = 0.1)
        where T : unmanaged, INumberBase<T> => Grid(n, 4, (dx, j) => Scalar.IsComplex<T>() && dx != 0
            ? Scalar.Create<T>(-Math.Cos(fieldPerCell * j), -dx * Math.Sin(fieldPerCell * j))
            : -T.One);

    /// <summary>A five-point matrix on a square grid.</summary>
    public static SparseMatrix<T> Grid<T>(int n, double diagonal, Func<int, int, T> coupling)
        where T : unmanaged, INumberBase<T>
    {
        List<int> rows = [];
        List<int> columns = [];
        List<T> values = [];
        for (int j = 0; j < n; j++)
        {
            for (int i = 0; i < n; i++)
            {
                Add(i, j, 0, 0);
                Add(i, j, -1, 0);
                Add(i, j, 1, 0);
                Add(i, j, 0, -1);
                Add(i, j, 0, 1);
            }
        }

        return SparseMatrices.FromTriplets<T>(n * n, n * n, rows.ToArray(), columns.ToArray(), values.ToArray());

        void Add(int i, int j, int dx, int dy)
        {
            if (i + dx >= 0 && i + dx < n && j + dy >= 0 && j + dy < n)
            {
                rows.Add((j * n) + i);
                columns.Add(((j + dy) * n) + i + dx);
                values.Add(dx == 0 && dy == 0 ? Scalar.Create<T>(diagonal) : coupling(dx, j));
            }
        }
    }

    /// <summary>A random Hermitian positive definite matrix, <c>B B^H + D</c>.</summary>
    public static SparseMatrix<T> PositiveDefinite<T>(Recipe recipe)
        where T : unmanaged, INumberBase<T>
    {
        Random random = new(recipe.Seed);
        SparseMatrix<T> b = SparseMatrices.FromTriplets<T>(
            recipe.Size,
            recipe.Size,
            Enumerable.Range(0, recipe.Entries).Select(_ => random.Next(recipe.Size)).ToArray(),
            Enumerable.Range(0, recipe.Entries).Select(_ => random.Next(recipe.Size)).ToArray(),
            Vector<T>(recipe.Entries, recipe.Seed));
        SparseMatrix<T> shift = SparseMatrices.Identity<T>(recipe.Size);
        for (int i = 0; i < recipe.Size; i++)
        {
            shift.Entry(i, i) = Scalar.Create<T>(0.1 + random.NextDouble());
        }

        return b.Multiply(b.ConjugateTranspose()).Add(shift);
    }

    public static T[] Vector<T>(int length, int seed)
        where T : unmanaged, INumberBase<T>
    {
        Random random = new(seed);
        return Enumerable.Range(0, length)
            .Select(_ => Scalar.Create<T>(random.NextDouble() - 0.5, random.NextDouble() - 0.5)).ToArray();
    }

    public static double Norm<T>(ReadOnlySpan<T> vector)
        where T : unmanaged, INumberBase<T>
    {
        double sum = 0;
        foreach (T value in vector)
        {
            sum += Scalar.MagnitudeSquared(value);
        }

        return Math.Sqrt(sum);
    }

    public static double RelativeDifference<T>(ReadOnlySpan<T> expected, ReadOnlySpan<T> actual)
        where T : unmanaged, INumberBase<T>
    {
        T[] difference = new T[expected.Length];
        for (int i = 0; i < difference.Length; i++)
        {
            difference[i] = expected[i] - actual[i];
        }

        double norm = Norm(expected);
        return norm == 0 ? Norm<T>(difference) : Norm<T>(difference) / norm;
    }

    public static double RelativeResidual<T>(SparseMatrix<T> matrix, ReadOnlySpan<T> solution, ReadOnlySpan<T> rightHandSide)
        where T : unmanaged, INumberBase<T> => RelativeDifference(rightHandSide, matrix.Multiply(solution));
}
