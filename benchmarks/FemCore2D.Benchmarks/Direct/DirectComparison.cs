using System.Diagnostics;
using System.Globalization;
using System.Numerics;
using FemCore2D.Geometry;
using FemCore2D.Solvers;
using FemCore2D.Sparse;

namespace FemCore2D.Benchmarks;

/// <summary>
/// Direct solvers side by side with native ones in one run: each matrix is solved a few times by each, and the best total
/// is told. Started by <c>direct</c> as first argument; further arguments choose among the cases by their names.
/// </summary>
internal static class DirectComparison
{
    private const int Repetitions = 3;

    /// <summary>Runs the cases whose names contain one of the arguments, or all.</summary>
    public static void Run(string[] names)
    {
        if (Environment.GetEnvironmentVariable("OPENBLAS_CORETYPE") is string core)
            Console.WriteLine($"OPENBLAS_CORETYPE is {core}: unset it to let the native libraries choose their kernels.");
        (string Name, Action<string> Run)[] cases =
        [
            ("laplacian", name => Positive(name, DirectSystems.FivePoint(1000), null)),
            ("degree1", name => Mesh(name, 1000, 1)),
            ("degree2", name => Mesh(name, 350, 2)),
            ("degree3", name => Mesh(name, 235, 3)),
            ("complex", name => ComplexSymmetric(name, 500)),
            ("growth", Growth),
        ];
        foreach ((string name, Action<string> run) in cases)
        {
            if (names.Length == 0 || names.Any(n => name.Contains(n, StringComparison.OrdinalIgnoreCase)))
                run(name);
        }
    }

    private static void Mesh(string name, int side, int degree)
    {
        (SparseMatrix<double> matrix, Point2D[] points) = DirectSystems.Triangles(side, degree);
        Positive(name, matrix, points);
    }

    private static void Positive(string name, SparseMatrix<double> a, Point2D[]? points)
    {
        Console.WriteLine($"{name}: {a.RowCount} unknowns, {a.Pattern.EntryCount} entries");
        double[] b = [.. Enumerable.Range(0, a.RowCount).Select(i => 1.0 + Math.Sin(0.7 * i))];
        double[] x = new double[b.Length];
        Row("", "analysis", "factor", "solve", "total", "again", "MB", "error");
        double best = 0.0;
        foreach (OrderingMethod method in (OrderingMethod[])
            [OrderingMethod.Automatic, OrderingMethod.MinimumDegree, OrderingMethod.NestedDissection])
        {
            double total = Own(method.ToString(), a, FactorizationKind.Cholesky, new DirectOptions { OrderingMethod = method }, b, x);
            best = method == OrderingMethod.Automatic ? total : best;
        }

        if (points is not null)
            Own("Points", a, FactorizationKind.Cholesky, new DirectOptions { Points = points }, b, x);
        foreach (bool byDegree in new[] { false, true })
        {
            string label = byDegree ? "CHOLMOD, minimum degree" : "CHOLMOD";
            NativeTimes? times = Best(() => NativeCholmod.Run(a, b, x, byDegree));
            Native(label, times, times is null ? 0.0 : Error(a, x, b), best);
        }
    }

    private static void ComplexSymmetric(string name, int side)
    {
        SparseMatrix<Complex> a = DirectSystems.FivePoint(side).ToComplex();
        for (int i = 0; i < a.RowCount; i++)
            a.Entry(i, i) += new Complex(-0.05, 0.02);
        Console.WriteLine($"{name}: {a.RowCount} unknowns, {a.Pattern.EntryCount} entries");
        Complex[] b = [.. Enumerable.Range(0, a.RowCount).Select(i => new Complex(1.0, Math.Sin(0.7 * i)))];
        Complex[] x = new Complex[b.Length];
        Row("", "analysis", "factor", "solve", "total", "again", "MB", "error");
        double best = Own("L D L^T", a, FactorizationKind.Symmetric, new DirectOptions(), b, x);
        Own("P L U", a, FactorizationKind.General, new DirectOptions(), b, x);
        NativeTimes? times = Best(() => NativeUmfpack.Run(a, b, x));
        Native("UMFPACK", times, times is null ? 0.0 : Error(a, x, b), best);
    }

    /// <summary>Tells how time and memory grow: with n^1.5 and n log n, if the order is good and the plane is a plane.</summary>
    private static void Growth(string name)
    {
        Console.WriteLine($"{name}: the 5-point Laplacian");
        double lastFactor = 0.0;
        long lastEntries = 0;
        double lastOperations = 0.0;
        foreach (int side in new[] { 250, 500, 1000, 2000 })
        {
            SparseMatrix<double> a = DirectSystems.FivePoint(side);
            FactorizationPlan<double> plan = FactorizationPlan.Make<double>(a.Pattern, FactorizationKind.Cholesky);
            DirectFactorization<double> factors = plan.Factorize(a);
            double factor = double.MaxValue;
            for (int k = 0; k < Repetitions; k++)
            {
                factors.Refactorize(a);
                factor = Math.Min(factor, factors.Report.FactorizationTime.TotalSeconds);
            }

            Console.WriteLine(
                Text($"  n = {a.RowCount}: {factor:F3} s, {plan.Operations / 1e9:F2} G operations, ")
                + Text($"{plan.FactorEntries / 1e6:F1} M entries"));
            if (lastEntries > 0)
            {
                Console.WriteLine(
                    Text($"    exponents: time {Exponent(factor / lastFactor):F2}, ")
                    + Text($"operations {Exponent(plan.Operations / lastOperations):F2} (theory 1.5), ")
                    + Text($"entries {Exponent((double)plan.FactorEntries / lastEntries):F2} (theory 1 and a logarithm)"));
            }

            (lastFactor, lastEntries, lastOperations) = (factor, plan.FactorEntries, plan.Operations);
        }
    }

    private static double Exponent(double ratio) => Math.Log(ratio) / Math.Log(4.0);

    private static double Own<T>(
        string label, SparseMatrix<T> a, FactorizationKind kind, DirectOptions options, T[] b, T[] x)
        where T : unmanaged, INumberBase<T>
    {
        double best = double.MaxValue;
        string[] row = [];
        for (int k = 0; k < Repetitions; k++)
        {
            GC.Collect();
            long start = Stopwatch.GetTimestamp();
            FactorizationPlan<T> plan = FactorizationPlan.Make<T>(a.Pattern, kind, options);
            double analysis = Stopwatch.GetElapsedTime(start).TotalSeconds;
            DirectFactorization<T> factors = plan.Factorize(a);
            double factor = Stopwatch.GetElapsedTime(start).TotalSeconds - analysis;
            factors.Solve(b, x);
            double total = Stopwatch.GetElapsedTime(start).TotalSeconds;
            factors.Refactorize(a);
            double again = Stopwatch.GetElapsedTime(start).TotalSeconds - total;
            if (total >= best)
                continue;
            best = total;
            row =
            [
                label, Text($"{analysis:F3}"), Text($"{factor:F3}"), Text($"{total - analysis - factor:F3}"),
                Text($"{total:F3}"), Text($"{again:F3}"), Text($"{plan.Bytes / 1e6:F0}"), Text($"{Error(a, x, b):E0}"),
            ];
        }

        Row(row);
        return best;
    }

    private static void Native(string label, NativeTimes? times, double error, double own)
    {
        if (times is null)
        {
            Console.WriteLine($"  {label}: the library is not on this machine (Debian: libsuitesparse-dev).");
            return;
        }

        Row(
            label, Text($"{times.Analysis.TotalSeconds:F3}"), Text($"{times.Factorization.TotalSeconds:F3}"),
            Text($"{times.Solve.TotalSeconds:F3}"), Text($"{times.Total.TotalSeconds:F3}"),
            Text($"{times.Again.TotalSeconds:F3}"), Text($"{times.Bytes / 1e6:F0}"), Text($"{error:E0}"));
        Console.WriteLine(Text($"  ours is {times.Total.TotalSeconds / own:F1} times faster than {label}"));
    }

    private static NativeTimes? Best(Func<NativeTimes?> run)
    {
        NativeTimes? best = null;
        for (int k = 0; k < Repetitions; k++)
        {
            NativeTimes? times = run();
            if (best is null || (times is not null && times.Total < best.Total))
                best = times;
        }

        return best;
    }

    private static double Error<T>(SparseMatrix<T> a, T[] x, T[] b)
        where T : unmanaged, INumberBase<T>
    {
        T[] product = a.Multiply(x, 1);
        double residual = 0.0;
        double size = 0.0;
        for (int i = 0; i < b.Length; i++)
        {
            residual = Math.Max(residual, double.CreateTruncating(T.Abs(b[i] - product[i])));
            size = Math.Max(size, double.CreateTruncating(T.Abs(x[i])));
        }

        return residual / (a.InfinityNorm() * size);
    }

    private static void Row(params string[] cells) =>
        Console.WriteLine("  " + cells[0].PadRight(26) + string.Concat(cells.Skip(1).Select(c => c.PadLeft(10))));

    private static string Text(FormattableString text) => text.ToString(CultureInfo.InvariantCulture);
}
