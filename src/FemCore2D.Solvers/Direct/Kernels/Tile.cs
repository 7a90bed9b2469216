using System.Runtime.CompilerServices;

namespace FemCore2D.Solvers;

/// <summary>
/// The innermost loops of the dense work: <c>C -= A B^T</c> on a tile of C that stays in registers, one to three
/// registers high and eight or four doubles wide. Complex numbers are pairs of doubles: the same loop multiplies by
/// real and imaginary parts as if they were two columns, and the two are joined when the tile is written.
/// </summary>
internal static unsafe partial class Tile<TLanes, TVector, TNumber>
    where TLanes : ILanes<TVector>
    where TVector : unmanaged
    where TNumber : INumberForm
{
    /// <summary>Subtracts the product from a strip of C, at most eight doubles wide.</summary>
    /// <param name="a">The first row of A.</param>
    /// <param name="lda">The distance of the columns of A, in doubles.</param>
    /// <param name="b">The rows of B that belong to the columns of the strip.</param>
    /// <param name="ldb">The distance of the columns of B, in doubles.</param>
    /// <param name="inner">The number of columns of A and B.</param>
    /// <param name="c">The strip.</param>
    /// <param name="ldc">The distance of the columns of C, in doubles.</param>
    /// <param name="rows">The rows of the strip in doubles, a multiple of the width of a register.</param>
    /// <param name="columns">The number of columns of C, at most eight real or four complex ones.</param>
    /// <param name="conjugate">Whether B is conjugated.</param>
    public static void Strip(
        double* a, nint lda, double* b, nint ldb, int inner, double* c, nint ldc, int rows, int columns, bool conjugate)
    {
        int w = TLanes.Width;
        if (TLanes.Wide)
        {
            for (; rows >= 3 * w; rows -= 3 * w, a += 3 * w, c += 3 * w)
                Tile3x8(a, lda, b, ldb, inner, c, ldc, columns, conjugate);
            if (rows >= 2 * w)
                Tile2x8(a, lda, b, ldb, inner, c, ldc, columns, conjugate);
            else if (rows >= w)
                Tile1x8(a, lda, b, ldb, inner, c, ldc, columns, conjugate);
            return;
        }

        int half = 4 / TNumber.Doubles;
        for (int first = 0; first < columns; first += half)
        {
            int some = Math.Min(half, columns - first);
            double* ai = a;
            double* ci = c + first * ldc;
            double* bi = b + 4 * (first / half);
            int left = rows;
            for (; left >= 3 * w; left -= 3 * w, ai += 3 * w, ci += 3 * w)
                Tile3x4(ai, lda, bi, ldb, inner, ci, ldc, some, conjugate);
            if (left >= 2 * w)
                Tile2x4(ai, lda, bi, ldb, inner, ci, ldc, some, conjugate);
            else if (left >= w)
                Tile1x4(ai, lda, bi, ldb, inner, ci, ldc, some, conjugate);
        }
    }

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    private static void Put(double* c, TVector product) => TLanes.Store(c, TLanes.Subtract(TLanes.Load(c), product));

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    private static TVector Join(TVector byReal, TVector byImaginary, TVector signs) =>
        TLanes.MultiplyAdd(TLanes.SwapPairs(byImaginary), signs, byReal);

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    private static TVector Signs(bool conjugate) =>
        conjugate ? TLanes.SpreadPair(1.0, -1.0) : TLanes.SpreadPair(-1.0, 1.0);
}
