using System.Runtime.Intrinsics;

namespace FemCore2D.Solvers;

/// <summary>
/// Passes over vectors of doubles. Complex vectors pass as twice as many doubles: the methods that use these need only
/// real factors and the real part of inner products. Sums run in a fixed order.
/// </summary>
internal static unsafe class VectorKernels
{
    /// <summary>The inner product.</summary>
    public static double Dot(double* x, double* y, nint count)
    {
        Vector256<double> a = default;
        Vector256<double> b = default;
        Vector256<double> c = default;
        Vector256<double> d = default;
        nint i = 0;
        for (; i + 16 <= count; i += 16)
        {
            a = Vector256.MultiplyAddEstimate(Vector256.Load(x + i), Vector256.Load(y + i), a);
            b = Vector256.MultiplyAddEstimate(Vector256.Load(x + i + 4), Vector256.Load(y + i + 4), b);
            c = Vector256.MultiplyAddEstimate(Vector256.Load(x + i + 8), Vector256.Load(y + i + 8), c);
            d = Vector256.MultiplyAddEstimate(Vector256.Load(x + i + 12), Vector256.Load(y + i + 12), d);
        }

        double sum = Vector256.Sum((a + b) + (c + d));
        for (; i < count; i++)
        {
            sum += x[i] * y[i];
        }

        return sum;
    }

    /// <summary><c>x += factor p</c>, <c>r -= factor q</c>; returns the inner product of the new r with itself.</summary>
    public static double Advance(double factor, double* p, double* q, double* x, double* r, nint count)
    {
        Vector256<double> factors = Vector256.Create(factor);
        Vector256<double> a = default;
        Vector256<double> b = default;
        nint i = 0;
        for (; i + 8 <= count; i += 8)
        {
            Vector256.Store(
                Vector256.MultiplyAddEstimate(factors, Vector256.Load(p + i), Vector256.Load(x + i)), x + i);
            Vector256.Store(
                Vector256.MultiplyAddEstimate(factors, Vector256.Load(p + i + 4), Vector256.Load(x + i + 4)), x + i + 4);
            Vector256<double> r0 =
                Vector256.MultiplyAddEstimate(-factors, Vector256.Load(q + i), Vector256.Load(r + i));
            Vector256<double> r1 =
                Vector256.MultiplyAddEstimate(-factors, Vector256.Load(q + i + 4), Vector256.Load(r + i + 4));
            Vector256.Store(r0, r + i);
            Vector256.Store(r1, r + i + 4);
            a = Vector256.MultiplyAddEstimate(r0, r0, a);
            b = Vector256.MultiplyAddEstimate(r1, r1, b);
        }

        double sum = Vector256.Sum(a + b);
        for (; i < count; i++)
        {
            x[i] += factor * p[i];
            r[i] -= factor * q[i];
            sum += r[i] * r[i];
        }

        return sum;
    }

    /// <summary><c>p = z + factor p</c>.</summary>
    public static void Turn(double factor, double* z, double* p, nint count)
    {
        Vector256<double> factors = Vector256.Create(factor);
        nint i = 0;
        for (; i + 4 <= count; i += 4)
        {
            Vector256.Store(
                Vector256.MultiplyAddEstimate(factors, Vector256.Load(p + i), Vector256.Load(z + i)), p + i);
        }

        for (; i < count; i++)
        {
            p[i] = z[i] + (factor * p[i]);
        }
    }

    /// <summary><c>r = b - r</c>; returns the inner product of the new r with itself.</summary>
    public static double SubtractFrom(double* b, double* r, nint count)
    {
        double sum = 0;
        for (nint i = 0; i < count; i++)
        {
            r[i] = b[i] - r[i];
            sum += r[i] * r[i];
        }

        return sum;
    }
}
