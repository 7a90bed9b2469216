namespace FemCore2D.Drawing.Tests;

/// <summary>What the three kinds of dichromats see.</summary>
/// <remarks>G. M. Machado, M. M. Oliveira and L. A. F. Fernandes (2009), matrices for full severity, on linear channels.</remarks>
internal static class ColourVision
{
    public static readonly double[] Protan =
        [0.152286, 1.052583, -0.204868, 0.114503, 0.786281, 0.099216, -0.003882, -0.048116, 1.051998];

    public static readonly double[] Deutan =
        [0.367322, 0.860646, -0.227968, 0.280085, 0.672501, 0.047413, -0.011820, 0.042940, 0.968881];

    public static readonly double[] Tritan =
        [1.255528, -0.076749, -0.178779, -0.078411, 0.930809, 0.147602, 0.004733, 0.691367, 0.303900];

    public static Oklab Seen(Colour colour, double[] matrix)
    {
        double r = Linear(colour.Red);
        double g = Linear(colour.Green);
        double b = Linear(colour.Blue);
        return Oklab.FromColour(new Colour(
            Channel((matrix[0] * r) + (matrix[1] * g) + (matrix[2] * b)),
            Channel((matrix[3] * r) + (matrix[4] * g) + (matrix[5] * b)),
            Channel((matrix[6] * r) + (matrix[7] * g) + (matrix[8] * b))));
    }

    /// <summary>The relative luminance of IEC 61966-2-1.</summary>
    public static double Luminance(Colour colour) =>
        (0.2126 * Linear(colour.Red)) + (0.7152 * Linear(colour.Green)) + (0.0722 * Linear(colour.Blue));

    private static double Linear(byte channel) =>
        channel <= 10 ? channel / 255.0 / 12.92 : Math.Pow(((channel / 255.0) + 0.055) / 1.055, 2.4);

    private static byte Channel(double linear)
    {
        double value = Math.Clamp(linear, 0, 1);
        return (byte)Math.Round(255 * (value <= 0.0031308 ? 12.92 * value : (1.055 * Math.Pow(value, 1 / 2.4)) - 0.055));
    }
}
