using System.Numerics;

namespace FemCore2D.Assembly;

/// <summary>
/// What drives the field at a point: the coefficients of the value and of the slopes of a test function. The term's
/// contribution to the right-hand side is the integral of their sum.
/// </summary>
/// <typeparam name="T">The number type: <see cref="double"/> or <see cref="Complex"/>.</typeparam>
/// <param name="Value">The coefficient of the test function's value: a density, such as a charge or heat source.</param>
/// <param name="X">The coefficient of its slope along x: the first component of a given polarization, say.</param>
/// <param name="Y">The coefficient of its slope along y.</param>
public readonly record struct Load<T>(T Value, T X, T Y)
    where T : unmanaged, INumberBase<T>
{
    /// <summary>The sum of two loads.</summary>
    public static Load<T> operator +(Load<T> left, Load<T> right) =>
        new(left.Value + right.Value, left.X + right.X, left.Y + right.Y);
}

/// <summary>Makes loads of the usual forms.</summary>
public static class Load
{
    /// <summary>A density: <c>density · v</c>.</summary>
    public static Load<T> Density<T>(T density)
        where T : unmanaged, INumberBase<T> => new(density, T.Zero, T.Zero);

    /// <summary>A given vector field that acts on the gradient: <c>(x, y) · ∇v</c>.</summary>
    public static Load<T> OnGradient<T>(T x, T y)
        where T : unmanaged, INumberBase<T> => new(T.Zero, x, y);
}
