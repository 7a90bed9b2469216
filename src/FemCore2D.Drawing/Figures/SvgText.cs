using System.Globalization;
using System.Text;
using SkiaSharp;

namespace FemCore2D.Drawing;

/// <summary>Finishes the text of an SVG file: short numbers, a view box, and names of its own for its clips.</summary>
internal static class SvgText
{
    private const string ShapeStart = " d=\"";

    /// <summary>Rewrites a file as the canvas made it.</summary>
    public static string Tidy(string svg, SKSize size)
    {
        svg = Rename(svg);
        var text = new StringBuilder(svg.Length);
        int done = svg.IndexOf("<svg ", StringComparison.Ordinal) + 5;
        text.Append(svg, 0, done);
        text.Append(CultureInfo.InvariantCulture, $"viewBox=\"0 0 {size.Width:0.##} {size.Height:0.##}\" ");
        for (int start = svg.IndexOf(ShapeStart, done, StringComparison.Ordinal); start >= 0;
            start = svg.IndexOf(ShapeStart, done, StringComparison.Ordinal))
        {
            start += ShapeStart.Length;
            int end = svg.IndexOf('"', start);
            text.Append(svg, done, start - done);
            AppendShape(text, svg.AsSpan(start, end - start));
            done = end;
        }

        return text.Append(svg, done, svg.Length - done).ToString();
    }

    /// <summary>
    /// Gives clips and images names that depend on the contents alone: several pictures may share one page, where equal
    /// names would be taken for each other, and the canvas numbers them on through all its files.
    /// </summary>
    private static string Rename(string svg)
    {
        const string start = " id=\"";
        int count = 0;
        for (int at = svg.IndexOf(start, StringComparison.Ordinal); at >= 0; at = svg.IndexOf(start, at + 1, StringComparison.Ordinal))
        {
            int from = at + start.Length;
            string old = svg[from..svg.IndexOf('"', from)];
            string plain = string.Create(CultureInfo.InvariantCulture, $"@part{count++}@");
            svg = svg.Replace($"\"{old}\"", $"\"{plain}\"", StringComparison.Ordinal)
                .Replace($"#{old})", $"#{plain})", StringComparison.Ordinal)
                .Replace($"\"#{old}\"", $"\"#{plain}\"", StringComparison.Ordinal);
        }

        string mark = Mark(svg);
        for (int i = 0; i < count; i++)
            svg = svg.Replace($"@part{i}@", $"{mark}-{i}", StringComparison.Ordinal);
        return svg;
    }

    /// <summary>Copies a shape with its numbers rounded to a hundredth of a point.</summary>
    private static void AppendShape(StringBuilder text, ReadOnlySpan<char> shape)
    {
        int at = 0;
        while (at < shape.Length)
        {
            int end = at;
            while (end < shape.Length && (char.IsAsciiDigit(shape[end]) || shape[end] is '.' or '-' or '+' or 'e' or 'E'))
                end++;
            if (end == at)
            {
                text.Append(shape[at++]);
                continue;
            }

            double value = double.Parse(shape[at..end], CultureInfo.InvariantCulture);
            text.Append(CultureInfo.InvariantCulture, $"{Math.Round(value, 2) + 0.0:0.##}");
            at = end;
        }
    }

    /// <summary>A name that depends on the contents alone (hash of Fowler, Noll and Vo).</summary>
    private static string Mark(string svg)
    {
        uint hash = 2166136261;
        foreach (char letter in svg)
            hash = unchecked((hash ^ letter) * 16777619);
        return string.Create(CultureInfo.InvariantCulture, $"f{hash:x8}");
    }
}
