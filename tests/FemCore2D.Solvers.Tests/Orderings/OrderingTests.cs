using FemCore2D.Geometry;
using FemCore2D.Sparse;
using FsCheck.Xunit;

namespace FemCore2D.Solvers.Tests;

/// <summary>Orders, and the structure of the factors that they give.</summary>
public class OrderingTests
{
    [Property(MaxTest = 50)]
    public void Every_method_lists_every_unknown_once(int seed, byte extent)
    {
        SparsePattern pattern = DirectMatrices.General(seed, 1 + extent, DirectMatrices.Real).Pattern;
        Point2D[] points = Points(pattern.RowCount, seed);
        foreach (OrderingMethod method in Enum.GetValues<OrderingMethod>())
        {
            Ordering ordering = Ordering.Find(pattern, method, points);
            Assert.Equal(Enumerable.Range(0, pattern.RowCount), ordering.Unknowns.ToArray().Order());
            Assert.NotEqual(OrderingMethod.Automatic, ordering.Method);
        }
    }

    [Property(MaxTest = 40)]
    public void Counted_rows_are_those_of_a_dense_elimination(int seed, byte extent)
    {
        int n = 1 + extent % 80;
        SparsePattern pattern = DirectMatrices.Symmetric(seed, n, DirectMatrices.Real, false, DirectMatrices.Real).Pattern;
        Ordering ordering = Ordering.Find(pattern, OrderingMethod.MinimumDegree);
        Graph graph = Graph.Of(pattern);
        SupernodeTree tree = SupernodeTree.Build(graph, ordering.Unknowns);
        FactorStructure structure = new(graph, tree);
        HashSet<int>[] filled = Eliminate(pattern, tree.Order);
        long entries = 0;
        for (int s = 0; s < tree.Count; s++)
        {
            HashSet<int> union = [];
            for (int c = tree.Starts[s]; c < tree.Starts[s + 1]; c++)
            {
                union.UnionWith(filled[c]);
                entries += filled[c].Count + 1;
            }

            union.RemoveWhere(row => row < tree.Starts[s + 1]);
            Assert.Equal(union.Order(), structure.Below(s).ToArray());
        }

        Assert.Equal(entries, CountEntries(graph, ordering.Unknowns.ToArray()));
    }

    [Property(MaxTest = 30)]
    public void Minimum_degree_fills_nothing_in_on_a_tree(int seed, byte extent)
    {
        int n = 2 + extent;
        Random random = new(seed);
        List<int> rows = [.. Enumerable.Range(0, n)];
        List<int> columns = [.. rows];
        for (int k = 1; k < n; k++)
        {
            int up = random.Next(k);
            rows.AddRange([k, up]);
            columns.AddRange([up, k]);
        }

        SparsePattern pattern = SparsePattern.FromPlaces(n, n, [.. rows], [.. columns]);
        Ordering ordering = Ordering.Find(pattern, OrderingMethod.MinimumDegree);
        Assert.Equal(n - 1, Eliminate(pattern, ordering.Unknowns.ToArray()).Sum(f => f.Count));
    }

    [Theory]
    [InlineData(OrderingMethod.NestedDissection)]
    [InlineData(OrderingMethod.CoordinateDissection)]
    [InlineData(OrderingMethod.MinimumDegree)]
    public void Threads_do_not_change_an_order(OrderingMethod method)
    {
        SparsePattern pattern = DirectMatrices.Grid(210, 190).Pattern;
        Point2D[] points = [.. Enumerable.Range(0, pattern.RowCount).Select(i => new Point2D(i % 210, i / 210))];
        int[] expected = Ordering.Find(pattern, method, points, 1).Unknowns.ToArray();
        Assert.Equal(expected, Ordering.Find(pattern, method, points, 2).Unknowns.ToArray());
        Assert.Equal(expected, Ordering.Find(pattern, method, points, 7).Unknowns.ToArray());
    }

    [Theory]
    [InlineData(OrderingMethod.NestedDissection)]
    [InlineData(OrderingMethod.CoordinateDissection)]
    public void Separators_separate(OrderingMethod method)
    {
        SparsePattern pattern = DirectMatrices.Grid(230, 170).Pattern;
        Graph graph = Graph.Of(pattern);
        Crew crew = new(2);
        Point2D[] points = [.. Enumerable.Range(0, pattern.RowCount).Select(i => new Point2D(i % 230, i / 230))];
        (SeparatorTree tree, int[] labels) = method == OrderingMethod.NestedDissection
            ? NestedDissection.Dissect(graph, crew, default)
            : new CoordinateDissection(graph, crew, default).Run(points);
        int separators = 0;
        for (int v = 0; v < graph.Count; v++)
        {
            separators += labels[v] == 0 ? 1 : 0;
            for (int p = graph.Starts[v]; p < graph.Starts[v + 1]; p++)
            {
                int other = labels[graph.Neighbors[p]];
                Assert.True(tree.Contains(labels[v], other) || tree.Contains(other, labels[v]));
            }
        }

        // The shorter side of the grid is the best first separator.
        Assert.InRange(separators, 1, 1.1 * 170);
    }

    [Theory]
    [InlineData(OrderingMethod.NestedDissection, 1.03)]
    [InlineData(OrderingMethod.CoordinateDissection, 1.1)]
    public void Dissection_fills_in_no_more_than_minimum_degree(OrderingMethod method, double share)
    {
        SparsePattern pattern = DirectMatrices.Grid(300, 300).Pattern;
        Point2D[] points = [.. Enumerable.Range(0, pattern.RowCount).Select(i => new Point2D(i % 300, i / 300))];
        Assert.InRange(Fill(pattern, method, points), 0, share * Fill(pattern, OrderingMethod.MinimumDegree, points));
    }

    [Fact]
    public void Rows_with_very_many_entries_come_last()
    {
        const int Size = 3000;
        List<int> rows = [.. Enumerable.Range(0, Size)];
        List<int> columns = [.. rows];
        for (int k = 0; k < Size - 1; k++)
        {
            rows.AddRange([k, Size / 2]);
            columns.AddRange([Size / 2, k]);
        }

        SparsePattern pattern = SparsePattern.FromPlaces(Size, Size, [.. rows], [.. columns]);
        Assert.Equal(Size / 2, Ordering.Find(pattern, OrderingMethod.MinimumDegree).Unknowns[^1]);
    }

    [Fact]
    public void Wrong_arguments_are_refused()
    {
        SparsePattern pattern = SparsePattern.Diagonal(4);
        Assert.Throws<ArgumentException>(() => Ordering.Find(pattern, OrderingMethod.CoordinateDissection));
        Assert.Throws<ArgumentException>(() => Ordering.Find(pattern, points: new Point2D[3]));
        Assert.Throws<ArgumentException>(() => Ordering.FromUnknowns([0, 2, 2]));
        Assert.Throws<ArgumentException>(() => Ordering.FromUnknowns([0, 3, 1]));
        Assert.Throws<ArgumentException>(() => FactorizationPlan.Make<double>(
            pattern, FactorizationKind.Cholesky, new DirectOptions { Ordering = Ordering.FromUnknowns([0, 1]) }));
    }

    private static long Fill(SparsePattern pattern, OrderingMethod method, Point2D[] points) =>
        CountEntries(Graph.Of(pattern), Ordering.Find(pattern, method, points).Unknowns.ToArray());

    private static long CountEntries(Graph graph, int[] order)
    {
        int[] positions = new int[order.Length];
        for (int k = 0; k < order.Length; k++)
            positions[order[k]] = k;
        int[] post = EliminationTree.Postorder(EliminationTree.Parents(graph, order, positions));
        order = [.. post.Select(k => order[k])];
        for (int k = 0; k < order.Length; k++)
            positions[order[k]] = k;
        int[] parents = EliminationTree.Parents(graph, order, positions);
        return EliminationTree.ColumnCounts(graph, order, positions, parents).Sum(c => (long)c);
    }

    private static Point2D[] Points(int count, int seed)
    {
        Random random = new(seed);
        return [.. Enumerable.Range(0, count).Select(_ => new Point2D(random.NextDouble(), random.NextDouble()))];
    }

    /// <summary>The rows below the diagonal of each column of the factor, by the definition of fill.</summary>
    private static HashSet<int>[] Eliminate(SparsePattern pattern, int[] order)
    {
        int n = order.Length;
        int[] positions = new int[n];
        for (int k = 0; k < n; k++)
            positions[order[k]] = k;
        HashSet<int>[] rows = new HashSet<int>[n];
        for (int k = 0; k < n; k++)
            rows[k] = [.. pattern.ColumnsOf(order[k]).ToArray().Select(v => positions[v]).Where(p => p > k)];
        for (int k = 0; k < n; k++)
        {
            if (rows[k].Count == 0)
                continue;
            int parent = rows[k].Min();
            rows[parent].UnionWith(rows[k].Where(r => r != parent));
        }

        return rows;
    }
}
