using System.Numerics;
using System.Runtime.CompilerServices;

namespace FemCore2D.Assembly;

/// <summary>A density that drives the field.</summary>
/// <remarks>The integral of <c>f v</c>: charge, heat or current density.</remarks>
/// <typeparam name="T">The number type: <see cref="double"/> or <see cref="Complex"/>.</typeparam>
/// <typeparam name="TCoefficient">The kind of coefficient.</typeparam>
/// <param name="coefficient">The coefficient.</param>
public readonly struct Source<T, TCoefficient>(TCoefficient coefficient) : ICellVectorTerm<T>
    where T : unmanaged, INumberBase<T>
    where TCoefficient : struct, ICoefficient<T>
{
    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public int DegreeIn(int region) => coefficient.DegreeIn(region);

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public Load<T> At(in CellPoint point) => Load.Density(coefficient.At(point));
}
