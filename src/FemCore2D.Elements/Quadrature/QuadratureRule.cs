using FemCore2D.Geometry;

namespace FemCore2D.Elements;

/// <summary>Points and weights that integrate polynomials exactly over a reference cell. Immutable and shared.</summary>
/// <remarks>
/// <para>All weights are positive, all points lie inside the cell, and the points and weights have all symmetries of
/// the cell.</para>
/// <para>Triangles: symmetric rules with as few points as known for their degree, from 1 point (degree 1) to 79
/// (degree 20). Quadrilaterals: products of Gauss rules, exact up to the degree in each coordinate alone.</para>
/// </remarks>
public sealed class QuadratureRule
{
    /// <summary>The highest degree for which there is a rule.</summary>
    public const int MaximumDegree = 20;

    private static readonly Lazy<QuadratureRule>[] Triangles =
        [.. Enumerable.Range(0, MaximumDegree + 1).Select(d => new Lazy<QuadratureRule>(() => ForTriangle(d)))];

    private static readonly Lazy<QuadratureRule>[] Quadrilaterals =
        [.. Enumerable.Range(0, MaximumDegree + 1).Select(d => new Lazy<QuadratureRule>(() => ForQuadrilateral(d)))];

    private readonly Point2D[] points;
    private readonly double[] weights;

    private QuadratureRule(CellKind cell, int degree, Point2D[] points, double[] weights)
    {
        Cell = cell;
        Degree = degree;
        this.points = points;
        this.weights = weights;
    }

    /// <summary>The shape of the cell.</summary>
    public CellKind Cell { get; }

    /// <summary>
    /// The degree up to which polynomials are integrated exactly: the sum of both exponents on a triangle, each
    /// exponent on a quadrilateral. It can be higher than the degree that was asked for.
    /// </summary>
    public int Degree { get; }

    /// <summary>The number of points.</summary>
    public int Count => points.Length;

    /// <summary>The points, in coordinates of the reference cell.</summary>
    public ReadOnlySpan<Point2D> Points => points;

    /// <summary>The weights; they sum to the area of the reference cell (1/2 for the triangle, 1 for the square).</summary>
    public ReadOnlySpan<double> Weights => weights;

    /// <summary>The rule of a cell that is exact for a degree.</summary>
    /// <param name="cell">The shape of the cell.</param>
    /// <param name="degree">The degree, 0 to 20.</param>
    /// <exception cref="ArgumentOutOfRangeException">The degree is not one of these.</exception>
    public static QuadratureRule For(CellKind cell, int degree)
    {
        ArgumentOutOfRangeException.ThrowIfNegative(degree);
        ArgumentOutOfRangeException.ThrowIfGreaterThan(degree, MaximumDegree);
        return (cell == CellKind.Triangle ? Triangles : Quadrilaterals)[degree].Value;
    }

    private static QuadratureRule ForTriangle(int degree)
    {
        int exact = Math.Max(degree, 1);
        (Point2D[] points, double[] weights) = TriangleOrbits.Expand(exact);
        return new QuadratureRule(CellKind.Triangle, exact, points, weights);
    }

    private static QuadratureRule ForQuadrilateral(int degree)
    {
        int count = (degree / 2) + 1;
        (double[] line, double[] lineWeights) = GaussLegendre.OnUnitInterval(count);
        Point2D[] points = new Point2D[count * count];
        double[] weights = new double[count * count];
        for (int i = 0; i < points.Length; i++)
        {
            points[i] = new Point2D(line[i % count], line[i / count]);
            weights[i] = lineWeights[i % count] * lineWeights[i / count];
        }

        return new QuadratureRule(CellKind.Quadrilateral, (2 * count) - 1, points, weights);
    }
}
