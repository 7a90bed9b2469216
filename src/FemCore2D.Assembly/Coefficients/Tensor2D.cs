using System.Numerics;

namespace FemCore2D.Assembly;

/// <summary>A tensor of the plane: turns a gradient into a flux.</summary>
/// <typeparam name="T">The number type: <see cref="double"/> or <see cref="Complex"/>.</typeparam>
/// <param name="XX">The first component for a unit vector along x.</param>
/// <param name="XY">The first component for a unit vector along y.</param>
/// <param name="YX">The second component for a unit vector along x.</param>
/// <param name="YY">The second component for a unit vector along y.</param>
public readonly record struct Tensor2D<T>(T XX, T XY, T YX, T YY)
    where T : unmanaged, INumberBase<T>
{
    /// <summary>The vector that the tensor makes of another.</summary>
    public FieldVector<T> Times(FieldVector<T> vector) =>
        new((XX * vector.X) + (XY * vector.Y), (YX * vector.X) + (YY * vector.Y));

    /// <summary>The sum of two tensors.</summary>
    public static Tensor2D<T> operator +(Tensor2D<T> left, Tensor2D<T> right) =>
        new(left.XX + right.XX, left.XY + right.XY, left.YX + right.YX, left.YY + right.YY);

    /// <summary>The multiple of a tensor.</summary>
    public static Tensor2D<T> operator *(T factor, Tensor2D<T> tensor) =>
        new(factor * tensor.XX, factor * tensor.XY, factor * tensor.YX, factor * tensor.YY);
}

/// <summary>Makes tensors of the usual forms.</summary>
public static class Tensor2D
{
    /// <summary>The tensor that multiplies every vector by the same number.</summary>
    public static Tensor2D<T> Isotropic<T>(T value)
        where T : unmanaged, INumberBase<T> => new(value, T.Zero, T.Zero, value);

    /// <summary>The tensor with the coordinate directions as its axes.</summary>
    public static Tensor2D<T> Diagonal<T>(T x, T y)
        where T : unmanaged, INumberBase<T> => new(x, T.Zero, T.Zero, y);

    /// <summary>The symmetric tensor with given values along two perpendicular axes.</summary>
    /// <param name="along">The value along the first axis.</param>
    /// <param name="across">The value along the second axis, which lies a right angle counterclockwise from the first.</param>
    /// <param name="angleRadians">The direction of the first axis, counterclockwise from x.</param>
    /// <typeparam name="T">The number type: <see cref="double"/> or <see cref="Complex"/>.</typeparam>
    public static Tensor2D<T> Principal<T>(T along, T across, double angleRadians)
        where T : unmanaged, INumberBase<T>
    {
        (double sine, double cosine) = Math.SinCos(angleRadians);
        var cc = T.CreateChecked(cosine * cosine);
        var ss = T.CreateChecked(sine * sine);
        T mixed = T.CreateChecked(sine * cosine) * (along - across);
        return new Tensor2D<T>((cc * along) + (ss * across), mixed, mixed, (ss * along) + (cc * across));
    }
}
