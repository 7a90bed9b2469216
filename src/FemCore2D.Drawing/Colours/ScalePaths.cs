namespace FemCore2D.Drawing;

/// <summary>The paths of the library's colour scales through the perceptual space.</summary>
internal static class ScalePaths
{
    // All paths end light enough that dark lines and letters stay readable on them.
    private const double Darkest = 0.4;

    public static Oklab Undertow(double t) => Oklab.FromPolar(
        Line(0.965, Darkest, t),
        Between(t, (0, 0.022), (0.35, 0.085), (0.7, 0.115), (1, 0.12)),
        Between(t, (0, 175), (0.25, 232), (0.5, 282), (0.75, 335), (1, 377)));

    public static Oklab Samphire(double t) => Oklab.FromPolar(
        Line(0.965, Darkest, t),
        Between(t, (0, 0.02), (0.35, 0.1), (0.65, 0.095), (1, 0.075)),
        Between(t, (0, 45), (0.4, 95), (0.7, 150), (1, 222)));

    public static Oklab EbbFlood(double t)
    {
        double side = Math.Abs((2 * t) - 1);
        double hue = t < 0.5
            ? Between(side, (0, 255), (0.5, 275), (1, 298))
            : Between(side, (0, 92), (0.5, 82), (1, 55));
        double chroma = Between(side, (0, 0.006), (0.5, 0.095), (1, 0.12));
        return Oklab.FromPolar(Line(0.97, Darkest, side), chroma, hue);
    }

    public static Oklab TideClock(double t)
    {
        double side = 1 - Math.Abs((2 * t) - 1);
        double chroma = 0.115 * Math.Sin(Math.PI * side);
        double hue = t < 0.5 ? Line(225, 280, side) : Line(95, 60, side);
        return Oklab.FromPolar(Line(0.95, Darkest, side), chroma, hue);
    }

    private static double Line(double from, double to, double t) => from + (t * (to - from));

    /// <summary>Interpolates with a smooth course: a monotone cubic (Fritsch and Carlson 1980) through the stops.</summary>
    private static double Between(double t, params ReadOnlySpan<(double At, double Value)> stops)
    {
        int i = 0;
        while (i < stops.Length - 2 && t > stops[i + 1].At)
            i++;
        double h = stops[i + 1].At - stops[i].At;
        double x = (t - stops[i].At) / h;
        double start = SlopeAt(stops, i);
        double end = SlopeAt(stops, i + 1);
        double rise = stops[i + 1].Value - stops[i].Value;
        return stops[i].Value + (x * ((h * start) + (x * (((3 * rise) - (h * ((2 * start) + end)))
            + (x * ((h * (start + end)) - (2 * rise)))))));
    }

    private static double SlopeAt(ReadOnlySpan<(double At, double Value)> stops, int i)
    {
        double before = i > 0 ? Secant(stops, i - 1) : Secant(stops, 0);
        double after = i < stops.Length - 1 ? Secant(stops, i) : Secant(stops, stops.Length - 2);
        return before * after <= 0 ? 0 : 2 * before * after / (before + after);
    }

    private static double Secant(ReadOnlySpan<(double At, double Value)> stops, int i) =>
        (stops[i + 1].Value - stops[i].Value) / (stops[i + 1].At - stops[i].At);
}
