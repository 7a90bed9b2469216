using FemCore2D.Geometry;
using FemCore2D.Sparse;
using FemCore2D.Testing;
using FsCheck.Xunit;

namespace FemCore2D.Assembly.Tests;

/// <summary>The bits and the memory of a refill.</summary>
public class RefillTests
{
    [Theory]
    [InlineData(1, true)]
    [InlineData(2, true)]
    [InlineData(5, true)]
    [InlineData(1, false)]
    [InlineData(3, false)]
    public void AnyNumberOfThreadsGivesTheSameBits(int degree, bool triangles)
    {
        Mesh mesh = TestMeshes.Disc(12, 12, triangles);
        byte[][] results = [.. new[] { 1, 2, 7 }.Select(threads =>
        {
            // A space of its own for each, so that the pattern is built by as many threads too.
            var assembler = new Assembler(new NodeSpace(mesh, degree), threads);
            SparseMatrix<double> matrix = assembler.CreateMatrix<double>();
            assembler.Add(matrix, Term.Stiffness(Coefficient.OfPlace(p => 1 + (p.X * p.Y), 2)));
            assembler.Add(matrix, Term.Mass(0.7));
            double[] load = assembler.CreateVector<double>();
            assembler.Add(load, Term.Source(Coefficient.OfPlace(p => Math.Sin(p.X))));
            return (byte[])
            [
                .. System.Runtime.InteropServices.MemoryMarshal.AsBytes(matrix.Pattern.Columns),
                .. System.Runtime.InteropServices.MemoryMarshal.AsBytes(matrix.Values),
                .. System.Runtime.InteropServices.MemoryMarshal.AsBytes(load.AsSpan()),
            ];
        })];
        Assert.Equal(results[0], results[1]);
        Assert.Equal(results[0], results[2]);
    }

    [Property(MaxTest = 10, Arbitrary = [typeof(FieldArbitraries)])]
    public void SymmetricTermsGiveSymmetricBits(Mesh mesh)
    {
        for (int degree = 1; degree <= (mesh.QuadrilateralCount > 0 ? 3 : 5); degree++)
        {
            var assembler = new Assembler(new NodeSpace(mesh, degree), 2);
            SparseMatrix<double> matrix = assembler.CreateMatrix<double>();
            assembler.Add(matrix, Term.Stiffness(Tensor2D.Principal(1.0, 3.0, 0.3)));
            Assert.True(matrix.IsSymmetric());
            assembler.Add(matrix, Term.Stiffness(Coefficient.OfPlace(p => Tensor2D.Principal(2.0, 1.0, p.X), 2)));
            assembler.Add(matrix, Term.Mass(Coefficient.OfPlace(p => 1 + (p.X * p.X), 2)));
            foreach (string boundary in mesh.BoundaryNames)
            {
                assembler.AddOnBoundary(matrix, Term.BoundaryMass(Coefficient.OfPlace(p => 2 + Math.Cos(p.Y))), boundary);
            }

            Assert.True(matrix.IsSymmetric());
        }
    }

    [Fact]
    public void PatternHoldsExactlyTheNeighboursOfEachUnknown()
    {
        Mesh mesh = TestMeshes.Square(4, triangles: true);
        var space = new NodeSpace(mesh, 3);
        HashSet<(int, int)> expected = [];
        int[] unknowns = new int[10];
        for (int cell = 0; cell < mesh.CellCount; cell++)
        {
            space.Numbering.CellUnknowns(cell, unknowns);
            expected.UnionWith(unknowns.SelectMany(i => unknowns.Select(j => (i, j))));
        }

        SparsePattern pattern = new Assembler(space).Pattern;
        Assert.Equal(expected.Count, pattern.EntryCount);
        for (int row = 0; row < pattern.RowCount; row++)
        {
            int[] columns = pattern.ColumnsOf(row).ToArray();
            Assert.Equal(columns.Order(), columns);
            Assert.All(columns, column => Assert.Contains((row, column), expected));
        }
    }

    [Fact]
    public void RowsOfMoreThan256EntriesAreServed()
    {
        // A fan of 300 triangles around one vertex.
        const int Count = 300;
        double step = 2 * Math.PI / Count;
        Mesh fan = new MeshDefinition
        {
            Vertices = [Point2D.Origin, .. Enumerable.Range(0, Count).Select(i => Point2D.Origin + Vector2D.AtAngle(i * step))],
            Triangles = [.. Enumerable.Range(0, Count).SelectMany(i => new[] { 0, i + 1, ((i + 1) % Count) + 1 })],
            RegionNames = ["all"],
        }.ToMesh();
        var assembler = new Assembler(new NodeSpace(fan, 1));
        SparseMatrix<double> matrix = assembler.CreateMatrix<double>();
        assembler.Add(matrix, Term.Stiffness(1.0));
        Assert.Equal(Count + 1, matrix.Pattern.ColumnsOf(0).Length);

        // Each triangle adds the squared opposite edge over four areas.
        double edge = 2 * Math.Sin(step / 2);
        Assert.Equal(Count * edge * edge / (2 * Math.Sin(step)), matrix.Values[0], 1e-9);
    }

    [Fact]
    public void RefillStopsWhenAsked()
    {
        var assembler = new Assembler(new NodeSpace(TestMeshes.Disc(10, 10, triangles: true), 1));
        SparseMatrix<double> matrix = assembler.CreateMatrix<double>();
        Assert.ThrowsAny<OperationCanceledException>(
            () => assembler.Add(matrix, Term.Mass(1.0), cancellationToken: new CancellationToken(canceled: true)));
    }
}
