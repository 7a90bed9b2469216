namespace FemCore2D.Drawing;

/// <summary>A line of the legend under a panel.</summary>
/// <param name="Text">What it says.</param>
/// <param name="Colour">The tint of its swatch, or the colour of its arrow.</param>
/// <param name="ArrowLength">The length of an arrow in points; 0 for a swatch.</param>
internal readonly record struct LegendItem(string Text, Colour Colour, float ArrowLength = 0);
