using FemCore2D.Geometry;

namespace FemCore2D.Elements;

/// <summary>The map from the unit square to a quadrilateral with straight edges.</summary>
internal readonly struct BilinearMap(Point2D a, Point2D b, Point2D c, Point2D d)
{
    private readonly Vector2D alongXi = b - a;
    private readonly Vector2D alongEta = d - a;
    private readonly Vector2D twist = (c - d) - (b - a);

    /// <summary>Whether the twist is no more than what rounding of the vertices leaves in a parallelogram.</summary>
    public bool IsAffine
    {
        get
        {
            double size = Math.Max(alongXi.LengthSquared, alongEta.LengthSquared);
            return twist.LengthSquared <= 1e-28 * size;
        }
    }

    /// <summary>The vector from the first vertex to the place of a point.</summary>
    public Vector2D OffsetOf(Point2D reference) =>
        (reference.X * alongXi) + (reference.Y * (alongEta + (reference.X * twist)));

    public Jacobian JacobianAt(Point2D reference) =>
        new(alongXi + (reference.Y * twist), alongEta + (reference.X * twist));
}
