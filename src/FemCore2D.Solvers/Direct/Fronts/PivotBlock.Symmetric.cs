using System.Numerics;

namespace FemCore2D.Solvers;

/// <content>The corner block of a symmetric or Hermitian matrix.</content>
internal static unsafe partial class PivotBlock<T>
{
    /// <summary>The share of the largest entry that a diagonal pivot must have: the bound that limits growth most.</summary>
    private const double Alpha = 0.6403882032022076;

    /// <summary>Factorizes the corner block into L, D and L^T, with pivots of one or two columns.</summary>
    /// <param name="p">The corner; receives L, and the diagonal of D on its diagonal.</param>
    /// <param name="q">Receives L D in the rows below the block.</param>
    /// <param name="ld">The distance of columns in doubles.</param>
    /// <param name="n">The columns.</param>
    /// <param name="m">The rows that come along, at least <paramref name="n"/>.</param>
    /// <param name="hermitian">Whether the matrix equals its conjugate transpose.</param>
    /// <param name="least">The size that a pivot is raised to.</param>
    /// <param name="order">Receives the column taken at each place.</param>
    /// <param name="offDiagonal">Receives the entries of D below the diagonal.</param>
    /// <param name="firstPerturbed">Receives the first column whose pivot was raised, or stays as it is.</param>
    /// <returns>The number of pivots that were raised.</returns>
    /// <remarks>
    /// J. R. Bunch and L. Kaufman (1977), <em>Some stable methods for calculating inertia and solving symmetric linear
    /// systems</em>; pivots are looked for in the block only (O. Schenk and K. Gaertner 2006).
    /// </remarks>
    public static int Symmetric(
        double* p, double* q, nint ld, int n, int m, bool hermitian, double least,
        Span<int> order, Span<T> offDiagonal, ref int firstPerturbed)
    {
        const int Stride = FrontArithmetic.BlockWidth + 8;
        T* a = stackalloc T[FrontArithmetic.BlockWidth * Stride];
        for (int j = 0; j < n; j++)
        {
            new ReadOnlySpan<T>((T*)(p + j * ld) + j, m - j).CopyTo(new Span<T>(a + j * Stride + j, m - j));
            order[j] = j;
            offDiagonal[j] = T.Zero;
        }

        int raised = 0;
        int step;
        for (int k = 0; k < n; k += step)
        {
            step = Choose(a, Stride, k, n, hermitian, least, order);
            T* column = a + k * Stride;
            if (step == 1)
            {
                if (hermitian)
                    column[k] = RealPart(column[k]);
                if (!(Size(column[k]) >= least))
                {
                    if (raised++ == 0)
                        firstPerturbed = Math.Min(firstPerturbed, order[k]);
                    column[k] = T.CreateChecked(T.IsNegative(column[k]) && T.IsRealNumber(column[k]) ? -least : least);
                }

                Single(a, Stride, k, n, m, q, ld, hermitian);
            }
            else
            {
                Pair(a, Stride, k, n, m, q, ld, hermitian);
                offDiagonal[k] = column[k + 1];
                column[k + 1] = T.Zero;
            }
        }

        for (int j = 0; j < n; j++)
            new ReadOnlySpan<T>(a + j * Stride + j, m - j).CopyTo(new Span<T>((T*)(p + j * ld) + j, m - j));
        return raised;
    }

    /// <summary>Brings the next pivot to its place, and returns whether it has one column or two.</summary>
    private static int Choose(T* a, int stride, int k, int n, bool hermitian, double least, Span<int> order)
    {
        T* column = a + k * stride;
        double diagonal = Size(column[k]);
        double largest = 0.0;
        int r = k;
        for (int i = k + 1; i < n; i++)
        {
            double size = Size(column[i]);
            if (size > largest)
            {
                largest = size;
                r = i;
            }
        }

        if (diagonal >= Alpha * largest || largest < least)
            return 1;
        double across = 0.0;
        for (int i = k; i < r; i++)
            across = Math.Max(across, Size(a[i * stride + r]));
        for (int i = r + 1; i < n; i++)
            across = Math.Max(across, Size(a[r * stride + i]));
        if (diagonal * across >= Alpha * largest * largest)
            return 1;
        if (Size(a[r * stride + r]) >= Alpha * across)
        {
            Exchange(a, stride, k, r, n, hermitian, order);
            return 1;
        }

        if (r != k + 1)
            Exchange(a, stride, k + 1, r, n, hermitian, order);
        return 2;
    }

    /// <summary>Exchanges two rows and the same columns of the lower triangle, the first before the second.</summary>
    private static void Exchange(T* a, int stride, int first, int second, int n, bool hermitian, Span<int> order)
    {
        (order[first], order[second]) = (order[second], order[first]);
        for (int j = 0; j < first; j++)
            (a[j * stride + first], a[j * stride + second]) = (a[j * stride + second], a[j * stride + first]);
        T* p = a + first * stride;
        T* q = a + second * stride;
        (p[first], q[second]) = (q[second], p[first]);
        for (int i = first + 1; i < second; i++)
        {
            T low = p[i];
            T side = a[i * stride + second];
            p[i] = hermitian ? Conjugate(side) : side;
            a[i * stride + second] = hermitian ? Conjugate(low) : low;
        }

        if (hermitian)
            p[second] = Conjugate(p[second]);
        for (int i = second + 1; i < FrontArithmetic.BlockWidth + 8; i++)
            (p[i], q[i]) = (q[i], p[i]);
    }

    private static void Single(T* a, int stride, int k, int n, int m, double* q, nint ld, bool hermitian)
    {
        T* w = a + k * stride;
        T inverse = T.One / w[k];
        T* kept = (T*)(q + k * ld);
        for (int j = k + 1; j < n; j++)
        {
            T factor = inverse * (hermitian ? Conjugate(w[j]) : w[j]);
            T* target = a + j * stride;
            for (int i = j; i < m; i++)
                target[i] -= w[i] * factor;
        }

        for (int i = k + 1; i < m; i++)
        {
            if (i >= n)
                kept[i] = w[i];
            w[i] *= inverse;
        }
    }

    private static void Pair(T* a, int stride, int k, int n, int m, double* q, nint ld, bool hermitian)
    {
        T* w1 = a + k * stride;
        T* w2 = w1 + stride;
        T b = w1[k + 1];
        T c = hermitian ? Conjugate(b) : b;
        T* l1 = stackalloc T[FrontArithmetic.BlockWidth + 8];
        T* l2 = stackalloc T[FrontArithmetic.BlockWidth + 8];
        for (int i = k + 2; i < m; i++)
            (l1[i], l2[i]) = SolvePair(w1[k], c, b, w2[k + 1], w1[i], w2[i]);
        for (int j = k + 2; j < n; j++)
        {
            T f1 = hermitian ? Conjugate(w1[j]) : w1[j];
            T f2 = hermitian ? Conjugate(w2[j]) : w2[j];
            T* target = a + j * stride;
            for (int i = j; i < m; i++)
                target[i] -= l1[i] * f1 + l2[i] * f2;
        }

        T* kept1 = (T*)(q + k * ld);
        T* kept2 = (T*)(q + (k + 1) * ld);
        for (int i = k + 2; i < m; i++)
        {
            if (i >= n)
            {
                kept1[i] = w1[i];
                kept2[i] = w2[i];
            }

            w1[i] = l1[i];
            w2[i] = l2[i];
        }
    }

    private static double Size(T value) => double.CreateTruncating(T.Abs(value));

    private static T RealPart(T value) =>
        typeof(T) == typeof(Complex) ? (T)(object)new Complex(((Complex)(object)value).Real, 0.0) : value;
}
