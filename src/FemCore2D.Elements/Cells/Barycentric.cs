using FemCore2D.Geometry;

namespace FemCore2D.Elements;

/// <summary>
/// The barycentric coordinates of a point in a triangle: each is the area of the triangle that the point spans with
/// the edge opposite a vertex, divided by the whole area. Each is one at its own vertex, zero along the whole
/// opposite edge and linear between; they sum to one.
/// </summary>
/// <param name="First">The coordinate that is one at the first vertex.</param>
/// <param name="Second">The coordinate that is one at the second vertex.</param>
/// <param name="Third">The coordinate that is one at the third vertex.</param>
/// <remarks>A. F. Moebius, <em>Der barycentrische Calcul</em>, 1827.</remarks>
public readonly record struct Barycentric(double First, double Second, double Third)
{
    /// <summary>The coordinates of a point of the reference triangle.</summary>
    public static Barycentric OfReference(Point2D point) => new(1 - point.X - point.Y, point.X, point.Y);

    /// <summary>The coordinates of a place with respect to a triangle; negative across an edge.</summary>
    /// <exception cref="ArgumentException">The vertices lie on a line, or are not finite.</exception>
    public static Barycentric Of(Point2D a, Point2D b, Point2D c, Point2D place)
    {
        double area = DoubleArea(a, b, c);

        // Each area has a vertex of its own edge as origin, so that a place on the edge gives a clean zero.
        return new Barycentric(
            (c - b).Cross(place - b) / area,
            (a - c).Cross(place - c) / area,
            (b - a).Cross(place - a) / area);
    }

    /// <summary>
    /// The gradients of the three coordinates in a triangle, per metre: each is perpendicular to the edge opposite its
    /// vertex, as long as the inverse of the height above that edge, and constant; they sum to zero.
    /// </summary>
    /// <exception cref="ArgumentException">The vertices lie on a line, or are not finite.</exception>
    public static (Vector2D First, Vector2D Second, Vector2D Third) Gradients(Point2D a, Point2D b, Point2D c)
    {
        double area = DoubleArea(a, b, c);
        return ((c - b).LeftNormal / area, (a - c).LeftNormal / area, (b - a).LeftNormal / area);
    }

    /// <summary>The place that has these coordinates with respect to a triangle.</summary>
    public Point2D PlaceIn(Point2D a, Point2D b, Point2D c) => a + (Second * (b - a)) + (Third * (c - a));

    private static double DoubleArea(Point2D a, Point2D b, Point2D c)
    {
        double area = (b - a).Cross(c - a);
        return area != 0 && double.IsFinite(area)
            ? area
            : throw new ArgumentException(
                $"The triangle {a}, {b}, {c} has no area: its vertices must be finite and must not lie on one line.");
    }
}
