using BenchmarkDotNet.Attributes;
using FemCore2D.Solvers;
using FemCore2D.Sparse;
using LinearAlgebra = MathNet.Numerics.LinearAlgebra;

namespace FemCore2D.Benchmarks;

/// <summary>
/// The product of a sparse matrix with a vector, and an iteration of conjugate gradients, against the product of
/// MathNet.Numerics with the same matrix: the five-point Laplacian of a square grid.
/// </summary>
[MemoryDiagnoser]
public class SparseProductBenchmarks
{
    private const int Iterations = 20;

    private SparseMatrix<double> matrix = null!;
    private LinearAlgebra.Matrix<double> foreignMatrix = null!;
    private LinearAlgebra.Vector<double> foreignX = null!;
    private LinearAlgebra.Vector<double> foreignY = null!;
    private ConjugateGradients<double> plain = null!;
    private ConjugateGradients<double> preconditioned = null!;
    private double[] x = null!;
    private double[] y = null!;

    /// <summary>The vertices along a side of the grid.</summary>
    [Params(1000)]
    public int Side { get; set; }

    [GlobalSetup]
    public void Prepare()
    {
        matrix = Laplacian(Side);
        foreignMatrix = matrix.ToMathNetSparse();
        Random random = new(1);
        x = Enumerable.Range(0, matrix.RowCount).Select(_ => random.NextDouble() - 0.5).ToArray();
        y = new double[x.Length];
        foreignX = LinearAlgebra.Vector<double>.Build.Dense(x.ToArray());
        foreignY = LinearAlgebra.Vector<double>.Build.Dense(y.ToArray());
        plain = new ConjugateGradients<double>(matrix);
        preconditioned = new ConjugateGradients<double>(matrix, new IncompleteCholesky<double>(matrix));
    }

    [Benchmark(Baseline = true)]
    public void MathNetProduct() => foreignMatrix.Multiply(foreignX, foreignY);

    [Benchmark]
    public void Product() => matrix.Multiply(x, y);

    [Benchmark]
    public void ProductOnOneThread() => matrix.Multiply(x, y, threads: 1);

    [Benchmark(OperationsPerInvoke = Iterations)]
    public IterationReport Iteration() => Iterate(plain, threads: 0);

    [Benchmark(OperationsPerInvoke = Iterations)]
    public IterationReport IterationOnOneThread() => Iterate(plain, threads: 1);

    [Benchmark(OperationsPerInvoke = Iterations)]
    public IterationReport IterationWithIncompleteCholesky() => Iterate(preconditioned, threads: 0);

    private static SparseMatrix<double> Laplacian(int side)
    {
        List<int> columns = new(5 * side * side);
        List<double> values = new(5 * side * side);
        int[] starts = new int[(side * side) + 1];
        for (int i = 0; i < side * side; i++)
        {
            Add(i >= side, i - side, -1);
            Add(i % side > 0, i - 1, -1);
            Add(true, i, 4);
            Add((i + 1) % side > 0, i + 1, -1);
            Add(i < side * (side - 1), i + side, -1);
            starts[i + 1] = columns.Count;
        }

        return new(SparsePattern.FromCompressedRows(side * side, starts, columns.ToArray()), values.ToArray());

        void Add(bool exists, int column, double value)
        {
            if (exists)
            {
                columns.Add(column);
                values.Add(value);
            }
        }
    }

    private IterationReport Iterate(ConjugateGradients<double> solver, int threads)
    {
        y.AsSpan().Clear();
        return solver.Solve(x, y, new IterationOptions { IterationLimit = Iterations, Threads = threads });
    }
}
