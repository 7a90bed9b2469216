using FemCore2D.Geometry;

namespace FemCore2D.Elements;

/// <summary>Points of circular arcs that are known by their ends and the angle that they sweep.</summary>
internal static class ArcPoint
{
    /// <summary>How far the point at a fraction of an arc lies from the point at the same fraction of its chord.</summary>
    /// <remarks>
    /// By the inscribed angle: the chord to the point has the length sin(s a / 2) / sin(a / 2) of the whole chord and is
    /// turned from it by (s - 1) a / 2. The form needs no centre and stays accurate for the flattest arc.
    /// </remarks>
    public static Vector2D Rise(Vector2D chord, double sweepRadians, double fraction)
    {
        double half = sweepRadians / 2;
        double ratio = Math.Sin(fraction * half) / Math.Sin(half);
        (double sine, double cosine) = Math.SinCos((fraction - 1) * half);
        return (((ratio * cosine) - fraction) * chord) + (ratio * sine * chord.LeftNormal);
    }
}
