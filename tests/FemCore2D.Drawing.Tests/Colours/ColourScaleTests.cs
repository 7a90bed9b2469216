namespace FemCore2D.Drawing.Tests;

public sealed class ColourScaleTests
{
    private const int Steps = 32;

    // Eight bits a channel move the lightness by up to 0.002 either way.
    private const double Rounding = 0.004;

    public static TheoryData<ColourScale> Sequential => [ColourScale.Undertow, ColourScale.Samphire];

    public static TheoryData<double[]> Dichromats => [ColourVision.Protan, ColourVision.Deutan, ColourVision.Tritan];

    [Theory]
    [MemberData(nameof(Sequential))]
    public void Sequential_scales_fall_in_lightness_by_equal_steps(ColourScale scale) =>
        AssertEven(Lightness(scale, 0, 1), falls: true);

    [Fact]
    public void The_diverging_scale_rises_to_its_middle_and_falls_as_evenly()
    {
        AssertEven(Lightness(ColourScale.EbbFlood, 0, 0.5), falls: false);
        AssertEven(Lightness(ColourScale.EbbFlood, 0.5, 1), falls: true);
        double[] all = Lightness(ColourScale.EbbFlood, 0, 1);
        Assert.All(Enumerable.Range(0, Steps + 1), i => Assert.Equal(all[i], all[Steps - i], Rounding));
    }

    [Fact]
    public void The_cyclic_scale_falls_and_rises_evenly_and_ends_where_it_began()
    {
        AssertEven(Lightness(ColourScale.TideClock, 0, 0.5), falls: true);
        AssertEven(Lightness(ColourScale.TideClock, 0.5, 1), falls: false);
        Oklab start = Oklab.FromColour(ColourScale.TideClock.At(0));
        Oklab end = Oklab.FromColour(ColourScale.TideClock.At(0.9999));
        Assert.True(start.DistanceTo(end) < 0.01);
        Assert.Equal(ColourScale.TideClock.At(0.3), ColourScale.TideClock.At(1.3));
        Assert.Equal(ColourScale.TideClock.At(0.3), ColourScale.TideClock.At(-0.7));
    }

    [Theory]
    [MemberData(nameof(Dichromats))]
    public void Neighbouring_bands_are_told_apart_by_lightness_alone_by_the_colour_blind(double[] matrix)
    {
        const int bands = 12;
        foreach (ColourScale scale in new[] { ColourScale.Undertow, ColourScale.Samphire })
        {
            double[] seen = [.. Enumerable.Range(0, bands)
                .Select(i => ColourVision.Seen(scale.At((i + 0.5) / bands), matrix).Lightness)];
            for (int i = 1; i < bands; i++)
                Assert.InRange(seen[i - 1] - seen[i], 0.025, 0.075);
        }
    }

    [Theory]
    [MemberData(nameof(Dichromats))]
    public void Both_sides_of_the_diverging_scale_differ_in_colour_for_the_colour_blind(double[] matrix)
    {
        for (double side = 0.15; side <= 0.5; side += 0.05)
        {
            Oklab below = ColourVision.Seen(ColourScale.EbbFlood.At(0.5 - side), matrix);
            Oklab above = ColourVision.Seen(ColourScale.EbbFlood.At(0.5 + side), matrix);
            Assert.True(below.DistanceTo(above) > 0.06, $"{below} and {above} at {side}");
        }
    }

    [Theory]
    [MemberData(nameof(Dichromats))]
    public void Opposite_quarters_of_the_cycle_differ_for_the_colour_blind(double[] matrix)
    {
        Oklab quarter = ColourVision.Seen(ColourScale.TideClock.At(0.25), matrix);
        Oklab threeQuarters = ColourVision.Seen(ColourScale.TideClock.At(0.75), matrix);
        Assert.True(quarter.DistanceTo(threeQuarters) > 0.06);
    }

    [Fact]
    public void Dark_lines_and_letters_stay_readable_on_every_colour_but_the_darkest_third()
    {
        double ink = ColourVision.Luminance(Ink.Text);
        foreach (ColourScale scale in new[] { ColourScale.Undertow, ColourScale.Samphire })
        {
            // A contrast of 3 is the least for graphics in WCAG 2.1.
            for (double t = 0; t <= 0.66; t += 0.02)
                Assert.True((ColourVision.Luminance(scale.At(t)) + 0.05) / (ink + 0.05) > 3, $"{scale} at {t}");
        }
    }

    [Fact]
    public void Fractions_beyond_the_ends_keep_the_end_colours_and_none_is_grey()
    {
        ColourScale scale = ColourScale.Undertow;
        Assert.Equal(scale.At(0), scale.At(-3));
        Assert.Equal(scale.At(1), scale.At(double.PositiveInfinity));
        Assert.Equal(new Colour(128, 128, 128), scale.At(double.NaN));
        Assert.Equal(scale.At(0.25), scale.Reversed().At(0.75));
    }

    [Fact]
    public void A_scale_through_given_colours_meets_them()
    {
        Colour[] colours = [new(10, 20, 120), new(200, 180, 40), new(250, 250, 250)];
        var scale = ColourScale.Through("own", ColourScaleKind.Sequential, colours);
        Assert.Equal(colours[0], scale.At(0));
        Assert.Equal(colours[2], scale.At(1));
        Assert.True(Oklab.FromColour(colours[1]).DistanceTo(Oklab.FromColour(scale.At(0.5))) < 0.01);
        Assert.Throws<ArgumentException>(() => ColourScale.Through("own", ColourScaleKind.Sequential, colours[0]));
    }

    private static double[] Lightness(ColourScale scale, double from, double to) =>
        [.. Enumerable.Range(0, Steps + 1).Select(i => Oklab.FromColour(scale.At(from + ((to - from) * i / Steps))).Lightness)];

    private static void AssertEven(double[] lightness, bool falls)
    {
        double mean = (lightness[^1] - lightness[0]) / Steps;
        Assert.Equal(falls, mean < 0);
        Assert.InRange(Math.Abs(mean) * Steps, 0.5, 0.6);
        for (int i = 1; i < lightness.Length; i++)
        {
            Assert.Equal(mean, lightness[i] - lightness[i - 1], Rounding);
            Assert.Equal(falls, lightness[i] < lightness[i - 1]);
        }
    }
}
