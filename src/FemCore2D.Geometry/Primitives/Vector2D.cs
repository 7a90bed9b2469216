namespace FemCore2D.Geometry;

/// <summary>A vector of the plane.</summary>
/// <param name="X">The first component.</param>
/// <param name="Y">The second component.</param>
public readonly record struct Vector2D(double X, double Y)
{
    /// <summary>The vector with both components zero.</summary>
    public static Vector2D Zero => default;

    /// <summary>The Euclidean length.</summary>
    public double Length => Math.Sqrt(LengthSquared);

    /// <summary>The square of the length.</summary>
    public double LengthSquared => (X * X) + (Y * Y);

    /// <summary>The vector turned counterclockwise by a right angle.</summary>
    public Vector2D LeftNormal => new(-Y, X);

    /// <summary>The unit vector at the given angle, counterclockwise from the first axis.</summary>
    public static Vector2D AtAngle(double radians)
    {
        (double sine, double cosine) = Math.SinCos(radians);
        return new Vector2D(cosine, sine);
    }

    /// <summary>The sum of two vectors.</summary>
    public static Vector2D operator +(Vector2D left, Vector2D right) => new(left.X + right.X, left.Y + right.Y);

    /// <summary>The difference of two vectors.</summary>
    public static Vector2D operator -(Vector2D left, Vector2D right) => new(left.X - right.X, left.Y - right.Y);

    /// <summary>The opposite vector.</summary>
    public static Vector2D operator -(Vector2D vector) => new(-vector.X, -vector.Y);

    /// <summary>The multiple of a vector.</summary>
    public static Vector2D operator *(double factor, Vector2D vector) => new(factor * vector.X, factor * vector.Y);

    /// <summary>The multiple of a vector.</summary>
    public static Vector2D operator *(Vector2D vector, double factor) => factor * vector;

    /// <summary>The quotient of a vector and a number.</summary>
    public static Vector2D operator /(Vector2D vector, double divisor) => new(vector.X / divisor, vector.Y / divisor);

    /// <summary>The scalar product.</summary>
    public double Dot(Vector2D other) => (X * other.X) + (Y * other.Y);

    /// <summary>The out-of-plane component of the vector product: positive when <paramref name="other"/> lies to the left.</summary>
    public double Cross(Vector2D other) => (X * other.Y) - (Y * other.X);

    /// <inheritdoc/>
    public override string ToString() => string.Create(null, $"({X:G9}, {Y:G9})");
}
