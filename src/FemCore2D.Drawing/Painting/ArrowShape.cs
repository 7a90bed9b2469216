using FemCore2D.Geometry;
using SkiaSharp;

namespace FemCore2D.Drawing;

/// <summary>The outline of an arrow: a slim shaft and a head that shrinks with short arrows.</summary>
internal static class ArrowShape
{
    /// <summary>Adds an arrow with its middle at a place of the page.</summary>
    /// <param name="builder">Receives the outline.</param>
    /// <param name="middle">The middle of the arrow.</param>
    /// <param name="direction">Its direction in the plane, of unit length.</param>
    /// <param name="length">Its length in points.</param>
    public static void Add(SKPathBuilder builder, SKPoint middle, Vector2D direction, double length)
    {
        double head = Math.Min(4.4, 0.55 * length);
        double wing = 0.36 * head;
        double half = Math.Min(0.38, 0.16 * head);
        double tail = -length / 2;
        double tip = length / 2;
        double neck = tip - (0.86 * head);
        ReadOnlySpan<(double Along, double Across)> outline =
        [
            (tail, half), (neck, half), (tip - head, wing), (tip, 0), (tip - head, -wing), (neck, -half), (tail, -half),
        ];
        Span<SKPoint> points = stackalloc SKPoint[outline.Length];
        for (int i = 0; i < points.Length; i++)
        {
            (double along, double across) = outline[i];
            points[i] = new SKPoint(
                (float)(middle.X + (along * direction.X) - (across * direction.Y)),
                (float)(middle.Y - (along * direction.Y) - (across * direction.X)));
        }

        builder.AddPoly(points, close: true);
    }
}
