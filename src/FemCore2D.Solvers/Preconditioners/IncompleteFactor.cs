using System.Numerics;
using System.Runtime.CompilerServices;
using FemCore2D.Sparse;

namespace FemCore2D.Solvers;

/// <summary>
/// The incomplete factors of a Hermitian matrix as <c>S^-1 L L^H S^-1</c> with a unit lower triangle L that keeps the
/// zeros of the matrix, and a positive diagonal S. Rows follow the order of elimination; columns are named by unknowns.
/// </summary>
/// <remarks>
/// The factors are computed in double precision and stored in single: they pass through memory at each iteration, and
/// what is rounded away is far less than what is left out by being incomplete. The product stays Hermitian and
/// positive definite, since any unit triangle and any positive diagonal give such a one. With the pivots in the outer
/// diagonal, each step of a triangular solve is a single fused operation behind the one before.
/// </remarks>
internal sealed class IncompleteFactor<T>
    where T : unmanaged, INumberBase<T>
{
    private IncompleteFactor(ChunkedOrder order, int[] starts, int[] columns, double[] scale, double shift)
    {
        Order = order;
        Starts = starts;
        Columns = columns;
        Scale = scale;
        Shift = shift;
        Lower = new float[Width * (long)columns.Length];
    }

    /// <summary>The number of floats that make one number.</summary>
    public static int Width => Scalar.IsComplex<T>() ? 2 : 1;

    /// <summary>The order of elimination.</summary>
    public ChunkedOrder Order { get; }

    /// <summary>For each place in the order the first entry of its row of L.</summary>
    public int[] Starts { get; }

    /// <summary>The unknown of each entry of L, in the order of elimination within a row.</summary>
    public int[] Columns { get; }

    /// <summary>The entries of L without its unit diagonal.</summary>
    public float[] Lower { get; }

    /// <summary>For each unknown the entry of S.</summary>
    public double[] Scale { get; }

    /// <summary>The multiple of the diagonal that was added to keep the pivots positive.</summary>
    public double Shift { get; }

    /// <summary>Factorizes with the smallest shift, from the one given on, that keeps all pivots positive.</summary>
    public static IncompleteFactor<T> Create(
        SparseMatrix<T> matrix, ChunkedOrder order, double shift, int threads, CancellationToken cancellationToken)
    {
        const double FirstShift = 1e-3;
        const double Growth = 2;
        const double LargestShift = 1e4;
        double[] scale = ScaleOf(matrix);
        (int[] starts, int[] columns) = LowerPattern(matrix.Pattern, order);
        FactorWork work = new(matrix, order, starts, columns, scale, cancellationToken);
        ThreadTeam team = new(threads);
        while (!work.TryFactorize(team, shift))
        {
            cancellationToken.ThrowIfCancellationRequested();
            if (shift > LargestShift)
            {
                int unknown = work.FirstFailure(shift);
                throw new NotPositiveDefiniteException(
                    $"The entries beside the diagonal at unknown {unknown} are far larger than those on it; a positive "
                    + "definite matrix has none such. Check what acts on this unknown, or use a solver for indefinite "
                    + "matrices.",
                    unknown);
            }

            shift = shift == 0 ? FirstShift : shift * Growth;
        }

        cancellationToken.ThrowIfCancellationRequested();
        IncompleteFactor<T> factor = new(order, starts, columns, scale, shift);
        work.Pack(factor);
        return factor;
    }

    /// <summary>An entry of L.</summary>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static unsafe T Load(float* lower, nint position)
    {
        if (typeof(T) == typeof(Complex))
        {
            return Scalar.Create<T>(lower[2 * position], lower[(2 * position) + 1]);
        }

        return Scalar.Create<T>(lower[position]);
    }

    private static double[] ScaleOf(SparseMatrix<T> matrix)
    {
        double[] scale = new double[matrix.RowCount];
        for (int i = 0; i < scale.Length; i++)
        {
            T entry = matrix[i, i];
            double diagonal = Scalar.Real(entry);
            scale[i] = 1 / Math.Sqrt(diagonal);
            if (!(diagonal > 0) || !double.IsFinite(scale[i]))
            {
                throw new NotPositiveDefiniteException(
                    $"The diagonal entry of unknown {i} is {entry}, but a positive definite matrix has positive ones. "
                    + "Check what acts on this unknown, or use a solver for indefinite matrices.",
                    i);
            }
        }

        return scale;
    }

    private static (int[] Starts, int[] Columns) LowerPattern(SparsePattern pattern, ChunkedOrder order)
    {
        int size = pattern.RowCount;
        int firstSeparator = order.ChunkStarts[^1];
        int[] starts = new int[size + 1];
        for (int place = 0; place < size; place++)
        {
            int count = 0;
            foreach (int column in pattern.ColumnsOf(order.Order[place]))
            {
                count += order.Rank[column] < place ? 1 : 0;
            }

            starts[place + 1] = starts[place] + count;
        }

        int[] columns = new int[starts[^1]];
        for (int place = 0; place < size; place++)
        {
            int next = starts[place];
            ReadOnlySpan<int> row = pattern.ColumnsOf(order.Order[place]);
            foreach (int column in row)
            {
                if (order.Rank[column] < Math.Min(place, firstSeparator))
                {
                    columns[next++] = column;
                }
            }

            // Separators are eliminated after all chunks.
            foreach (int column in row)
            {
                if (order.Rank[column] >= firstSeparator && order.Rank[column] < place)
                {
                    columns[next++] = column;
                }
            }
        }

        return (starts, columns);
    }

    /// <summary>The numeric factorization, in double precision, chunk by chunk.</summary>
    private sealed class FactorWork(
        SparseMatrix<T> matrix,
        ChunkedOrder order,
        int[] starts,
        int[] columns,
        double[] scale,
        CancellationToken cancellationToken) : IBlockWork
    {
        /// <summary>A pivot below this, where the diagonal is one, is taken for a breakdown.</summary>
        private const double LeastPivot = 1e-10;

        private readonly T[] lower = new T[columns.Length];
        private readonly double[] pivots = new double[scale.Length];

        // The row at hand, spread over all unknowns. Chunks touch disjoint parts of it.
        private readonly T[] spread = new T[scale.Length];
        private volatile bool failed;
        private double diagonal;
        private int failedUnknown;

        public bool TryFactorize(ThreadTeam team, double shift)
        {
            failed = false;
            diagonal = 1 + shift;
            team.Run(this, order.ChunkCount);
            Rows(order.ChunkStarts[^1], scale.Length);
            return !failed;
        }

        /// <summary>The first unknown in the order whose pivot fails with a shift that is known to fail.</summary>
        public int FirstFailure(double shift)
        {
            TryFactorize(new ThreadTeam(1), shift);
            return failedUnknown;
        }

        public void Run(int block) => Rows(order.ChunkStarts[block], order.ChunkStarts[block + 1]);

        /// <summary>Brings the factors into their final form; the pivots go into the outer diagonal.</summary>
        public void Pack(IncompleteFactor<T> factor)
        {
            for (int place = 0; place < pivots.Length; place++)
            {
                pivots[place] = Math.Sqrt(pivots[place]);
                factor.Scale[order.Order[place]] /= pivots[place];
                for (int k = starts[place]; k < starts[place + 1]; k++)
                {
                    T entry = Scalar.Scale(lower[k], pivots[order.Rank[columns[k]]] / pivots[place]);
                    factor.Lower[k * (long)Width] = (float)Scalar.Real(entry);
                    if (Scalar.IsComplex<T>())
                    {
                        factor.Lower[(k * (long)Width) + 1] = (float)Scalar.Imaginary(entry);
                    }
                }
            }
        }

        private void Rows(int first, int end)
        {
            const int CheckEvery = 4096;
            for (int place = first; place < end && !failed; place++)
            {
                if (place % CheckEvery == 0 && cancellationToken.IsCancellationRequested)
                {
                    failed = true;
                    return;
                }

                Row(place);
            }
        }

        private void Row(int place)
        {
            int unknown = order.Order[place];
            ReadOnlySpan<int> stored = matrix.Pattern.ColumnsOf(unknown);
            ReadOnlySpan<T> entries = matrix.Values.Slice(matrix.Pattern.RowStarts[unknown], stored.Length);
            for (int k = 0; k < stored.Length; k++)
            {
                if (order.Rank[stored[k]] < place)
                {
                    spread[stored[k]] = Scalar.Scale(Scalar.Scale(entries[k], scale[unknown]), scale[stored[k]]);
                }
            }

            double pivot = diagonal;
            for (int k = starts[place]; k < starts[place + 1]; k++)
            {
                int before = order.Rank[columns[k]];
                T sum = spread[columns[k]];
                for (int j = starts[before]; j < starts[before + 1]; j++)
                {
                    sum -= spread[columns[j]] * Scalar.Conjugate(lower[j]);
                }

                // Kept times its pivot in the spread row, and divided by it in L.
                spread[columns[k]] = sum;
                lower[k] = Scalar.Scale(sum, 1 / pivots[before]);
                pivot -= Scalar.MagnitudeSquared(sum) / pivots[before];
            }

            for (int k = starts[place]; k < starts[place + 1]; k++)
            {
                spread[columns[k]] = T.Zero;
            }

            pivots[place] = pivot;
            if (!(pivot > LeastPivot))
            {
                failedUnknown = unknown;
                failed = true;
            }
        }
    }
}
