using FemCore2D.Geometry;

namespace FemCore2D.Sparse;

/// <summary>Cuts a stream into lines of bytes, with a bound on the memory for one line.</summary>
internal sealed class LineReader(Stream stream)
{
    private const int LongestLine = 1 << 16;
    private readonly byte[] buffer = new byte[LongestLine];
    private int start;
    private int end;
    private bool isAtEnd;

    /// <summary>The number of the line that was read last, from 1.</summary>
    public long Line { get; private set; }

    /// <summary>Reads a line without its end; valid until the next is read.</summary>
    /// <returns>False after the last line.</returns>
    /// <exception cref="MalformedFileException">The line is longer than any of the format.</exception>
    public bool TryRead(out ReadOnlySpan<byte> line)
    {
        while (true)
        {
            int length = buffer.AsSpan(start, end - start).IndexOf((byte)'\n');
            if (length >= 0 || (isAtEnd && end > start))
            {
                bool isLast = length < 0;
                length = isLast ? end - start : length;
                line = buffer.AsSpan(start, length);
                start += isLast ? length : length + 1;
                Line++;
                return true;
            }

            if (isAtEnd)
            {
                line = default;
                return false;
            }

            Fill();
        }
    }

    private void Fill()
    {
        buffer.AsSpan(start, end - start).CopyTo(buffer);
        end -= start;
        start = 0;
        if (end == buffer.Length)
        {
            throw new MalformedFileException($"The line is longer than {LongestLine} bytes.", Line + 1);
        }

        int count = stream.Read(buffer.AsSpan(end));
        isAtEnd = count == 0;
        end += count;
    }
}
