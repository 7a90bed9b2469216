namespace FemCore2D.Geometry;

/// <summary>How the divisions of a line are spread along it: immutable.</summary>
public sealed class Grading
{
    private readonly double growth;
    private readonly bool isSymmetric;
    private readonly double[]? fixedFractions;

    private Grading(double growth, bool isSymmetric, double[]? fixedFractions)
    {
        this.growth = growth;
        this.isSymmetric = isSymmetric;
        this.fixedFractions = fixedFractions;
    }

    /// <summary>Divisions of equal length.</summary>
    public static Grading Even { get; } = new(1, false, null);

    /// <summary>Divisions that grow in geometric progression from the start to the end of the line.</summary>
    /// <param name="lastToFirst">The ratio of the last length to the first; below 1 they shrink.</param>
    /// <exception cref="ArgumentOutOfRangeException">The ratio is not a positive number.</exception>
    public static Grading Growing(double lastToFirst) => new(Positive(lastToFirst), false, null);

    /// <summary>Divisions that grow in geometric progression from both ends to the middle.</summary>
    /// <param name="middleToEnds">The ratio of the middle length to those at the ends; below 1 the middle is finer.</param>
    /// <exception cref="ArgumentOutOfRangeException">The ratio is not a positive number.</exception>
    public static Grading FromBothEnds(double middleToEnds) => new(Positive(middleToEnds), true, null);

    /// <summary>Divisions at given fractions of the line.</summary>
    /// <param name="fractions">The fractions, ascending, the first 0 and the last 1.</param>
    /// <exception cref="ArgumentException">They do not ascend from 0 to 1.</exception>
    public static Grading At(params ReadOnlySpan<double> fractions)
    {
        bool valid = fractions.Length >= 2 && fractions[0] == 0 && fractions[^1] == 1;
        for (int i = 1; i < fractions.Length; i++)
        {
            valid &= fractions[i] > fractions[i - 1];
        }

        return valid
            ? new Grading(1, false, fractions.ToArray())
            : throw new ArgumentException("The fractions must ascend strictly from 0 to 1.", nameof(fractions));
    }

    /// <summary>The fractions of the line between which a number of divisions lie: one more than divisions.</summary>
    /// <param name="count">The number of divisions.</param>
    /// <exception cref="ArgumentOutOfRangeException">
    /// The number is not positive, or differs from that of the fractions the grading was made with.
    /// </exception>
    public double[] Fractions(int count)
    {
        ArgumentOutOfRangeException.ThrowIfNegativeOrZero(count);
        if (fixedFractions is not null)
        {
            return fixedFractions.Length == count + 1
                ? [.. fixedFractions]
                : throw new ArgumentOutOfRangeException(
                    nameof(count), count, $"The grading was given for {fixedFractions.Length - 1} divisions.");
        }

        var fractions = new double[count + 1];
        int steps = isSymmetric ? (count - 1) / 2 : count - 1;
        double factor = steps > 0 ? Math.Pow(growth, 1.0 / steps) : 1;
        for (int i = 0; i < count; i++)
        {
            int step = isSymmetric ? Math.Min(i, count - 1 - i) : i;
            fractions[i + 1] = fractions[i] + Math.Pow(factor, step);
        }

        double total = fractions[count];
        for (int i = 1; i < count; i++)
        {
            fractions[i] /= total;
        }

        fractions[count] = 1;
        return fractions;
    }

    private static double Positive(double ratio) => ratio > 0 && double.IsFinite(ratio)
        ? ratio
        : throw new ArgumentOutOfRangeException(nameof(ratio), ratio, "The ratio of lengths must be a positive number.");
}
