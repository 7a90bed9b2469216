namespace FemCore2D.Drawing;

/// <summary>Round numbers: 1, 2 or 5 times a power of ten.</summary>
internal static class RoundSteps
{
    /// <summary>The round step that divides a range into about a number of parts.</summary>
    public static double StepFor(double range, double parts)
    {
        double raw = range / parts;
        double power = Math.Pow(10, Math.Floor(Math.Log10(raw)));
        double lead = raw / power;
        return power * (lead < 1.5 ? 1 : lead < 3.2 ? 2 : lead < 7.1 ? 5 : 10);
    }

    /// <summary>The step for angles in degrees: parts of a right angle rather than tens, where they are not small.</summary>
    public static double DegreeStepFor(double range, double parts)
    {
        double raw = range / parts;
        foreach (double step in (ReadOnlySpan<double>)[15, 30, 45, 90, 180])
        {
            if (raw > 9 && raw <= 1.25 * step)
                return step;
        }

        return StepFor(range, parts);
    }

    /// <summary>The multiples of a step within a range.</summary>
    public static List<double> Multiples(double low, double high, double step)
    {
        double slack = 1e-9;
        long first = (long)Math.Ceiling((low / step) - slack);
        long last = (long)Math.Floor((high / step) + slack);
        var values = new List<double>();
        for (long i = first; i <= last; i++)
            values.Add(Rounded(i, step));
        return values;
    }

    /// <summary>A multiple of a round step without the rounding error of the product.</summary>
    public static double Rounded(long count, double step)
    {
        // Steps below one are not exact in binary: divide by their inverse, which is.
        double inverse = Math.Round(1 / step);
        return step < 1 && Math.Abs((inverse * step) - 1) < 1e-12 ? count / inverse : count * step;
    }
}
