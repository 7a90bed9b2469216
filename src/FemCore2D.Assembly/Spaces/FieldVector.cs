using System.Numerics;

namespace FemCore2D.Assembly;

/// <summary>A vector of the plane with real or complex components: the gradient of a field, or a flux.</summary>
/// <typeparam name="T">The number type: <see cref="double"/> or <see cref="Complex"/>.</typeparam>
/// <param name="X">The first component.</param>
/// <param name="Y">The second component.</param>
public readonly record struct FieldVector<T>(T X, T Y)
    where T : unmanaged, INumberBase<T>
{
    /// <summary>The sum of two vectors.</summary>
    public static FieldVector<T> operator +(FieldVector<T> left, FieldVector<T> right) =>
        new(left.X + right.X, left.Y + right.Y);

    /// <summary>The difference of two vectors.</summary>
    public static FieldVector<T> operator -(FieldVector<T> left, FieldVector<T> right) =>
        new(left.X - right.X, left.Y - right.Y);

    /// <summary>The multiple of a vector.</summary>
    public static FieldVector<T> operator *(T factor, FieldVector<T> vector) =>
        new(factor * vector.X, factor * vector.Y);
}
