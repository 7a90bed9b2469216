using System.Numerics;
using System.Runtime.CompilerServices;

namespace FemCore2D.Assembly;

/// <summary>Gradient against gradient with a scalar coefficient.</summary>
/// <remarks>The integral of <c>k ∇v · ∇u</c>: conduction of heat or current, electrostatics, magnetostatics.</remarks>
/// <typeparam name="T">The number type: <see cref="double"/> or <see cref="Complex"/>.</typeparam>
/// <typeparam name="TCoefficient">The kind of coefficient.</typeparam>
/// <param name="coefficient">The coefficient.</param>
public readonly struct Stiffness<T, TCoefficient>(TCoefficient coefficient) : ICellMatrixTerm<T>
    where T : unmanaged, INumberBase<T>
    where TCoefficient : struct, ICoefficient<T>
{
    /// <inheritdoc/>
    static int ICellMatrixTerm<T>.SlopeFactors => 2;

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public int DegreeIn(int region) => coefficient.DegreeIn(region);

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public Coupling<T> At(in CellPoint point) => Coupling.Gradients(coefficient.At(point));
}
