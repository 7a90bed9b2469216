namespace FemCore2D.Drawing.Tests;

public sealed class RegionTintsTests
{
    [Fact]
    public void Tints_that_follow_each_other_differ_in_lightness()
    {
        for (int i = 1; i < RegionTints.Foreshore.Length; i++)
        {
            double before = Oklab.FromColour(RegionTints.Foreshore[i - 1]).Lightness;
            double here = Oklab.FromColour(RegionTints.Foreshore[i]).Lightness;
            Assert.True(Math.Abs(before - here) > 0.05, $"tints {i - 1} and {i}");
        }
    }

    [Fact]
    public void All_of_three_rounds_of_tints_are_different()
    {
        Oklab[] tints = [.. Enumerable.Range(0, 36).Select(i => Oklab.FromColour(RegionTints.Of(i)))];
        for (int i = 0; i < tints.Length; i++)
        {
            for (int j = 0; j < i; j++)
                Assert.True(tints[i].DistanceTo(tints[j]) > 0.012, $"tints {i} and {j}");
        }
    }

    [Fact]
    public void Names_are_readable_on_all_tints()
    {
        double ink = ColourVision.Luminance(Ink.Text);

        // The enhanced contrast of WCAG 2.1.
        Assert.All(RegionTints.Foreshore, tint => Assert.True((ColourVision.Luminance(tint) + 0.05) / (ink + 0.05) > 7));
    }
}
