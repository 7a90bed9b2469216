using System.Numerics;
using System.Runtime.CompilerServices;
using System.Runtime.InteropServices;

namespace FemCore2D.Solvers;

/// <content>Pivoting in corner blocks, and division by the block diagonal.</content>
internal sealed unsafe partial class FrontKernels<TLanes, TVector, TNumber>
{
    /// <inheritdoc/>
    public override int SymmetricCorner(
        double* p, double* q, nint ld, int n, int rows, bool hermitian, double least,
        Span<int> order, Span<double> offDiagonals, ref int firstPerturbed) => TNumber.Doubles == 1
        ? PivotBlock<double>.Symmetric(
            p, q, ld, n, rows, hermitian, least, order, offDiagonals, ref firstPerturbed)
        : PivotBlock<Complex>.Symmetric(
            p, q, ld, n, rows / 2, hermitian, least, order, MemoryMarshal.Cast<double, Complex>(offDiagonals),
            ref firstPerturbed);

    /// <inheritdoc/>
    public override int GeneralCorner(
        double* p, double* q, nint ld, int n, int rows, double least, Span<int> order, ref int firstPerturbed) =>
        TNumber.Doubles == 1
            ? PivotBlock<double>.General(p, q, ld, n, rows, least, order, ref firstPerturbed)
            : PivotBlock<Complex>.General(p, q, ld, n, rows / 2, least, order, ref firstPerturbed);

    /// <inheritdoc/>
    public override void DivideRows(
        double* p, double* q, nint ld, int n, int rows, double* corner, ReadOnlySpan<double> offDiagonals, bool hermitian)
    {
        int w = TLanes.Width;
        for (int k = 0; k < n; k++)
        {
            Complex a = Entry(corner + k * ld, k);
            Complex b = TNumber.Doubles == 1
                ? offDiagonals[k]
                : new Complex(offDiagonals[2 * k], offDiagonals[2 * k + 1]);
            double* p1 = p + k * ld;
            double* q1 = q + k * ld;
            if (b == Complex.Zero)
            {
                Complex inverse = 1.0 / a;
                for (int i = 0; i < rows; i += w)
                {
                    TVector x = TLanes.Load(p1 + i);
                    TLanes.Store(q1 + i, x);
                    TLanes.Store(p1 + i, Times(x, inverse));
                }

                continue;
            }

            Complex e = Entry(corner + (k + 1) * ld, k + 1);
            Complex c = hermitian ? Complex.Conjugate(b) : b;

            // The inverse of [a c; b e], scaled by its dominant entries.
            Complex scaled = (a / c) * (e / b) - 1.0;
            Complex toFirst1 = e / b / c / scaled;
            Complex toFirst2 = -1.0 / c / scaled;
            Complex toSecond1 = -1.0 / b / scaled;
            Complex toSecond2 = a / b / c / scaled;
            double* p2 = p1 + ld;
            double* q2 = q1 + ld;
            for (int i = 0; i < rows; i += w)
            {
                TVector x = TLanes.Load(p1 + i);
                TVector y = TLanes.Load(p2 + i);
                TLanes.Store(q1 + i, x);
                TLanes.Store(q2 + i, y);
                TLanes.Store(p1 + i, TLanes.Add(Times(x, toFirst1), Times(y, toFirst2)));
                TLanes.Store(p2 + i, TLanes.Add(Times(x, toSecond1), Times(y, toSecond2)));
            }

            k++;
        }
    }

    private static Complex Entry(double* column, int row) =>
        TNumber.Doubles == 1 ? column[row] : new Complex(column[2 * row], column[2 * row + 1]);

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    private static TVector Times(TVector x, Complex factor)
    {
        TVector straight = TLanes.Multiply(x, TLanes.Spread(factor.Real));
        return TNumber.Doubles == 1
            ? straight
            : TLanes.MultiplyAdd(TLanes.SwapPairs(x), TLanes.SpreadPair(-factor.Imaginary, factor.Imaginary), straight);
    }
}
