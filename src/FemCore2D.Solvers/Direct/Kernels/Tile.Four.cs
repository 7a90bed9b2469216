namespace FemCore2D.Solvers;

/// <content>The tiles of four columns.</content>
internal static unsafe partial class Tile<TLanes, TVector, TNumber>
{
    private static void Tile3x4(
        double* a, nint lda, double* b, nint ldb, int inner, double* c, nint ldc, int columns, bool conjugate)
    {
        int w = TLanes.Width;
        TVector x00 = TLanes.Zero, x01 = TLanes.Zero, x02 = TLanes.Zero, x03 = TLanes.Zero;
        TVector x10 = TLanes.Zero, x11 = TLanes.Zero, x12 = TLanes.Zero, x13 = TLanes.Zero;
        TVector x20 = TLanes.Zero, x21 = TLanes.Zero, x22 = TLanes.Zero, x23 = TLanes.Zero;
        for (; inner > 0; inner--, a += lda, b += ldb)
        {
            TVector a0 = TLanes.Load(a);
            TVector a1 = TLanes.Load(a + w);
            TVector a2 = TLanes.Load(a + 2 * w);
            TVector bj = TLanes.Spread(b[0]);
            x00 = TLanes.MultiplyAdd(a0, bj, x00);
            x10 = TLanes.MultiplyAdd(a1, bj, x10);
            x20 = TLanes.MultiplyAdd(a2, bj, x20);
            bj = TLanes.Spread(b[1]);
            x01 = TLanes.MultiplyAdd(a0, bj, x01);
            x11 = TLanes.MultiplyAdd(a1, bj, x11);
            x21 = TLanes.MultiplyAdd(a2, bj, x21);
            bj = TLanes.Spread(b[2]);
            x02 = TLanes.MultiplyAdd(a0, bj, x02);
            x12 = TLanes.MultiplyAdd(a1, bj, x12);
            x22 = TLanes.MultiplyAdd(a2, bj, x22);
            bj = TLanes.Spread(b[3]);
            x03 = TLanes.MultiplyAdd(a0, bj, x03);
            x13 = TLanes.MultiplyAdd(a1, bj, x13);
            x23 = TLanes.MultiplyAdd(a2, bj, x23);
        }

        if (TNumber.Doubles == 1)
        {
            Put(c, x00);
            Put(c + w, x10);
            Put(c + 2 * w, x20);
            if (columns == 1)
                return;
            c += ldc;
            Put(c, x01);
            Put(c + w, x11);
            Put(c + 2 * w, x21);
            if (columns == 2)
                return;
            c += ldc;
            Put(c, x02);
            Put(c + w, x12);
            Put(c + 2 * w, x22);
            if (columns == 3)
                return;
            c += ldc;
            Put(c, x03);
            Put(c + w, x13);
            Put(c + 2 * w, x23);
            return;
        }

        TVector signs = Signs(conjugate);
        Put(c, Join(x00, x01, signs));
        Put(c + w, Join(x10, x11, signs));
        Put(c + 2 * w, Join(x20, x21, signs));
        if (columns == 1)
            return;
        c += ldc;
        Put(c, Join(x02, x03, signs));
        Put(c + w, Join(x12, x13, signs));
        Put(c + 2 * w, Join(x22, x23, signs));
    }

    private static void Tile2x4(
        double* a, nint lda, double* b, nint ldb, int inner, double* c, nint ldc, int columns, bool conjugate)
    {
        int w = TLanes.Width;
        TVector x00 = TLanes.Zero, x01 = TLanes.Zero, x02 = TLanes.Zero, x03 = TLanes.Zero;
        TVector x10 = TLanes.Zero, x11 = TLanes.Zero, x12 = TLanes.Zero, x13 = TLanes.Zero;
        for (; inner > 0; inner--, a += lda, b += ldb)
        {
            TVector a0 = TLanes.Load(a);
            TVector a1 = TLanes.Load(a + w);
            TVector bj = TLanes.Spread(b[0]);
            x00 = TLanes.MultiplyAdd(a0, bj, x00);
            x10 = TLanes.MultiplyAdd(a1, bj, x10);
            bj = TLanes.Spread(b[1]);
            x01 = TLanes.MultiplyAdd(a0, bj, x01);
            x11 = TLanes.MultiplyAdd(a1, bj, x11);
            bj = TLanes.Spread(b[2]);
            x02 = TLanes.MultiplyAdd(a0, bj, x02);
            x12 = TLanes.MultiplyAdd(a1, bj, x12);
            bj = TLanes.Spread(b[3]);
            x03 = TLanes.MultiplyAdd(a0, bj, x03);
            x13 = TLanes.MultiplyAdd(a1, bj, x13);
        }

        if (TNumber.Doubles == 1)
        {
            Put(c, x00);
            Put(c + w, x10);
            if (columns == 1)
                return;
            c += ldc;
            Put(c, x01);
            Put(c + w, x11);
            if (columns == 2)
                return;
            c += ldc;
            Put(c, x02);
            Put(c + w, x12);
            if (columns == 3)
                return;
            c += ldc;
            Put(c, x03);
            Put(c + w, x13);
            return;
        }

        TVector signs = Signs(conjugate);
        Put(c, Join(x00, x01, signs));
        Put(c + w, Join(x10, x11, signs));
        if (columns == 1)
            return;
        c += ldc;
        Put(c, Join(x02, x03, signs));
        Put(c + w, Join(x12, x13, signs));
    }

    private static void Tile1x4(
        double* a, nint lda, double* b, nint ldb, int inner, double* c, nint ldc, int columns, bool conjugate)
    {
        int w = TLanes.Width;
        TVector x00 = TLanes.Zero, x01 = TLanes.Zero, x02 = TLanes.Zero, x03 = TLanes.Zero;
        for (; inner > 0; inner--, a += lda, b += ldb)
        {
            TVector a0 = TLanes.Load(a);
            TVector bj = TLanes.Spread(b[0]);
            x00 = TLanes.MultiplyAdd(a0, bj, x00);
            bj = TLanes.Spread(b[1]);
            x01 = TLanes.MultiplyAdd(a0, bj, x01);
            bj = TLanes.Spread(b[2]);
            x02 = TLanes.MultiplyAdd(a0, bj, x02);
            bj = TLanes.Spread(b[3]);
            x03 = TLanes.MultiplyAdd(a0, bj, x03);
        }

        if (TNumber.Doubles == 1)
        {
            Put(c, x00);
            if (columns == 1)
                return;
            c += ldc;
            Put(c, x01);
            if (columns == 2)
                return;
            c += ldc;
            Put(c, x02);
            if (columns == 3)
                return;
            c += ldc;
            Put(c, x03);
            return;
        }

        TVector signs = Signs(conjugate);
        Put(c, Join(x00, x01, signs));
        if (columns == 1)
            return;
        c += ldc;
        Put(c, Join(x02, x03, signs));
    }
}
