namespace FemCore2D.Geometry;

/// <summary>A rectangle parallel to the axes, such as the bounds of an outline, in metres.</summary>
/// <param name="Lower">The corner with the smallest coordinates.</param>
/// <param name="Upper">The corner with the largest coordinates.</param>
public readonly record struct Box2D(Point2D Lower, Point2D Upper)
{
    /// <summary>The box that holds no point; a union with it changes nothing.</summary>
    public static Box2D Empty { get; } = new(
        new Point2D(double.PositiveInfinity, double.PositiveInfinity),
        new Point2D(double.NegativeInfinity, double.NegativeInfinity));

    /// <summary>Whether the box holds no point.</summary>
    public bool IsEmpty => !(Lower.X <= Upper.X && Lower.Y <= Upper.Y);

    /// <summary>The extent along the first axis; 0 for the empty box.</summary>
    public double Width => IsEmpty ? 0 : Upper.X - Lower.X;

    /// <summary>The extent along the second axis; 0 for the empty box.</summary>
    public double Height => IsEmpty ? 0 : Upper.Y - Lower.Y;

    /// <summary>The length of the diagonal; 0 for the empty box.</summary>
    public double Diagonal => new Vector2D(Width, Height).Length;

    /// <summary>The point in the middle; not a number for the empty box.</summary>
    public Point2D Centre => Lower.Towards(Upper, 0.5);

    /// <summary>The smallest box that holds both points.</summary>
    public static Box2D Around(Point2D first, Point2D second) => new(
        new Point2D(Math.Min(first.X, second.X), Math.Min(first.Y, second.Y)),
        new Point2D(Math.Max(first.X, second.X), Math.Max(first.Y, second.Y)));

    /// <summary>Whether a point lies in the box or on its sides.</summary>
    public bool Contains(Point2D point) =>
        point.X >= Lower.X && point.X <= Upper.X && point.Y >= Lower.Y && point.Y <= Upper.Y;

    /// <summary>Whether two boxes share at least one point.</summary>
    public bool Meets(Box2D other) =>
        Lower.X <= other.Upper.X && other.Lower.X <= Upper.X && Lower.Y <= other.Upper.Y && other.Lower.Y <= Upper.Y;

    /// <summary>The smallest box that holds this one and another.</summary>
    public Box2D Union(Box2D other) => new(
        new Point2D(Math.Min(Lower.X, other.Lower.X), Math.Min(Lower.Y, other.Lower.Y)),
        new Point2D(Math.Max(Upper.X, other.Upper.X), Math.Max(Upper.Y, other.Upper.Y)));

    /// <summary>The box with every side moved outward by a distance.</summary>
    public Box2D Widened(double distance)
    {
        Vector2D step = new(distance, distance);
        return new Box2D(Lower - step, Upper + step);
    }
}
