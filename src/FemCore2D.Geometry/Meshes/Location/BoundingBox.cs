namespace FemCore2D.Geometry;

/// <summary>A box with sides along the axes, with its rim.</summary>
internal readonly record struct BoundingBox(double Left, double Bottom, double Right, double Top)
{
    /// <summary>The box that holds nothing.</summary>
    public static BoundingBox Empty => new(
        double.PositiveInfinity, double.PositiveInfinity, double.NegativeInfinity, double.NegativeInfinity);

    public Point2D Middle => new((0.5 * Left) + (0.5 * Right), (0.5 * Bottom) + (0.5 * Top));

    public double Diagonal => Left > Right ? 0 : new Vector2D(Right - Left, Top - Bottom).Length;

    public static BoundingBox Around(Point2D point) => new(point.X, point.Y, point.X, point.Y);

    public BoundingBox With(Point2D point) => new(
        Math.Min(Left, point.X), Math.Min(Bottom, point.Y), Math.Max(Right, point.X), Math.Max(Top, point.Y));

    public BoundingBox With(in BoundingBox other) => new(
        Math.Min(Left, other.Left), Math.Min(Bottom, other.Bottom),
        Math.Max(Right, other.Right), Math.Max(Top, other.Top));

    public BoundingBox Widened(double margin) => new(Left - margin, Bottom - margin, Right + margin, Top + margin);

    public bool Contains(Point2D point) =>
        point.X >= Left & point.X <= Right & point.Y >= Bottom & point.Y <= Top;

    public bool Meets(in BoundingBox other) =>
        other.Left <= Right & other.Right >= Left & other.Bottom <= Top & other.Top >= Bottom;

    /// <summary>The square of the distance to a point, zero inside.</summary>
    public double DistanceSquaredTo(Point2D point)
    {
        double x = Math.Max(0, Math.Max(Left - point.X, point.X - Right));
        double y = Math.Max(0, Math.Max(Bottom - point.Y, point.Y - Top));
        return (x * x) + (y * y);
    }
}
