using FemCore2D.Geometry;

namespace FemCore2D.Testing;

/// <summary>A polynomial in two variables, to be reproduced by an element or integrated by a rule.</summary>
/// <remarks>
/// The coefficients belong to the monomials by rising degree, within a degree by falling power of x:
/// 1, x, y, x^2, x y, y^2, ...
/// </remarks>
public sealed record Polynomial2D
{
    private readonly double[] coefficients;

    /// <summary>Creates the polynomial.</summary>
    /// <param name="coefficients">1, 3, 6, 10, ... coefficients.</param>
    /// <exception cref="ArgumentException">Their number is not that of a complete degree.</exception>
    public Polynomial2D(params ReadOnlySpan<double> coefficients)
    {
        while ((Degree + 1) * (Degree + 2) / 2 < coefficients.Length)
        {
            Degree++;
        }

        if ((Degree + 1) * (Degree + 2) / 2 != coefficients.Length)
        {
            throw new ArgumentException(
                $"There are {coefficients.Length} coefficients. Give 1, 3, 6, 10, ... for a complete degree.",
                nameof(coefficients));
        }

        this.coefficients = coefficients.ToArray();
    }

    /// <summary>The degree of its highest monomial.</summary>
    public int Degree { get; }

    /// <summary>The coefficients.</summary>
    public ReadOnlySpan<double> Coefficients => coefficients;

    /// <summary>The value at a point.</summary>
    public double ValueAt(Point2D point)
    {
        double sum = 0;
        for (int total = 0, place = 0; total <= Degree; total++)
        {
            for (int y = 0; y <= total; y++, place++)
            {
                sum += coefficients[place] * Math.Pow(point.X, total - y) * Math.Pow(point.Y, y);
            }
        }

        return sum;
    }

    /// <summary>The gradient at a point.</summary>
    public Vector2D GradientAt(Point2D point)
    {
        Vector2D sum = default;
        for (int total = 0, place = 0; total <= Degree; total++)
        {
            for (int y = 0; y <= total; y++, place++)
            {
                int x = total - y;
                sum += coefficients[place] * new Vector2D(
                    x == 0 ? 0 : x * Math.Pow(point.X, x - 1) * Math.Pow(point.Y, y),
                    y == 0 ? 0 : y * Math.Pow(point.X, x) * Math.Pow(point.Y, y - 1));
            }
        }

        return sum;
    }

    /// <inheritdoc/>
    public bool Equals(Polynomial2D? other) => other is not null && Coefficients.SequenceEqual(other.Coefficients);

    /// <inheritdoc/>
    public override int GetHashCode() => coefficients.Aggregate(0, HashCode.Combine);

    /// <inheritdoc/>
    public override string ToString() => $"[{string.Join("; ", coefficients.Select(c => c.ToString("R", null)))}]";
}
