using FemCore2D.Geometry;
using FemCore2D.Sparse;

namespace FemCore2D.Solvers;

/// <summary>An order in which the unknowns of a sparse matrix are eliminated; a good one keeps its factors small.</summary>
/// <remarks>
/// The same matrix gives the same order on every run and for any number of threads. Matrices whose pattern is not
/// symmetric are ordered by the pattern of <c>A + A^T</c>.
/// </remarks>
public sealed class Ordering
{
    /// <summary>The number of unknowns above which dissection by points beats minimum degree.</summary>
    private const int DissectedFromPoints = 20_000;

    /// <summary>The number of unknowns above which dissection of the graph beats minimum degree.</summary>
    private const int DissectedFromGraph = 100_000;
    private readonly int[] order;

    private Ordering(OrderingMethod method, int[] order)
    {
        Method = method;
        this.order = order;
    }

    /// <summary>How the order was found; never <see cref="OrderingMethod.Automatic"/>.</summary>
    public OrderingMethod Method { get; }

    /// <summary>For each position in the elimination the unknown.</summary>
    public ReadOnlySpan<int> Unknowns => order;

    /// <summary>Finds an order for a square pattern.</summary>
    /// <param name="pattern">The pattern.</param>
    /// <param name="method">How to find it.</param>
    /// <param name="points">The point of each unknown where the caller has them, or empty.</param>
    /// <param name="threads">The largest number of threads; 0 for one a processor.</param>
    /// <param name="cancellationToken">Stops the work.</param>
    /// <exception cref="ArgumentException">The pattern is not square, or there is not one finite point an unknown.</exception>
    /// <exception cref="OperationCanceledException">The work was stopped.</exception>
    /// <remarks>
    /// P. R. Amestoy, T. A. Davis and I. S. Duff (1996) for minimum degree; A. George (1973), B. Hendrickson and
    /// E. Rothberg (1998) for nested dissection.
    /// </remarks>
    public static Ordering Find(
        SparsePattern pattern,
        OrderingMethod method = OrderingMethod.Automatic,
        ReadOnlySpan<Point2D> points = default,
        int threads = 0,
        CancellationToken cancellationToken = default)
    {
        ArgumentNullException.ThrowIfNull(pattern);
        ArgumentOutOfRangeException.ThrowIfNegative(threads);
        RequireSquare(pattern);
        Crew crew = new(threads);
        return Find(Graph.Of(pattern), method, points, crew, cancellationToken);
    }

    /// <summary>Takes an order that the caller has found.</summary>
    /// <param name="unknowns">For each position in the elimination the unknown.</param>
    /// <exception cref="ArgumentException">Not every unknown occurs exactly once.</exception>
    public static Ordering FromUnknowns(ReadOnlySpan<int> unknowns)
    {
        bool[] seen = new bool[unknowns.Length];
        foreach (int unknown in unknowns)
        {
            if ((uint)unknown >= (uint)seen.Length || seen[unknown])
            {
                throw new ArgumentException(
                    $"An order of {seen.Length} unknowns holds each of 0 to {seen.Length - 1} once; {unknown} is out of "
                    + "range or occurs twice.",
                    nameof(unknowns));
            }

            seen[unknown] = true;
        }

        return new Ordering(OrderingMethod.Natural, unknowns.ToArray());
    }

    /// <summary>The same method's order of all unknowns, where this one is of groups of them.</summary>
    internal Ordering Expand(int[] unknowns) => new(Method, unknowns);

    /// <summary>Finds an order for a graph, whose vertices may stand for several unknowns.</summary>
    internal static Ordering Find(
        Graph graph, OrderingMethod method, ReadOnlySpan<Point2D> points, Crew crew, CancellationToken cancellationToken)
    {
        int n = graph.Count;
        RequirePoints(n, method, points);
        if (method == OrderingMethod.Automatic)
            method = Choose(graph, points);
        crew.Gather();
        try
        {
            return new Ordering(method, method switch
            {
                OrderingMethod.Natural => [.. Enumerable.Range(0, n)],
                OrderingMethod.MinimumDegree => ByDegree(graph, cancellationToken),
                OrderingMethod.NestedDissection => ByDissection(
                    graph, NestedDissection.Dissect(graph, crew, cancellationToken), crew, cancellationToken),
                OrderingMethod.CoordinateDissection => ByDissection(
                    graph, new CoordinateDissection(graph, crew, cancellationToken).Run(points), crew, cancellationToken),
                _ => throw new ArgumentOutOfRangeException(nameof(method), method, "This is no method of ordering."),
            });
        }
        finally
        {
            crew.Dismiss();
        }
    }

    private static OrderingMethod Choose(Graph graph, ReadOnlySpan<Point2D> points)
    {
        // Rows with very many entries have no place in a plane, where dissection is at its best.
        bool planar = graph.Count > 0 && graph.Starts[graph.Count] < 40L * graph.Count;
        if (planar && !points.IsEmpty && graph.Count >= DissectedFromPoints)
            return OrderingMethod.CoordinateDissection;
        return planar && graph.Count >= DissectedFromGraph
            ? OrderingMethod.NestedDissection
            : OrderingMethod.MinimumDegree;
    }

    private static int[] ByDegree(Graph graph, CancellationToken cancellationToken)
    {
        int[] order = new int[graph.Count];
        new MinimumDegree().Order(
            graph.Count, graph.Count, graph.Starts, graph.Neighbors, graph.VertexWeights, order, cancellationToken);
        return order;
    }

    private static int[] ByDissection(
        Graph graph, (SeparatorTree Tree, int[] Labels) dissection, Crew crew, CancellationToken cancellationToken) =>
        new TreeOrdering(graph, dissection.Tree, dissection.Labels, crew, cancellationToken).Run();

    private static void RequireSquare(SparsePattern pattern)
    {
        if (pattern.RowCount != pattern.ColumnCount)
        {
            throw new ArgumentException(
                $"The pattern must be square, not {pattern.RowCount} x {pattern.ColumnCount}.", nameof(pattern));
        }
    }

    private static void RequirePoints(int count, OrderingMethod method, ReadOnlySpan<Point2D> points)
    {
        if (points.IsEmpty && method != OrderingMethod.CoordinateDissection)
            return;
        if (points.Length != count)
        {
            throw new ArgumentException(
                $"Dissection by points needs one point for each of the {count} unknowns; {points.Length} are given.",
                nameof(points));
        }

        for (int i = 0; i < points.Length; i++)
        {
            if (!points[i].IsFinite)
                throw new ArgumentException($"The point of unknown {i} is {points[i]}; it must be finite.", nameof(points));
        }
    }
}
