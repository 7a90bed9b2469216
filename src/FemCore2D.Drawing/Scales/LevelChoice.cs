using System.Collections.Immutable;

namespace FemCore2D.Drawing;

/// <summary>Chooses round levels for a range of values.</summary>
internal static class LevelChoice
{
    private const double SmallestShare = 1e-4;

    /// <summary>The edges of bands that cover a range: ascending, at least two.</summary>
    /// <param name="low">The smallest value.</param>
    /// <param name="high">The largest value.</param>
    /// <param name="count">About how many bands.</param>
    /// <param name="spacing">How they follow each other.</param>
    /// <param name="range">A range that is kept exactly, instead of being rounded outwards.</param>
    /// <param name="unit">The unit, as degrees have round numbers of their own.</param>
    public static ImmutableArray<double> BandEdges(
        double low, double high, int count, ValueSpacing spacing, ValueRange? range, string unit)
    {
        if (range is { } given)
            (low, high) = (given.Low, given.High);
        if (spacing == ValueSpacing.Logarithmic && high > 0)
            return LogarithmicEdges(low, high, count, range is not null);
        double size = Math.Max(Math.Abs(low), Math.Abs(high));
        if (high - low <= 1e-9 * size || size == 0)
            return AroundConstant(low + ((high - low) / 2));

        double step = unit == "°" ? RoundSteps.DegreeStepFor(high - low, count) : RoundSteps.StepFor(high - low, count);
        if (range is not null)
            return WithEnds(low, high, RoundSteps.Multiples(low, high, step));
        long first = (long)Math.Floor((low / step) + 1e-9);
        long last = (long)Math.Ceiling((high / step) - 1e-9);
        var edges = ImmutableArray.CreateBuilder<double>();
        for (long i = first; i <= last; i++)
            edges.Add(RoundSteps.Rounded(i, step));
        return edges.ToImmutable();
    }

    /// <summary>Levels for lines strictly inside a range; none for a constant.</summary>
    public static ImmutableArray<double> LineLevels(
        double low, double high, int count, ValueSpacing spacing, ValueRange? range, string unit)
    {
        ImmutableArray<double> edges = BandEdges(low, high, count, spacing, range, unit);
        double slack = 1e-9 * (high - low);
        return [.. edges.Where(level => level > low + slack && level < high - slack)];
    }

    private static ImmutableArray<double> AroundConstant(double value)
    {
        double step = value == 0 ? 1 : RoundSteps.StepFor(Math.Abs(value), 5);
        double below = Math.Floor((value / step) + 1e-9) * step;
        return [below, below + step];
    }

    private static ImmutableArray<double> LogarithmicEdges(double low, double high, int count, bool keepsEnds)
    {
        if (low <= 0)
            low = SmallestShare * high;
        double decades = Math.Log10(high / low);
        if (decades < 1e-6)
            return AroundConstant(high);
        if (decades < 0.7)
            return BandEdges(low, high, count, ValueSpacing.Linear, keepsEnds ? new ValueRange(low, high) : null, "");
        double[] leads = decades > count ? [1] : decades * 3 > 1.3 * count ? [1] : decades * 6 > count ? [1, 2, 5] : [1, 1.5, 2, 3, 5, 7];
        int stride = Math.Max(1, (int)Math.Round(decades / count));
        var all = new List<double>();
        for (int power = (int)Math.Floor(Math.Log10(low)) - 1; power <= Math.Ceiling(Math.Log10(high)) + 1; power++)
        {
            if (leads.Length == 1 && power % stride != 0)
                continue;
            all.AddRange(leads.Select(lead => lead * Math.Pow(10, power)));
        }

        if (keepsEnds)
            return WithEnds(low, high, all);
        double first = all.Last(level => level <= low * (1 + 1e-9));
        double last = all.First(level => level >= high * (1 - 1e-9));
        return [.. all.Where(level => level >= first && level <= last)];
    }

    private static ImmutableArray<double> WithEnds(double low, double high, List<double> inner)
    {
        double slack = 1e-6 * (high - low);
        return [low, .. inner.Where(level => level > low + slack && level < high - slack), high];
    }
}
