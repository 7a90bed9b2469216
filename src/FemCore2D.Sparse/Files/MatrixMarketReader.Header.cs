using System.Numerics;
using FemCore2D.Geometry;

namespace FemCore2D.Sparse;

internal sealed partial class MatrixMarketReader<T>
    where T : unmanaged, INumberBase<T>
{
    /// <summary>The number of rows or columns up to which a matrix may be almost empty.</summary>
    private const int PlausibleLines = 1 << 20;

    /// <summary>Above that, the largest number of rows or columns for each stored entry.</summary>
    private const int PlausibleLinesPerEntry = 64;

    /// <summary>Reads the first line.</summary>
    public static MatrixMarketFormat ReadFormat(LineReader lines)
    {
        if (!lines.TryRead(out ReadOnlySpan<byte> line))
        {
            throw new MalformedFileException("The text is empty.", 1);
        }

        // The signature of UTF-8 is no part of the text.
        TokenReader tokens = new(line.StartsWith("\uFEFF"u8) ? line[3..] : line, lines.Line);
        if (tokens.Word("first word") != "%%matrixmarket")
        {
            throw tokens.Fault($"the text does not begin with {MatrixMarketFormat.Banner}");
        }

        string kind = tokens.Word("object");
        MatrixMarketLayout? layout = Find<MatrixMarketLayout>(tokens.Word("layout"), MatrixMarketFormat.Word);
        MatrixMarketField? field = Find<MatrixMarketField>(tokens.Word("field"), MatrixMarketFormat.Word);
        MatrixMarketSymmetry? symmetry = Find<MatrixMarketSymmetry>(tokens.Word("symmetry"), MatrixMarketFormat.Word);
        tokens.End();
        if (kind != "matrix" || layout is null || field is null || symmetry is null)
        {
            throw tokens.Fault(
                "the object must be matrix, the layout coordinate or array, the field real, integer, complex or pattern "
                + "and the symmetry general, symmetric, skew-symmetric or hermitian");
        }

        MatrixMarketFormat format = new(layout.Value, field.Value, symmetry.Value);
        return format.Fault is null ? format : throw tokens.Fault(format.Fault);
    }

    private static TEnum? Find<TEnum>(string word, Func<TEnum, string> name)
        where TEnum : struct, Enum
    {
        foreach (TEnum candidate in Enum.GetValues<TEnum>())
        {
            if (name(candidate) == word)
            {
                return candidate;
            }
        }

        return null;
    }

    private void ReadSizes()
    {
        ReadOnlySpan<byte> line = ReadLine("The sizes are missing", skipComments: true);
        TokenReader tokens = new(line, lines.Line);
        long m = tokens.Count("number of rows");
        long n = tokens.Count("number of columns");
        if (format.Symmetry != MatrixMarketSymmetry.General && m != n)
        {
            throw tokens.Fault($"a {MatrixMarketFormat.Word(format.Symmetry)} matrix is square, not {m} x {n}");
        }

        UInt128 places = (UInt128)m * (UInt128)n;
        if (format.Symmetry != MatrixMarketSymmetry.General)
        {
            bool hasDiagonal = format.Symmetry != MatrixMarketSymmetry.SkewSymmetric;
            places = (places + (UInt128)(hasDiagonal ? m : 0) - (UInt128)(hasDiagonal ? 0 : m)) / 2;
        }

        UInt128 count = format.Layout == MatrixMarketLayout.Array
            ? places
            : (UInt128)tokens.Count("number of entries");
        tokens.End();
        if (count > places)
        {
            throw tokens.Fault($"{count} entries do not fit into {places} places");
        }

        CheckSizes(m, n, count);
        (rowCount, columnCount, entryCount) = ((int)m, (int)n, (long)count);
    }

    private void CheckSizes(long m, long n, UInt128 count)
    {
        string sizes = $"Line {lines.Line}: A matrix of {m} rows, {n} columns and {count} entries in the file";
        UInt128 stored = format.Symmetry == MatrixMarketSymmetry.General ? count : 2 * count;
        if (stored > (UInt128)SizeLimitException.MaxEntries || Math.Max(m, n) >= Array.MaxLength)
        {
            throw new SizeLimitException(
                $"{sizes} is too large: a matrix can store at most {SizeLimitException.MaxEntries} entries.");
        }

        if (Math.Max(m, n) > Math.Max(PlausibleLines, PlausibleLinesPerEntry * (long)count))
        {
            throw new SizeLimitException(
                $"{sizes} is not plausible: nearly all of its rows or columns would be empty. Correct the sizes.");
        }

        // The shortest lines are "0" for arrays and "1 1" for places, each but the last with its end.
        int shortest = format.Layout == MatrixMarketLayout.Array ? 2 : 4;
        if (stream.CanSeek && (count * (UInt128)shortest) > (UInt128)stream.Length + 1)
        {
            throw new MalformedFileException(
                $"{count} entries are announced, but the text of {stream.Length} bytes is too short for them.", lines.Line);
        }
    }
}
