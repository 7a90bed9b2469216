namespace FemCore2D.Drawing;

/// <summary>A colour of a perceptual space: lightness and two opponent axes.</summary>
/// <param name="Lightness">0 for black to 1 for white.</param>
/// <param name="A">Green (negative) to red.</param>
/// <param name="B">Blue (negative) to yellow.</param>
/// <remarks>B. Ottosson, "A perceptual color space for image processing" (2020), with its published matrices.</remarks>
internal readonly record struct Oklab(double Lightness, double A, double B)
{
    public double Chroma => Math.Sqrt((A * A) + (B * B));

    public static Oklab FromPolar(double lightness, double chroma, double hueDegrees)
    {
        (double sine, double cosine) = Math.SinCos(hueDegrees * Math.PI / 180);
        return new Oklab(lightness, chroma * cosine, chroma * sine);
    }

    public static Oklab FromColour(Colour colour)
    {
        double r = Linear(colour.Red / 255.0);
        double g = Linear(colour.Green / 255.0);
        double b = Linear(colour.Blue / 255.0);
        double l = Math.Cbrt((0.4122214708 * r) + (0.5363325363 * g) + (0.0514459929 * b));
        double m = Math.Cbrt((0.2119034982 * r) + (0.6806995451 * g) + (0.1073969566 * b));
        double s = Math.Cbrt((0.0883024619 * r) + (0.2817188376 * g) + (0.6299787005 * b));
        return new Oklab(
            (0.2104542553 * l) + (0.7936177850 * m) - (0.0040720468 * s),
            (1.9779984951 * l) - (2.4285922050 * m) + (0.4505937099 * s),
            (0.0259040371 * l) + (0.7827717662 * m) - (0.8086757660 * s));
    }

    public static Oklab Mix(Oklab from, Oklab to, double fraction) => new(
        from.Lightness + (fraction * (to.Lightness - from.Lightness)),
        from.A + (fraction * (to.A - from.A)),
        from.B + (fraction * (to.B - from.B)));

    public double DistanceTo(Oklab other)
    {
        double l = Lightness - other.Lightness;
        double a = A - other.A;
        double b = B - other.B;
        return Math.Sqrt((l * l) + (a * a) + (b * b));
    }

    /// <summary>The nearest colour of the same lightness and hue that a screen can show: chroma gives way.</summary>
    public Colour ToColour()
    {
        double low = 0;
        double high = 1;
        if (!IsShown(ToLinear(1)))
        {
            for (int i = 0; i < 30; i++)
            {
                double middle = (low + high) / 2;
                if (IsShown(ToLinear(middle)))
                    low = middle;
                else
                    high = middle;
            }

            high = low;
        }

        (double r, double g, double b) = ToLinear(high);
        return new Colour(ToByte(r), ToByte(g), ToByte(b));
    }

    private (double R, double G, double B) ToLinear(double share)
    {
        double a = share * A;
        double b = share * B;
        double l = Cube(Lightness + (0.3963377774 * a) + (0.2158037573 * b));
        double m = Cube(Lightness - (0.1055613458 * a) - (0.0638541728 * b));
        double s = Cube(Lightness - (0.0894841775 * a) - (1.2914855480 * b));
        return (
            (4.0767416621 * l) - (3.3077115913 * m) + (0.2309699292 * s),
            (-1.2684380046 * l) + (2.6097574011 * m) - (0.3413193965 * s),
            (-0.0041960863 * l) - (0.7034186147 * m) + (1.7076147010 * s));
    }

    private static bool IsShown((double R, double G, double B) colour)
    {
        const double slack = 1e-4;
        return Math.Min(colour.R, Math.Min(colour.G, colour.B)) >= -slack
            && Math.Max(colour.R, Math.Max(colour.G, colour.B)) <= 1 + slack;
    }

    private static double Cube(double value) => value * value * value;

    private static double Linear(double channel) =>
        channel <= 0.04045 ? channel / 12.92 : Math.Pow((channel + 0.055) / 1.055, 2.4);

    private static byte ToByte(double linear)
    {
        double value = Math.Clamp(linear, 0, 1);
        double channel = value <= 0.0031308 ? 12.92 * value : (1.055 * Math.Pow(value, 1 / 2.4)) - 0.055;
        return (byte)Math.Round(255 * channel);
    }
}
