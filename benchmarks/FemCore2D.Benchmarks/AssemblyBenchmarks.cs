using BenchmarkDotNet.Attributes;
using BenchmarkDotNet.Engines;
using FemCore2D.Assembly;
using FemCore2D.Geometry;
using FemCore2D.Sparse;
using Indexed = MathNet.Numerics.LinearAlgebra.Double.SparseMatrix;

namespace FemCore2D.Benchmarks;

/// <summary>The stiffness matrix of degree 1 on 2 million triangles, against an indexed builder and against memory.</summary>
[SimpleJob(RunStrategy.Monitoring, warmupCount: 6, iterationCount: 9)]
public class AssemblyBenchmarks
{
    private Mesh mesh = null!;
    private Assembler assembler = null!;
    private SparseMatrix<double> matrix = null!;
    private Assembler serial = null!;
    private (int Row, int Column, double Value)[] summed = [];

    [GlobalSetup]
    public void Setup()
    {
        mesh = AssemblyInput.Triangles(2_000_000);
        var space = new NodeSpace(mesh, 1);
        assembler = new Assembler(space);
        serial = new Assembler(space, 1);
        matrix = assembler.CreateMatrix<double>();
        assembler.Add(matrix, Term.Stiffness(1.0));
        summed = new (int, int, double)[matrix.Values.Length];
        for (int row = 0, k = 0; row < matrix.RowCount; row++)
        {
            foreach (int column in matrix.Pattern.ColumnsOf(row))
            {
                summed[k] = (row, column, matrix.Values[k]);
                k++;
            }
        }
    }

    /// <summary>All local entries. The builder keeps repeated places apart, so that its work ends before that of an assembly.</summary>
    [Benchmark(Baseline = true)]
    public object IndexedBuilderOfLocalEntries() =>
        Indexed.OfIndexed(mesh.VertexCount, mesh.VertexCount, AssemblyInput.LocalEntries(mesh));

    /// <summary>The finished entries, already integrated and summed: the builder's work alone.</summary>
    [Benchmark]
    public object IndexedBuilderOfSummedEntries() => Indexed.OfIndexed(mesh.VertexCount, mesh.VertexCount, summed);

    [Benchmark]
    public object FirstAssembly()
    {
        var first = new Assembler(new NodeSpace(mesh, 1));
        SparseMatrix<double> made = first.CreateMatrix<double>();
        first.Add(made, Term.Stiffness(1.0));
        return made;
    }

    [Benchmark]
    public void Refill() => RefillBy(assembler);

    [Benchmark]
    public void RefillByOneThread() => RefillBy(serial);

    /// <summary>Reads what a refill must read and rewrites the values, once each, by one thread.</summary>
    [Benchmark]
    public double Streaming()
    {
        long sum = 0;
        foreach (int vertex in mesh.Triangles)
        {
            sum += vertex;
        }

        foreach (int region in mesh.CellRegions)
        {
            sum += region;
        }

        foreach (int start in matrix.Pattern.RowStarts)
        {
            sum += start;
        }

        double total = sum;
        foreach (Point2D vertex in mesh.Vertices)
        {
            total += vertex.X + vertex.Y;
        }

        foreach (ref double value in matrix.Values)
        {
            value *= 1.000000001;
        }

        return total;
    }

    private void RefillBy(Assembler by)
    {
        matrix.Values.Clear();
        by.Add(matrix, Term.Stiffness(1.0));
    }
}
