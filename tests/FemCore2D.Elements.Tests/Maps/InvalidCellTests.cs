using FemCore2D.Geometry;

namespace FemCore2D.Elements.Tests;

public class InvalidCellTests
{
    [Fact]
    public void ATriangleListedClockwiseIsNamed()
    {
        Mesh mesh = TestMeshes.OfCells([new(0, 0), new(1, 0), new(0, 1), new(4, 4), new(4, 5), new(5, 4)], [0, 1, 2, 3, 4, 5], []);
        InvalidCellException fold = Assert.Throws<InvalidCellException>(() => new CellMaps(mesh, 1));
        Assert.Equal(1, fold.Cell);
        Assert.Equal(new Point2D(4, 4), fold.Place);
        Assert.Contains("Cell 1", fold.Message, StringComparison.Ordinal);
        Assert.Contains("'filling'", fold.Message, StringComparison.Ordinal);
        Assert.Contains("counterclockwise", fold.Message, StringComparison.Ordinal);
    }

    [Fact]
    public void AReentrantVertexOfAQuadrilateralIsNamed()
    {
        Mesh mesh = TestMeshes.OfCells([new(0, 0), new(1, 0), new(0.25, 0.25), new(0, 1)], [], [0, 1, 2, 3]);
        InvalidCellException fold = Assert.Throws<InvalidCellException>(() => new CellMaps(mesh, 3));
        Assert.Equal(new Point2D(0.25, 0.25), fold.Place);
    }

    [Theory]
    [InlineData(2)]
    [InlineData(3)]
    public void AnArcThatBendsThroughItsCellIsNamedAndDegreeOneStillWorks(int degree)
    {
        // A half circle of radius 1 bulges into a triangle of height 0.8.
        Mesh mesh = TestMeshes.OfCells([new(-1, 0), new(1, 0), new(0, 0.8)], [0, 1, 2], [], new MarkedEdge(0, 1, -Math.PI, -1));
        InvalidCellException fold = Assert.Throws<InvalidCellException>(() => new CellMaps(mesh, degree));
        Assert.Contains("refine", fold.Message, StringComparison.Ordinal);
        Assert.Equal(0, fold.Cell);
        Assert.True(new CellMaps(mesh, 1).IsAffine(0));
    }

    [Theory]
    [InlineData(CellKind.Triangle, 2)]
    [InlineData(CellKind.Triangle, 3)]
    [InlineData(CellKind.Quadrilateral, 2)]
    [InlineData(CellKind.Quadrilateral, 3)]
    public void AFoldIsFoundExactlyWhereTheDeterminantDips(CellKind cell, int mapDegree)
    {
        // A bowl with its lowest point between all lattice points, lifted by a hair above zero or below it.
        PositivityCheck check = new(cell, mapDegree);
        Point2D dip = new(0.3137, 0.2719);
        Assert.False(check.TryFindFold(new Bowl(dip, 1e-5), out _));
        Assert.True(check.TryFindFold(new Bowl(dip, -1e-5), out Point2D fold));
        Assert.True(fold.DistanceTo(dip) <= 0.0032);
    }

    [Fact]
    public void VerticesThatAreNotFiniteAreNamed()
    {
        Mesh mesh = TestMeshes.OfCells([new(0, 0), new(double.NaN, 0), new(0, 1)], [0, 1, 2], []);
        Assert.Throws<InvalidCellException>(() => new CellMaps(mesh, 1));
    }

    [Fact]
    public void DegreesWithoutAMapAreRefused()
    {
        Mesh mesh = TestMeshes.Disc(1);
        Assert.Throws<ArgumentOutOfRangeException>(() => new CellMaps(mesh, 0));
        Assert.Throws<ArgumentOutOfRangeException>(() => new CellMaps(mesh, 4));
        Assert.Throws<ArgumentNullException>(() => new CellMaps(null!, 1));
    }

    private readonly struct Bowl(Point2D dip, double lift) : IDeterminant
    {
        public double DeterminantAt(Point2D reference) => (reference - dip).LengthSquared + lift;
    }
}
