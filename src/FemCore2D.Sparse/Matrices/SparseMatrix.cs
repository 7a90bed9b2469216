using System.Numerics;

namespace FemCore2D.Sparse;

/// <summary>A matrix in compressed rows, of real or complex numbers.</summary>
/// <typeparam name="T">The number type: <see cref="double"/> or <see cref="Complex"/>.</typeparam>
/// <remarks>
/// The pattern never changes; the values may be refilled in place by one writer at a time, and read by many threads
/// between refills. Operations that return a matrix leave this one alone.
/// </remarks>
public sealed partial class SparseMatrix<T>
    where T : unmanaged, INumberBase<T>
{
    private readonly T[] values;

    /// <summary>Creates a matrix of zeros with a pattern.</summary>
    /// <param name="pattern">The entries to store.</param>
    /// <exception cref="NotSupportedException"><typeparamref name="T"/> is neither <see cref="double"/> nor <see cref="Complex"/>.</exception>
    public SparseMatrix(SparsePattern pattern)
    {
        ArgumentNullException.ThrowIfNull(pattern);
        Scalar.Require<T>();
        Pattern = pattern;
        values = new T[pattern.EntryCount];
    }

    /// <summary>Creates a matrix with a pattern and values, which are copied.</summary>
    /// <param name="pattern">The entries to store.</param>
    /// <param name="values">Their values, in the order of the pattern.</param>
    /// <exception cref="ArgumentException">There are not as many values as entries.</exception>
    /// <inheritdoc cref="SparseMatrix{T}(SparsePattern)" path="/exception"/>
    public SparseMatrix(SparsePattern pattern, ReadOnlySpan<T> values)
        : this(pattern)
    {
        if (values.Length != pattern.EntryCount)
        {
            throw new ArgumentException(
                $"There are {values.Length} values for {pattern.EntryCount} entries.", nameof(values));
        }

        values.CopyTo(this.values);
    }

    /// <summary>Takes over an array of values that the caller vouches for and no longer changes.</summary>
    internal SparseMatrix(SparsePattern pattern, T[] values)
    {
        Pattern = pattern;
        this.values = values;
    }

    /// <summary>Which entries are stored.</summary>
    public SparsePattern Pattern { get; }

    /// <summary>The values of the stored entries, in the order of the pattern.</summary>
    public Span<T> Values => values;

    /// <summary>The number of rows.</summary>
    public int RowCount => Pattern.RowCount;

    /// <summary>The number of columns.</summary>
    public int ColumnCount => Pattern.ColumnCount;

    /// <summary>The value at a place; zero where no entry is stored. Binary search in the row.</summary>
    /// <param name="row">The row, from 0.</param>
    /// <param name="column">The column, from 0.</param>
    /// <exception cref="ArgumentOutOfRangeException">There is no such row or column.</exception>
    public T this[int row, int column]
    {
        get
        {
            int position = Pattern.PositionOf(row, column);
            return position < 0 ? T.Zero : values[position];
        }
    }

    /// <summary>Replaces all values by the sums of the given ones, as <see cref="SparseMatrices.FromTriplets"/> does; the pattern stays.</summary>
    /// <param name="rows">The row of each value.</param>
    /// <param name="columns">The column of each value.</param>
    /// <param name="newValues">The values; those of the same place are added up in the order they are given in.</param>
    /// <exception cref="ArgumentException">The spans differ in length, or the pattern does not store a place.</exception>
    public void Refill(ReadOnlySpan<int> rows, ReadOnlySpan<int> columns, ReadOnlySpan<T> newValues)
    {
        SparseMatrices.CheckTriplets(rows, columns, newValues);
        Array.Clear(values);
        for (int i = 0; i < newValues.Length; i++)
        {
            Entry(rows[i], columns[i]) += newValues[i];
        }
    }

    /// <summary>A stored entry, to be read or changed in place. Binary search in the row.</summary>
    /// <param name="row">The row, from 0.</param>
    /// <param name="column">The column, from 0.</param>
    /// <exception cref="ArgumentOutOfRangeException">There is no such row or column.</exception>
    /// <exception cref="ArgumentException">The pattern does not store this place.</exception>
    public ref T Entry(int row, int column)
    {
        int position = Pattern.PositionOf(row, column);
        if (position < 0)
        {
            throw new ArgumentException(
                $"The pattern stores no entry at row {row}, column {column}. Create it with this place.");
        }

        return ref values[position];
    }

    /// <summary>A matrix of the same pattern with a copy of the values.</summary>
    public SparseMatrix<T> Copy() => new(Pattern, values.AsSpan().ToArray());

    /// <summary>The entries on the diagonal; zero where none is stored.</summary>
    public T[] Diagonal()
    {
        T[] diagonal = new T[Math.Min(RowCount, ColumnCount)];
        for (int i = 0; i < diagonal.Length; i++)
        {
            diagonal[i] = this[i, i];
        }

        return diagonal;
    }
}
