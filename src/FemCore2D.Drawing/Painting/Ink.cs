namespace FemCore2D.Drawing;

/// <summary>The colours and sizes, in points, of everything around the contents of a panel.</summary>
internal static class Ink
{
    public const float TitleSize = 11.5f;
    public const float PanelTitleSize = 9.5f;
    public const float LabelSize = 8.5f;
    public const float TickSize = 7.5f;
    public const float NameSize = 7.5f;
    public const float HairWidth = 0.6f;
    public const float TickLength = 3.2f;

    public static Colour Text => new(32, 40, 48);

    public static Colour Axis => new(112, 122, 132);

    public static Colour Outline => new(48, 58, 68);
}
