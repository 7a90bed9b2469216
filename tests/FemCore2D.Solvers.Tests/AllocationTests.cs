using System.Numerics;
using FemCore2D.Sparse;

namespace FemCore2D.Solvers.Tests;

public class AllocationTests
{
    [Theory]
    [InlineData(1)]
    [InlineData(3)]
    public void AnIterationAllocatesNothing(int threads)
    {
        Check<double>(withPreconditioner: false);
        Check<double>(withPreconditioner: true);
        Check<Complex>(withPreconditioner: true);

        void Check<T>(bool withPreconditioner)
            where T : unmanaged, INumberBase<T>
        {
            SparseMatrix<T> matrix = Matrices.Laplacian<T>(290);
            ConjugateGradients<T> solver = new(matrix, withPreconditioner ? new IncompleteCholesky<T>(matrix) : null);
            T[] b = Matrices.Vector<T>(matrix.RowCount, 1);
            T[] x = new T[b.Length];
            IterationOptions options = new() { IterationLimit = 30, Threads = threads };

            // The runtime itself allocates now and then, as it compiles a method anew or adds a thread to its pool. What
            // an iteration allocates it would allocate each time.
            long least = long.MaxValue;
            for (int attempt = 0; attempt < 20 && least > 0; attempt++)
            {
                Watch watch = new();
                Array.Clear(x);
                solver.Solve(b, x, options, watch);
                Assert.Equal(30, watch.Iterations);
                least = Math.Min(least, watch.Bytes);
            }

            Assert.Equal(0, least);
        }
    }

    [Fact]
    public void ASolveAllocatesItsReportOnly()
    {
        SparseMatrix<double> matrix = Matrices.Laplacian<double>(20);
        ConjugateGradients<double> solver = new(matrix, new IncompleteCholesky<double>(matrix));
        double[] b = Matrices.Vector<double>(400, 1);
        double[] x = new double[400];
        IterationOptions options = new() { Threads = 1 };
        int iterations = solver.Solve(b, x, options).Iterations;
        Array.Clear(x);
        long before = GC.GetAllocatedBytesForCurrentThread();
        solver.Solve(b, x, options);
        Assert.InRange(GC.GetAllocatedBytesForCurrentThread() - before, 1, 300 + (8 * iterations));
    }

    /// <summary>Adds up what the calling thread allocates between its calls.</summary>
    private sealed class Watch : IProgress<IterationProgress>
    {
        private long last;

        public long Bytes { get; private set; }

        public int Iterations { get; private set; }

        public void Report(IterationProgress value)
        {
            long now = GC.GetAllocatedBytesForCurrentThread();
            if (Iterations++ > 0)
            {
                Bytes += now - last;
            }

            last = GC.GetAllocatedBytesForCurrentThread();
        }
    }
}
