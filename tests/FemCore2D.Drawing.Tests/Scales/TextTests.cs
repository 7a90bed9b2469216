namespace FemCore2D.Drawing.Tests;

public sealed class TextTests
{
    [Theory]
    [InlineData("V/m", 2.3e6, "MV/m", 1e6)]
    [InlineData("V", 12000, "kV", 1e3)]
    [InlineData("V", 1000, "kV", 1e3)]
    [InlineData("V", 999.9, "V", 1)]
    [InlineData("m", 0.045, "mm", 1e-3)]
    [InlineData("F", 66.7e-12, "pF", 1e-12)]
    [InlineData("W/m²", 5e4, "kW/m²", 1e3)]
    [InlineData("Ω·m", 0.002, "mΩ·m", 1e-3)]
    [InlineData("°C", 20, "°C", 1)]
    [InlineData("m²", 4e-6, "10⁻⁶ m²", 1e-6)]
    [InlineData("", 3e7, "10⁶", 1e6)]
    [InlineData("V", 0, "V", 1)]
    public void Units_get_the_prefix_that_suits(string unit, double largest, string expected, double factor)
    {
        var prefix = UnitPrefix.For(unit, largest);
        Assert.Equal(expected, prefix.Unit);
        Assert.Equal(factor, prefix.Factor, 1e-12 * factor);
    }

    [Theory]
    [InlineData(0.0, "0")]
    [InlineData(1.0, "1")]
    [InlineData(-2.5, "−2.5")]
    [InlineData(0.04, "0.04")]
    [InlineData(123.456, "123")]
    [InlineData(2e7, "2 × 10⁷")]
    [InlineData(1e-6, "10⁻⁶")]
    public void Numbers_are_written_short(double value, string expected) => Assert.Equal(expected, NumberText.Short(value));

    [Fact]
    public void Numbers_of_one_row_share_their_decimals()
    {
        Assert.Equal(1, NumberText.DecimalsFor([0, 0.5, 1]));
        Assert.Equal(2, NumberText.DecimalsFor([0.25, 1]));
        Assert.Equal(0, NumberText.DecimalsFor([10, 20]));
        Assert.Equal("−0.50", NumberText.Fixed(-0.5, 2));
        Assert.Equal("0.0", NumberText.Fixed(-0.01, 1));
    }

    [Fact]
    public void The_typefaces_know_the_signs_of_science()
    {
        foreach (SkiaSharp.SKTypeface face in new[] { Typefaces.Regular, Typefaces.SemiBold })
        {
            using var font = new SkiaSharp.SKFont(face);
            foreach (char sign in "aZ09µμΩ°²³⁻⁰¹⁴⁵⁶⁷⁸⁹₀₁₂ελρσφωΔΦπ−×·∂∞≤≥≈→½…ÅåøßЖя")
                Assert.True(font.ContainsGlyph(sign), $"{face.FamilyName} lacks '{sign}'");
        }
    }
}
