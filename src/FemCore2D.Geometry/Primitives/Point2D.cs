namespace FemCore2D.Geometry;

/// <summary>A point of the plane, in metres.</summary>
/// <param name="X">The first coordinate (the distance from the axis in axisymmetric problems).</param>
/// <param name="Y">The second coordinate (the position along the axis in axisymmetric problems).</param>
public readonly record struct Point2D(double X, double Y)
{
    /// <summary>The point with both coordinates zero.</summary>
    public static Point2D Origin => default;

    /// <summary>Whether both coordinates are finite numbers.</summary>
    public bool IsFinite => double.IsFinite(X) && double.IsFinite(Y);

    /// <summary>The vector that leads from <paramref name="from"/> to <paramref name="to"/>.</summary>
    public static Vector2D operator -(Point2D to, Point2D from) => new(to.X - from.X, to.Y - from.Y);

    /// <summary>The point reached from <paramref name="point"/> by <paramref name="step"/>.</summary>
    public static Point2D operator +(Point2D point, Vector2D step) => new(point.X + step.X, point.Y + step.Y);

    /// <summary>The point from which <paramref name="step"/> leads to <paramref name="point"/>.</summary>
    public static Point2D operator -(Point2D point, Vector2D step) => new(point.X - step.X, point.Y - step.Y);

    /// <summary>The distance to another point.</summary>
    public double DistanceTo(Point2D other) => (other - this).Length;

    /// <summary>The point that lies at <paramref name="fraction"/> of the way to <paramref name="other"/>.</summary>
    public Point2D Towards(Point2D other, double fraction) => this + (fraction * (other - this));

    /// <inheritdoc/>
    public override string ToString() => string.Create(null, $"({X:G9}, {Y:G9})");
}
