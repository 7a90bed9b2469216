using System.Globalization;
using System.Text;
using FemCore2D.Geometry;

namespace FemCore2D.Sparse;

/// <summary>Takes the words and numbers of one line, from left to right.</summary>
internal ref struct TokenReader(ReadOnlySpan<byte> text, long line)
{
    private ReadOnlySpan<byte> rest = text;

    /// <summary>Whether only blanks are left.</summary>
    public readonly bool IsAtEnd => rest.TrimStart(" \t\r"u8).IsEmpty;

    /// <summary>Takes a word in lower case.</summary>
    public string Word(string what) => Encoding.Latin1.GetString(Next(what)).ToLowerInvariant();

    /// <summary>Takes a whole number of at least zero.</summary>
    public long Count(string what)
    {
        ReadOnlySpan<byte> token = Next(what);
        if (long.TryParse(token, NumberStyles.None, CultureInfo.InvariantCulture, out long count))
        {
            return count;
        }

        throw Unreadable(token, what, "a whole number");
    }

    /// <summary>Takes the index of a row or column, counted from 1, and returns it counted from 0.</summary>
    public int Index(string what, int count)
    {
        long index = Count(what);
        if (index < 1 || index > count)
        {
            throw Fault($"the {what} is {index}, but must lie in 1 to {count}");
        }

        return (int)index - 1;
    }

    /// <summary>Takes a real number.</summary>
    public double Real(string what)
    {
        ReadOnlySpan<byte> token = Next(what);
        if (!double.TryParse(token, NumberStyles.Float, CultureInfo.InvariantCulture, out double value))
        {
            throw Unreadable(token, what, "a number");
        }

        return double.IsFinite(value) ? value : throw Unreadable(token, what, "a finite number");
    }

    /// <summary>Takes a whole number that a double holds exactly.</summary>
    public double Whole(string what)
    {
        const long Largest = 1L << 53;
        ReadOnlySpan<byte> token = Next(what);
        if (long.TryParse(token, NumberStyles.AllowLeadingSign, CultureInfo.InvariantCulture, out long value)
            && value is >= -Largest and <= Largest)
        {
            return value;
        }

        throw Unreadable(token, what, "a whole number of at most 53 bits");
    }

    /// <summary>Makes sure that nothing is left.</summary>
    public readonly void End()
    {
        if (!IsAtEnd)
        {
            throw Fault($"there is more than expected: {Quote(rest)}");
        }
    }

    /// <summary>An exception for this line.</summary>
    public readonly MalformedFileException Fault(string message) => new(message, line);

    private static string Quote(ReadOnlySpan<byte> token)
    {
        const int Longest = 40;
        string text = Encoding.Latin1.GetString(token.Length > Longest ? token[..Longest] : token).Trim();
        return $"'{text}{(token.Length > Longest ? "..." : string.Empty)}'";
    }

    private readonly MalformedFileException Unreadable(ReadOnlySpan<byte> token, string what, string expected) =>
        Fault($"the {what} is {Quote(token)}, but must be {expected}");

    private ReadOnlySpan<byte> Next(string what)
    {
        rest = rest.TrimStart(" \t\r"u8);
        if (rest.IsEmpty)
        {
            throw Fault($"the {what} is missing");
        }

        int length = rest.IndexOfAny(" \t\r"u8);
        ReadOnlySpan<byte> token = length < 0 ? rest : rest[..length];
        rest = rest[token.Length..];
        return token;
    }
}
