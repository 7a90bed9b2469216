using System.Numerics;
using FsCheck;
using FsCheck.Fluent;
using MathNet.Numerics.LinearAlgebra;

namespace FemCore2D.Sparse.Tests;

/// <summary>A random matrix as places and values, some places more than once.</summary>
/// <param name="RowCount">The number of rows.</param>
/// <param name="ColumnCount">The number of columns.</param>
/// <param name="Rows">The row of each value.</param>
/// <param name="Columns">The column of each value.</param>
/// <param name="Quarters">The real and imaginary part of each value, in quarters.</param>
/// <remarks>
/// The values are small multiples of 1/4, so that sums and products are exact in any order, and results can be compared
/// for equality.
/// </remarks>
public sealed record Triplets(int RowCount, int ColumnCount, int[] Rows, int[] Columns, (int Re, int Im)[] Quarters)
{
    public T[] Values<T>()
        where T : unmanaged, INumberBase<T> =>
        Quarters.Select(q => Scalar.Create<T>(q.Re / 4.0, q.Im / 4.0)).ToArray();

    public SparseMatrix<T> Sparse<T>()
        where T : unmanaged, INumberBase<T> =>
        SparseMatrices.FromTriplets<T>(RowCount, ColumnCount, Rows, Columns, Values<T>());

    public Matrix<T> Dense<T>()
        where T : unmanaged, INumberBase<T>
    {
        Matrix<T> dense = Matrix<T>.Build.Dense(RowCount, ColumnCount);
        T[] values = Values<T>();
        for (int i = 0; i < Rows.Length; i++)
        {
            dense[Rows[i], Columns[i]] += values[i];
        }

        return dense;
    }

    public override string ToString() =>
        $"{RowCount} x {ColumnCount}: " + string.Join(", ", Rows.Zip(Columns, Quarters));
}

/// <summary>Two matrices of the same size.</summary>
public sealed record SameSize(Triplets First, Triplets Second);

/// <summary>Two matrices that can be multiplied.</summary>
public sealed record Chain(Triplets First, Triplets Second);

/// <summary>Generators of random matrices.</summary>
public static class Samples
{
    public const int Largest = 9;

    public static Arbitrary<Triplets> Any() => Arb.From(
        from m in Gen.Choose(1, Largest)
        from n in Gen.Choose(1, Largest)
        from t in Of(m, n)
        select t);

    public static Arbitrary<SameSize> Pair() => Arb.From(
        from m in Gen.Choose(1, Largest)
        from n in Gen.Choose(1, Largest)
        from a in Of(m, n)
        from b in Of(m, n)
        select new SameSize(a, b));

    public static Arbitrary<Chain> Factors() => Arb.From(
        from m in Gen.Choose(1, Largest)
        from k in Gen.Choose(1, Largest)
        from n in Gen.Choose(1, Largest)
        from a in Of(m, k)
        from b in Of(k, n)
        select new Chain(a, b));

    /// <summary>A large random matrix of many row blocks, with rows of very different length.</summary>
    public static SparseMatrix<T> Large<T>(int rows, int columns, int entries, int seed)
        where T : unmanaged, INumberBase<T>
    {
        Random random = new(seed);
        int[] r = new int[entries];
        int[] c = new int[entries];
        T[] v = new T[entries];
        for (int i = 0; i < entries; i++)
        {
            r[i] = random.Next(random.Next(rows) + 1);
            c[i] = random.Next(columns);
            v[i] = Scalar.Create<T>(random.NextDouble() - 0.5, random.NextDouble() - 0.5);
        }

        return SparseMatrices.FromTriplets<T>(rows, columns, r, c, v);
    }

    public static T[] Vector<T>(int length, int seed)
        where T : unmanaged, INumberBase<T>
    {
        Random random = new(seed);
        T[] vector = new T[length];
        for (int i = 0; i < length; i++)
        {
            vector[i] = Scalar.Create<T>(random.Next(-20, 21) / 4.0, random.Next(-20, 21) / 4.0);
        }

        return vector;
    }

    private static Gen<Triplets> Of(int m, int n) =>
        from count in Gen.Choose(0, 3 * Largest)
        from rows in Gen.Choose(0, m - 1).ArrayOf(count)
        from columns in Gen.Choose(0, n - 1).ArrayOf(count)
        from re in Gen.Choose(-16, 16).ArrayOf(count)
        from im in Gen.Choose(-16, 16).ArrayOf(count)
        select new Triplets(m, n, rows, columns, re.Zip(im).ToArray());
}
