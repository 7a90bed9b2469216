using System.Diagnostics;
using System.Numerics;
using FemCore2D.Sparse;

namespace FemCore2D.Solvers;

/// <summary>
/// Everything about a direct factorization that depends on the pattern alone: the order, the structure of the factors,
/// and what they will cost. Made once and used for all matrices of the pattern.
/// </summary>
/// <typeparam name="T">The number type: <see cref="double"/> or <see cref="Complex"/>.</typeparam>
public sealed class FactorizationPlan<T>
    where T : unmanaged, INumberBase<T>
{
    private readonly int sides;

    private FactorizationPlan(
        SparsePattern pattern, FactorizationKind kind, DirectOptions options, Ordering ordering,
        FrontPlan fronts, EntryMap map, TimeSpan orderingTime, TimeSpan analysisTime)
    {
        Pattern = pattern;
        Kind = kind;
        Options = options;
        Ordering = ordering;
        Fronts = fronts;
        Map = map;
        OrderingTime = orderingTime;
        AnalysisTime = analysisTime;
        sides = fronts.Sides;
    }

    /// <summary>The pattern.</summary>
    public SparsePattern Pattern { get; }

    /// <summary>The class of matrices.</summary>
    public FactorizationKind Kind { get; }

    /// <summary>The order of elimination.</summary>
    public Ordering Ordering { get; }

    /// <summary>The entries that the factors will store.</summary>
    public long FactorEntries => sides * Fronts.FactorEntries;

    /// <summary>The floating-point operations of a factorization; a complex multiplication counts as one.</summary>
    public double Operations => sides * Fronts.Flops;

    /// <summary>The bytes that a factorization will take.</summary>
    public long Bytes => PredictBytes(Fronts, Kind, Pattern.EntryCount, Crew.SizeOf(Options.Threads));

    /// <summary>The options that the plan was made with.</summary>
    internal DirectOptions Options { get; }

    internal FrontPlan Fronts { get; }

    internal EntryMap Map { get; }

    internal TimeSpan OrderingTime { get; }

    internal TimeSpan AnalysisTime { get; }

    /// <summary>Makes a plan that eliminates given pairs of unknowns together.</summary>
    internal static FactorizationPlan<T> Make(
        SparsePattern pattern, FactorizationKind kind, DirectOptions options, int[]? partners,
        CancellationToken cancellationToken)
    {
        ArgumentNullException.ThrowIfNull(pattern);
        Scalar.Require<T>();
        if (pattern.RowCount != pattern.ColumnCount)
        {
            throw new ArgumentException(
                $"The pattern must be square, not {pattern.RowCount} x {pattern.ColumnCount}.", nameof(pattern));
        }

        long start = Stopwatch.GetTimestamp();
        if (kind != FactorizationKind.General && !Graph.IsSymmetric(pattern))
        {
            throw new UnsuitableMatrixException(
                "The pattern is not symmetric: an entry is stored on one side of the diagonal only. Store both sides, or "
                + "use the general factorization.");
        }

        Graph graph = Graph.Of(pattern);
        Crew crew = new(options.Threads);
        Ordering ordering = Order(graph, options, partners, crew, cancellationToken);
        long ordered = Stopwatch.GetTimestamp();
        cancellationToken.ThrowIfCancellationRequested();
        SupernodeTree tree = SupernodeTree.Build(graph, ordering.Unknowns, partners);
        cancellationToken.ThrowIfCancellationRequested();
        bool general = kind == FactorizationKind.General;
        FactorStructure structure = new(graph, tree);
        cancellationToken.ThrowIfCancellationRequested();
        FrontPlan fronts = new(structure, Scalar.IsComplex<T>() ? 2 : 1, general ? 2 : 1, crew.Size);
        long bytes = PredictBytes(fronts, kind, pattern.EntryCount, crew.Size);
        long limit = Math.Min(options.MaximumBytes, sizeof(double) * AlignedDoubles.MostDoubles);
        if (bytes > limit)
            throw new FactorTooLargeException(bytes, limit);
        EntryMap map = new(pattern, structure, general);
        return new FactorizationPlan<T>(
            pattern, kind, options, ordering, fronts, map,
            Stopwatch.GetElapsedTime(start, ordered), Stopwatch.GetElapsedTime(ordered));
    }

    /// <summary>Factorizes a matrix of the pattern.</summary>
    /// <param name="matrix">The matrix; it is not changed, and not needed any more after the call.</param>
    /// <param name="cancellationToken">Stops the work.</param>
    /// <exception cref="ArgumentException">The matrix has another pattern.</exception>
    /// <exception cref="UnsuitableMatrixException">The matrix is not of its class, or not finite.</exception>
    /// <exception cref="NotPositiveDefiniteException">The kind is Cholesky and the matrix is not positive definite.</exception>
    /// <exception cref="SingularMatrixException">The matrix is singular.</exception>
    /// <exception cref="OperationCanceledException">The work was stopped.</exception>
    public DirectFactorization<T> Factorize(SparseMatrix<T> matrix, CancellationToken cancellationToken = default) =>
        new(this, matrix, cancellationToken);

    private static Ordering Order(
        Graph graph, DirectOptions options, int[]? partners, Crew crew, CancellationToken cancellationToken)
    {
        if (options.Ordering is Ordering given)
        {
            if (given.Unknowns.Length != graph.Count)
            {
                throw new ArgumentException(
                    $"The order holds {given.Unknowns.Length} unknowns, the pattern {graph.Count}.", nameof(options));
            }

            return given;
        }

        return partners is null
            ? Ordering.Find(graph, options.OrderingMethod, options.Points.Span, crew, cancellationToken)
            : PairedGraph.Order(graph, partners, options, crew, cancellationToken);
    }

    private static long PredictBytes(FrontPlan fronts, FactorizationKind kind, int entries, int threads)
    {
        long indices = 4L * entries + 8L * fronts.Structure.Rows.Length + 12L * fronts.Structure.Positions.Length;
        long copies = 0;
        long panels = 0;
        if (kind != FactorizationKind.Cholesky)
        {
            copies = 16L * fronts.Doubles * entries;
            indices += kind == FactorizationKind.General ? 8L * entries : 0;
            panels = kind == FactorizationKind.Symmetric ? fronts.LargestPanel : 0;
        }

        long doubles = fronts.Sides * fronts.PanelStarts[^1] + fronts.ArenaSize
            + threads * (fronts.WorkspaceSize + panels + FrontArithmetic.ScratchSize);
        return 8 * doubles + indices + copies;
    }
}
