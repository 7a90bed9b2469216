using System.Numerics;

namespace FemCore2D.Assembly;

/// <summary>Makes the built-in terms. With a coefficient type of one's own, construct the term's struct directly.</summary>
public static class Term
{
    /// <summary>Gradient against gradient: the integral of <c>k ∇v · ∇u</c>.</summary>
    /// <param name="coefficient">The coefficient, the same everywhere.</param>
    /// <typeparam name="T">The number type: <see cref="double"/> or <see cref="Complex"/>.</typeparam>
    public static Stiffness<T, Coefficient<T>> Stiffness<T>(T coefficient)
        where T : unmanaged, INumberBase<T> => new(coefficient);

    /// <summary>Gradient against gradient: the integral of <c>k ∇v · ∇u</c>.</summary>
    /// <param name="coefficient">The coefficient.</param>
    /// <typeparam name="T">The number type: <see cref="double"/> or <see cref="Complex"/>.</typeparam>
    public static Stiffness<T, Coefficient<T>> Stiffness<T>(Coefficient<T> coefficient)
        where T : unmanaged, INumberBase<T> => new(coefficient);

    /// <summary>Gradient against gradient through a tensor: the integral of <c>∇v · (K ∇u)</c>.</summary>
    /// <param name="coefficient">The coefficient, the same everywhere.</param>
    /// <typeparam name="T">The number type: <see cref="double"/> or <see cref="Complex"/>.</typeparam>
    public static TensorStiffness<T, Coefficient<Tensor2D<T>>> Stiffness<T>(Tensor2D<T> coefficient)
        where T : unmanaged, INumberBase<T> => new(coefficient);

    /// <summary>Gradient against gradient through a tensor: the integral of <c>∇v · (K ∇u)</c>.</summary>
    /// <param name="coefficient">The coefficient.</param>
    /// <typeparam name="T">The number type: <see cref="double"/> or <see cref="Complex"/>.</typeparam>
    public static TensorStiffness<T, Coefficient<Tensor2D<T>>> Stiffness<T>(Coefficient<Tensor2D<T>> coefficient)
        where T : unmanaged, INumberBase<T> => new(coefficient);

    /// <summary>Value against value: the integral of <c>m v u</c>.</summary>
    /// <param name="coefficient">The coefficient, the same everywhere.</param>
    /// <typeparam name="T">The number type: <see cref="double"/> or <see cref="Complex"/>.</typeparam>
    public static Mass<T, Coefficient<T>> Mass<T>(T coefficient)
        where T : unmanaged, INumberBase<T> => new(coefficient);

    /// <summary>Value against value: the integral of <c>m v u</c>.</summary>
    /// <param name="coefficient">The coefficient.</param>
    /// <typeparam name="T">The number type: <see cref="double"/> or <see cref="Complex"/>.</typeparam>
    public static Mass<T, Coefficient<T>> Mass<T>(Coefficient<T> coefficient)
        where T : unmanaged, INumberBase<T> => new(coefficient);

    /// <summary>A driving density: the integral of <c>f v</c>.</summary>
    /// <param name="coefficient">The coefficient, the same everywhere.</param>
    /// <typeparam name="T">The number type: <see cref="double"/> or <see cref="Complex"/>.</typeparam>
    public static Source<T, Coefficient<T>> Source<T>(T coefficient)
        where T : unmanaged, INumberBase<T> => new(coefficient);

    /// <summary>A driving density: the integral of <c>f v</c>.</summary>
    /// <param name="coefficient">The coefficient.</param>
    /// <typeparam name="T">The number type: <see cref="double"/> or <see cref="Complex"/>.</typeparam>
    public static Source<T, Coefficient<T>> Source<T>(Coefficient<T> coefficient)
        where T : unmanaged, INumberBase<T> => new(coefficient);

    /// <summary>Value against value on edges: the integral of <c>h v u</c>.</summary>
    /// <param name="coefficient">The coefficient, the same everywhere.</param>
    /// <typeparam name="T">The number type: <see cref="double"/> or <see cref="Complex"/>.</typeparam>
    public static BoundaryMass<T, Coefficient<T>> BoundaryMass<T>(T coefficient)
        where T : unmanaged, INumberBase<T> => new(coefficient);

    /// <summary>Value against value on edges: the integral of <c>h v u</c>.</summary>
    /// <param name="coefficient">The coefficient.</param>
    /// <typeparam name="T">The number type: <see cref="double"/> or <see cref="Complex"/>.</typeparam>
    public static BoundaryMass<T, Coefficient<T>> BoundaryMass<T>(Coefficient<T> coefficient)
        where T : unmanaged, INumberBase<T> => new(coefficient);

    /// <summary>A flux that enters through edges: the integral of <c>g v</c>.</summary>
    /// <param name="coefficient">The coefficient, the same everywhere.</param>
    /// <typeparam name="T">The number type: <see cref="double"/> or <see cref="Complex"/>.</typeparam>
    public static BoundaryFlux<T, Coefficient<T>> BoundaryFlux<T>(T coefficient)
        where T : unmanaged, INumberBase<T> => new(coefficient);

    /// <summary>A flux that enters through edges: the integral of <c>g v</c>.</summary>
    /// <param name="coefficient">The coefficient.</param>
    /// <typeparam name="T">The number type: <see cref="double"/> or <see cref="Complex"/>.</typeparam>
    public static BoundaryFlux<T, Coefficient<T>> BoundaryFlux<T>(Coefficient<T> coefficient)
        where T : unmanaged, INumberBase<T> => new(coefficient);
}
