using System.Runtime.CompilerServices;
using FemCore2D.Geometry;

namespace FemCore2D.Elements;

/// <summary>
/// The Lagrange node element of degree 1 to 5 on triangles: all polynomials of its degree, known by their values at
/// equally spaced nodes. The default value is the element of degree 1.
/// </summary>
/// <remarks>
/// Nodes lie at barycentric coordinates that are multiples of 1/degree; those of the interior are ordered by rows of
/// growing second reference coordinate, each row by growing first coordinate. Shape functions are products of three
/// factors, one of each barycentric coordinate (P. Silvester, 1969).
/// </remarks>
public readonly record struct LagrangeTriangle : INodeElement
{
    /// <summary>The highest degree.</summary>
    public const int MaximumDegree = 5;

    private static readonly NodeLattice[] Lattices = NodeLattice.UpTo(CellKind.Triangle, MaximumDegree);

    private readonly int degreeBeyondFirst;

    /// <summary>Creates the element of a degree.</summary>
    /// <param name="degree">The degree, 1 to 5.</param>
    /// <exception cref="ArgumentOutOfRangeException">The degree is not one of these.</exception>
    public LagrangeTriangle(int degree)
    {
        ArgumentOutOfRangeException.ThrowIfLessThan(degree, 1);
        ArgumentOutOfRangeException.ThrowIfGreaterThan(degree, MaximumDegree);
        degreeBeyondFirst = degree - 1;
    }

    /// <inheritdoc/>
    public CellKind Cell => CellKind.Triangle;

    /// <inheritdoc/>
    public int Degree => degreeBeyondFirst + 1;

    /// <inheritdoc/>
    public int UnknownCount => (Degree + 1) * (Degree + 2) / 2;

    /// <inheritdoc/>
    public UnknownLayout Layout => new(1, Degree - 1, (Degree - 1) * (Degree - 2) / 2);

    /// <inheritdoc/>
    public ReadOnlySpan<Point2D> NodePoints => Lattices[degreeBeyondFirst].Points;

    /// <inheritdoc/>
    [SkipLocalsInit]
    public void Values(Point2D point, Span<double> values)
    {
        values = values[..UnknownCount];
        int degree = Degree;
        if (degree == 1)
        {
            values[0] = 1 - point.X - point.Y;
            values[1] = point.X;
            values[2] = point.Y;
            return;
        }

        const int Stride = MaximumDegree + 1;
        Span<double> factors = stackalloc double[3 * Stride];
        Span<double> first = factors[..Stride];
        Span<double> second = factors.Slice(Stride, Stride);
        Span<double> third = factors.Slice(2 * Stride, Stride);
        LagrangeFactors.Values(degree, 1 - point.X - point.Y, first);
        LagrangeFactors.Values(degree, point.X, second);
        LagrangeFactors.Values(degree, point.Y, third);

        ReadOnlySpan<(byte Xi, byte Eta)> steps = Lattices[degreeBeyondFirst].Steps;
        for (int i = 0; i < values.Length; i++)
        {
            (byte xi, byte eta) = steps[i];
            values[i] = first[degree - xi - eta] * second[xi] * third[eta];
        }
    }

    /// <inheritdoc/>
    [SkipLocalsInit]
    public void Gradients(Point2D point, Span<Vector2D> gradients)
    {
        gradients = gradients[..UnknownCount];
        int degree = Degree;
        if (degree == 1)
        {
            gradients[0] = new Vector2D(-1, -1);
            gradients[1] = new Vector2D(1, 0);
            gradients[2] = new Vector2D(0, 1);
            return;
        }

        const int Stride = MaximumDegree + 1;
        Span<double> factors = stackalloc double[6 * Stride];
        Span<double> first = factors[..Stride];
        Span<double> second = factors.Slice(Stride, Stride);
        Span<double> third = factors.Slice(2 * Stride, Stride);
        Span<double> firstSlope = factors.Slice(3 * Stride, Stride);
        Span<double> secondSlope = factors.Slice(4 * Stride, Stride);
        Span<double> thirdSlope = factors.Slice(5 * Stride, Stride);
        LagrangeFactors.ValuesAndSlopes(degree, 1 - point.X - point.Y, first, firstSlope);
        LagrangeFactors.ValuesAndSlopes(degree, point.X, second, secondSlope);
        LagrangeFactors.ValuesAndSlopes(degree, point.Y, third, thirdSlope);

        ReadOnlySpan<(byte Xi, byte Eta)> steps = Lattices[degreeBeyondFirst].Steps;
        for (int i = 0; i < gradients.Length; i++)
        {
            (byte xi, byte eta) = steps[i];
            int rest = degree - xi - eta;
            double alongFirst = firstSlope[rest] * second[xi] * third[eta];
            gradients[i] = new Vector2D(
                (first[rest] * secondSlope[xi] * third[eta]) - alongFirst,
                (first[rest] * second[xi] * thirdSlope[eta]) - alongFirst);
        }
    }
}
