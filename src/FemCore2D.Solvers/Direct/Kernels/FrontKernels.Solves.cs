using System.Numerics;
using System.Runtime.CompilerServices;

namespace FemCore2D.Solvers;

/// <content>The passes over a panel that a solve makes; each reads the panel once.</content>
internal sealed unsafe partial class FrontKernels<TLanes, TVector, TNumber>
{
    /// <inheritdoc/>
    public override void Forward(double* panel, nint ld, int width, int rows, bool unit, double* f)
    {
        int step = 4 / TNumber.Doubles;
        for (int c = 0; c < width; c += step)
        {
            int n = Math.Min(step, width - c);
            if (TNumber.Doubles == 1)
                ForwardReal(panel + c * ld, ld, c, n, rows, unit, f);
            else
                ForwardComplex(panel + c * ld, ld, c, n, rows, unit, f);
        }
    }

    /// <inheritdoc/>
    public override void Backward(double* panel, nint ld, int width, int rows, bool unit, bool conjugate, double* f)
    {
        int step = 4 / TNumber.Doubles;
        for (int c = (width - 1) / step * step; c >= 0; c -= step)
        {
            int n = Math.Min(step, width - c);
            if (TNumber.Doubles == 1)
                BackwardReal(panel + c * ld, ld, c, n, rows, unit, f);
            else
                BackwardComplex(panel + c * ld, ld, c, n, rows, unit, conjugate, f);
        }
    }

    /// <summary>Up to four columns: their triangle, and what they take off all rows below it.</summary>
    private static void ForwardReal(double* p, nint ld, int first, int n, int rows, bool unit, double* f)
    {
        double* y = stackalloc double[4];
        y[1] = y[2] = y[3] = 0.0;
        for (int c = 0; c < n; c++)
        {
            double value = f[first + c];
            for (int k = 0; k < c; k++)
                value -= p[first + c + k * ld] * y[k];
            y[c] = unit ? value : value / p[first + c + c * ld];
            f[first + c] = y[c];
        }

        // Missing columns are the last one again, times zero.
        double* p0 = p;
        double* p1 = p + Math.Min(1, n - 1) * ld;
        double* p2 = p + Math.Min(2, n - 1) * ld;
        double* p3 = p + Math.Min(3, n - 1) * ld;
        TVector y0 = TLanes.Spread(y[0]);
        TVector y1 = TLanes.Spread(y[1]);
        TVector y2 = TLanes.Spread(y[2]);
        TVector y3 = TLanes.Spread(y[3]);
        int w = TLanes.Width;
        int i = first + n;
        for (; i < rows && i % w != 0; i++)
            f[i] -= p0[i] * y[0] + p1[i] * y[1] + (p2[i] * y[2] + p3[i] * y[3]);
        for (; i < rows; i += w)
        {
            TVector a = TLanes.MultiplyAdd(TLanes.Load(p0 + i), y0, TLanes.Multiply(TLanes.Load(p1 + i), y1));
            TVector b = TLanes.MultiplyAdd(TLanes.Load(p2 + i), y2, TLanes.Multiply(TLanes.Load(p3 + i), y3));
            TLanes.Store(f + i, TLanes.Subtract(TLanes.Load(f + i), TLanes.Add(a, b)));
        }
    }

    private static void BackwardReal(double* p, nint ld, int first, int n, int rows, bool unit, double* f)
    {
        double* p0 = p;
        double* p1 = p + Math.Min(1, n - 1) * ld;
        double* p2 = p + Math.Min(2, n - 1) * ld;
        double* p3 = p + Math.Min(3, n - 1) * ld;
        double* s = stackalloc double[4];
        double s0 = 0.0, s1 = 0.0, s2 = 0.0, s3 = 0.0;
        int w = TLanes.Width;
        int i = first + n;
        for (; i < rows && i % w != 0; i++)
        {
            s0 += p0[i] * f[i];
            s1 += p1[i] * f[i];
            s2 += p2[i] * f[i];
            s3 += p3[i] * f[i];
        }

        TVector v0 = TLanes.Zero, v1 = TLanes.Zero, v2 = TLanes.Zero, v3 = TLanes.Zero;
        for (; i <= rows - w; i += w)
        {
            TVector x = TLanes.Load(f + i);
            v0 = TLanes.MultiplyAdd(TLanes.Load(p0 + i), x, v0);
            v1 = TLanes.MultiplyAdd(TLanes.Load(p1 + i), x, v1);
            v2 = TLanes.MultiplyAdd(TLanes.Load(p2 + i), x, v2);
            v3 = TLanes.MultiplyAdd(TLanes.Load(p3 + i), x, v3);
        }

        for (; i < rows; i++)
        {
            s0 += p0[i] * f[i];
            s1 += p1[i] * f[i];
            s2 += p2[i] * f[i];
            s3 += p3[i] * f[i];
        }

        s[0] = s0 + TLanes.Sum(v0);
        s[1] = s1 + TLanes.Sum(v1);
        s[2] = s2 + TLanes.Sum(v2);
        s[3] = s3 + TLanes.Sum(v3);
        for (int c = n - 1; c >= 0; c--)
        {
            double value = f[first + c] - s[c];
            for (int k = c + 1; k < n; k++)
                value -= p[first + k + c * ld] * f[first + k];
            f[first + c] = unit ? value : value / p[first + c + c * ld];
        }
    }

    private static void ForwardComplex(double* p, nint ld, int first, int n, int rows, bool unit, double* f)
    {
        Complex* y = stackalloc Complex[2];
        y[1] = default;
        Complex* values = (Complex*)f;
        for (int c = 0; c < n; c++)
        {
            Complex value = values[first + c];
            for (int k = 0; k < c; k++)
                value -= ((Complex*)(p + k * ld))[first + c] * y[k];
            y[c] = unit ? value : value / ((Complex*)(p + c * ld))[first + c];
            values[first + c] = y[c];
        }

        double* p0 = p;
        double* p1 = p + (n - 1) * ld;
        TVector r0 = TLanes.Spread(y[0].Real);
        TVector r1 = TLanes.Spread(y[1].Real);
        TVector i0 = TLanes.SpreadPair(-y[0].Imaginary, y[0].Imaginary);
        TVector i1 = TLanes.SpreadPair(-y[1].Imaginary, y[1].Imaginary);
        int w = TLanes.Width;
        int i = 2 * (first + n);
        for (; i < 2 * rows && i % w != 0; i += 2)
            values[i / 2] -= ((Complex*)p0)[i / 2] * y[0] + ((Complex*)p1)[i / 2] * y[1];
        for (; i < 2 * rows; i += w)
        {
            TVector a0 = TLanes.Load(p0 + i);
            TVector a1 = TLanes.Load(p1 + i);
            TVector straight = TLanes.MultiplyAdd(a0, r0, TLanes.Multiply(a1, r1));
            TVector crossed = TLanes.MultiplyAdd(TLanes.SwapPairs(a0), i0, TLanes.Multiply(TLanes.SwapPairs(a1), i1));
            TLanes.Store(f + i, TLanes.Subtract(TLanes.Load(f + i), TLanes.Add(straight, crossed)));
        }
    }

    private static void BackwardComplex(
        double* p, nint ld, int first, int n, int rows, bool unit, bool conjugate, double* f)
    {
        double* p0 = p;
        double* p1 = p + (n - 1) * ld;
        Complex* values = (Complex*)f;
        Complex* s = stackalloc Complex[2];
        s[0] = s[1] = default;
        int w = TLanes.Width;
        int i = 2 * (first + n);
        int end = 2 * rows;
        for (; i < end && i % w != 0; i += 2)
        {
            s[0] += Turn(((Complex*)p0)[i / 2], conjugate) * values[i / 2];
            s[1] += Turn(((Complex*)p1)[i / 2], conjugate) * values[i / 2];
        }

        // Products with equal and with swapped lanes; their pairs give the real and the imaginary part.
        TVector e0 = TLanes.Zero, e1 = TLanes.Zero, x0 = TLanes.Zero, x1 = TLanes.Zero;
        for (; i <= end - w; i += w)
        {
            TVector x = TLanes.Load(f + i);
            TVector swapped = TLanes.SwapPairs(x);
            TVector a0 = TLanes.Load(p0 + i);
            TVector a1 = TLanes.Load(p1 + i);
            e0 = TLanes.MultiplyAdd(a0, x, e0);
            e1 = TLanes.MultiplyAdd(a1, x, e1);
            x0 = TLanes.MultiplyAdd(a0, swapped, x0);
            x1 = TLanes.MultiplyAdd(a1, swapped, x1);
        }

        s[0] += Gather(e0, x0, conjugate);
        s[1] += Gather(e1, x1, conjugate);
        for (; i < end; i += 2)
        {
            s[0] += Turn(((Complex*)p0)[i / 2], conjugate) * values[i / 2];
            s[1] += Turn(((Complex*)p1)[i / 2], conjugate) * values[i / 2];
        }

        for (int c = n - 1; c >= 0; c--)
        {
            Complex* column = (Complex*)(p + c * ld);
            Complex value = values[first + c] - s[c];
            for (int k = c + 1; k < n; k++)
                value -= Turn(column[first + k], conjugate) * values[first + k];
            values[first + c] = unit ? value : value / Turn(column[first + c], conjugate);
        }
    }

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    private static Complex Turn(Complex value, bool conjugate) => conjugate ? Complex.Conjugate(value) : value;

    private static Complex Gather(TVector equal, TVector swapped, bool conjugate)
    {
        TVector signs = TLanes.SpreadPair(1.0, -1.0);
        double even = TLanes.Sum(TLanes.Multiply(equal, signs));
        double all = TLanes.Sum(equal);
        double crossed = TLanes.Sum(swapped);
        double crossedDifference = TLanes.Sum(TLanes.Multiply(swapped, signs));
        return conjugate ? new Complex(all, crossedDifference) : new Complex(even, crossed);
    }
}
