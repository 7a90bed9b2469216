using System.Numerics;

namespace FemCore2D.Sparse;

public sealed partial class SparseMatrix<T>
    where T : unmanaged, INumberBase<T>
{
    /// <summary>The largest sum of magnitudes in a column.</summary>
    public double OneNorm()
    {
        double[] sums = new double[ColumnCount];
        ReadOnlySpan<int> columns = Pattern.Columns;
        for (int k = 0; k < columns.Length; k++)
        {
            sums[columns[k]] += Scalar.Magnitude(values[k]);
        }

        return Largest(sums);
    }

    /// <summary>The largest sum of magnitudes in a row.</summary>
    public double InfinityNorm()
    {
        double[] sums = new double[RowCount];
        for (int row = 0; row < RowCount; row++)
        {
            for (int k = Pattern.RowStarts[row]; k < Pattern.RowStarts[row + 1]; k++)
            {
                sums[row] += Scalar.Magnitude(values[k]);
            }
        }

        return Largest(sums);
    }

    /// <summary>The root of the sum of the squares of all magnitudes, free of needless overflow and underflow.</summary>
    public double FrobeniusNorm()
    {
        double scale = LargestMagnitude();
        if (scale == 0 || !double.IsFinite(scale))
        {
            return scale;
        }

        double sum = 0;
        foreach (T value in values)
        {
            double part = Scalar.Magnitude(value) / scale;
            sum += part * part;
        }

        return scale * Math.Sqrt(sum);
    }

    /// <summary>The largest magnitude of an entry; 0 without entries, NaN where an entry is.</summary>
    public double LargestMagnitude()
    {
        double largest = 0;
        foreach (T value in values)
        {
            largest = Math.Max(largest, Scalar.Magnitude(value));
        }

        return largest;
    }

    /// <summary>Whether the matrix equals its transpose, where an entry that is not stored counts as zero.</summary>
    /// <param name="relativeTolerance">
    /// The largest difference between mirrored entries, relative to <see cref="LargestMagnitude"/>; 0 asks for equality.
    /// </param>
    /// <exception cref="ArgumentOutOfRangeException">The tolerance is negative or not a number.</exception>
    public bool IsSymmetric(double relativeTolerance = 0) => FindUnmirrored(relativeTolerance, conjugate: false) is null;

    /// <summary>Whether the matrix equals its conjugate transpose, where an entry that is not stored counts as zero.</summary>
    /// <inheritdoc cref="IsSymmetric"/>
    public bool IsHermitian(double relativeTolerance = 0) => FindUnmirrored(relativeTolerance, conjugate: true) is null;

    /// <summary>An entry that differs from its mirrored one by more than the tolerance, or null.</summary>
    /// <exception cref="ArgumentOutOfRangeException">The tolerance is negative or not a number.</exception>
    internal (int Row, int Column)? FindUnmirrored(double relativeTolerance, bool conjugate)
    {
        if (!(relativeTolerance >= 0))
        {
            throw new ArgumentOutOfRangeException(
                nameof(relativeTolerance), relativeTolerance, "The tolerance must be zero or positive.");
        }

        if (RowCount != ColumnCount)
        {
            return (0, 0);
        }

        double allowed = relativeTolerance * LargestMagnitude();
        ReadOnlySpan<int> columns = Pattern.Columns;
        ReadOnlySpan<int> starts = Pattern.RowStarts;

        // As rows ascend, each row is entered at the first place that no earlier row has been compared with.
        int[] next = starts[..RowCount].ToArray();
        for (int row = 0; row < RowCount; row++)
        {
            for (int k = next[row]; k < starts[row + 1]; k++)
            {
                int column = columns[k];
                T mirror = T.Zero;
                if (column > row)
                {
                    // Entries left of this row that no earlier row mirrors stand alone.
                    int place = next[column];
                    for (; place < starts[column + 1] && columns[place] < row; place++)
                    {
                        if (!IsSmall(values[place], allowed))
                        {
                            return (column, columns[place]);
                        }
                    }

                    if (place < starts[column + 1] && columns[place] == row)
                    {
                        mirror = values[place++];
                    }

                    next[column] = place;
                }
                else if (column == row)
                {
                    mirror = values[k];
                }

                if (!IsSmall(values[k] - (conjugate ? Scalar.Conjugate(mirror) : mirror), allowed))
                {
                    return (row, column);
                }
            }
        }

        return null;
    }

    private static bool IsSmall(T difference, double allowed) => Scalar.Magnitude(difference) <= allowed;

    private static double Largest(double[] sums)
    {
        double largest = 0;
        foreach (double sum in sums)
        {
            largest = Math.Max(largest, sum);
        }

        return largest;
    }
}
