namespace FemCore2D.Drawing;

/// <summary>A unit with the prefix that brings numbers into a readable size.</summary>
/// <param name="Factor">What one prefixed unit is in plain units.</param>
/// <param name="Unit">The prefixed unit as text; empty for a plain number.</param>
/// <remarks>Prefixes of the International System of Units (BIPM, 9th edition, 2019), every third power of ten.</remarks>
internal readonly record struct UnitPrefix(double Factor, string Unit)
{
    private static readonly string[] Prefixes = ["f", "p", "n", "µ", "m", "", "k", "M", "G", "T"];

    // Units that take a prefix; others, such as °C, % or m², keep their size or get a power of ten.
    private static readonly string[] Symbols =
        ["Wb", "Pa", "Hz", "VA", "var", "V", "A", "W", "T", "H", "F", "C", "J", "N", "m", "Ω", "S", "s"];

    /// <summary>Chooses the prefix for numbers up to a size.</summary>
    /// <param name="unit">The plain unit, such as <c>V/m</c>.</param>
    /// <param name="largest">The largest absolute value that is shown.</param>
    public static UnitPrefix For(string unit, double largest)
    {
        if (!(largest > 0) || !double.IsFinite(largest))
            return new UnitPrefix(1, unit);
        int power = (int)Math.Floor((Math.Log10(largest) + 1e-9) / 3);
        if (TakesPrefix(unit))
        {
            power = Math.Clamp(power, -5, 4);
            return new UnitPrefix(Math.Pow(10, 3 * power), Prefixes[power + 5] + unit);
        }

        if (largest >= 1e-2 && largest < 1e5)
            return new UnitPrefix(1, unit);
        string ten = "10" + NumberText.Exponent(3 * power);
        return new UnitPrefix(Math.Pow(10, 3 * power), unit.Length == 0 ? ten : $"{ten} {unit}");
    }

    /// <summary>Text that names a quantity and its unit, such as <c>Potential in kV</c>.</summary>
    public string Title(string label) =>
        Unit.Length == 0 ? label : label.Length == 0 ? Unit : $"{label} in {Unit}";

    private static bool TakesPrefix(string unit)
    {
        foreach (string symbol in Symbols)
        {
            if (unit.StartsWith(symbol, StringComparison.Ordinal)
                && (unit.Length == symbol.Length || unit[symbol.Length] is '/' or '·' or ' ' or '*'))
            {
                return true;
            }
        }

        return false;
    }
}
