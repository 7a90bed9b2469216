using System.Numerics;

namespace FemCore2D.Solvers;

/// <summary>The dense operations on fronts for one number type and one width of registers.</summary>
internal sealed unsafe partial class FrontKernels<TLanes, TVector, TNumber> : FrontArithmetic
    where TLanes : ILanes<TVector>
    where TVector : unmanaged
    where TNumber : INumberForm
{
    /// <summary>The rows below which a product works in place: its A then stays in the cache without packing.</summary>
    private const int UnpackedDoubles = 24 * 1024;

    /// <summary>The columns that are updated together.</summary>
    private static int Group => 8 / TNumber.Doubles;

    /// <inheritdoc/>
    public override int Doubles => TNumber.Doubles;

    /// <inheritdoc/>
    public override void Product(
        double* a, nint lda, double* b, nint ldb, int inner, double* c, nint ldc, int rows, int columns,
        bool lower, int offset, bool conjugate, double* scratch)
    {
        // The inner dimension is cut in the same way on both paths, so that the bits do not depend on the path.
        for (int k = 0; k < inner; k += InnerBlock)
        {
            int depth = Math.Min(InnerBlock, inner - k);
            double* ak = a + k * lda;
            double* bk = b + k * ldb;
            if ((long)rows * inner > UnpackedDoubles)
            {
                PackedProduct(ak, lda, bk, ldb, depth, c, ldc, rows, columns, lower, offset, conjugate, scratch);
                continue;
            }

            for (int j = 0; j < columns; j += Group)
            {
                int top = lower ? Math.Max(0, (j + offset) * TNumber.Doubles) : 0;
                if (top < rows)
                {
                    Tile<TLanes, TVector, TNumber>.Strip(
                        ak + top, lda, bk + j * TNumber.Doubles, ldb, depth, c + j * ldc + top, ldc,
                        rows - top, Math.Min(Group, columns - j), conjugate);
                }
            }
        }
    }

    /// <inheritdoc/>
    public override void SolveRows(
        double* x, nint ldx, int rows, double* l, nint ldl, int n, bool unit, bool conjugate)
    {
        // As many rows at a time as stay in the nearest cache.
        const int Chunk = 96;
        for (int top = 0; top < rows; top += Chunk)
        {
            int some = Math.Min(Chunk, rows - top);
            double* xt = x + top;
            for (int g = 0; g < n; g += Group)
            {
                int width = Math.Min(Group, n - g);
                if (g > 0)
                {
                    Tile<TLanes, TVector, TNumber>.Strip(
                        xt, ldx, l + g * TNumber.Doubles, ldl, g, xt + g * ldx, ldx, some, width, conjugate);
                }

                SolveGroup(xt + g * ldx, ldx, some, l + g * TNumber.Doubles + g * ldl, ldl, width, unit, conjugate);
            }
        }
    }

    /// <inheritdoc/>
    public override int Cholesky(double* p, nint ld, int n, int rows)
    {
        int d = TNumber.Doubles;
        for (int g = 0; g < n; g += Group)
        {
            int width = Math.Min(Group, n - g);
            double* corner = p + g * d + g * ld;
            int left = rows - g * d;
            if (g > 0)
                Tile<TLanes, TVector, TNumber>.Strip(p + g * d, ld, p + g * d, ld, g, corner, ld, left, width, true);
            int failed = d == 1 ? RealCorner(corner, ld, width) : ComplexCorner(corner, ld, width);
            if (failed >= 0)
                return g + failed;
            if (left > 8)
                SolveGroup(corner + 8, ld, left - 8, corner, ld, width, false, true);
        }

        return -1;
    }

    /// <inheritdoc/>
    public override void AddUpdate(
        double* panel, nint ld, int width, double* update, nint ldu,
        int* places, int* runEnds, int count, double* child, nint ldc, int from, int to)
    {
        int d = TNumber.Doubles;
        int w = TLanes.Width;
        for (int j = from; j < to; j++)
        {
            int place = places[j];
            double* target = place < width ? panel + place * ld : update + (place - width) * ldu - width * d;
            double* source = child + j * ldc;
            int end;
            for (int i = j; i < count; i = end)
            {
                end = runEnds[i];
                double* t = target + places[i] * d;
                double* s = source + i * d;
                int doubles = (end - i) * d;
                int k = 0;
                for (; k <= doubles - w; k += w)
                    TLanes.Store(t + k, TLanes.Add(TLanes.Load(t + k), TLanes.Load(s + k)));
                for (; k < doubles; k++)
                    t[k] += s[k];
            }
        }
    }

    private static void PackedProduct(
        double* a, nint lda, double* b, nint ldb, int depth, double* c, nint ldc, int rows, int columns,
        bool lower, int offset, bool conjugate, double* scratch)
    {
        int d = TNumber.Doubles;
        int w = TLanes.Width;
        double* packedA = scratch;
        double* packedB = scratch + 3 * w * InnerBlock;
        for (int j = 0; j < columns; j += Group)
        {
            double* from = b + j * d;
            double* to = packedB + j * d * depth;
            for (int k = 0; k < depth; k++, from += ldb, to += 8)
            {
                for (int i = 0; i < 8; i += w)
                    TLanes.Store(to + i, TLanes.Load(from + i));
            }
        }

        int height;
        for (int top = 0; top < rows; top += height)
        {
            height = Math.Min(3 * w, rows - top);
            double* from = a + top;
            double* to = packedA;
            for (int k = 0; k < depth; k++, from += lda, to += height)
            {
                for (int i = 0; i < height; i += w)
                    TLanes.Store(to + i, TLanes.Load(from + i));
            }

            // Columns whose diagonal lies below this strip have nothing in it.
            int end = lower ? Math.Min(columns, (top + height) / d - offset) : columns;
            for (int j = 0; j < end; j += Group)
            {
                Tile<TLanes, TVector, TNumber>.Strip(
                    packedA, height, packedB + j * d * depth, 8, depth, c + j * ldc + top, ldc,
                    height, Math.Min(Group, columns - j), conjugate);
            }
        }
    }

    private static void SolveGroup(
        double* x, nint ldx, int rows, double* l, nint ldl, int n, bool unit, bool conjugate)
    {
        if (TNumber.Doubles == 1)
            SolveRealGroup(x, ldx, rows, l, ldl, n, unit);
        else
            SolveComplexGroup(x, ldx, rows, l, ldl, n, unit, conjugate);
    }

    private static void SolveRealGroup(double* x, nint ldx, int rows, double* l, nint ldl, int n, bool unit)
    {
        double* inverse = stackalloc double[8];
        for (int c = 0; c < n; c++)
            inverse[c] = unit ? 1.0 : 1.0 / l[c + c * ldl];
        int w = TLanes.Width;
        for (int i = 0; i < rows; i += w)
        {
            double* xi = x + i;
            for (int c = 0; c < n; c++)
            {
                TVector sum = TLanes.Zero;
                double* lc = l + c;
                for (int k = 0; k < c; k++)
                    sum = TLanes.MultiplyAdd(TLanes.Load(xi + k * ldx), TLanes.Spread(lc[k * ldl]), sum);
                TVector value = TLanes.Subtract(TLanes.Load(xi + c * ldx), sum);
                TLanes.Store(xi + c * ldx, TLanes.Multiply(value, TLanes.Spread(inverse[c])));
            }
        }
    }

    private static void SolveComplexGroup(
        double* x, nint ldx, int rows, double* l, nint ldl, int n, bool unit, bool conjugate)
    {
        Complex* inverse = stackalloc Complex[4];
        double sign = conjugate ? -1.0 : 1.0;
        for (int c = 0; c < n; c++)
        {
            double* diagonal = l + 2 * c + c * ldl;
            inverse[c] = unit ? Complex.One : 1.0 / new Complex(diagonal[0], sign * diagonal[1]);
        }

        int w = TLanes.Width;
        for (int i = 0; i < rows; i += w)
        {
            double* xi = x + i;
            for (int c = 0; c < n; c++)
            {
                TVector value = TLanes.Load(xi + c * ldx);
                for (int k = 0; k < c; k++)
                {
                    double* factor = l + 2 * c + k * ldl;
                    TVector known = TLanes.Load(xi + k * ldx);
                    double imaginary = sign * factor[1];
                    value = TLanes.MultiplyAdd(known, TLanes.Spread(-factor[0]), value);
                    value = TLanes.MultiplyAdd(
                        TLanes.SwapPairs(known), TLanes.SpreadPair(imaginary, -imaginary), value);
                }

                if (!unit)
                {
                    Complex s = inverse[c];
                    value = TLanes.MultiplyAdd(
                        value,
                        TLanes.Spread(s.Real),
                        TLanes.Multiply(TLanes.SwapPairs(value), TLanes.SpreadPair(-s.Imaginary, s.Imaginary)));
                }

                TLanes.Store(xi + c * ldx, value);
            }
        }
    }

    /// <summary>Factorizes the first columns of a square of eight rows; the rows below them in the square come along.</summary>
    private static int RealCorner(double* p, nint ld, int n)
    {
        for (int c = 0; c < n; c++)
        {
            double* column = p + c * ld;
            double pivot = column[c];
            if (!(pivot > 0.0) || !double.IsFinite(pivot))
                return c;
            double root = Math.Sqrt(pivot);
            double inverse = 1.0 / root;
            column[c] = root;
            for (int i = c + 1; i < 8; i++)
                column[i] *= inverse;
            for (int j = c + 1; j < n; j++)
            {
                double factor = column[j];
                double* other = p + j * ld;
                for (int i = j; i < 8; i++)
                    other[i] -= column[i] * factor;
            }
        }

        return -1;
    }

    private static int ComplexCorner(double* p, nint ld, int n)
    {
        for (int c = 0; c < n; c++)
        {
            double* column = p + c * ld;
            double pivot = column[2 * c];
            if (!(pivot > 0.0) || !double.IsFinite(pivot))
                return c;
            double root = Math.Sqrt(pivot);
            double inverse = 1.0 / root;
            column[2 * c] = root;
            column[2 * c + 1] = 0.0;
            for (int i = 2 * (c + 1); i < 8; i++)
                column[i] *= inverse;
            for (int j = c + 1; j < n; j++)
            {
                double re = column[2 * j];
                double im = -column[2 * j + 1];
                double* other = p + j * ld;
                for (int i = 2 * j; i < 8; i += 2)
                {
                    other[i] -= column[i] * re - column[i + 1] * im;
                    other[i + 1] -= column[i] * im + column[i + 1] * re;
                }
            }
        }

        return -1;
    }
}
