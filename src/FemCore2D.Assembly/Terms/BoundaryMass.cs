using System.Numerics;
using System.Runtime.CompilerServices;

namespace FemCore2D.Assembly;

/// <summary>Value against value on edges: the matrix part of a Robin condition.</summary>
/// <remarks>The integral of <c>h v u</c> along edges: heat transfer to surroundings, a surface impedance.</remarks>
/// <typeparam name="T">The number type: <see cref="double"/> or <see cref="Complex"/>.</typeparam>
/// <typeparam name="TCoefficient">The kind of coefficient.</typeparam>
/// <param name="coefficient">The coefficient.</param>
public readonly struct BoundaryMass<T, TCoefficient>(TCoefficient coefficient) : IEdgeMatrixTerm<T>
    where T : unmanaged, INumberBase<T>
    where TCoefficient : struct, ICoefficient<T>
{
    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public int DegreeIn(int region) => coefficient.DegreeIn(region);

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public T At(in EdgePoint point) => coefficient.At(point.InCell);
}
