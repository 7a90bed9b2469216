using FsCheck.Xunit;

namespace FemCore2D.Drawing.Tests;

public sealed class OklabTests
{
    // Ottosson (2020), table of the colours of the screen's corners, to the digits of the published matrices.
    [Theory]
    [InlineData(255, 255, 255, 1.0, 0.0, 0.0)]
    [InlineData(255, 0, 0, 0.62796, 0.22486, 0.12585)]
    [InlineData(0, 255, 0, 0.86644, -0.23389, 0.17950)]
    [InlineData(0, 0, 255, 0.45201, -0.03246, -0.31153)]
    public void Corners_of_the_screen_space_have_their_published_coordinates(
        byte red, byte green, byte blue, double lightness, double a, double b)
    {
        Oklab found = Oklab.FromColour(new Colour(red, green, blue));
        Assert.Equal(lightness, found.Lightness, 1e-4);
        Assert.Equal(a, found.A, 1e-4);
        Assert.Equal(b, found.B, 1e-4);
    }

    [Property]
    public bool There_and_back_gives_the_same_colour(byte red, byte green, byte blue)
    {
        var colour = new Colour(red, green, blue);
        return Oklab.FromColour(colour).ToColour() == colour;
    }

    [Fact]
    public void A_colour_beyond_the_screen_keeps_its_lightness_and_hue()
    {
        Oklab wanted = Oklab.FromPolar(0.5, 0.4, 140);
        Oklab shown = Oklab.FromColour(wanted.ToColour());
        Assert.Equal(wanted.Lightness, shown.Lightness, 0.004);
        Assert.Equal(Math.Atan2(wanted.B, wanted.A), Math.Atan2(shown.B, shown.A), 0.03);
        Assert.InRange(shown.Chroma, 0.1, 0.25);
    }
}
