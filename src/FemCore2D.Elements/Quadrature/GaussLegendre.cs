namespace FemCore2D.Elements;

/// <summary>The points and weights of Gauss and Legendre on the interval from 0 to 1.</summary>
/// <remarks>
/// Newton's method on the Legendre polynomial from Tricomi's estimate of its roots (P. J. Davis and P. Rabinowitz,
/// <em>Methods of Numerical Integration</em>, 1984, section 2.7). It runs in numbers of 28 digits, so that points and
/// weights come out as the doubles nearest to the true ones, and symmetric to the last bit.
/// </remarks>
internal static class GaussLegendre
{
    /// <summary>The rule of a number of points, exact for polynomials of degree 2 n - 1.</summary>
    public static (double[] Points, double[] Weights) OnUnitInterval(int count)
    {
        double[] points = new double[count];
        double[] weights = new double[count];
        for (int i = 0; i < (count + 1) / 2; i++)
        {
            bool isMiddle = (2 * i) + 1 == count;
            decimal root = isMiddle ? 0 : (decimal)Math.Cos(Math.PI * (i + 0.75) / (count + 0.5));
            (decimal value, decimal slope) = Legendre(count, root);

            // The estimate holds at least three digits; each step doubles them.
            for (int step = 0; step < 5; step++)
            {
                root -= value / slope;
                (value, slope) = Legendre(count, root);
            }

            points[i] = (double)((1 - root) / 2);
            points[count - 1 - i] = isMiddle ? 0.5 : 1 - points[i];
            weights[i] = (double)(1 / ((1 - root) * (1 + root) * slope * slope));
            weights[count - 1 - i] = weights[i];
        }

        return (points, weights);
    }

    /// <summary>The value and the derivative of a Legendre polynomial inside (-1, 1), by its three-term recurrence.</summary>
    private static (decimal Value, decimal Slope) Legendre(int degree, decimal x)
    {
        decimal previous = 1;
        decimal value = x;
        for (int n = 1; n < degree; n++)
        {
            (previous, value) = (value, ((((2 * n) + 1) * x * value) - (n * previous)) / (n + 1));
        }

        return (value, degree * (previous - (x * value)) / ((1 - x) * (1 + x)));
    }
}
