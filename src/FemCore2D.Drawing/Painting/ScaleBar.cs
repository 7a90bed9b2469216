using System.Collections.Immutable;
using SkiaSharp;

namespace FemCore2D.Drawing;

/// <summary>The bands of colour with the values between them.</summary>
internal static class ScaleBar
{
    private const float Thickness = 10;
    private const float PointLength = 9;
    private const float LargestLength = 320;

    /// <summary>Draws the bar upright beside a panel.</summary>
    /// <param name="surface">The surface.</param>
    /// <param name="scale">The bands; null says that there are no values.</param>
    /// <param name="plot">The plot beside it.</param>
    /// <param name="left">Where the bar begins.</param>
    public static void DrawUpright(Surface surface, BandScale? scale, SKRect plot, float left)
    {
        float length = Math.Min(plot.Height, LargestLength);
        var bar = SKRect.Create(left, plot.MidY - (length / 2), Thickness, length);
        var numbers = new TextStyle(Ink.TickSize, Ink.Text);
        if (scale is null)
        {
            surface.Write("no values", bar.Left, bar.MidY, Anchor.Middle, numbers, degrees: -90);
            return;
        }

        bar.Top += scale.GoesAbove ? PointLength : 0;
        bar.Bottom -= scale.GoesBelow ? PointLength : 0;
        int count = scale.Colours.Length;
        float[] at = [.. Positions(scale).Select(share => bar.Bottom - (share * bar.Height))];
        for (int i = 0; i < count; i++)
            surface.Fill(new SKRect(bar.Left, i + 1 == count ? at[i + 1] : at[i + 1] - 0.4f, bar.Right, at[i]), scale.Colours[i]);
        DrawEnds(surface, scale, bar, isFlat: false);

        ImmutableArray<string> texts = scale.Texts();
        float widest = 0;
        foreach (int i in Written(scale, at, Ink.TickSize + 3.5f, _ => 0))
        {
            surface.Line(bar.Right, at[i], bar.Right + 2, at[i], Ink.Axis, Ink.HairWidth);
            surface.Write(texts[i], bar.Right + 5, at[i], Anchor.Start, numbers);
            widest = Math.Max(widest, Surface.WidthOf(texts[i], Ink.TickSize));
        }

        var titles = new TextStyle(Ink.LabelSize, Ink.Text);
        string title = scale.Prefix.Title(scale.Label);
        surface.Write(title, bar.Right + 5 + widest + 5 + (Ink.LabelSize / 2), plot.MidY, Anchor.Middle, titles, degrees: -90);
    }

    /// <summary>Draws the bar lying under a panel.</summary>
    /// <param name="surface">The surface.</param>
    /// <param name="scale">The bands; null says that there are no values.</param>
    /// <param name="plot">The plot above it.</param>
    /// <param name="top">Where the bar begins.</param>
    public static void DrawFlat(Surface surface, BandScale? scale, SKRect plot, float top)
    {
        float length = Math.Min(plot.Width, LargestLength);
        var numbers = new TextStyle(Ink.TickSize, Ink.Text);
        if (scale is null)
        {
            surface.Write("no values", plot.MidX, top + (Thickness / 2), Anchor.Middle, numbers);
            return;
        }

        // The title stands to the left of the bar when there is room, so that the bar keeps close to the plot.
        var titles = new TextStyle(Ink.LabelSize, Ink.Text);
        string title = scale.Prefix.Title(scale.Label);
        float titleWidth = title.Length == 0 ? 0 : Surface.WidthOf(title, Ink.LabelSize) + 10;
        length = Math.Max(Math.Min(length, plot.Width - titleWidth), 0.4f * plot.Width);
        float start = plot.MidX - ((length + titleWidth) / 2) + titleWidth;
        var bar = SKRect.Create(start, top, length, Thickness - 1);
        surface.Write(title, start - 10, bar.MidY, Anchor.End, titles);
        bar.Left += scale.GoesBelow ? PointLength : 0;
        bar.Right -= scale.GoesAbove ? PointLength : 0;
        int count = scale.Colours.Length;
        float[] at = [.. Positions(scale).Select(share => bar.Left + (share * bar.Width))];
        for (int i = 0; i < count; i++)
            surface.Fill(new SKRect(at[i], bar.Top, i + 1 == count ? at[i + 1] : at[i + 1] + 0.4f, bar.Bottom), scale.Colours[i]);
        DrawEnds(surface, scale, bar, isFlat: true);

        ImmutableArray<string> texts = scale.Texts();
        foreach (int i in Written(scale, at, 7, i => Surface.WidthOf(texts[i], Ink.TickSize)))
        {
            surface.Line(at[i], bar.Bottom, at[i], bar.Bottom + 2, Ink.Axis, Ink.HairWidth);
            surface.Write(texts[i], at[i], bar.Bottom + 5 + (Ink.TickSize / 2), Anchor.Middle, numbers);
        }
    }

    /// <summary>The place of each edge along the bar, from 0 to 1.</summary>
    private static IEnumerable<float> Positions(BandScale scale)
    {
        double first = scale.Edges[0];
        double last = scale.Edges[^1];
        return scale.Edges.Select(edge =>
            scale.IsLogarithmic ? (float)(Math.Log(edge / first) / Math.Log(last / first)) : (float)((edge - first) / (last - first)));
    }

    private static void DrawEnds(Surface surface, BandScale scale, SKRect bar, bool isFlat)
    {
        if (scale.GoesAbove)
            DrawPoint(surface, bar, scale.Colours[^1], isFlat, isHigh: true);
        if (scale.GoesBelow)
            DrawPoint(surface, bar, scale.Colours[0], isFlat, isHigh: false);
        using var builder = new SKPathBuilder();
        builder.AddRect(bar);
        using SKPath frame = builder.Detach();
        surface.Stroke(frame, Ink.Axis, 0.4f);
    }

    /// <summary>A bar whose end is pointed says that values go on beyond it.</summary>
    private static void DrawPoint(Surface surface, SKRect bar, Colour colour, bool isFlat, bool isHigh)
    {
        using var builder = new SKPathBuilder();
        float side = isHigh ? 1 : -1;
        if (isFlat)
        {
            float end = isHigh ? bar.Right : bar.Left;
            builder.AddPoly([new SKPoint(end, bar.Top), new SKPoint(end + (side * (PointLength - 1)), bar.MidY), new SKPoint(end, bar.Bottom)], true);
        }
        else
        {
            float end = isHigh ? bar.Top : bar.Bottom;
            builder.AddPoly([new SKPoint(bar.Left, end), new SKPoint(bar.MidX, end - (side * (PointLength - 1))), new SKPoint(bar.Right, end)], true);
        }

        using SKPath path = builder.Detach();
        surface.Fill(path, colour);
        surface.Stroke(path, Ink.Axis, 0.4f);
    }

    /// <summary>Which edges get a number: all, or every second, fifth ... counted from zero so that round ones stay.</summary>
    private static List<int> Written(BandScale scale, float[] at, float gap, Func<int, float> width)
    {
        // Decades go one by one; steps of 15 or 30 degrees by threes to right angles, which decimal ones do not.
        ReadOnlySpan<int> strides = scale.IsLogarithmic ? [1, 2, 3, 4, 5, 7, 11] : scale.Unit == "°" ? [1, 2, 3, 6, 12] : [1, 2, 5, 10, 20, 50, 100, 200, 500, 1000];
        foreach (int stride in strides)
        {
            List<int> chosen = scale.IsLogarithmic ? PowersOfTen(scale, stride) : Regular(scale, stride);
            bool fits = chosen.Count > 1 || (stride > 1 && chosen.Count > 0);
            for (int i = 1; i < chosen.Count; i++)
            {
                float needed = gap + ((width(chosen[i - 1]) + width(chosen[i])) / 2);
                fits &= Math.Abs(at[chosen[i]] - at[chosen[i - 1]]) >= needed;
            }

            if (fits)
                return chosen;
        }

        return [0];
    }

    private static List<int> Regular(BandScale scale, int stride)
    {
        int count = scale.Edges.Length;
        double step = count > 2 ? scale.Edges[2] - scale.Edges[1] : scale.Edges[1] - scale.Edges[0];
        var chosen = new List<int>();
        for (int i = 0; i < count; i++)
        {
            double number = Math.Round(scale.Edges[i] / step);
            bool isRegular = number % stride == 0 && Math.Abs((number * step) - scale.Edges[i]) < 1e-6 * step;
            if (isRegular || (stride == 1 && (i == 0 || i == count - 1)))
                chosen.Add(i);
        }

        return chosen;
    }

    private static List<int> PowersOfTen(BandScale scale, int stride)
    {
        if (stride == 1)
            return [.. Enumerable.Range(0, scale.Edges.Length)];
        var chosen = new List<int>();
        for (int i = 0; i < scale.Edges.Length; i++)
        {
            double power = Math.Log10(scale.Edges[i]);
            if (Math.Abs(power - Math.Round(power)) < 1e-9 && Math.Round(power) % (stride - 1) == 0)
                chosen.Add(i);
        }

        return chosen;
    }
}
