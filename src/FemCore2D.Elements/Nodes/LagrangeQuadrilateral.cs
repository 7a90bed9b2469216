using System.Runtime.CompilerServices;
using FemCore2D.Geometry;

namespace FemCore2D.Elements;

/// <summary>
/// The Lagrange node element of degree 1 to 3 on quadrilaterals: all products of a polynomial of its degree in each
/// reference coordinate, known by their values at equally spaced nodes. The default value is the element of degree 1.
/// </summary>
/// <remarks>
/// Nodes lie at multiples of 1/degree in both reference coordinates; those of the interior are ordered by rows of
/// growing second coordinate, each row by growing first coordinate. In each coordinate the shape functions are the
/// products of two factors, one of the distance to either end (P. Silvester, 1969).
/// </remarks>
public readonly record struct LagrangeQuadrilateral : INodeElement
{
    /// <summary>The highest degree.</summary>
    public const int MaximumDegree = 3;

    private static readonly NodeLattice[] Lattices = NodeLattice.UpTo(CellKind.Quadrilateral, MaximumDegree);

    private readonly int degreeBeyondFirst;

    /// <summary>Creates the element of a degree.</summary>
    /// <param name="degree">The degree in each coordinate, 1 to 3.</param>
    /// <exception cref="ArgumentOutOfRangeException">The degree is not one of these.</exception>
    public LagrangeQuadrilateral(int degree)
    {
        ArgumentOutOfRangeException.ThrowIfLessThan(degree, 1);
        ArgumentOutOfRangeException.ThrowIfGreaterThan(degree, MaximumDegree);
        degreeBeyondFirst = degree - 1;
    }

    /// <inheritdoc/>
    public CellKind Cell => CellKind.Quadrilateral;

    /// <inheritdoc/>
    public int Degree => degreeBeyondFirst + 1;

    /// <inheritdoc/>
    public int UnknownCount => (Degree + 1) * (Degree + 1);

    /// <inheritdoc/>
    public UnknownLayout Layout => new(1, Degree - 1, (Degree - 1) * (Degree - 1));

    /// <inheritdoc/>
    public ReadOnlySpan<Point2D> NodePoints => Lattices[degreeBeyondFirst].Points;

    /// <inheritdoc/>
    [SkipLocalsInit]
    public void Values(Point2D point, Span<double> values)
    {
        values = values[..UnknownCount];
        const int Stride = MaximumDegree + 1;
        Span<double> lines = stackalloc double[2 * Stride];
        Span<double> alongXi = lines[..Stride];
        Span<double> alongEta = lines[Stride..];
        LineValues(point.X, alongXi);
        LineValues(point.Y, alongEta);

        ReadOnlySpan<(byte Xi, byte Eta)> steps = Lattices[degreeBeyondFirst].Steps;
        for (int i = 0; i < values.Length; i++)
        {
            (byte xi, byte eta) = steps[i];
            values[i] = alongXi[xi] * alongEta[eta];
        }
    }

    /// <inheritdoc/>
    [SkipLocalsInit]
    public void Gradients(Point2D point, Span<Vector2D> gradients)
    {
        gradients = gradients[..UnknownCount];
        const int Stride = MaximumDegree + 1;
        Span<double> lines = stackalloc double[4 * Stride];
        Span<double> alongXi = lines[..Stride];
        Span<double> alongEta = lines.Slice(Stride, Stride);
        Span<double> slopeXi = lines.Slice(2 * Stride, Stride);
        Span<double> slopeEta = lines.Slice(3 * Stride, Stride);
        LineValuesAndSlopes(point.X, alongXi, slopeXi);
        LineValuesAndSlopes(point.Y, alongEta, slopeEta);

        ReadOnlySpan<(byte Xi, byte Eta)> steps = Lattices[degreeBeyondFirst].Steps;
        for (int i = 0; i < gradients.Length; i++)
        {
            (byte xi, byte eta) = steps[i];
            gradients[i] = new Vector2D(slopeXi[xi] * alongEta[eta], alongXi[xi] * slopeEta[eta]);
        }
    }

    /// <summary>The Lagrange polynomials of one coordinate.</summary>
    [SkipLocalsInit]
    private void LineValues(double coordinate, Span<double> values)
    {
        const int Stride = MaximumDegree + 1;
        Span<double> factors = stackalloc double[2 * Stride];
        Span<double> end = factors[..Stride];
        Span<double> start = factors[Stride..];
        LagrangeFactors.Values(Degree, coordinate, end);
        LagrangeFactors.Values(Degree, 1 - coordinate, start);
        for (int i = 0; i <= Degree; i++)
        {
            values[i] = end[i] * start[Degree - i];
        }
    }

    /// <summary>The Lagrange polynomials of one coordinate and their derivatives.</summary>
    [SkipLocalsInit]
    private void LineValuesAndSlopes(double coordinate, Span<double> values, Span<double> slopes)
    {
        const int Stride = MaximumDegree + 1;
        Span<double> factors = stackalloc double[4 * Stride];
        Span<double> end = factors[..Stride];
        Span<double> start = factors.Slice(Stride, Stride);
        Span<double> endSlope = factors.Slice(2 * Stride, Stride);
        Span<double> startSlope = factors.Slice(3 * Stride, Stride);
        LagrangeFactors.ValuesAndSlopes(Degree, coordinate, end, endSlope);
        LagrangeFactors.ValuesAndSlopes(Degree, 1 - coordinate, start, startSlope);
        for (int i = 0; i <= Degree; i++)
        {
            int rest = Degree - i;
            values[i] = end[i] * start[rest];
            slopes[i] = (endSlope[i] * start[rest]) - (end[i] * startSlope[rest]);
        }
    }
}
