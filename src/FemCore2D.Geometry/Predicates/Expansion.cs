using System.Runtime.CompilerServices;

namespace FemCore2D.Geometry;

/// <summary>
/// Exact sums and products of doubles as expansions: unevaluated sums of components that do not overlap, the
/// smallest first.
/// </summary>
/// <remarks>
/// J. R. Shewchuk, "Adaptive precision floating-point arithmetic and fast robust geometric predicates",
/// Discrete and Computational Geometry 18 (1997). Exact as long as nothing overflows or underflows.
/// </remarks>
internal static class Expansion
{
    /// <summary>The rounded sum and its rounding error.</summary>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static double Sum(double a, double b, out double error)
    {
        double sum = a + b;
        double virtualB = sum - a;
        double virtualA = sum - virtualB;
        error = (a - virtualA) + (b - virtualB);
        return sum;
    }

    /// <summary>The rounded sum and its rounding error, for <paramref name="a"/> of no smaller magnitude.</summary>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    private static double OrderedSum(double a, double b, out double error)
    {
        double sum = a + b;
        error = b - (sum - a);
        return sum;
    }

    /// <summary>The rounded product and its rounding error.</summary>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static double Product(double a, double b, out double error)
    {
        double product = a * b;
        error = Math.FusedMultiplyAdd(a, b, -product);
        return product;
    }

    /// <summary>Writes a - b as an expansion of one or two components and returns their number.</summary>
    public static int Difference(double a, double b, Span<double> result)
    {
        double difference = Sum(a, -b, out double error);
        if (error == 0)
        {
            result[0] = difference;
            return 1;
        }

        result[0] = error;
        result[1] = difference;
        return 2;
    }

    /// <summary>Adds two expansions; the result needs room for the components of both.</summary>
    /// <returns>The number of components written, at least one.</returns>
    public static int Add(ReadOnlySpan<double> e, ReadOnlySpan<double> f, Span<double> result)
    {
        int i = 0;
        int j = 0;
        int count = 0;
        double total = TakeSmaller(e, f, ref i, ref j);
        bool first = true;
        while (i < e.Length || j < f.Length)
        {
            double next = TakeSmaller(e, f, ref i, ref j);
            total = first ? OrderedSum(next, total, out double error) : Sum(total, next, out error);
            first = false;
            if (error != 0)
            {
                result[count++] = error;
            }
        }

        if (total != 0 || count == 0)
        {
            result[count++] = total;
        }

        return count;
    }

    /// <summary>Multiplies an expansion by a double; the result needs room for twice the components.</summary>
    /// <returns>The number of components written, at least one.</returns>
    public static int Scale(ReadOnlySpan<double> e, double factor, Span<double> result)
    {
        int count = 0;
        double total = Product(e[0], factor, out double error);
        if (error != 0)
        {
            result[count++] = error;
        }

        for (int i = 1; i < e.Length; i++)
        {
            double product = Product(e[i], factor, out double productError);
            double sum = Sum(total, productError, out error);
            if (error != 0)
            {
                result[count++] = error;
            }

            total = OrderedSum(product, sum, out error);
            if (error != 0)
            {
                result[count++] = error;
            }
        }

        if (total != 0 || count == 0)
        {
            result[count++] = total;
        }

        return count;
    }

    /// <summary>
    /// Multiplies two expansions; the result and the scratch need room for twice the product of their lengths each.
    /// </summary>
    /// <returns>The number of components written, at least one.</returns>
    public static int Multiply(
        ReadOnlySpan<double> e, ReadOnlySpan<double> f, Span<double> result, Span<double> scratch)
    {
        Span<double> term = stackalloc double[2 * e.Length];
        int count = Scale(e, f[0], result);
        for (int j = 1; j < f.Length; j++)
        {
            int terms = Scale(e, f[j], term);
            result[..count].CopyTo(scratch);
            count = Add(scratch[..count], term[..terms], result);
        }

        return count;
    }

    /// <summary>The value of an expansion, rounded; its sign is exact.</summary>
    public static double Estimate(ReadOnlySpan<double> e)
    {
        double sum = 0;
        foreach (double component in e)
        {
            sum += component;
        }

        return sum;
    }

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    private static double TakeSmaller(ReadOnlySpan<double> e, ReadOnlySpan<double> f, ref int i, ref int j) =>
        j >= f.Length || (i < e.Length && Math.Abs(e[i]) < Math.Abs(f[j])) ? e[i++] : f[j++];
}
