namespace FemCore2D.Drawing;

/// <summary>How levels follow each other.</summary>
public enum ValueSpacing
{
    /// <summary>At equal differences.</summary>
    Linear,

    /// <summary>At nearly equal ratios; values of zero and below count as smaller than all levels.</summary>
    Logarithmic,
}
