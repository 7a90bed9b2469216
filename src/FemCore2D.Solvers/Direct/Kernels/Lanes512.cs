using System.Runtime.CompilerServices;
using System.Runtime.Intrinsics;

namespace FemCore2D.Solvers;

/// <summary>Registers of 512 bits.</summary>
internal readonly unsafe struct Lanes512 : ILanes<Vector512<double>>
{
    /// <inheritdoc/>
    public static int Width => 8;

    /// <inheritdoc/>
    public static bool Wide => true;

    /// <inheritdoc/>
    public static Vector512<double> Zero
    {
        [MethodImpl(MethodImplOptions.AggressiveInlining)]
        get => Vector512<double>.Zero;
    }

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Vector512<double> Load(double* source) => Vector512.Load(source);

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static void Store(double* target, Vector512<double> value) => value.Store(target);

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Vector512<double> Spread(double value) => Vector512.Create(value);

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Vector512<double> SpreadPair(double even, double odd) =>
        Vector512.Create(even, odd, even, odd, even, odd, even, odd);

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Vector512<double> Add(Vector512<double> a, Vector512<double> b) => a + b;

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Vector512<double> Subtract(Vector512<double> a, Vector512<double> b) => a - b;

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Vector512<double> Multiply(Vector512<double> a, Vector512<double> b) => a * b;

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Vector512<double> MultiplyAdd(
        Vector512<double> a, Vector512<double> b, Vector512<double> c) =>
        Vector512.MultiplyAddEstimate(a, b, c);

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Vector512<double> SwapPairs(Vector512<double> a) =>
        Vector512.Shuffle(a, Vector512.Create(1L, 0L, 3L, 2L, 5L, 4L, 7L, 6L));

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static double Sum(Vector512<double> a) => Vector512.Sum(a);
}
