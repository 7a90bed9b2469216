using System.Runtime.CompilerServices;

namespace FemCore2D.Assembly;

/// <summary>
/// A coefficient of one of the usual kinds: constant, per region, a function of place, or a function of a field. Made
/// by <see cref="Coefficient"/>, or from a plain value. Immutable.
/// </summary>
/// <typeparam name="TValue">The type of its values: a real or complex number, or a <see cref="Tensor2D{T}"/> of these.</typeparam>
public readonly struct Coefficient<TValue> : ICoefficient<TValue>
    where TValue : struct
{
    private readonly TValue constant;
    private readonly CoefficientSource<TValue>? source;

    internal Coefficient(TValue constant) => this.constant = constant;

    internal Coefficient(CoefficientSource<TValue> source) => this.source = source;

    /// <summary>A value that is the same everywhere.</summary>
    public static implicit operator Coefficient<TValue>(TValue value) => new(value);

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public int DegreeIn(int region) => source is null ? 0 : source.DegreeIn(region);

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public TValue At(in CellPoint point) => source is null ? constant : source.At(point);
}
