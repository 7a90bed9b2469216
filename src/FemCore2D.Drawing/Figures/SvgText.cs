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
        // Several pictures may share one page, where equal names of clips would be taken for each other.
        string mark = Mark(svg);
        svg = svg.Replace("id=\"cl_", $"id=\"{mark}-", StringComparison.Ordinal)
            .Replace("url(#cl_", $"url(#{mark}-", StringComparison.Ordinal);
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
