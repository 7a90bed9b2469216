using System.Numerics;
using FemCore2D.Sparse;

namespace FemCore2D.Assembly.Tests;

/// <summary>Counts what the whole process allocates, so that no other test may run at the time.</summary>
[CollectionDefinition(nameof(AllocationTests), DisableParallelization = true)]
[Collection(nameof(AllocationTests))]
public class AllocationTests
{
    [Theory]
    [InlineData(1)]
    [InlineData(2)]
    public void RefillAllocatesNothingPerCell(int threads)
    {
        var space = new NodeSpace(TestMeshes.Disc(40, 40, triangles: true), 2);
        var assembler = new Assembler(space, threads);
        SparseMatrix<Complex> matrix = assembler.CreateMatrix<Complex>();
        Complex[] load = assembler.CreateVector<Complex>();
        var coefficient = Coefficient.OfPlace(p => new Complex(p.X, 1), 2);
        long allocated = 0;
        for (int round = 0; round < 3; round++)
        {
            long before = GC.GetTotalAllocatedBytes(precise: true);
            assembler.Add(matrix, Term.Stiffness(coefficient));
            assembler.Add(load, Term.Source(coefficient));
            assembler.Add(matrix, Term.Mass(Complex.ImaginaryOne));
            allocated = GC.GetTotalAllocatedBytes(precise: true) - before;
        }

        // 16 thousand cells are assembled three times; one byte a cell would already exceed this.
        Assert.True(space.Mesh.CellCount > 15_000);
        Assert.True(allocated < 3 * 15_000, $"{allocated} bytes");
    }
}
