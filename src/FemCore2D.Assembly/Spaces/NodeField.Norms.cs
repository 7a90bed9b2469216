using FemCore2D.Elements;
using FemCore2D.Geometry;
using FemCore2D.Sparse;

namespace FemCore2D.Assembly;

/// <content>Distances to given functions.</content>
public sealed partial class NodeField<T>
{
    private delegate double Density(int cell, Point2D reference, Point2D place);

    /// <summary>The L2 distance to a function: the root of the integral of the squared difference.</summary>
    /// <param name="function">The function, of a point in metres.</param>
    /// <param name="extraDegree">
    /// How far the degree of the quadrature goes beyond twice that of the space; rules end at degree 20.
    /// </param>
    /// <exception cref="ArgumentOutOfRangeException">The extra degree is negative.</exception>
    public double DistanceTo(Func<Point2D, T> function, int extraDegree = 4)
    {
        ArgumentNullException.ThrowIfNull(function);
        return Math.Sqrt(Integrate(
            (cell, reference, place) => Scalar.MagnitudeSquared(ValueIn(cell, reference) - function(place)),
            extraDegree));
    }

    /// <summary>
    /// The distance of the gradient to a vector function: the root of the integral of the squared length of the
    /// difference. For the solution of a problem with unit coefficient it is the distance in energy.
    /// </summary>
    /// <param name="gradient">The vector function, of a point in metres.</param>
    /// <param name="extraDegree">
    /// How far the degree of the quadrature goes beyond twice that of the space; rules end at degree 20.
    /// </param>
    /// <exception cref="ArgumentOutOfRangeException">The extra degree is negative.</exception>
    public double GradientDistanceTo(Func<Point2D, FieldVector<T>> gradient, int extraDegree = 4)
    {
        ArgumentNullException.ThrowIfNull(gradient);
        return Math.Sqrt(Integrate(
            (cell, reference, place) =>
            {
                FieldVector<T> difference = GradientIn(cell, reference) - gradient(place);
                return Scalar.MagnitudeSquared(difference.X) + Scalar.MagnitudeSquared(difference.Y);
            },
            extraDegree));
    }

    private double Integrate(Density density, int extraDegree)
    {
        ArgumentOutOfRangeException.ThrowIfNegative(extraDegree);
        int degree = Math.Min(CellTables.HighestDegree, (2 * Space.Degree) + extraDegree);
        double sum = 0;
        for (int cell = 0; cell < Space.Mesh.CellCount; cell++)
        {
            var geometry = CellGeometry.Of(Space.Maps, cell);
            var rule = QuadratureRule.For(Space.Mesh.KindOf(cell), degree);
            double own = 0;
            for (int q = 0; q < rule.Points.Length; q++)
            {
                Point2D reference = rule.Points[q];
                own += rule.Weights[q] * geometry.JacobianAt(reference).Determinant
                    * density(cell, reference, geometry.PlaceAt(reference));
            }

            sum += own;
        }

        return sum;
    }
}
