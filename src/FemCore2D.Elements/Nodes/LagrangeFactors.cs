namespace FemCore2D.Elements;

/// <summary>
/// The polynomials of one barycentric coordinate whose products are the Lagrange shape functions on equally spaced
/// nodes: the i-th vanishes at 0, 1/p, ..., (i-1)/p and is one at i/p.
/// </summary>
/// <remarks>
/// P. Silvester, "High-order polynomial triangular finite elements for potential problems", 1969. Values and
/// derivatives come from one recurrence, by the product rule, so that nothing is divided by a factor that may be zero.
/// </remarks>
internal static class LagrangeFactors
{
    /// <summary>The factors 0 to <paramref name="degree"/> at a coordinate.</summary>
    public static void Values(int degree, double coordinate, Span<double> values)
    {
        double scaled = degree * coordinate;
        double value = 1;
        values[0] = 1;
        for (int i = 0; i < degree; i++)
        {
            value *= (scaled - i) / (i + 1);
            values[i + 1] = value;
        }
    }

    /// <summary>The factors 0 to <paramref name="degree"/> and their derivatives at a coordinate.</summary>
    public static void ValuesAndSlopes(int degree, double coordinate, Span<double> values, Span<double> slopes)
    {
        double scaled = degree * coordinate;
        double value = 1;
        double slope = 0;
        values[0] = 1;
        slopes[0] = 0;
        for (int i = 0; i < degree; i++)
        {
            slope = ((slope * (scaled - i)) + (value * degree)) / (i + 1);
            value *= (scaled - i) / (i + 1);
            slopes[i + 1] = slope;
            values[i + 1] = value;
        }
    }
}
