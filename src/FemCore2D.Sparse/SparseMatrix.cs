using System.Numerics;

namespace FemCore2D.Sparse;

/// <summary>A matrix in compressed rows, of real or complex numbers.</summary>
/// <typeparam name="T">The number type: <see cref="double"/> or <see cref="Complex"/>.</typeparam>
/// <remarks>
/// The pattern never changes; the values may be refilled in place by one writer at a time, and read by many threads
/// between refills.
/// </remarks>
public sealed class SparseMatrix<T>
    where T : unmanaged, INumberBase<T>
{
    private readonly T[] values;

    /// <summary>Creates a matrix of zeros with a pattern.</summary>
    public SparseMatrix(SparsePattern pattern)
    {
        ArgumentNullException.ThrowIfNull(pattern);
        Pattern = pattern;
        values = new T[pattern.EntryCount];
    }

    /// <summary>Which entries are stored.</summary>
    public SparsePattern Pattern { get; }

    /// <summary>The values of the stored entries, in the order of the pattern.</summary>
    public Span<T> Values => values;

    /// <summary>The number of rows.</summary>
    public int RowCount => Pattern.RowCount;

    /// <summary>The number of columns.</summary>
    public int ColumnCount => Pattern.ColumnCount;
}
