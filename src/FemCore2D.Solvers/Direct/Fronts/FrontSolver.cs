using System.Numerics;

namespace FemCore2D.Solvers;

/// <summary>
/// Solves with a factor: up the tree, where each front hands its parent what its columns take off the rows below, and
/// down again. Fronts of different subtrees are done at the same time; the sums are the same for any threads. One
/// object is the workspace of one solve at a time.
/// </summary>
internal sealed unsafe class FrontSolver
{
    /// <summary>The right-hand sides for which a panel is read once.</summary>
    public const int MostColumns = 8;

    private readonly FrontPlan plan;
    private readonly FactorStructure structure;
    private readonly FrontArithmetic arithmetic;
    private readonly FrontEngine engine;
    private FactorKind kind;
    private readonly PivotRecord pivots;
    private readonly AlignedDoubles factor;
    private readonly long sideSize;
    private readonly Crew crew;
    private readonly AlignedDoubles[] fronts;
    private readonly Crew.Work forward;
    private readonly Crew.Work backward;
    private readonly int doubles;
    private readonly int frontSize;
    private double[] updates = [];
    private double* solution;
    private int columns;
    private bool transposed;

    /// <summary>Allocates a workspace.</summary>
    public FrontSolver(FrontPlan plan, FrontEngine engine, Crew crew)
    {
        this.plan = plan;
        this.engine = engine;
        pivots = engine.Pivots;
        this.crew = crew;
        structure = plan.Structure;
        doubles = plan.Doubles;
        arithmetic = FrontArithmetic.For(doubles);
        factor = engine.Factor;
        sideSize = engine.SideSize;
        frontSize = (plan.LargestFront * doubles + 23) / 8 * 8;
        fronts = new AlignedDoubles[crew.Size];
        for (int i = 0; i < fronts.Length; i++)
            fronts[i] = new AlignedDoubles(2L * frontSize);
        forward = ForwardSubtree;
        backward = BackwardSubtree;
    }

    /// <summary>Solves in place.</summary>
    /// <param name="values">The right-hand sides in the order of the factor, one after another.</param>
    /// <param name="count">Their number.</param>
    /// <param name="transpose">Whether to solve with the transposed matrix (of a general factorization).</param>
    public void Solve(double* values, int count, bool transpose)
    {
        transposed = transpose;
        kind = engine.Kind;
        int together = Math.Clamp(Array.MaxLength / Math.Max(1, structure.Rows.Length * doubles), 1, MostColumns);
        int room = Math.Min(count, together) * structure.Rows.Length * doubles;
        if (updates.Length < room)
            updates = GC.AllocateUninitializedArray<double>(room);
        bool parallel = crew.Size > 1 && plan.FactorEntries > 200_000;
        if (parallel)
            crew.Gather();
        for (int first = 0; first < count; first += together)
        {
            solution = values + (long)first * Size;
            columns = Math.Min(together, count - first);
            Pass(parallel);
        }

        crew.Dismiss();
        solution = null;
    }

    private int Size => structure.Positions.Length * doubles;

    private void Pass(bool parallel)
    {
        if (parallel)
            crew.Run(forward, plan.Subtrees.Length);
        else
            Sequentially(forward);
        foreach (int s in plan.TopNodes)
            Forward(s, 0);
        for (int i = plan.TopNodes.Length - 1; i >= 0; i--)
            Backward(plan.TopNodes[i], 0);
        if (parallel)
            crew.Run(backward, plan.Subtrees.Length);
        else
            Sequentially(backward);
    }

    private void Sequentially(Crew.Work work)
    {
        for (int piece = 0; piece < plan.Subtrees.Length; piece++)
            work(piece, 0);
    }

    private void ForwardSubtree(int piece, int place)
    {
        (int first, int root) = plan.Subtrees[piece];
        for (int s = first; s <= root; s++)
            Forward(s, place);
    }

    private void BackwardSubtree(int piece, int place)
    {
        (int first, int root) = plan.Subtrees[piece];
        for (int s = root; s >= first; s--)
            Backward(s, place);
    }

    private void Forward(int s, int place)
    {
        double* f = fronts[place].Pointer;
        int first = structure.Tree.Starts[s];
        int width = structure.Width(s);
        int below = structure.BelowCount(s);
        double* panel = factor.Pointer + plan.PanelStarts[s];
        bool upper = kind == FactorKind.General && transposed;
        if (upper)
            panel += sideSize;
        bool unit = kind is FactorKind.Symmetric or FactorKind.Hermitian || (kind == FactorKind.General && !transposed);
        for (int c = 0; c < columns; c++)
        {
            double* x = solution + (long)c * Size + (long)first * doubles;
            new ReadOnlySpan<double>(x, width * doubles).CopyTo(new Span<double>(f, width * doubles));
            new Span<double>(f + width * doubles, below * doubles).Clear();
            for (int i = plan.ChildStarts[s]; i < plan.ChildStarts[s + 1]; i++)
                AddChild(f, plan.Children[i], c);
            if (kind != FactorKind.Cholesky && !upper)
                Permute(f, f + frontSize, first, width, inverse: false);
            arithmetic.Forward(panel, plan.Strides[s], width, width + below, unit, f);
            if (pivots.OffDiagonals.Length > 0)
                DivideByDiagonal(panel, plan.Strides[s], first, width, f);
            new ReadOnlySpan<double>(f, width * doubles).CopyTo(new Span<double>(x, width * doubles));
            new ReadOnlySpan<double>(f + width * doubles, below * doubles).CopyTo(UpdateOf(s, c));
        }
    }

    private void Backward(int s, int place)
    {
        double* f = fronts[place].Pointer;
        int first = structure.Tree.Starts[s];
        int width = structure.Width(s);
        ReadOnlySpan<int> rows = structure.Below(s);
        double* panel = factor.Pointer + plan.PanelStarts[s];
        bool upper = kind == FactorKind.General && !transposed;
        if (upper)
            panel += sideSize;
        bool unit = kind is FactorKind.Symmetric or FactorKind.Hermitian || (kind == FactorKind.General && transposed);
        bool conjugate = kind is FactorKind.Cholesky or FactorKind.Hermitian;
        for (int c = 0; c < columns; c++)
        {
            double* whole = solution + (long)c * Size;
            double* x = whole + (long)first * doubles;
            new ReadOnlySpan<double>(x, width * doubles).CopyTo(new Span<double>(f, width * doubles));
            double* target = f + width * doubles;
            if (doubles == 1)
            {
                for (int i = 0; i < rows.Length; i++)
                    target[i] = whole[rows[i]];
            }
            else
            {
                for (int i = 0; i < rows.Length; i++)
                    ((Complex*)target)[i] = ((Complex*)whole)[rows[i]];
            }

            arithmetic.Backward(panel, plan.Strides[s], width, width + rows.Length, unit, conjugate, f);
            if (kind != FactorKind.Cholesky && !upper)
                Permute(f, f + frontSize, first, width, inverse: true);
            new ReadOnlySpan<double>(f, width * doubles).CopyTo(new Span<double>(x, width * doubles));
        }
    }

    private Span<double> UpdateOf(int s, int column)
    {
        long start = ((long)column * structure.Rows.Length + structure.RowStarts[s]) * doubles;
        return updates.AsSpan((int)start, structure.BelowCount(s) * doubles);
    }

    private void AddChild(double* f, int child, int column)
    {
        ReadOnlySpan<double> update = UpdateOf(child, column);
        ReadOnlySpan<int> places = structure.ParentPlaces.AsSpan(
            (int)structure.RowStarts[child], structure.BelowCount(child));
        if (doubles == 1)
        {
            for (int i = 0; i < places.Length; i++)
                f[places[i]] += update[i];
            return;
        }

        for (int i = 0; i < places.Length; i++)
        {
            f[2 * places[i]] += update[2 * i];
            f[2 * places[i] + 1] += update[2 * i + 1];
        }
    }

    private void Permute(double* f, double* copy, int first, int width, bool inverse)
    {
        new ReadOnlySpan<double>(f, width * doubles).CopyTo(new Span<double>(copy, width * doubles));
        for (int k = 0; k < width; k++)
        {
            int from = inverse ? k : pivots.Order[first + k];
            int to = inverse ? pivots.Order[first + k] : k;
            for (int i = 0; i < doubles; i++)
                f[to * doubles + i] = copy[from * doubles + i];
        }
    }

    private void DivideByDiagonal(double* panel, nint ld, int first, int width, double* f)
    {
        if (doubles == 1)
            PivotBlock<double>.Divide(panel, ld, pivots.OffDiagonals.AsSpan(first, width), f, false);
        else
            PivotBlock<Complex>.Divide(panel, ld, pivots.OffDiagonals.AsSpan(2 * first, 2 * width), f, kind == FactorKind.Hermitian);
    }
}
