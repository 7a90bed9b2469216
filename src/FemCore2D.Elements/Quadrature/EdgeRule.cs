namespace FemCore2D.Elements;

/// <summary>Points and weights of Gauss and Legendre that integrate polynomials exactly along an edge. Immutable and shared.</summary>
public sealed class EdgeRule
{
    /// <summary>The highest degree for which there is a rule.</summary>
    public const int MaximumDegree = 41;

    private static readonly Lazy<EdgeRule>[] Rules =
        [.. Enumerable.Range(1, (MaximumDegree + 1) / 2).Select(n => new Lazy<EdgeRule>(() => new EdgeRule(n)))];

    private readonly double[] parameters;
    private readonly double[] weights;

    private EdgeRule(int count) => (parameters, weights) = GaussLegendre.OnUnitInterval(count);

    /// <summary>The degree up to which polynomials are integrated exactly; always odd.</summary>
    public int Degree => (2 * parameters.Length) - 1;

    /// <summary>The number of points.</summary>
    public int Count => parameters.Length;

    /// <summary>The points, as parameters that run from 0 at the edge's start to 1 at its end, ascending.</summary>
    public ReadOnlySpan<double> Parameters => parameters;

    /// <summary>The weights; they sum to one.</summary>
    public ReadOnlySpan<double> Weights => weights;

    /// <summary>The rule that is exact for a degree.</summary>
    /// <param name="degree">The degree, 0 to 41.</param>
    /// <exception cref="ArgumentOutOfRangeException">The degree is not one of these.</exception>
    public static EdgeRule For(int degree)
    {
        ArgumentOutOfRangeException.ThrowIfNegative(degree);
        ArgumentOutOfRangeException.ThrowIfGreaterThan(degree, MaximumDegree);
        return Rules[degree / 2].Value;
    }
}
