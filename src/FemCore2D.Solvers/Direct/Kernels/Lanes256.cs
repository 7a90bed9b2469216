using System.Runtime.CompilerServices;
using System.Runtime.Intrinsics;

namespace FemCore2D.Solvers;

/// <summary>Registers of 256 bits.</summary>
internal readonly unsafe struct Lanes256 : ILanes<Vector256<double>>
{
    /// <inheritdoc/>
    public static int Width => 4;

    /// <inheritdoc/>
    public static bool Wide => false;

    /// <inheritdoc/>
    public static Vector256<double> Zero
    {
        [MethodImpl(MethodImplOptions.AggressiveInlining)]
        get => Vector256<double>.Zero;
    }

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Vector256<double> Load(double* source) => Vector256.Load(source);

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static void Store(double* target, Vector256<double> value) => value.Store(target);

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Vector256<double> Spread(double value) => Vector256.Create(value);

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Vector256<double> SpreadPair(double even, double odd) =>
        Vector256.Create(even, odd, even, odd);

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Vector256<double> Add(Vector256<double> a, Vector256<double> b) => a + b;

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Vector256<double> Subtract(Vector256<double> a, Vector256<double> b) => a - b;

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Vector256<double> Multiply(Vector256<double> a, Vector256<double> b) => a * b;

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Vector256<double> MultiplyAdd(
        Vector256<double> a, Vector256<double> b, Vector256<double> c) =>
        Vector256.MultiplyAddEstimate(a, b, c);

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Vector256<double> SwapPairs(Vector256<double> a) =>
        Vector256.Shuffle(a, Vector256.Create(1L, 0L, 3L, 2L));

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static double Sum(Vector256<double> a) => Vector256.Sum(a);
}
