using System.Numerics;
using FemCore2D.Sparse;

namespace FemCore2D.Solvers;

/// <summary>
/// One pass over a matrix that finds its norms and diagonal, and whether it is finite, symmetric and Hermitian. Made
/// once for a pattern; a pass allocates nothing.
/// </summary>
internal sealed class MatrixInspection<T>
    where T : unmanaged, INumberBase<T>
{
    private const int BlockRows = 4096;

    /// <summary>The difference of mirrored entries, relative to the largest of their row, that passes for rounding.</summary>
    private const double MirrorTolerance = 1e-10;
    private readonly SparsePattern pattern;
    private readonly bool mirrored;
    private readonly Crew.Work work;
    private readonly double[] rowSums;
    private int firstInfinite;
    private int firstUnsymmetric;
    private int firstNotHermitian;
    private SparseMatrix<T>? matrix;

    /// <summary>Allocates what the passes need.</summary>
    /// <param name="pattern">The pattern.</param>
    /// <param name="mirrored">Whether to compare mirrored entries; the pattern must then be symmetric.</param>
    public MatrixInspection(SparsePattern pattern, bool mirrored)
    {
        this.pattern = pattern;
        this.mirrored = mirrored;
        rowSums = new double[pattern.RowCount];
        Diagonals = new double[pattern.RowCount];
        work = Inspect;
    }

    /// <summary>The real parts of the diagonal.</summary>
    public double[] Diagonals { get; }

    /// <summary>The largest sum of magnitudes in a row.</summary>
    public double RowNorm { get; private set; }

    /// <summary>The first row that mirrors its column not even but for conjugation, or -1.</summary>
    public int FirstNotHermitian => firstNotHermitian == int.MaxValue ? -1 : firstNotHermitian;

    /// <summary>The first row that differs from its column, or -1.</summary>
    public int FirstUnsymmetric => firstUnsymmetric == int.MaxValue ? -1 : firstUnsymmetric;

    /// <summary>Makes the pass.</summary>
    /// <exception cref="UnsuitableMatrixException">An entry is not finite.</exception>
    /// <exception cref="SingularMatrixException">A row is zero.</exception>
    public void Run(SparseMatrix<T> inspected, Crew crew)
    {
        matrix = inspected;
        firstInfinite = firstUnsymmetric = firstNotHermitian = int.MaxValue;
        crew.Run(work, (pattern.RowCount + BlockRows - 1) / BlockRows);
        matrix = null;
        if (firstInfinite != int.MaxValue)
        {
            throw new UnsuitableMatrixException(
                $"Row {firstInfinite} holds a value that is not finite. Check what acts on this unknown.");
        }

        RowNorm = 0.0;
        for (int i = 0; i < rowSums.Length; i++)
        {
            RowNorm = Math.Max(RowNorm, rowSums[i]);
            if (rowSums[i] == 0.0)
            {
                throw new SingularMatrixException(
                    $"Nothing acts on unknown {i}: its row is zero. Leave the unknown out, or fix its value.", i);
            }
        }
    }

    private void Inspect(int block, int place)
    {
        ReadOnlySpan<int> starts = pattern.RowStarts;
        ReadOnlySpan<int> columns = pattern.Columns;
        ReadOnlySpan<T> values = matrix!.Values;
        int end = Math.Min(pattern.RowCount, (block + 1) * BlockRows);
        for (int i = block * BlockRows; i < end; i++)
        {
            double sum = 0.0;
            double largest = 0.0;
            double diagonal = 0.0;
            for (int k = starts[i]; k < starts[i + 1]; k++)
            {
                double size = Scalar.Magnitude(values[k]);
                sum += size;
                largest = Math.Max(largest, size);
                if (columns[k] == i)
                    diagonal = Scalar.Real(values[k]);
            }

            rowSums[i] = sum;
            Diagonals[i] = diagonal;
            if (!double.IsFinite(sum))
                Lower(ref firstInfinite, i);
            else if (mirrored)
                Compare(i, starts, columns, values, MirrorTolerance * largest);
        }
    }

    private void Compare(int i, ReadOnlySpan<int> starts, ReadOnlySpan<int> columns, ReadOnlySpan<T> values, double tolerance)
    {
        for (int k = starts[i + 1] - 1; k >= starts[i] && columns[k] >= i; k--)
        {
            int j = columns[k];
            int at = starts[j] + columns[starts[j]..starts[j + 1]].BinarySearch(i);
            T own = values[k];
            T other = values[at];
            if (j != i && Scalar.Magnitude(own - other) > tolerance)
                Lower(ref firstUnsymmetric, i);
            if (Scalar.Magnitude(own - Scalar.Conjugate(other)) > tolerance)
                Lower(ref firstNotHermitian, i);
        }
    }

    private static void Lower(ref int least, int value)
    {
        int seen = Volatile.Read(ref least);
        while (value < seen)
        {
            int found = Interlocked.CompareExchange(ref least, value, seen);
            if (found == seen)
                return;
            seen = found;
        }
    }
}
