using BenchmarkDotNet.Attributes;
using BenchmarkDotNet.Engines;
using FemCore2D.Assembly;
using FemCore2D.Geometry;
using FemCore2D.Sparse;

namespace FemCore2D.Benchmarks;

/// <summary>How time and memory of the assembly grow with the number of triangles.</summary>
[SimpleJob(RunStrategy.Monitoring, warmupCount: 2, iterationCount: 7)]
[MemoryDiagnoser]
public class AssemblyGrowthBenchmarks
{
    private Mesh mesh = null!;
    private Assembler assembler = null!;
    private SparseMatrix<double> matrix = null!;

    [Params(10_000, 100_000, 1_000_000, 4_000_000)]
    public int Triangles { get; set; }

    [GlobalSetup]
    public void Setup()
    {
        mesh = AssemblyInput.Triangles(Triangles);
        assembler = new Assembler(new NodeSpace(mesh, 1));
        matrix = assembler.CreateMatrix<double>();
    }

    [Benchmark]
    public object FirstAssembly()
    {
        var first = new Assembler(new NodeSpace(mesh, 1));
        SparseMatrix<double> made = first.CreateMatrix<double>();
        first.Add(made, Term.Stiffness(1.0));
        return made;
    }

    [Benchmark]
    public void Refill()
    {
        matrix.Values.Clear();
        assembler.Add(matrix, Term.Stiffness(1.0));
    }
}
