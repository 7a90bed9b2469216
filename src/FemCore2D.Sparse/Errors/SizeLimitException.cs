using FemCore2D.Geometry;

namespace FemCore2D.Sparse;

/// <summary>
/// A result would need more rows, columns or stored entries than the library can address or than is plausible. It is
/// raised before the memory is asked for.
/// </summary>
public sealed class SizeLimitException : FemCoreException
{
    /// <summary>Creates the exception with its message.</summary>
    public SizeLimitException(string message)
        : base(message)
    {
    }

    /// <summary>Creates the exception with its message and cause.</summary>
    public SizeLimitException(string message, Exception innerException)
        : base(message, innerException)
    {
    }

    /// <summary>The largest number of stored entries that one matrix can have.</summary>
    internal static int MaxEntries => Array.MaxLength;

    /// <summary>Refuses a number of rows or columns for which no array could hold one more number than lines.</summary>
    internal static void CheckLines(int count)
    {
        if (count >= Array.MaxLength)
        {
            throw new SizeLimitException(
                $"A matrix can have at most {Array.MaxLength - 1} rows or columns, not {count}. Split it into blocks.");
        }
    }

    /// <summary>Returns a count of entries as an index, or raises the exception.</summary>
    internal static int CheckEntries(long count, string what) => count <= MaxEntries
        ? (int)count
        : throw new SizeLimitException(
            $"{what} would store {count} entries; a matrix can store at most {MaxEntries}. Split it into blocks.");
}
