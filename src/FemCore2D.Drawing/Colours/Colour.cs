using System.Globalization;
using SkiaSharp;

namespace FemCore2D.Drawing;

/// <summary>A colour of the standard screen space (sRGB, IEC 61966-2-1), eight bits a channel.</summary>
/// <param name="Red">The red channel.</param>
/// <param name="Green">The green channel.</param>
/// <param name="Blue">The blue channel.</param>
/// <param name="Opacity">255 for opaque, 0 for invisible.</param>
public readonly record struct Colour(byte Red, byte Green, byte Blue, byte Opacity = 255)
{
    /// <summary>White.</summary>
    public static Colour White => new(255, 255, 255);

    /// <summary>Black.</summary>
    public static Colour Black => new(0, 0, 0);

    /// <summary>The same colour with another opacity.</summary>
    /// <param name="opacity">1 for opaque, 0 for invisible.</param>
    /// <exception cref="ArgumentOutOfRangeException">The opacity is no number from 0 to 1.</exception>
    public Colour WithOpacity(double opacity)
    {
        if (!(opacity >= 0 && opacity <= 1))
            throw new ArgumentOutOfRangeException(nameof(opacity), opacity, "Opacity runs from 0 (invisible) to 1 (opaque).");
        return this with { Opacity = (byte)Math.Round(255 * opacity) };
    }

    /// <summary>The colour as <c>#rrggbb</c>, with two more digits for the opacity where it is not full.</summary>
    public override string ToString() => Opacity == 255
        ? string.Create(CultureInfo.InvariantCulture, $"#{Red:x2}{Green:x2}{Blue:x2}")
        : string.Create(CultureInfo.InvariantCulture, $"#{Red:x2}{Green:x2}{Blue:x2}{Opacity:x2}");

    internal SKColor ToSkia() => new(Red, Green, Blue, Opacity);
}
