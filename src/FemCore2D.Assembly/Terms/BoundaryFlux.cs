using System.Numerics;
using System.Runtime.CompilerServices;

namespace FemCore2D.Assembly;

/// <summary>A flux that enters through edges: a Neumann condition, or the right-hand side of a Robin condition.</summary>
/// <remarks>The integral of <c>g v</c> along edges: a surface charge, a heat flux, a current that flows in.</remarks>
/// <typeparam name="T">The number type: <see cref="double"/> or <see cref="Complex"/>.</typeparam>
/// <typeparam name="TCoefficient">The kind of coefficient.</typeparam>
/// <param name="coefficient">The coefficient.</param>
public readonly struct BoundaryFlux<T, TCoefficient>(TCoefficient coefficient) : IEdgeVectorTerm<T>
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
