using System.Collections.Immutable;
using FemCore2D.Geometry;
using SkiaSharp;

namespace FemCore2D.Drawing;

/// <summary>A point with a text beside it.</summary>
/// <param name="Place">The point, in metres.</param>
/// <param name="Label">The text; empty for none.</param>
public readonly record struct LabelledPoint(Point2D Place, string Label);

/// <summary>Points marked in the picture, with their names beside them.</summary>
public sealed record PointLayer : Layer
{
    private const float Radius = 2.2f;

    /// <summary>Creates the layer.</summary>
    /// <param name="points">The points.</param>
    /// <exception cref="ArgumentException">A point is not finite.</exception>
    public PointLayer(params ReadOnlySpan<LabelledPoint> points)
    {
        foreach (LabelledPoint point in points)
        {
            if (!point.Place.IsFinite)
                throw new ArgumentException($"The point '{point.Label}' at {point.Place} is not finite.", nameof(points));
        }

        Points = [.. points];
    }

    /// <summary>The points.</summary>
    public ImmutableArray<LabelledPoint> Points { get; }

    /// <summary>The colour of the marks.</summary>
    public Colour Colour { get; init; } = new(176, 62, 40);

    internal override Box2D Extent => Box2D.Empty;

    internal override void Draw(Surface surface, PlotFrame frame)
    {
        var seen = Points
            .Select(point => (Place: frame.ToPage(point.Place), point.Label))
            .Where(point => frame.Area.Contains(point.Place))
            .ToList();
        foreach ((SKPoint place, _) in seen)
        {
            DrawMark(surface, place);
            frame.Taken.Add(Around(place.X - Radius, place.Y - Radius, 2 * Radius, 2 * Radius));
        }

        foreach ((SKPoint place, string label) in seen)
        {
            if (!string.IsNullOrEmpty(label))
                Write(surface, frame, place, label);
        }
    }

    private static SKRect Around(float left, float top, float width, float height) => SKRect.Create(left, top, width, height);

    private static void Write(Surface surface, PlotFrame frame, SKPoint place, string label)
    {
        float width = Surface.WidthOf(label, Ink.NameSize);
        const float height = Ink.NameSize + 1;
        const float gap = Radius + 3;
        ReadOnlySpan<(float X, float Y)> ways =
            [(1, 0), (0.75f, -1), (0.75f, 1), (-1, 0), (-0.75f, -1), (-0.75f, 1), (0, -1.3f), (0, 1.3f)];
        SKRect best = default;
        foreach ((float x, float y) in ways)
        {
            float middleX = place.X + (x * gap) + (Math.Sign(x) * width / 2);
            SKRect box = Around(middleX - (width / 2), place.Y + (y * (gap + 1)) - (height / 2), width, height);
            if (best == default)
                best = box;
            if (!frame.IsFree(box) || !frame.Area.Contains(box))
                continue;
            best = box;
            break;
        }

        frame.Taken.Add(best);
        var style = new TextStyle(Ink.NameSize, Ink.Text, Halo: Colour.White.WithOpacity(0.8));
        surface.Write(label, best.MidX, best.MidY, Anchor.Middle, style);
    }

    private void DrawMark(Surface surface, SKPoint place)
    {
        using var builder = new SKPathBuilder();
        builder.AddCircle(place.X, place.Y, Radius);
        using SKPath circle = builder.Detach();
        surface.Stroke(circle, Colour.White, 1.4f);
        surface.Fill(circle, Colour);
    }
}
