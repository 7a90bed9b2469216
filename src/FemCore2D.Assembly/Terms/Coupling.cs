using System.Numerics;

namespace FemCore2D.Assembly;

/// <summary>
/// How a term couples a test function to the unknown field at a point: the coefficients of the products of value and
/// slopes of the one with value and slopes of the other. The term's contribution to the matrix is the integral of
/// their sum.
/// </summary>
/// <remarks>
/// In each name the test function comes first: <c>ValueX</c> multiplies the value of the test function with the slope
/// of the field along x. With the three numbers (value, slope along x, slope along y) of both, this is a matrix of
/// three rows and columns.
/// </remarks>
/// <typeparam name="T">The number type: <see cref="double"/> or <see cref="Complex"/>.</typeparam>
/// <param name="ValueValue">Value with value.</param>
/// <param name="ValueX">Value of the test function with the field's slope along x.</param>
/// <param name="ValueY">Value of the test function with the field's slope along y.</param>
/// <param name="XValue">Slope of the test function along x with the field's value.</param>
/// <param name="XX">Slope along x with slope along x.</param>
/// <param name="XY">Slope of the test function along x with the field's slope along y.</param>
/// <param name="YValue">Slope of the test function along y with the field's value.</param>
/// <param name="YX">Slope of the test function along y with the field's slope along x.</param>
/// <param name="YY">Slope along y with slope along y.</param>
public readonly record struct Coupling<T>(
    T ValueValue, T ValueX, T ValueY, T XValue, T XX, T XY, T YValue, T YX, T YY)
    where T : unmanaged, INumberBase<T>
{
    /// <summary>The sum of two couplings.</summary>
    public static Coupling<T> operator +(Coupling<T> left, Coupling<T> right) => new(
        left.ValueValue + right.ValueValue, left.ValueX + right.ValueX, left.ValueY + right.ValueY,
        left.XValue + right.XValue, left.XX + right.XX, left.XY + right.XY,
        left.YValue + right.YValue, left.YX + right.YX, left.YY + right.YY);

    /// <summary>The multiple of a coupling.</summary>
    public static Coupling<T> operator *(T factor, Coupling<T> coupling) => new(
        factor * coupling.ValueValue, factor * coupling.ValueX, factor * coupling.ValueY,
        factor * coupling.XValue, factor * coupling.XX, factor * coupling.XY,
        factor * coupling.YValue, factor * coupling.YX, factor * coupling.YY);
}

/// <summary>Makes couplings of the usual forms; add them for terms with several.</summary>
public static class Coupling
{
    /// <summary>Couples value with value: <c>factor · v · u</c>, as in a mass term.</summary>
    public static Coupling<T> Values<T>(T factor)
        where T : unmanaged, INumberBase<T> => default(Coupling<T>) with { ValueValue = factor };

    /// <summary>Couples gradient with gradient: <c>factor · ∇v · ∇u</c>, as in a stiffness term.</summary>
    public static Coupling<T> Gradients<T>(T factor)
        where T : unmanaged, INumberBase<T> => default(Coupling<T>) with { XX = factor, YY = factor };

    /// <summary>Couples gradient with gradient through a tensor: <c>∇v · (tensor ∇u)</c>.</summary>
    public static Coupling<T> Gradients<T>(Tensor2D<T> tensor)
        where T : unmanaged, INumberBase<T> => default(Coupling<T>) with
        {
            XX = tensor.XX,
            XY = tensor.XY,
            YX = tensor.YX,
            YY = tensor.YY,
        };

    /// <summary>Couples the value of the test function with the field's gradient: <c>v · (x, y) · ∇u</c>, as in convection.</summary>
    public static Coupling<T> ValueWithGradient<T>(T x, T y)
        where T : unmanaged, INumberBase<T> => default(Coupling<T>) with { ValueX = x, ValueY = y };

    /// <summary>Couples the gradient of the test function with the field's value: <c>(x, y) · ∇v · u</c>.</summary>
    public static Coupling<T> GradientWithValue<T>(T x, T y)
        where T : unmanaged, INumberBase<T> => default(Coupling<T>) with { XValue = x, YValue = y };
}
