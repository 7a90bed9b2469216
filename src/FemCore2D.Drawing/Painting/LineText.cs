using SkiaSharp;

namespace FemCore2D.Drawing;

/// <summary>The value written along a level line, in a gap of the line.</summary>
internal readonly record struct LineText(string Text, SKPoint Middle, float Degrees, float Width)
{
    private const float Size = 6.5f;

    /// <summary>Finds the straightest stretch of the longest lines that has room for the text.</summary>
    public static LineText? Place(string text, List<Polyline> lines, PlotFrame frame)
    {
        float width = Surface.WidthOf(text, Size) + 6;
        foreach (Polyline line in lines.OrderByDescending(line => line.Points.Length).Take(3))
        {
            SKPoint[] points = [.. line.Points.Select(frame.ToPage)];
            double best = 0.985;
            LineText? found = null;
            int stride = Math.Max(1, points.Length / 200);
            for (int start = 0; start < points.Length; start += stride)
            {
                double length = 0;
                int end = start;
                while (end + 1 < points.Length && length < width)
                {
                    length += SKPoint.Distance(points[end], points[end + 1]);
                    end++;
                }

                if (length < width)
                    break;
                double straightness = SKPoint.Distance(points[start], points[end]) / length;
                var middle = new SKPoint((points[start].X + points[end].X) / 2, (points[start].Y + points[end].Y) / 2);
                if (straightness <= best || !IsRoom(middle, width, frame))
                    continue;
                best = straightness;
                double angle = Math.Atan2(points[end].Y - points[start].Y, points[end].X - points[start].X) * 180 / Math.PI;
                if (angle > 90)
                    angle -= 180;
                else if (angle <= -90)
                    angle += 180;
                found = new LineText(text, middle, (float)angle, width);
            }

            if (found is { } placed)
            {
                frame.Taken.Add(Box(placed.Middle, width));
                return placed;
            }
        }

        return null;
    }

    public void ClipOut(SKCanvas canvas)
    {
        using var builder = new SKPathBuilder();
        builder.AddRect(new SKRect(-Width / 2, -Size * 0.62f, Width / 2, Size * 0.62f));
        using SKPath box = builder.Detach();
        SKMatrix turn = SKMatrix.CreateRotationDegrees(Degrees).PostConcat(SKMatrix.CreateTranslation(Middle.X, Middle.Y));
        box.Transform(turn);
        canvas.ClipPath(box, SKClipOperation.Difference, antialias: true);
    }

    public void Draw(Surface surface, Colour colour) =>
        surface.Write(Text, Middle.X, Middle.Y, Anchor.Middle, new TextStyle(Size, colour, Halo: Colour.White.WithOpacity(0.6)), Degrees);

    private static bool IsRoom(SKPoint middle, float width, PlotFrame frame)
    {
        SKRect box = Box(middle, width);
        SKRect area = frame.Area;
        return frame.IsFree(box) && area.Left < box.Left && box.Right < area.Right && area.Top < box.Top && box.Bottom < area.Bottom;
    }

    private static SKRect Box(SKPoint middle, float width) =>
        new(middle.X - (width / 2), middle.Y - (width / 2), middle.X + (width / 2), middle.Y + (width / 2));
}
