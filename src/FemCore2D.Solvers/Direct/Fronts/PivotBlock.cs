using System.Numerics;
using System.Runtime.InteropServices;

namespace FemCore2D.Solvers;

/// <summary>The pivoting inside the corner block of a panel, and the divisions by the block diagonal that it leaves.</summary>
/// <typeparam name="T">The number type.</typeparam>
internal static unsafe partial class PivotBlock<T>
    where T : unmanaged, INumberBase<T>
{
    /// <summary>Divides values by D, whose diagonal is that of the panel.</summary>
    public static void Divide(double* panel, nint ld, ReadOnlySpan<double> offDiagonals, double* values, bool hermitian)
    {
        ReadOnlySpan<T> off = MemoryMarshal.Cast<double, T>(offDiagonals);
        T* f = (T*)values;
        for (int k = 0; k < off.Length; k++)
        {
            T a = ((T*)(panel + k * ld))[k];
            T b = off[k];
            if (T.IsZero(b))
            {
                f[k] /= a;
                continue;
            }

            // [a c; b e] with c = b or its conjugate; scaled by b, since b is the largest.
            T c = hermitian ? Conjugate(b) : b;
            T e = ((T*)(panel + (k + 1) * ld))[k + 1];
            (f[k], f[k + 1]) = SolvePair(a, b, c, e, f[k], f[k + 1]);
            k++;
        }
    }

    /// <summary>Solves a system of two equations whose off-diagonal entries dominate.</summary>
    public static (T X, T Y) SolvePair(T a, T b, T c, T e, T f, T g)
    {
        T alpha = a / c;
        T beta = e / b;
        T det = alpha * beta - T.One;
        T first = f / c;
        T second = g / b;
        return ((beta * first - second) / det, (alpha * second - first) / det);
    }

    /// <summary>The conjugate of a number.</summary>
    public static T Conjugate(T value) =>
        typeof(T) == typeof(Complex) ? (T)(object)Complex.Conjugate((Complex)(object)value) : value;
}
