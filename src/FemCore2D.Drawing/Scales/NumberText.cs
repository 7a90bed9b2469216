using System.Globalization;

namespace FemCore2D.Drawing;

/// <summary>Writes numbers for people.</summary>
internal static class NumberText
{
    private const string Superscripts = "⁰¹²³⁴⁵⁶⁷⁸⁹";

    /// <summary>A number with a fixed count of decimals and a true minus sign.</summary>
    public static string Fixed(double value, int decimals)
    {
        double rounded = Math.Round(value, decimals);
        string text = Math.Abs(rounded).ToString("F" + decimals.ToString(CultureInfo.InvariantCulture), CultureInfo.InvariantCulture);
        return rounded < 0 ? "−" + text : text;
    }

    /// <summary>The fewest decimals that tell all given numbers exactly, or nearly so.</summary>
    public static int DecimalsFor(IEnumerable<double> values)
    {
        int decimals = 0;
        foreach (double value in values)
        {
            double slack = 1e-7 * Math.Max(1e-12, Math.Abs(value));
            while (decimals < 9 && Math.Abs(Math.Round(value, decimals) - value) > slack)
                decimals++;
        }

        return decimals;
    }

    /// <summary>A number with about three significant digits.</summary>
    public static string Short(double value)
    {
        double size = Math.Abs(value);
        if (size != 0 && (size >= 1e5 || size < 1e-3))
        {
            int exponent = (int)Math.Floor(Math.Log10(size));
            double lead = value / Math.Pow(10, exponent);
            string front = Fixed(lead, DecimalsFor([Math.Round(lead, 2)]));
            return front == "1" ? $"10{Exponent(exponent)}" : $"{front} × 10{Exponent(exponent)}";
        }

        int digits = size == 0 ? 0 : Math.Max(0, 2 - (int)Math.Floor(Math.Log10(size)));
        return Fixed(value, DecimalsFor([Math.Round(value, Math.Min(digits, 9))]));
    }

    /// <summary>A number as short as it can be told; from a hundredth down and ten thousand up as a power of ten.</summary>
    public static string Compact(double value)
    {
        double size = Math.Abs(value);
        double power = size == 0 ? 0 : Math.Round(Math.Log10(size), 9);
        return power % 1 == 0 && (power <= -2 || power >= 4) ? $"10{Exponent((int)power)}" : Short(value);
    }

    /// <summary>An exponent in raised figures.</summary>
    public static string Exponent(int exponent)
    {
        string figures = Math.Abs(exponent).ToString(CultureInfo.InvariantCulture);
        return (exponent < 0 ? "⁻" : "") + string.Concat(figures.Select(figure => Superscripts[figure - '0']));
    }
}
