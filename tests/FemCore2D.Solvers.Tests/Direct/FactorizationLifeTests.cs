using System.Diagnostics;
using System.Numerics;
using FemCore2D.Sparse;

namespace FemCore2D.Solvers.Tests;

/// <summary>Threads, memory, refactorization, cancellation and failures.</summary>
public class FactorizationLifeTests
{
    public static TheoryData<FactorizationKind, OrderingMethod> Kinds
    {
        get
        {
            TheoryData<FactorizationKind, OrderingMethod> data = [];
            foreach (FactorizationKind kind in Enum.GetValues<FactorizationKind>())
            {
                data.Add(kind, OrderingMethod.MinimumDegree);
                data.Add(kind, OrderingMethod.NestedDissection);
            }

            return data;
        }
    }

    [Theory]
    [MemberData(nameof(Kinds))]
    public void Any_number_of_threads_gives_the_same_bits(FactorizationKind kind, OrderingMethod method)
    {
        SparseMatrix<double> a = DirectMatrices.Grid(160, 150, kind == FactorizationKind.Cholesky ? 4.0 : 3.7);
        double[] b = DirectMatrices.RightHandSide<double>(a.RowCount);
        double[]? expected = null;
        double[] logarithms = new double[3];
        int at = 0;
        foreach (int threads in new[] { 1, 2, 7 })
        {
            DirectOptions options = new() { Threads = threads, OrderingMethod = method, RefinementSteps = 0 };
            DirectFactorization<double> factors = new DirectFactorizer<double>(kind, options).Factorize(a);
            double[] x = new double[b.Length];
            factors.Solve(b, x);
            expected ??= x;
            Assert.Equal(expected, x);
            logarithms[at++] = factors.LogDeterminant;
        }

        Assert.Equal(logarithms[0], logarithms[1]);
        Assert.Equal(logarithms[0], logarithms[2]);
    }

    [Theory]
    [InlineData(1)]
    [InlineData(2)]
    public void Complex_factors_have_the_same_bits_too(int threads)
    {
        SparseMatrix<Complex> a = DirectMatrices.Grid(110, 100).ToComplex();
        for (int i = 0; i < a.RowCount; i++)
            a.Entry(i, i) += new Complex(-0.3, 0.01 * (i % 7));
        Complex[] b = DirectMatrices.RightHandSide<Complex>(a.RowCount);
        Complex[] x = new Complex[b.Length];
        Complex[] y = new Complex[b.Length];
        DirectOptions options = new() { RefinementSteps = 0, Threads = threads };
        new DirectFactorizer<Complex>(FactorizationKind.Symmetric, options).Factorize(a).Solve(b, x);
        new DirectFactorizer<Complex>(FactorizationKind.Symmetric, options with { Threads = 5 }).Factorize(a).Solve(b, y);
        Assert.Equal(x, y);
    }

    [Theory]
    [InlineData(FactorizationKind.Cholesky)]
    [InlineData(FactorizationKind.Symmetric)]
    [InlineData(FactorizationKind.General)]
    public void Refactorization_is_a_fresh_factorization_and_allocates_nothing(FactorizationKind kind)
    {
        SparseMatrix<double> a = DirectMatrices.Grid(90, 90);
        SparseMatrix<double> c = a.Multiply(3.0);
        for (int i = 0; i < c.RowCount; i++)
            c.Entry(i, i) += 0.01 * (i % 13);
        DirectOptions options = new() { Threads = 1 };
        FactorizationPlan<double> plan = FactorizationPlan.Make<double>(a.Pattern, kind, options);
        DirectFactorization<double> factors = plan.Factorize(a);
        double[] b = DirectMatrices.RightHandSide<double>(a.RowCount);
        double[] x = new double[b.Length];
        factors.Solve(b, x);
        factors.Refactorize(a);
        long before = GC.GetAllocatedBytesForCurrentThread();
        factors.Refactorize(c);
        factors.Solve(b, x);
        long allocated = GC.GetAllocatedBytesForCurrentThread() - before;
        Assert.Equal(0, allocated);
        double[] y = new double[b.Length];
        plan.Factorize(c).Solve(b, y);
        Assert.Equal(y, x);
    }

    [Fact]
    public void The_predicted_memory_is_what_is_taken()
    {
        SparseMatrix<double> a = DirectMatrices.Grid(400, 400);
        FactorizationPlan<double> plan = FactorizationPlan.Make<double>(a.Pattern, FactorizationKind.Cholesky);
        long before = GC.GetTotalMemory(true);
        DirectFactorization<double> factors = plan.Factorize(a);
        long taken = GC.GetTotalMemory(true) - before;

        // The indices belong to the plan and were there before; the diagonal and row sums are not counted.
        Assert.InRange(taken, 0.7 * plan.Bytes, 1.05 * plan.Bytes);
        Assert.Equal(plan.Bytes, factors.Report.Bytes);
        FactorTooLargeException e = Assert.Throws<FactorTooLargeException>(() => FactorizationPlan.Make<double>(
            a.Pattern, FactorizationKind.Cholesky, new DirectOptions { MaximumBytes = plan.Bytes - 1 }));
        Assert.Equal(plan.Bytes, e.RequiredBytes);
    }

    [Fact]
    public void Work_stops_soon_after_it_is_cancelled()
    {
        SparseMatrix<double> a = DirectMatrices.Grid(500, 500);
        FactorizationPlan<double> plan = FactorizationPlan.Make<double>(a.Pattern, FactorizationKind.General);
        DirectFactorization<double> factors = plan.Factorize(a);
        double best = double.MaxValue;
        for (int attempt = 0; attempt < 5; attempt++)
        {
            // The best of a few: on a busy machine any wait can be long.
            using CancellationTokenSource source = new(TimeSpan.FromMilliseconds(30 + 40 * attempt));
            long start = 0;
            source.Token.Register(() => start = Stopwatch.GetTimestamp());
            Assert.Throws<OperationCanceledException>(() =>
            {
                for (int i = 0; i < 1000; i++)
                    factors.Refactorize(a, source.Token);
            });
            best = Math.Min(best, Stopwatch.GetElapsedTime(start).TotalSeconds);
        }

        Assert.InRange(best, 0.0, 0.1);
        Assert.Throws<InvalidOperationException>(() => factors.Solve(new double[a.RowCount], new double[a.RowCount]));
        factors.Refactorize(a);
        factors.Solve(new double[a.RowCount], new double[a.RowCount]);
        using CancellationTokenSource cancelled = new();
        cancelled.Cancel();
        Assert.Throws<OperationCanceledException>(
            () => FactorizationPlan.Make<double>(a.Pattern, FactorizationKind.Cholesky, null, cancelled.Token));
    }

    [Fact]
    public void Progress_rises_to_one()
    {
        SparseMatrix<double> a = DirectMatrices.Grid(120, 120);
        Recorder recorder = new();
        new DirectFactorizer<double>(
            FactorizationKind.Cholesky, new DirectOptions { Progress = recorder, Threads = 1 }).Factorize(a);
        Assert.True(recorder.Shares.Count > 20);
        Assert.Equal(recorder.Shares.Order(), recorder.Shares);
        Assert.Equal(1.0, recorder.Shares[^1], 1e-12);
    }

    [Fact]
    public void An_indefinite_matrix_fails_as_not_positive_definite_at_its_unknown()
    {
        SparseMatrix<double> a = DirectMatrices.Grid(30, 30);
        a.Entry(417, 417) = -5.0;
        NotPositiveDefiniteException e = Assert.Throws<NotPositiveDefiniteException>(
            () => new DirectFactorizer<double>(FactorizationKind.Cholesky).Factorize(a));
        Assert.InRange(e.Unknown, 0, 899);
        Assert.Contains($"unknown {e.Unknown} ", e.Message, StringComparison.Ordinal);

        // The same unknown whatever the threads.
        for (int threads = 1; threads < 5; threads++)
        {
            DirectOptions options = new() { Threads = threads };
            Assert.Equal(e.Unknown, Assert.Throws<NotPositiveDefiniteException>(
                () => new DirectFactorizer<double>(FactorizationKind.Cholesky, options).Factorize(a)).Unknown);
        }
    }

    [Fact]
    public void A_potential_fixed_nowhere_is_found_by_every_kind()
    {
        SparseMatrix<double> a = DirectMatrices.Grid(40, 40);
        for (int i = 0; i < a.RowCount; i++)
            a.Entry(i, i) = a.Pattern.ColumnsOf(i).Length - 1;
        Assert.Throws<NotPositiveDefiniteException>(
            () => new DirectFactorizer<double>(FactorizationKind.Cholesky).Factorize(a));
        Assert.Throws<SingularMatrixException>(
            () => new DirectFactorizer<double>(FactorizationKind.Symmetric).Factorize(a));
        Assert.Throws<SingularMatrixException>(
            () => new DirectFactorizer<double>(FactorizationKind.General).Factorize(a));
    }

    [Theory]
    [InlineData(FactorizationKind.Cholesky)]
    [InlineData(FactorizationKind.Symmetric)]
    [InlineData(FactorizationKind.General)]
    public void An_empty_row_is_named(FactorizationKind kind)
    {
        SparseMatrix<double> a = DirectMatrices.Grid(10, 10);
        foreach (int j in a.Pattern.ColumnsOf(33).ToArray())
        {
            a.Entry(33, j) = 0.0;
            a.Entry(j, 33) = 0.0;
        }

        SingularMatrixException e = Assert.Throws<SingularMatrixException>(
            () => new DirectFactorizer<double>(kind).Factorize(a));
        Assert.Equal(33, e.Unknown);
    }

    [Fact]
    public void Matrices_of_the_wrong_class_are_refused()
    {
        SparseMatrix<double> a = DirectMatrices.Grid(10, 10);
        a.Entry(11, 12) = -0.9;
        foreach (FactorizationKind kind in new[] { FactorizationKind.Cholesky, FactorizationKind.Symmetric })
        {
            UnsuitableMatrixException e = Assert.Throws<UnsuitableMatrixException>(
                () => new DirectFactorizer<double>(kind).Factorize(a));
            Assert.Contains("row 11 ", e.Message, StringComparison.Ordinal);
        }

        a.Entry(11, 12) = double.NaN;
        Assert.Throws<UnsuitableMatrixException>(
            () => new DirectFactorizer<double>(FactorizationKind.General).Factorize(a));
        SparseMatrix<double> triangle = SparseMatrices.FromTriplets<double>(2, 2, [0, 0, 1], [0, 1, 1], [1.0, 2.0, 1.0]);
        Assert.Throws<UnsuitableMatrixException>(
            () => new DirectFactorizer<double>(FactorizationKind.Cholesky).Factorize(triangle));
        SparseMatrix<double> wide = SparseMatrices.FromTriplets<double>(2, 3, [0, 1], [0, 1], [1.0, 1.0]);
        Assert.Throws<ArgumentException>(() => new DirectFactorizer<double>(FactorizationKind.General).Factorize(wide));
        SparseMatrix<Complex> symmetric = DirectMatrices.Grid(5, 5).ToComplex().Multiply(new Complex(1.0, 0.5));
        Assert.Throws<UnsuitableMatrixException>(
            () => new DirectFactorizer<Complex>(FactorizationKind.Cholesky).Factorize(symmetric));
    }

    [Theory]
    [InlineData(1)]
    [InlineData(1e-6)]
    [InlineData(1e6)]
    public void Saddle_points_are_solved_to_rounding(double scale)
    {
        // Flux through a grid of edges, with one pressure a cell: [D B^T; B 0].
        const int Cells = 24;
        List<int> i = [];
        List<int> j = [];
        List<double> v = [];
        int edges = 2 * Cells * (Cells + 1);
        int n = edges + Cells * Cells;
        void Add(int a, int b, double value)
        {
            i.Add(a);
            j.Add(b);
            v.Add(value);
            if (a == b)
                return;
            i.Add(b);
            j.Add(a);
            v.Add(value);
        }

        for (int e = 0; e < edges; e++)
            Add(e, e, scale * (1.0 + e % 5));
        for (int y = 0; y < Cells; y++)
        {
            for (int x = 0; x < Cells; x++)
            {
                int cell = edges + y * Cells + x;
                int vertical = Cells * (Cells + 1);
                Add(cell, y * (Cells + 1) + x, -1.0);
                Add(cell, y * (Cells + 1) + x + 1, 1.0);
                Add(cell, vertical + y * Cells + x, -1.0);
                Add(cell, vertical + (y + 1) * Cells + x, 1.0);
            }
        }

        SparseMatrix<double> a = SparseMatrices.FromTriplets<double>(n, n, [.. i], [.. j], [.. v]);
        double[] b = DirectMatrices.RightHandSide<double>(n);
        double[] x0 = new double[n];
        DirectFactorization<double> factors = new DirectFactorizer<double>(FactorizationKind.Symmetric).Factorize(a);
        factors.Solve(b, x0);
        Assert.InRange(DirectMatrices.BackwardError<double>(a, x0, b), 0.0, 1e-15);
        Assert.Equal(new Inertia(edges, Cells * Cells), factors.Inertia);
        Assert.Equal(0, factors.Report.RaisedPivots);
        factors = new DirectFactorizer<double>(FactorizationKind.General).Factorize(a);
        factors.Solve(b, x0);
        Assert.InRange(DirectMatrices.BackwardError<double>(a, x0, b), 0.0, 1e-15);
    }

    [Theory]
    [InlineData(1e-9)]
    [InlineData(1e-12)]
    public void Nearly_singular_matrices_keep_a_small_backward_error_and_tell_their_condition(double distance)
    {
        SparseMatrix<double> a = DirectMatrices.Grid(40, 40);
        for (int k = 0; k < a.RowCount; k++)
            a.Entry(k, k) = a.Pattern.ColumnsOf(k).Length - 1 + distance;
        double[] b = DirectMatrices.RightHandSide<double>(a.RowCount);
        double[] x = new double[b.Length];
        foreach (FactorizationKind kind in Enum.GetValues<FactorizationKind>())
        {
            DirectFactorization<double> factors = new DirectFactorizer<double>(kind).Factorize(a);
            factors.Solve(b, x);
            Assert.InRange(DirectMatrices.BackwardError<double>(a, x, b), 0.0, 1e-14);

            // The largest eigenvalue lies below 8, the smallest is the distance.
            Assert.InRange(factors.EstimateReciprocalCondition(), 0.05 * distance, distance);
        }
    }

    [Fact]
    public void Solves_may_run_at_the_same_time()
    {
        SparseMatrix<double> a = DirectMatrices.Grid(150, 150, 3.9);
        DirectFactorization<double> factors = new DirectFactorizer<double>(FactorizationKind.General).Factorize(a);
        double[] b = DirectMatrices.RightHandSide<double>(a.RowCount);
        double[] expected = new double[b.Length];
        factors.Solve(b, expected);
        Parallel.For(0, 12, _ =>
        {
            double[] x = new double[b.Length];
            factors.Solve(b, x);
            Assert.Equal(expected, x);
        });
    }

    [Fact]
    public void A_matrix_without_unknowns_is_solved()
    {
        SparseMatrix<double> a = SparseMatrices.FromTriplets<double>(0, 0, [], [], []);
        foreach (FactorizationKind kind in Enum.GetValues<FactorizationKind>())
            new DirectFactorizer<double>(kind).Factorize(a).Solve([], []);
    }

    private sealed class Recorder : IProgress<double>
    {
        public List<double> Shares { get; } = [];

        public void Report(double value) => Shares.Add(value);
    }
}
