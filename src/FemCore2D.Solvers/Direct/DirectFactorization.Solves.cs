using FemCore2D.Sparse;

namespace FemCore2D.Solvers;

/// <content>Solves and their refinement.</content>
public sealed unsafe partial class DirectFactorization<T>
{
    private readonly Lock spacesLock = new();
    private readonly SolveSpace[] spaces;
    private int spaceCount;

    /// <inheritdoc/>
    public void Solve(ReadOnlySpan<T> rightHandSide, Span<T> solution)
    {
        MatrixChecks.RequireLengths<T>(rightHandSide, solution, Size);
        Solve(rightHandSide, solution, 1, transposed: false);
    }

    /// <summary>Solves for many right-hand sides. Safe to call from many threads with different spans.</summary>
    /// <param name="rightHandSides">The right-hand sides, one after another.</param>
    /// <param name="solutions">Receives the solutions, one after another; may be the same memory.</param>
    /// <param name="count">Their number.</param>
    /// <exception cref="ArgumentException">The spans are not <see cref="Size"/> times <paramref name="count"/> long.</exception>
    public void Solve(ReadOnlySpan<T> rightHandSides, Span<T> solutions, int count)
    {
        ArgumentOutOfRangeException.ThrowIfNegative(count);
        MatrixChecks.RequireLengths<T>(rightHandSides, solutions, checked(count * Size));
        Solve(rightHandSides, solutions, count, transposed: false);
    }

    /// <summary>Solves with the transposed matrix. Safe to call from many threads with different spans.</summary>
    /// <param name="rightHandSide">The right-hand side, <see cref="Size"/> long.</param>
    /// <param name="solution">Receives the solution; may be the same memory as <paramref name="rightHandSide"/>.</param>
    /// <exception cref="ArgumentException">A span is not <see cref="Size"/> long.</exception>
    public void SolveTransposed(ReadOnlySpan<T> rightHandSide, Span<T> solution)
    {
        MatrixChecks.RequireLengths<T>(rightHandSide, solution, Size);
        if (engine.Kind is FactorKind.General or FactorKind.Symmetric)
        {
            Solve(rightHandSide, solution, 1, transposed: true);
            return;
        }

        // The transpose of a Hermitian matrix is its conjugate.
        T[] conjugated = new T[Size];
        for (int i = 0; i < conjugated.Length; i++)
            conjugated[i] = Scalar.Conjugate(rightHandSide[i]);
        Solve(conjugated, solution, 1, transposed: false);
        foreach (ref T value in solution)
            value = Scalar.Conjugate(value);
    }

    private void Solve(ReadOnlySpan<T> rightHandSides, Span<T> solutions, int count, bool transposed)
    {
        RequireValid();
        SolveSpace space = Rent();
        try
        {
            int n = Size;
            for (int first = 0; first < count; first += FrontSolver.MostColumns)
            {
                int some = Math.Min(FrontSolver.MostColumns, count - first);
                ReadOnlySpan<T> b = rightHandSides.Slice(first * n, some * n);
                if (matrix is not null && plan.Options.RefinementSteps > 0)
                    b = space.Keep(b);
                Span<T> x = solutions.Slice(first * n, some * n);
                SolveOnce(space, b, x, some, transposed);
                if (matrix is null || plan.Options.RefinementSteps == 0)
                    continue;
                for (int k = 0; k < some; k++)
                    Refine(space, b.Slice(k * n, n), x.Slice(k * n, n), transposed);
            }
        }
        finally
        {
            Return(space);
        }
    }

    private void SolveOnce(ReadOnlySpan<T> b, Span<T> x, bool transposed)
    {
        SolveSpace space = Rent();
        SolveOnce(space, b, x, 1, transposed);
        Return(space);
    }

    /// <summary>Solves with the factors alone.</summary>
    private void SolveOnce(SolveSpace space, ReadOnlySpan<T> b, Span<T> x, int count, bool transposed)
    {
        int n = Size;
        Span<T> values = space.Permuted(count);
        int[] order = plan.Fronts.Structure.Tree.Order;
        double[]? before = transposed ? scaling?.Columns : scaling?.Rows;
        double[]? after = transposed ? scaling?.Rows : scaling?.Columns;
        for (int c = 0; c < count; c++)
        {
            ReadOnlySpan<T> from = b.Slice(c * n, n);
            Span<T> to = values.Slice(c * n, n);
            for (int k = 0; k < order.Length; k++)
                to[k] = before is null ? from[order[k]] : Scalar.Scale(from[order[k]], before[order[k]]);
        }

        fixed (T* first = values)
            space.Solver.Solve((double*)first, count, transposed);
        for (int c = 0; c < count; c++)
        {
            ReadOnlySpan<T> from = values.Slice(c * n, n);
            Span<T> to = x.Slice(c * n, n);
            for (int k = 0; k < order.Length; k++)
                to[order[k]] = after is null ? from[k] : Scalar.Scale(from[k], after[order[k]]);
        }
    }

    private void Refine(SolveSpace space, ReadOnlySpan<T> b, Span<T> x, bool transposed)
    {
        Span<T> residual = space.Residual;
        Span<T> best = space.Best;
        double size = Norm(b);
        double bestError = double.MaxValue;
        for (int step = 0; ; step++)
        {
            if (transposed && engine.Kind == FactorKind.General)
                TransposedResidual(b, x, residual);
            else
                Residual(b, x, residual);
            double error = Norm(residual) / (inspection.RowNorm * Norm(x) + size);
            if (!(error < bestError))
            {
                best.CopyTo(x);
                return;
            }

            bool slow = error > 0.5 * bestError;
            bestError = error;
            if (error <= Rounding || slow || step == plan.Options.RefinementSteps)
                return;
            x.CopyTo(best);
            SolveOnce(space, residual, residual, 1, transposed);
            for (int i = 0; i < x.Length; i++)
                x[i] += residual[i];
        }
    }

    /// <summary>Computes b - A x, or A x for an empty b.</summary>
    private void Residual(ReadOnlySpan<T> b, ReadOnlySpan<T> x, Span<T> residual)
    {
        ReadOnlySpan<int> starts = plan.Pattern.RowStarts;
        ReadOnlySpan<int> columns = plan.Pattern.Columns;
        ReadOnlySpan<T> values = matrix!.Values;
        for (int i = 0; i < residual.Length; i++)
        {
            T sum = T.Zero;
            for (int k = starts[i]; k < starts[i + 1]; k++)
                sum += values[k] * x[columns[k]];
            residual[i] = b.IsEmpty ? sum : b[i] - sum;
        }
    }

    private void TransposedResidual(ReadOnlySpan<T> b, ReadOnlySpan<T> x, Span<T> residual)
    {
        ReadOnlySpan<int> starts = plan.Pattern.RowStarts;
        ReadOnlySpan<int> columns = plan.Pattern.Columns;
        ReadOnlySpan<T> values = matrix!.Values;
        b.CopyTo(residual);
        for (int i = 0; i < residual.Length; i++)
        {
            for (int k = starts[i]; k < starts[i + 1]; k++)
                residual[columns[k]] -= values[k] * x[i];
        }
    }

    private static double Norm(ReadOnlySpan<T> x)
    {
        double largest = 0.0;
        foreach (T value in x)
            largest = Math.Max(largest, Scalar.Magnitude(value));
        return largest;
    }

    private SolveSpace Rent()
    {
        lock (spacesLock)
        {
            if (spaceCount > 0)
                return spaces[--spaceCount];
        }

        return new SolveSpace(this);
    }

    private void Return(SolveSpace space)
    {
        lock (spacesLock)
        {
            if (spaceCount < spaces.Length)
                spaces[spaceCount++] = space;
        }
    }

    /// <summary>The workspace of one solve at a time.</summary>
    private sealed class SolveSpace(DirectFactorization<T> owner)
    {
        private T[] permuted = [];
        private T[] kept = [];
        private T[]? residual;
        private T[]? best;

        public FrontSolver Solver { get; } = new(owner.plan.Fronts, owner.engine, new Crew(owner.plan.Options.Threads));

        public Span<T> Residual => residual ??= new T[owner.Size];

        public Span<T> Best => best ??= new T[owner.Size];

        public Span<T> Permuted(int count)
        {
            if (permuted.Length < count * owner.Size)
                permuted = new T[count * owner.Size];
            return permuted.AsSpan(0, count * owner.Size);
        }

        public ReadOnlySpan<T> Keep(ReadOnlySpan<T> values)
        {
            if (kept.Length < values.Length)
                kept = new T[values.Length];
            values.CopyTo(kept);
            return kept.AsSpan(0, values.Length);
        }
    }
}
