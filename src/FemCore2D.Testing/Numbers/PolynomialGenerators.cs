using FsCheck;
using FsCheck.Fluent;

namespace FemCore2D.Testing;

/// <summary>Generators of polynomials.</summary>
public static class PolynomialGenerators
{
    /// <summary>Polynomials in two variables with coefficients from -1 to 1.</summary>
    /// <param name="degree">The degree.</param>
    /// <exception cref="ArgumentOutOfRangeException">The degree is negative.</exception>
    public static Gen<Polynomial2D> OfDegree(int degree)
    {
        ArgumentOutOfRangeException.ThrowIfNegative(degree);
        return NumberGenerators.Between(-1, 1)
            .ArrayOf((degree + 1) * (degree + 2) / 2)
            .Select(coefficients => new Polynomial2D(coefficients));
    }

    /// <summary>Polynomials in two variables of any degree up to a highest.</summary>
    /// <param name="highest">The highest degree.</param>
    public static Gen<Polynomial2D> UpToDegree(int highest) => Gen.Choose(0, highest).SelectMany(OfDegree);
}
