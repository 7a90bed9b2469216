namespace FemCore2D.Solvers;

/// <content>The corner block of a general matrix.</content>
internal static unsafe partial class PivotBlock<T>
{
    /// <summary>Factorizes the corner block into L and U, with exchanges of its own rows.</summary>
    /// <param name="p">The lower side: rows from the diagonal down; receives L.</param>
    /// <param name="q">The upper side, transposed; receives U with its diagonal.</param>
    /// <param name="ld">The distance of columns in doubles.</param>
    /// <param name="n">The columns.</param>
    /// <param name="m">The rows that come along, at least <paramref name="n"/>.</param>
    /// <param name="least">The size that a pivot is raised to.</param>
    /// <param name="order">Receives the row taken at each place.</param>
    /// <param name="firstPerturbed">Receives the first row whose pivot was raised, or stays as it is.</param>
    /// <returns>The number of pivots that were raised.</returns>
    public static int General(
        double* p, double* q, nint ld, int n, int m, double least, Span<int> order, ref int firstPerturbed)
    {
        const int Stride = FrontArithmetic.BlockWidth + 8;
        T* a = stackalloc T[Stride * Stride];
        for (int j = 0; j < n; j++)
        {
            T* lower = (T*)(p + j * ld);
            T* upper = (T*)(q + j * ld);
            for (int i = j; i < m; i++)
                a[j * Stride + i] = lower[i];
            for (int i = j + 1; i < m; i++)
                a[i * Stride + j] = upper[i];
            order[j] = j;
        }

        int raised = 0;
        for (int k = 0; k < n; k++)
        {
            T* column = a + k * Stride;
            int r = k;
            double largest = Size(column[k]);
            for (int i = k + 1; i < n; i++)
            {
                double size = Size(column[i]);
                if (size > largest)
                {
                    largest = size;
                    r = i;
                }
            }

            if (r != k)
            {
                (order[k], order[r]) = (order[r], order[k]);
                for (int j = 0; j < m; j++)
                    (a[j * Stride + k], a[j * Stride + r]) = (a[j * Stride + r], a[j * Stride + k]);
            }

            if (!(largest >= least))
            {
                if (raised++ == 0)
                    firstPerturbed = Math.Min(firstPerturbed, order[k]);
                column[k] = T.CreateChecked(T.IsNegative(column[k]) && T.IsRealNumber(column[k]) ? -least : least);
            }

            T inverse = T.One / column[k];
            for (int i = k + 1; i < m; i++)
                column[i] *= inverse;
            for (int j = k + 1; j < m; j++)
            {
                T* target = a + j * Stride;
                T factor = target[k];
                int end = j < n ? m : n;
                for (int i = k + 1; i < end; i++)
                    target[i] -= column[i] * factor;
            }
        }

        for (int j = 0; j < n; j++)
        {
            T* lower = (T*)(p + j * ld);
            T* upper = (T*)(q + j * ld);
            for (int i = j + 1; i < m; i++)
                lower[i] = a[j * Stride + i];
            for (int i = j; i < m; i++)
                upper[i] = a[i * Stride + j];
            lower[j] = T.One;
        }

        return raised;
    }
}
