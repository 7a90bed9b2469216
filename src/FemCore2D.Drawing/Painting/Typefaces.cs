using SkiaSharp;

namespace FemCore2D.Drawing;

/// <summary>The typefaces inside the assembly, so that text looks the same on every machine, also where none is installed.</summary>
internal static class Typefaces
{
    private static readonly Lazy<SKTypeface> LazyRegular = new(() => Load("Inter-Regular.otf"));
    private static readonly Lazy<SKTypeface> LazySemiBold = new(() => Load("Inter-SemiBold.otf"));

    public static SKTypeface Regular => LazyRegular.Value;

    public static SKTypeface SemiBold => LazySemiBold.Value;

    private static SKTypeface Load(string name)
    {
        using Stream stream = typeof(Typefaces).Assembly.GetManifestResourceStream(name)
            ?? throw new InvalidOperationException($"The typeface '{name}' is missing from the assembly.");
        using SKData data = SKData.Create(stream);
        return SKTypeface.FromData(data)
            ?? throw new InvalidOperationException($"The typeface '{name}' in the assembly cannot be read.");
    }
}
