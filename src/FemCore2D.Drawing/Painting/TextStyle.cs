namespace FemCore2D.Drawing;

/// <summary>Where a text stands beside its point.</summary>
internal enum Anchor
{
    Start,
    Middle,
    End,
}

/// <summary>How a text looks.</summary>
/// <param name="Size">The size in points.</param>
/// <param name="IsBold">Whether in the heavier weight.</param>
/// <param name="Colour">The colour.</param>
/// <param name="Halo">A light edge around the letters that keeps them readable on any ground; invisible by default.</param>
internal readonly record struct TextStyle(float Size, Colour Colour, bool IsBold = false, Colour Halo = default);
