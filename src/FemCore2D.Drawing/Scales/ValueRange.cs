namespace FemCore2D.Drawing;

/// <summary>A range of values.</summary>
public readonly record struct ValueRange
{
    /// <summary>Creates the range.</summary>
    /// <param name="low">Its lower end.</param>
    /// <param name="high">Its upper end.</param>
    /// <exception cref="ArgumentOutOfRangeException">An end is not finite, or the upper end is not above the lower.</exception>
    public ValueRange(double low, double high)
    {
        if (!double.IsFinite(low) || !double.IsFinite(high) || !(high > low))
            throw new ArgumentOutOfRangeException(
                nameof(high), high, $"A range reaches from a finite lower end, here {low}, to a finite upper end above it.");
        Low = low;
        High = high;
    }

    /// <summary>The lower end.</summary>
    public double Low { get; }

    /// <summary>The upper end.</summary>
    public double High { get; }
}
