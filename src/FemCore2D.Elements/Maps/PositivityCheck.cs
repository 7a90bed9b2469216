using System.Runtime.CompilerServices;
using FemCore2D.Geometry;

namespace FemCore2D.Elements;

/// <summary>
/// Decides whether the determinant of a polynomial map is positive in a whole reference cell, not at some points only.
/// </summary>
/// <remarks>
/// A polynomial lies between its smallest and its largest Bernstein coefficient, and its values at the vertices are
/// coefficients themselves. Where the coefficients leave it open, the cell is cut in four and each part looked at again;
/// the bounds close in with the square of the size (G. Farin, "Triangular Bernstein-Bezier patches", 1986).
/// </remarks>
internal sealed class PositivityCheck
{
    private const int MaximumSamples = 36;
    private const int MaximumDepth = 12;

    private readonly CellKind cell;
    private readonly Point2D[] lattice;
    private readonly double[] samplesToCoefficients;

    /// <summary>Prepares the check of the maps of a degree.</summary>
    public PositivityCheck(CellKind cell, int mapDegree)
    {
        this.cell = cell;
        int degree = cell == CellKind.Triangle ? 2 * (mapDegree - 1) : (2 * mapDegree) - 1;
        (int I, int J)[] steps =
        [
            .. from j in Enumerable.Range(0, degree + 1)
               from i in Enumerable.Range(0, degree + 1)
               where cell == CellKind.Quadrilateral || i + j <= degree
               select (i, j),
        ];
        lattice = [.. steps.Select(s => new Point2D((double)s.I / degree, (double)s.J / degree))];
        samplesToCoefficients = Invert(
            [.. lattice.SelectMany(p => steps.Select(s => Bernstein(cell, degree, s.I, s.J, p)))], lattice.Length);
    }

    /// <summary>Looks for a point at which the determinant of a cell's map is not positive.</summary>
    /// <returns>Whether there is one (or none could be excluded after many cuts).</returns>
    public bool TryFindFold<TMap>(in TMap map, out Point2D fold)
        where TMap : struct, IDeterminant =>
        TryFindFold(map, Point2D.Origin, 1, MaximumDepth, out fold);

    [SkipLocalsInit]
    private bool TryFindFold<TMap>(in TMap map, Point2D origin, double scale, int depth, out Point2D fold)
        where TMap : struct, IDeterminant
    {
        // On a triangle a negative scale turns the part upside down, as the middle one of the four is.
        int count = lattice.Length;
        Span<double> samples = stackalloc double[MaximumSamples];
        for (int i = 0; i < count; i++)
        {
            fold = new Point2D(origin.X + (scale * lattice[i].X), origin.Y + (scale * lattice[i].Y));
            samples[i] = map.DeterminantAt(fold);
            if (!(samples[i] > 0 && double.IsFinite(samples[i])))
            {
                return true;
            }
        }

        fold = origin;
        if (AllCoefficientsPositive(samples[..count]))
        {
            return false;
        }

        double half = scale / 2;
        Point2D right = new(origin.X + half, origin.Y);
        Point2D above = new(origin.X, origin.Y + half);
        Point2D across = new(origin.X + half, origin.Y + half);
        return depth == 0
            || TryFindFold(map, origin, half, depth - 1, out fold)
            || TryFindFold(map, right, half, depth - 1, out fold)
            || TryFindFold(map, above, half, depth - 1, out fold)
            || TryFindFold(map, across, cell == CellKind.Triangle ? -half : half, depth - 1, out fold);
    }

    private bool AllCoefficientsPositive(ReadOnlySpan<double> samples)
    {
        for (int i = 0; i < samples.Length; i++)
        {
            double coefficient = 0;
            ReadOnlySpan<double> row = samplesToCoefficients.AsSpan(i * samples.Length, samples.Length);
            for (int j = 0; j < samples.Length; j++)
            {
                coefficient += row[j] * samples[j];
            }

            if (!(coefficient > 0))
            {
                return false;
            }
        }

        return true;
    }

    private static double Bernstein(CellKind cell, int degree, int i, int j, Point2D p) =>
        cell == CellKind.Triangle
            ? Binomial(degree, i) * Binomial(degree - i, j)
                * Math.Pow(p.X, i) * Math.Pow(p.Y, j) * Math.Pow(Math.Max(0, 1 - p.X - p.Y), degree - i - j)
            : Binomial(degree, i) * Math.Pow(p.X, i) * Math.Pow(1 - p.X, degree - i)
                * Binomial(degree, j) * Math.Pow(p.Y, j) * Math.Pow(1 - p.Y, degree - j);

    private static double Binomial(int n, int k) => k == 0 ? 1 : Binomial(n - 1, k - 1) * n / k;

    /// <summary>The inverse of a small matrix in row order, by Gauss-Jordan elimination with row pivoting.</summary>
    private static double[] Invert(double[] matrix, int n)
    {
        double[] inverse = new double[n * n];
        for (int i = 0; i < n; i++)
        {
            inverse[(i * n) + i] = 1;
        }

        for (int column = 0; column < n; column++)
        {
            int pivot = Enumerable.Range(column, n - column).MaxBy(row => Math.Abs(matrix[(row * n) + column]));
            double scale = 1 / matrix[(pivot * n) + column];
            foreach (double[] side in new[] { matrix, inverse })
            {
                for (int k = 0; k < n; k++)
                {
                    double pivoted = scale * side[(pivot * n) + k];
                    side[(pivot * n) + k] = side[(column * n) + k];
                    side[(column * n) + k] = pivoted;
                }
            }

            for (int row = 0; row < n; row++)
            {
                double factor = row == column ? 0 : matrix[(row * n) + column];
                foreach (double[] side in new[] { matrix, inverse })
                {
                    for (int k = 0; k < n; k++)
                    {
                        side[(row * n) + k] -= factor * side[(column * n) + k];
                    }
                }
            }
        }

        return inverse;
    }
}

/// <summary>The determinant of one cell's map.</summary>
internal interface IDeterminant
{
    double DeterminantAt(Point2D reference);
}
