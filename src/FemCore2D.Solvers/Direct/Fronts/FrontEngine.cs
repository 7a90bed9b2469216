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
