using BenchmarkDotNet.Attributes;
using BenchmarkDotNet.Engines;
using FemCore2D.Assembly;
using FemCore2D.Sparse;

namespace FemCore2D.Benchmarks;

/// <summary>Refill at each degree on 200 thousand triangles: constant coefficient, function of place, and mass.</summary>
[SimpleJob(RunStrategy.Monitoring, warmupCount: 2, iterationCount: 5)]
public class AssemblyDegreeBenchmarks
{
    private Assembler assembler = null!;
    private SparseMatrix<double> matrix = null!;

    [Params(1, 2, 3, 4, 5)]
    public int Degree { get; set; }

    [GlobalSetup]
    public void Setup()
    {
        assembler = new Assembler(new NodeSpace(AssemblyInput.Triangles(200_000), Degree));
        matrix = assembler.CreateMatrix<double>();
    }

    [Benchmark(Baseline = true)]
    public void ConstantStiffness() => assembler.Add(matrix, Term.Stiffness(1.0));

    [Benchmark]
    public void StiffnessOfPlace() => assembler.Add(matrix, Term.Stiffness(Coefficient.OfPlace(p => 1 + p.X, 1)));

    [Benchmark]
    public void ConstantMass() => assembler.Add(matrix, Term.Mass(1.0));
}
