using FsCheck;
using FsCheck.Fluent;

namespace FemCore2D.Testing;

/// <summary>Generators of plain numbers.</summary>
public static class NumberGenerators
{
    private const int Steps = 1 << 30;

    /// <summary>Numbers spread evenly over a range, in which its two ends come up now and then.</summary>
    /// <param name="low">The lower end.</param>
    /// <param name="high">The upper end.</param>
    public static Gen<double> Between(double low, double high) =>
        Gen.Frequency(
            (1, Gen.Constant(low)),
            (1, Gen.Constant(high)),
            (18, Gen.Choose(0, Steps).Select(step => low + ((high - low) * (step / (double)Steps)))));

    /// <summary>Positive numbers whose logarithm is spread evenly over a range.</summary>
    /// <param name="low">The lower end, positive.</param>
    /// <param name="high">The upper end.</param>
    /// <exception cref="ArgumentOutOfRangeException"><paramref name="low"/> is not positive.</exception>
    public static Gen<double> MagnitudeBetween(double low, double high)
    {
        ArgumentOutOfRangeException.ThrowIfNegativeOrZero(low);
        return Between(Math.Log(low), Math.Log(high)).Select(Math.Exp);
    }
}
