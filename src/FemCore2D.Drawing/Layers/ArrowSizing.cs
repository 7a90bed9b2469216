namespace FemCore2D.Drawing;

/// <summary>What the length of an arrow shows.</summary>
public enum ArrowSizing
{
    /// <summary>The magnitude; a few very large ones are cut to the longest arrow, and a legend gives the measure.</summary>
    ByMagnitude,

    /// <summary>Nothing: all arrows are equally long and show the direction alone.</summary>
    Equal,
}
