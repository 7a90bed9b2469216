using FemCore2D.Geometry;

namespace FemCore2D.Elements;

/// <summary>
/// Fully symmetric rules on the triangle, with positive weights and all points inside, stored by orbits: the sets of
/// points that the six symmetries of the triangle turn into each other.
/// </summary>
/// <remarks>
/// <para>A symmetric rule needs to integrate only the symmetric polynomials (J. N. Lyness and D. Jespersen, 1975).
/// These moment equations, written in orthogonal polynomials (M. Dubiner, 1991), were solved here by damped Gauss-Newton
/// iterations from many random starts for the smallest number of points that admits a solution with positive weights
/// and inner points, in the way of L. Zhang, T. Cui and H. Liu (2009) and F. D. Witherden and P. E. Vincent (2015), then
/// polished with 28 digits until all moments held to 1e-22. The tests integrate every monomial.</para>
/// <para>Each table lists first the weight of the centroid (if the rule has it), then weight and coordinate a of each
/// orbit of three points (a, a, 1-2a), then weight and coordinates a, b of each orbit of six points (a, b, 1-a-b).
/// Weights are those of a single point and sum to one over all points.</para>
/// </remarks>
internal static partial class TriangleOrbits
{
    /// <summary>Spreads the orbits of a degree from 1 to 20 out to points, and scales weights to the reference triangle.</summary>
    public static (Point2D[] Points, double[] Weights) Expand(int degree)
    {
        Orbits orbits = ForDegree(degree);
        int count = orbits.Centroids + (3 * orbits.OfThree) + (6 * orbits.OfSix);
        Point2D[] points = new Point2D[count];
        double[] weights = new double[count];
        ReadOnlySpan<double> table = orbits.Table;
        int next = 0;

        for (int i = 0; i < orbits.Centroids; i++, table = table[1..])
        {
            weights[next] = table[0] / 2;
            points[next++] = ReferenceCell.Centre(CellKind.Triangle);
        }

        for (int i = 0; i < orbits.OfThree; i++, table = table[2..])
        {
            double a = table[1];
            double c = 1 - (2 * a);
            ReadOnlySpan<Point2D> orbit = [new(a, a), new(a, c), new(c, a)];
            weights.AsSpan(next, 3).Fill(table[0] / 2);
            orbit.CopyTo(points.AsSpan(next));
            next += 3;
        }

        for (int i = 0; i < orbits.OfSix; i++, table = table[3..])
        {
            double a = table[1];
            double b = table[2];
            double c = 1 - a - b;
            ReadOnlySpan<Point2D> orbit = [new(a, b), new(b, a), new(a, c), new(c, a), new(b, c), new(c, b)];
            weights.AsSpan(next, 6).Fill(table[0] / 2);
            orbit.CopyTo(points.AsSpan(next));
            next += 6;
        }

        return (points, weights);
    }

    private static Orbits ForDegree(int degree) => degree switch
    {
        1 => new(1, 0, 0, Degree1),
        2 => new(0, 1, 0, Degree2),
        3 => new(0, 0, 1, Degree3),
        4 => new(0, 2, 0, Degree4),
        5 => new(1, 2, 0, Degree5),
        6 => new(0, 2, 1, Degree6),
        7 => new(0, 1, 2, Degree7),
        8 => new(1, 3, 1, Degree8),
        9 => new(1, 4, 1, Degree9),
        10 => new(1, 2, 3, Degree10),
        11 => new(1, 5, 2, Degree11),
        12 => new(0, 5, 3, Degree12),
        13 => new(1, 4, 4, Degree13),
        14 => new(0, 6, 4, Degree14),
        15 => new(1, 4, 6, Degree15),
        16 => new(1, 4, 7, Degree16),
        17 => new(0, 6, 7, Degree17),
        18 => new(1, 6, 8, Degree18),
        19 => new(1, 6, 9, Degree19),
        _ => new(1, 8, 9, Degree20),
    };

    private readonly ref struct Orbits(int centroids, int ofThree, int ofSix, ReadOnlySpan<double> table)
    {
        public int Centroids { get; } = centroids;

        public int OfThree { get; } = ofThree;

        public int OfSix { get; } = ofSix;

        public ReadOnlySpan<double> Table { get; } = table;
    }
}
