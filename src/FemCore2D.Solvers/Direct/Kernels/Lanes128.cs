using System.Runtime.CompilerServices;
using System.Runtime.Intrinsics;

namespace FemCore2D.Solvers;

/// <summary>Registers of 128 bits.</summary>
internal readonly unsafe struct Lanes128 : ILanes<Vector128<double>>
{
    /// <inheritdoc/>
    public static int Width => 2;

    /// <inheritdoc/>
    public static bool Wide => false;

    /// <inheritdoc/>
    public static Vector128<double> Zero
    {
        [MethodImpl(MethodImplOptions.AggressiveInlining)]
        get => Vector128<double>.Zero;
    }

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Vector128<double> Load(double* source) => Vector128.Load(source);

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static void Store(double* target, Vector128<double> value) => value.Store(target);

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Vector128<double> Spread(double value) => Vector128.Create(value);

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Vector128<double> SpreadPair(double even, double odd) =>
        Vector128.Create(even, odd);

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Vector128<double> Add(Vector128<double> a, Vector128<double> b) => a + b;

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Vector128<double> Subtract(Vector128<double> a, Vector128<double> b) => a - b;

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Vector128<double> Multiply(Vector128<double> a, Vector128<double> b) => a * b;

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Vector128<double> MultiplyAdd(
        Vector128<double> a, Vector128<double> b, Vector128<double> c) =>
        Vector128.MultiplyAddEstimate(a, b, c);

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Vector128<double> SwapPairs(Vector128<double> a) =>
        Vector128.Shuffle(a, Vector128.Create(1L, 0L));

    /// <inheritdoc/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static double Sum(Vector128<double> a) => Vector128.Sum(a);
}
