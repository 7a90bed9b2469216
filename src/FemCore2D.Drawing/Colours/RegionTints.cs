using System.Collections.Immutable;

namespace FemCore2D.Drawing;

/// <summary>Soft tints to tell regions apart, under text and lines that stay readable.</summary>
public static class RegionTints
{
    /// <summary>
    /// Twelve tints of the foreshore. Each differs from the one before by lightness as well as by hue, so that
    /// neighbours in a list are told apart without colour too.
    /// </summary>
    public static ImmutableArray<Colour> Foreshore { get; } =
    [
        Tint(0.93, 0.035, 80), Tint(0.82, 0.065, 235), Tint(0.90, 0.055, 140), Tint(0.79, 0.075, 55),
        Tint(0.91, 0.035, 300), Tint(0.83, 0.050, 190), Tint(0.94, 0.070, 105), Tint(0.77, 0.070, 330),
        Tint(0.92, 0.025, 220), Tint(0.80, 0.070, 120), Tint(0.90, 0.050, 30), Tint(0.77, 0.060, 275),
    ];

    /// <summary>The tint of the region with a number; from the thirteenth on they return, darker and turned in hue.</summary>
    internal static Colour Of(int region)
    {
        Colour tint = Foreshore[region % Foreshore.Length];
        int round = region / Foreshore.Length;
        if (round == 0)
            return tint;
        Oklab first = Oklab.FromColour(tint);
        double hue = (Math.Atan2(first.B, first.A) * 180 / Math.PI) + (25 * round);
        return Oklab.FromPolar(first.Lightness - (0.07 * Math.Min(round, 3)), first.Chroma + 0.01, hue).ToColour();
    }

    private static Colour Tint(double lightness, double chroma, double hue) =>
        Oklab.FromPolar(lightness, chroma, hue).ToColour();
}
