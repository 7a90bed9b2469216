using System.Numerics;
using System.Runtime.CompilerServices;

namespace FemCore2D.Assembly;

/// <summary>Value against value.</summary>
/// <remarks>The integral of <c>m v u</c>: storage, losses in proportion to the field.</remarks>
/// <typeparam name="T">The number type: <see cref="double"/> or <see cref="Complex"/>.</typeparam>
/// <typeparam name="TCoefficient">The kind of coefficient.</typeparam>
/// <param name="coefficient">The coefficient.</param>
public readonly struct Mass<T, TCoefficient>(TCoefficient coefficient) : ICellMatrixTerm<T>
    where T : unmanaged, INumberBase<T>
    where TCoefficient : struct, ICoefficient<T>
{
    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public int DegreeIn(int region) => coefficient.DegreeIn(region);

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public Coupling<T> At(in CellPoint point) => Coupling.Values(coefficient.At(point));
}
