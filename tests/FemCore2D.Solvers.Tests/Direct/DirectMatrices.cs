using System.Numerics;
using FemCore2D.Sparse;
using MathNet.Numerics.LinearAlgebra;

namespace FemCore2D.Solvers.Tests;

/// <summary>Matrices for the direct solvers, made from a seed.</summary>
internal static class DirectMatrices
{
    /// <summary>The Laplacian of a grid, with four times the identity's share on the diagonal.</summary>
    public static SparseMatrix<double> Grid(int columns, int rows, double diagonal = 4.0)
    {
        List<int> i = [];
        List<int> j = [];
        List<double> v = [];
        for (int y = 0; y < rows; y++)
        {
            for (int x = 0; x < columns; x++)
            {
                int own = y * columns + x;
                i.Add(own);
                j.Add(own);
                v.Add(diagonal);
                if (x + 1 < columns)
                    Both(i, j, v, own, own + 1);
                if (y + 1 < rows)
                    Both(i, j, v, own, own + columns);
            }
        }

        return SparseMatrices.FromTriplets<double>(columns * rows, columns * rows, [.. i], [.. j], [.. v]);
    }

    /// <summary>A symmetric pattern of a seed, with the full diagonal, and random values put through a rule.</summary>
    public static SparseMatrix<T> Symmetric<T>(int seed, int size, Func<Random, T> value, bool hermitian, Func<Random, T> diagonal)
        where T : unmanaged, INumberBase<T>
    {
        Random random = new(seed);
        Dictionary<(int, int), T> entries = [];
        for (int k = 0; k < size; k++)
            entries[(k, k)] = diagonal(random);
        int edges = random.Next(0, 3 * size);
        for (int k = 0; k < edges; k++)
        {
            int a = random.Next(size);
            int b = random.Next(size);
            if (a == b)
                continue;
            T x = value(random);
            entries[(a, b)] = x;
            entries[(b, a)] = hermitian ? Scalar.Conjugate(x) : x;
        }

        return From(size, entries);
    }

    /// <summary>A matrix of a seed without any symmetry.</summary>
    public static SparseMatrix<T> General<T>(int seed, int size, Func<Random, T> value)
        where T : unmanaged, INumberBase<T>
    {
        Random random = new(seed);
        Dictionary<(int, int), T> entries = [];
        for (int k = 0; k < size; k++)
            entries[(k, k)] = value(random);
        int count = random.Next(0, 4 * size);
        for (int k = 0; k < count; k++)
            entries[(random.Next(size), random.Next(size))] = value(random);
        return From(size, entries);
    }

    /// <summary>A copy with every diagonal entry raised to dominate its row.</summary>
    public static SparseMatrix<T> Dominant<T>(SparseMatrix<T> matrix)
        where T : unmanaged, INumberBase<T>
    {
        SparseMatrix<T> copy = matrix.Copy();
        for (int i = 0; i < copy.RowCount; i++)
        {
            double sum = 0.1;
            foreach (int j in copy.Pattern.ColumnsOf(i))
                sum += j == i ? 0.0 : Scalar.Magnitude(copy[i, j]);
            copy.Entry(i, i) = Scalar.Create<T>(sum);
        }

        return copy;
    }

    public static double Real(Random random) => 2.0 * random.NextDouble() - 1.0;

    public static Complex Complex(Random random) => new(Real(random), Real(random));

    public static T[] RightHandSide<T>(int size, int seed = 1)
        where T : unmanaged, INumberBase<T>
    {
        Random random = new(seed);
        T[] b = new T[size];
        for (int i = 0; i < size; i++)
            b[i] = Scalar.Create<T>(Real(random), Scalar.IsComplex<T>() ? Real(random) : 0.0);
        return b;
    }

    /// <summary>The size of the residual relative to those of the matrix, the solution and the right-hand side.</summary>
    public static double BackwardError<T>(SparseMatrix<T> a, ReadOnlySpan<T> x, ReadOnlySpan<T> b)
        where T : unmanaged, INumberBase<T>
    {
        T[] product = a.Multiply(x, 1);
        double residual = 0.0;
        double solution = 0.0;
        double right = 0.0;
        for (int i = 0; i < b.Length; i++)
        {
            residual = Math.Max(residual, Scalar.Magnitude(b[i] - product[i]));
            solution = Math.Max(solution, Scalar.Magnitude(x[i]));
            right = Math.Max(right, Scalar.Magnitude(b[i]));
        }

        return residual / (a.InfinityNorm() * solution + right);
    }

    public static Matrix<double> Dense(SparseMatrix<double> a) =>
        Matrix<double>.Build.Dense(a.RowCount, a.ColumnCount, (i, j) => a[i, j]);

    public static Matrix<Complex> Dense(SparseMatrix<Complex> a) =>
        Matrix<Complex>.Build.Dense(a.RowCount, a.ColumnCount, (i, j) => a[i, j]);

    private static void Both(List<int> i, List<int> j, List<double> v, int a, int b)
    {
        i.AddRange([a, b]);
        j.AddRange([b, a]);
        v.AddRange([-1.0, -1.0]);
    }

    private static SparseMatrix<T> From<T>(int size, Dictionary<(int Row, int Column), T> entries)
        where T : unmanaged, INumberBase<T>
    {
        (int Row, int Column)[] keys = [.. entries.Keys.Order()];
        return SparseMatrices.FromTriplets<T>(
            size, size, [.. keys.Select(k => k.Row)], [.. keys.Select(k => k.Column)], [.. keys.Select(k => entries[k])]);
    }
}
