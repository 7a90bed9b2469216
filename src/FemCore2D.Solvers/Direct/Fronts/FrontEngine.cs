namespace FemCore2D.Solvers;

/// <summary>
/// Computes a factor front by front: assembles the entries of the matrix and the updates of the children, eliminates
/// the front's own columns, and leaves the update for the parent. The memory is allocated once and used for every
/// matrix of the pattern.
/// </summary>
/// <remarks>
/// I. S. Duff and J. K. Reid (1983), <em>The multifrontal solution of indefinite sparse symmetric linear equations</em>.
/// Children are assembled in ascending order and every product is cut by sizes alone, so that the bits of the factor do
/// not depend on the threads.
/// </remarks>
internal sealed unsafe partial class FrontEngine
{
    private readonly FrontPlan plan;
    private readonly FactorStructure structure;
    private readonly EntryMap map;
    private readonly FrontArithmetic arithmetic;
    private FactorKind kind;
    private readonly Crew crew;
    private readonly FrontPlace[] places;
    private readonly AlignedDoubles arena;
    private readonly int doubles;
    private readonly long sideSize;
    private readonly Crew.Work subtreeWork;
    private double* values;
    private CancellationToken cancellationToken;
    private readonly IProgress<double>? progress;
    private int failedColumn;
    private int raisedPivots;
    private int firstRaised;
    private long doneWork;
    private int reportedPercent;

    /// <summary>Allocates the memory of a factorization.</summary>
    public FrontEngine(FrontPlan plan, EntryMap map, FactorKind kind, Crew crew, IProgress<double>? progress = null)
    {
        this.progress = progress;
        Pivots = new PivotRecord(plan.Structure.Positions.Length, plan.Doubles, kind);
        this.plan = plan;
        this.map = map;
        this.kind = kind;
        this.crew = crew;
        structure = plan.Structure;
        doubles = plan.Doubles;
        arithmetic = FrontArithmetic.For(doubles);
        sideSize = plan.PanelStarts[^1] + Slack;
        Factor = new AlignedDoubles(plan.Sides * sideSize);
        arena = new AlignedDoubles(plan.ArenaSize + Slack);
        places = new FrontPlace[crew.Size];
        for (int i = 0; i < places.Length; i++)
            places[i] = new FrontPlace(plan, kind);
        subtreeWork = FactorizeSubtree;
        top = new TopFront(this);
    }

    /// <summary>Doubles beyond a block that may be read, though never used.</summary>
    internal static int Slack => 64;

    /// <summary>The panels of the factor; the second side follows the first.</summary>
    public AlignedDoubles Factor { get; }

    /// <summary>The doubles between the two sides of the factor.</summary>
    public long SideSize => sideSize;

    /// <summary>Which product of triangles is computed; symmetric and Hermitian ones share their memory.</summary>
    public FactorKind Kind
    {
        get => kind;
        set => kind = value;
    }

    /// <summary>What the pivoting has done.</summary>
    public PivotRecord Pivots { get; }

    /// <summary>The diagonal of the matrix that a Cholesky factorization starts from.</summary>
    public double[] Diagonals { get; set; } = [];

    /// <summary>
    /// The size that a pivot is raised to, where it is smaller; for Cholesky the share of the diagonal at which it fails.
    /// </summary>
    public double LeastPivot { get; set; }

    /// <summary>The number of pivots that were raised.</summary>
    public int RaisedPivots => raisedPivots;

    /// <summary>The first column whose pivot was raised, or -1.</summary>
    public int FirstRaised => firstRaised == int.MaxValue ? -1 : firstRaised;

    /// <summary>Computes the factor.</summary>
    /// <param name="matrixValues">The values of the matrix.</param>
    /// <param name="cancellation">Stops the work.</param>
    /// <returns>-1, or the first column whose pivot failed.</returns>
    public int Run(double* matrixValues, CancellationToken cancellation)
    {
        values = matrixValues;
        cancellationToken = cancellation;
        failedColumn = int.MaxValue;
        firstRaised = int.MaxValue;
        raisedPivots = 0;
        doneWork = 0;
        reportedPercent = 0;
        crew.Gather();
        try
        {
            crew.Run(subtreeWork, plan.Subtrees.Length);
            foreach (int s in plan.TopNodes)
            {
                if (failedColumn != int.MaxValue)
                    break;
                cancellationToken.ThrowIfCancellationRequested();
                top.Factorize(s);
                Report(s);
            }
        }
        finally
        {
            crew.Dismiss();
            values = null;
        }

        return failedColumn == int.MaxValue ? -1 : failedColumn;
    }

    private void FactorizeSubtree(int piece, int placeNumber)
    {
        FrontPlace place = places[placeNumber];
        (int first, int root) = plan.Subtrees[piece];
        for (int s = first; s <= root; s++)
        {
            cancellationToken.ThrowIfCancellationRequested();
            if (!FactorizeFront(s, s == root, place))
                return;
            Report(s);
        }
    }

    /// <summary>Tells the share of the work that is done, whenever another hundredth is.</summary>
    private void Report(int s)
    {
        if (progress is null)
            return;
        long work = Interlocked.Add(ref doneWork, plan.Work[s]);
        int percent = (int)(100.0 * work / plan.TotalWork);
        int seen = Volatile.Read(ref reportedPercent);
        if (percent > seen && Interlocked.CompareExchange(ref reportedPercent, percent, seen) == seen)
            progress.Report(percent / 100.0);
    }

    private bool FactorizeFront(int s, bool isRoot, FrontPlace place)
    {
        int width = structure.Width(s);
        int below = structure.BelowCount(s);
        double* panel = Panel(s);
        double* update = (isRoot ? arena.Pointer : place.Workspace.Pointer) + plan.UpdateStarts[s];
        Clear(s, panel, update, 0, width, 0, below);
        Scatter(s, panel, 0, width);
        for (int i = plan.ChildStarts[s]; i < plan.ChildStarts[s + 1]; i++)
        {
            int child = plan.Children[i];
            FindRuns(child, place.RunEnds);
            AddChild(s, panel, update, child, place.Workspace.Pointer + plan.UpdateStarts[child], place.RunEnds, 0,
                structure.BelowCount(child));
        }

        int ld = plan.Strides[s];
        double* second = SecondPanel(panel, place.SecondPanel);
        for (int b = 0; b < width; b += FrontArithmetic.BlockWidth)
        {
            int n = Math.Min(FrontArithmetic.BlockWidth, width - b);
            UpdateBlock(panel, second, ld, b, n, b * doubles, ld, place.Scratch);
            if (!FactorizeBlock(s, panel, second, ld, b, n))
                return false;
            SolveBlock(s, panel, second, ld, b, n, EndOfCorner(b + n), ld);
        }

        if (below == 0)
            return true;
        int ldu = plan.UpdateStrides[s];
        for (int c = 0; c < below; c += arithmetic.TileColumns)
        {
            for (int r = c * doubles; r < ldu; r += FrontArithmetic.TileRows)
                UpdateTile(s, panel, second, update, r, c, place.Scratch);
        }

        return true;
    }

    private double* Panel(int s) => Factor.Pointer + plan.PanelStarts[s];

    /// <summary>The other factor of all products: the same panel, the panel times D, or the transposed upper side.</summary>
    private double* SecondPanel(double* panel, double* workspace) => kind switch
    {
        FactorKind.Cholesky => panel,
        FactorKind.General => panel + sideSize,
        _ => workspace,
    };

    /// <summary>The first row in doubles that does not share a group of eight with the corner block.</summary>
    private int EndOfCorner(int row) => (row * doubles + 7) / 8 * 8;

    private void Clear(int s, double* panel, double* update, int fromColumn, int toColumn, int fromUpdate, int toUpdate)
    {
        long ld = plan.Strides[s];
        long ldu = plan.UpdateStrides[s];
        for (int side = 0; side < plan.Sides; side++)
        {
            double* p = panel + side * sideSize;
            new Span<double>(p + fromColumn * ld, checked((int)((toColumn - fromColumn) * ld))).Clear();
            double* u = update + side * plan.UpdateSize(s);
            for (int j = fromUpdate; j < toUpdate; j++)
            {
                int start = j * doubles / 8 * 8;
                new Span<double>(u + j * ldu + start, (int)ldu - start).Clear();
            }
        }
    }

    private void Scatter(int s, double* panel, int from, int to)
    {
        int first = structure.Tree.Starts[s];
        int ld = plan.Strides[s];
        double* target = kind == FactorKind.General ? panel + sideSize : panel;
        bool conjugate = doubles == 2 && kind is FactorKind.Cholesky or FactorKind.Hermitian;
        ReadOnlySpan<int> rowStarts = map.RowStarts;
        int[] targets = map.Places;
        for (int c = from; c < to; c++)
        {
            double* column = target + (long)c * ld;
            int v = structure.Tree.Order[first + c];
            for (int k = rowStarts[v]; k < rowStarts[v + 1]; k++)
            {
                int place = targets[k];
                if (place < 0)
                    continue;
                if (doubles == 1)
                {
                    column[place] += values[k];
                    continue;
                }

                column[2 * place] += values[2 * (long)k];
                column[2 * place + 1] += conjugate ? -values[2 * (long)k + 1] : values[2 * (long)k + 1];
            }

            if (kind == FactorKind.General)
                ScatterColumn(panel + (long)c * ld, v);
        }
    }

    private void ScatterColumn(double* column, int v)
    {
        for (int k = map.SourceStarts[v]; k < map.SourceStarts[v + 1]; k++)
        {
            int place = map.SourcePlaces[k];
            if (place < 0)
                continue;
            double* source = values + (long)doubles * map.Sources[k];
            for (int i = 0; i < doubles; i++)
                column[doubles * place + i] += source[i];
        }
    }

    private void FindRuns(int child, int[] runEnds)
    {
        ReadOnlySpan<int> places = structure.ParentPlaces.AsSpan(
            (int)structure.RowStarts[child], structure.BelowCount(child));
        int end = places.Length;
        for (int i = places.Length - 1; i >= 0; i--)
        {
            runEnds[i] = end;
            if (i > 0 && places[i - 1] != places[i] - 1)
                end = i;
        }
    }

    private void AddChild(int s, double* panel, double* update, int child, double* childUpdate, int[] runEnds, int from, int to)
    {
        int count = structure.BelowCount(child);
        if (count == 0)
            return;
        int width = structure.Width(s);
        fixed (int* rows = &structure.ParentPlaces[structure.RowStarts[child]])
        fixed (int* ends = runEnds)
        {
            for (int side = 0; side < plan.Sides; side++)
            {
                arithmetic.AddUpdate(
                    panel + side * sideSize, plan.Strides[s], width,
                    update + side * plan.UpdateSize(s), plan.UpdateStrides[s],
                    rows, ends, count,
                    childUpdate + side * plan.UpdateSize(child), plan.UpdateStrides[child], from, to);
            }
        }
    }

    /// <summary>Brings some rows of a block of columns up to date with the columns left of it.</summary>
    private void UpdateBlock(double* p, double* q, nint ld, int b, int n, int fromRow, int toRow, double* scratch)
    {
        if (b == 0)
            return;
        bool conjugate = kind is FactorKind.Cholesky or FactorKind.Hermitian;
        arithmetic.Product(
            p + fromRow, ld, q + b * doubles, ld, b, p + fromRow + b * ld, ld, toRow - fromRow, n,
            false, 0, conjugate, scratch);
        if (kind == FactorKind.General)
        {
            arithmetic.Product(
                q + fromRow, ld, p + b * doubles, ld, b, q + fromRow + b * ld, ld, toRow - fromRow, n,
                false, 0, false, scratch);
        }
    }

    private bool FactorizeBlock(int s, double* p, double* q, nint ld, int b, int n)
    {
        int rows = EndOfCorner(b + n) - b * doubles;
        int first = structure.Tree.Starts[s] + b;
        double* corner = p + b * doubles + b * ld;
        if (kind == FactorKind.Cholesky)
        {
            int failed = arithmetic.Cholesky(corner, ld, n, rows);
            if (failed < 0)
                failed = FindNegligible(corner, ld, n, first);
            if (failed >= 0)
                Fail(first + failed);
            return failed < 0;
        }

        double* second = q + b * doubles + b * ld;
        Span<int> order = Pivots.Order.AsSpan(first, n);
        int perturbed = int.MaxValue;
        int raised = kind == FactorKind.General
            ? arithmetic.GeneralCorner(corner, second, ld, n, rows, LeastPivot, order, ref perturbed)
            : arithmetic.SymmetricCorner(
                corner, second, ld, n, rows, kind == FactorKind.Hermitian, LeastPivot, order,
                Pivots.OffDiagonals.AsSpan(first * doubles, n * doubles), ref perturbed);
        if (raised > 0)
        {
            Interlocked.Add(ref raisedPivots, raised);
            Lower(ref firstRaised, first + perturbed);
        }

        MoveRows(p, ld, b, order);
        int end = EndOfCorner(b + n);
        MoveColumns((kind == FactorKind.General ? q : p) + end + b * ld, ld, (int)ld - end, order);
        foreach (ref int place in order)
            place += b;
        return true;
    }

    /// <summary>Finds a pivot that is nothing but the rounding of the entries it came from, or -1.</summary>
    private int FindNegligible(double* corner, nint ld, int n, int first)
    {
        for (int k = 0; k < n; k++)
        {
            double root = corner[k * doubles + k * ld];
            if (root * root <= LeastPivot * Diagonals[structure.Tree.Order[first + k]])
                return k;
        }

        return -1;
    }

    /// <summary>Puts the rows of a block left of its corner into the order of the pivots.</summary>
    private void MoveRows(double* p, nint ld, int b, ReadOnlySpan<int> order)
    {
        if (b == 0 || IsAscending(order))
            return;
        double* copy = stackalloc double[2 * FrontArithmetic.BlockWidth];
        for (int j = 0; j < b; j++)
        {
            double* column = p + b * doubles + j * ld;
            new ReadOnlySpan<double>(column, order.Length * doubles)
                .CopyTo(new Span<double>(copy, order.Length * doubles));
            for (int k = 0; k < order.Length; k++)
            {
                for (int i = 0; i < doubles; i++)
                    column[k * doubles + i] = copy[order[k] * doubles + i];
            }
        }
    }

    /// <summary>Puts the columns of a block below its corner into the order of the pivots.</summary>
    private static void MoveColumns(double* p, nint ld, int rows, ReadOnlySpan<int> order)
    {
        if (rows == 0 || IsAscending(order))
            return;
        Span<int> held = stackalloc int[FrontArithmetic.BlockWidth];
        for (int k = 0; k < order.Length; k++)
            held[k] = k;
        for (int k = 0; k < order.Length; k++)
        {
            int from = held[k..order.Length].IndexOf(order[k]) + k;
            if (from == k)
                continue;
            (held[k], held[from]) = (held[from], held[k]);
            double* a = p + k * ld;
            double* c = p + from * ld;
            for (int i = 0; i < rows; i++)
                (a[i], c[i]) = (c[i], a[i]);
        }
    }

    private static bool IsAscending(ReadOnlySpan<int> order)
    {
        for (int k = 0; k < order.Length; k++)
        {
            if (order[k] != k)
                return false;
        }

        return true;
    }

    /// <summary>Solves some rows below the corner of a block.</summary>
    private void SolveBlock(int s, double* p, double* q, nint ld, int b, int n, int fromRow, int toRow)
    {
        int rows = toRow - fromRow;
        if (rows <= 0)
            return;
        double* lower = p + b * doubles + b * ld;
        double* x = p + fromRow + b * ld;
        switch (kind)
        {
            case FactorKind.Cholesky:
                arithmetic.SolveRows(x, ld, rows, lower, ld, n, unit: false, conjugate: true);
                break;
            case FactorKind.General:
                arithmetic.SolveRows(x, ld, rows, q + b * doubles + b * ld, ld, n, unit: false, conjugate: false);
                arithmetic.SolveRows(q + fromRow + b * ld, ld, rows, lower, ld, n, unit: true, conjugate: false);
                break;
            default:
                bool hermitian = kind == FactorKind.Hermitian;
                int first = (structure.Tree.Starts[s] + b) * doubles;
                arithmetic.SolveRows(x, ld, rows, lower, ld, n, unit: true, conjugate: hermitian);
                arithmetic.DivideRows(
                    x, q + fromRow + b * ld, ld, n, rows, lower,
                    Pivots.OffDiagonals.AsSpan(first, n * doubles), hermitian);
                break;
        }
    }

    /// <summary>Subtracts the product of the rows below from a tile of the update.</summary>
    private void UpdateTile(int s, double* p, double* q, double* update, int row, int column, double* scratch)
    {
        int width = structure.Width(s);
        int below = structure.BelowCount(s);
        nint ld = plan.Strides[s];
        nint ldu = plan.UpdateStrides[s];
        int rows = Math.Min(FrontArithmetic.TileRows, (int)ldu - row);
        int columns = Math.Min(arithmetic.TileColumns, below - column);
        int offset = column - row / doubles;
        bool conjugate = kind is FactorKind.Cholesky or FactorKind.Hermitian;
        double* target = update + row + column * ldu;
        arithmetic.Product(
            p + width * doubles + row, ld, q + (width + column) * doubles, ld, width, target, ldu,
            rows, columns, true, offset, conjugate, scratch);
        if (kind == FactorKind.General)
        {
            arithmetic.Product(
                q + width * doubles + row, ld, p + (width + column) * doubles, ld, width,
                target + plan.UpdateSize(s), ldu, rows, columns, true, offset, false, scratch);
        }
    }

    private void Fail(int column) => Lower(ref failedColumn, column);

    private static void Lower(ref int least, int value)
    {
        int seen = Volatile.Read(ref least);
        while (value < seen)
        {
            int found = Interlocked.CompareExchange(ref least, value, seen);
            if (found == seen)
                return;
            seen = found;
        }
    }
}
