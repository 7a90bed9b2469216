using System.Collections.Immutable;
using FsCheck;
using FsCheck.Fluent;
using FsCheck.Xunit;

namespace FemCore2D.Drawing.Tests;

public sealed class LevelChoiceTests
{
    [Property]
    public Property Band_edges_cover_the_range_in_round_steps(NormalFloat first, NormalFloat second, byte count)
    {
        double low = Math.Min(first.Get, second.Get);
        double high = Math.Max(first.Get, second.Get);
        int wanted = 4 + (count % 30);
        ImmutableArray<double> edges = LevelChoice.BandEdges(low, high, wanted, ValueSpacing.Linear, null, "");
        bool isOrdered = edges.Zip(edges.Skip(1)).All(pair => pair.First < pair.Second);
        double slack = 1e-6 * (high - low);
        bool covers = edges[0] <= low + slack && edges[^1] >= high - slack;
        bool isNear = edges.Length - 1 <= (1.6 * wanted) + 2;
        double lead = (edges[1] - edges[0]) / Math.Pow(10, Math.Floor(Math.Log10(edges[1] - edges[0]) + 1e-9));
        bool isRound = new[] { 1.0, 2, 5 }.Any(round => Math.Abs(lead - round) < 1e-6);
        return (isOrdered && covers && isNear && isRound)
            .Label($"{low} to {high}: {string.Join(", ", edges)}")
            .When(double.IsFinite(low) && double.IsFinite(high) && high - low > 1e-6 * Math.Max(1e-300, Math.Abs(high) + Math.Abs(low)));
    }

    [Fact]
    public void Tenths_are_the_numbers_that_one_writes() =>
        Assert.Equal([0.0, 0.1, 0.2, 0.3, 0.4, 0.5, 0.6, 0.7, 0.8, 0.9, 1.0], LevelChoice.BandEdges(0, 1, 10, ValueSpacing.Linear, null, "").ToArray());

    [Fact]
    public void A_given_range_is_kept_with_round_levels_inside() =>
        Assert.Equal([-2.1, -2, -1, 0, 1, 2], LevelChoice.BandEdges(0, 0, 4, ValueSpacing.Linear, new ValueRange(-2.1, 2), "").ToArray());

    [Fact]
    public void Degrees_go_by_parts_of_a_right_angle() =>
        Assert.Equal([-180.0, -135, -90, -45, 0, 45, 90, 135, 180], LevelChoice.BandEdges(-180, 180, 8, ValueSpacing.Linear, null, "°").ToArray());

    [Fact]
    public void Logarithmic_levels_are_one_two_five_in_each_decade() => AssertClose(
        [0.01, 0.02, 0.05, 0.1, 0.2, 0.5, 1, 2, 5, 10],
        LevelChoice.BandEdges(0.011, 9, 9, ValueSpacing.Logarithmic, null, ""));

    [Fact]
    public void Logarithmic_levels_of_many_decades_are_powers_of_ten() => AssertClose(
        [1e-4, 1e-3, 1e-2, 1e-1, 1, 10, 100, 1000],
        LevelChoice.BandEdges(2e-4, 900, 7, ValueSpacing.Logarithmic, null, ""));

    [Fact]
    public void Values_of_zero_and_below_leave_a_logarithmic_scale_its_four_decades()
    {
        ImmutableArray<double> edges = LevelChoice.BandEdges(-1, 1, 12, ValueSpacing.Logarithmic, null, "");
        Assert.Equal(1e-4, edges[0], 1e-12);
        Assert.Equal(1, edges[^1], 1e-12);
    }

    [Theory]
    [InlineData(0)]
    [InlineData(7.3)]
    [InlineData(-2e-12)]
    [InlineData(4e20)]
    public void A_constant_gets_one_band_around_it(double value)
    {
        foreach (ValueSpacing spacing in Enum.GetValues<ValueSpacing>())
        {
            ImmutableArray<double> edges = LevelChoice.BandEdges(value, value, 12, spacing, null, "");
            Assert.Equal(2, edges.Length);
            Assert.InRange(value, edges[0], edges[1]);
        }

        Assert.Empty(LevelChoice.LineLevels(value, value, 12, ValueSpacing.Linear, null, ""));
    }

    [Fact]
    public void A_range_must_have_a_length()
    {
        Assert.Throws<ArgumentOutOfRangeException>(() => new ValueRange(1, 1));
        Assert.Throws<ArgumentOutOfRangeException>(() => new ValueRange(0, double.NaN));
        Assert.Throws<ArgumentOutOfRangeException>(() => new ValueRange(double.NegativeInfinity, 0));
    }

    private static void AssertClose(double[] expected, ImmutableArray<double> found)
    {
        Assert.Equal(expected.Length, found.Length);
        Assert.All(expected.Zip(found), pair => Assert.Equal(pair.First, pair.Second, 1e-9 * pair.First));
    }
}
