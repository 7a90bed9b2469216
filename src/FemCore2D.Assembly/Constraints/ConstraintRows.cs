using System.Numerics;
using FemCore2D.Sparse;

namespace FemCore2D.Assembly;

/// <summary>
/// The matrix C of <c>u = C v + g</c>, with at most one entry in each row, and the unknowns that share each column. It
/// does not depend on given values, and is shared by all resolved constraints that differ in these only.
/// </summary>
internal sealed class ConstraintRows<T>
    where T : unmanaged, INumberBase<T>
{
    private readonly Lock reductionLock = new();
    private MatrixReduction<T>? reduction;

    public ConstraintRows(int[] columns, T[] weights, int columnCount)
    {
        Columns = columns;
        Weights = weights.AsSpan().ContainsAnyExcept(T.One) ? weights : null;
        ColumnCount = columnCount;

        MemberStarts = new int[columnCount + 1];
        foreach (int column in columns)
        {
            if (column >= 0)
            {
                MemberStarts[column + 1]++;
            }
        }

        for (int column = 0; column < columnCount; column++)
        {
            MemberStarts[column + 1] += MemberStarts[column];
        }

        Members = new int[MemberStarts[columnCount]];
        int[] next = MemberStarts[..columnCount];
        for (int unknown = 0; unknown < columns.Length; unknown++)
        {
            if (columns[unknown] >= 0)
            {
                Members[next[columns[unknown]]++] = unknown;
            }
        }
    }

    /// <summary>For each unknown the free unknown that it follows, -1 when it is fixed.</summary>
    public int[] Columns { get; }

    /// <summary>
    /// For each unknown its multiple of the free unknown or, if it is fixed, of the unknown that was fixed first; null
    /// when all are one.
    /// </summary>
    public T[]? Weights { get; }

    /// <summary>The number of free unknowns.</summary>
    public int ColumnCount { get; }

    /// <summary>For each free unknown the first of its members, and after the last their number.</summary>
    public int[] MemberStarts { get; }

    /// <summary>The unknowns that follow each free unknown, ascending.</summary>
    public int[] Members { get; }

    public T WeightOf(int unknown) => Weights is null ? T.One : Weights[unknown];

    public ReadOnlySpan<int> MembersOf(int column) =>
        Members.AsSpan(MemberStarts[column], MemberStarts[column + 1] - MemberStarts[column]);

    /// <summary>The reduction of matrices with a pattern; the last one is kept.</summary>
    public MatrixReduction<T> ReductionOf(SparsePattern full)
    {
        lock (reductionLock)
        {
            if (reduction is null || !ReferenceEquals(reduction.Full, full))
            {
                reduction = new MatrixReduction<T>(this, full);
            }

            return reduction;
        }
    }
}
