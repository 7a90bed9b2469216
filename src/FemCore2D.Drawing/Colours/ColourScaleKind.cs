namespace FemCore2D.Drawing;

/// <summary>What the order of a colour scale stands for.</summary>
public enum ColourScaleKind
{
    /// <summary>From low to high; lightness grows or falls all the way.</summary>
    Sequential,

    /// <summary>Two sides of a middle value, which is the lightest colour.</summary>
    Diverging,

    /// <summary>A quantity that returns to where it began, such as a phase.</summary>
    Cyclic,
}
