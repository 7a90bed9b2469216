using System.Collections.Immutable;
using FemCore2D.Geometry;
using SkiaSharp;

namespace FemCore2D.Drawing;

/// <summary>Swatches or arrows with their meanings, flowing in lines under a panel.</summary>
internal sealed class Legend
{
    private const float LineHeight = 13;
    private const float Swatch = 8;
    private const float Between = 14;
    private readonly ImmutableArray<(LegendItem Item, float X, int Line)> places;
    private readonly int lines;

    public Legend(IReadOnlyList<LegendItem> items, float width)
    {
        var placed = ImmutableArray.CreateBuilder<(LegendItem, float, int)>();
        float x = 0;
        foreach (LegendItem item in items)
        {
            float needed = MarkWidth(item) + 4 + Surface.WidthOf(item.Text, Ink.NameSize);
            if (x > 0 && x + needed > width)
            {
                x = 0;
                lines++;
            }

            placed.Add((item, x, lines));
            x += needed + Between;
        }

        if (items.Count > 0)
            lines++;
        places = placed.ToImmutable();
    }

    public float Height => lines == 0 ? 0 : (lines * LineHeight) + 8;

    public void Draw(Surface surface, float left, float top)
    {
        foreach ((LegendItem item, float x, int line) in places)
        {
            float middle = top + ((line + 0.5f) * LineHeight);
            float start = left + x;
            if (item.ArrowLength > 0)
            {
                using var builder = new SKPathBuilder();
                var place = new SKPoint(start + (item.ArrowLength / 2), middle);
                ArrowShape.Add(builder, place, new Vector2D(1, 0), item.ArrowLength);
                using SKPath arrow = builder.Detach();
                surface.Fill(arrow, item.Colour);
            }
            else
            {
                var box = SKRect.Create(start, middle - (Swatch / 2), Swatch, Swatch);
                surface.Fill(box, item.Colour);
                surface.Frame(box, Ink.Outline, 0.5f);
            }

            var style = new TextStyle(Ink.NameSize, Ink.Text);
            surface.Write(item.Text, start + MarkWidth(item) + 4, middle, Anchor.Start, style);
        }
    }

    private static float MarkWidth(LegendItem item) => item.ArrowLength > 0 ? item.ArrowLength : Swatch;
}
