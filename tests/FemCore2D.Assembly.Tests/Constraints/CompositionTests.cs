using System.Numerics;
using FemCore2D.Geometry;
using FemCore2D.Sparse;

namespace FemCore2D.Assembly.Tests;

/// <summary>How conditions compose where they meet, and which contradictions are found.</summary>
public class CompositionTests
{
    private static readonly NodeSpace Square = new(TestMeshes.Square(2, triangles: true), 2);

    [Fact]
    public void AFixedValueReachesThroughAPairWithItsFactor()
    {
        // Whichever side has the lower numbers: the fixed one is named first or second in the pair.
        foreach ((string first, string second) in new[] { ("bottom", "top"), ("top", "bottom") })
        {
            ResolvedConstraints<double> constraints = new ConstraintSet<double>(Square)
                .Pair(first, second, -1).FixBoundary("bottom", 3).Resolve();
            double[] all = constraints.Expand(new double[constraints.FreeCount]);
            Assert.All(Square.Numbering.UnknownsOfBoundary("bottom"), unknown => Assert.Equal(3, all[unknown]));
            Assert.All(Square.Numbering.UnknownsOfBoundary("top"), unknown => Assert.Equal(-3, all[unknown]));

            // The reaction is that of the tied equations, seen from the fixed side.
            double[] residual = new double[Square.UnknownCount];
            foreach (int unknown in Square.Numbering.UnknownsOfBoundary("top"))
            {
                residual[unknown] = -1;
            }

            foreach (int unknown in Square.Numbering.UnknownsOfBoundary("bottom"))
            {
                residual[unknown] = 1;
            }

            Assert.Equal(
                2 * Square.Numbering.UnknownsOfBoundary("bottom").Length,
                constraints.Reaction("bottom", residual));
        }
    }

    [Fact]
    public void EqualValuesFromDifferentFormulasAgree()
    {
        // sin(pi) is not zero to the bit; at the corner it means the same.
        ResolvedConstraints<double> constraints = new ConstraintSet<double>(Square)
            .FixBoundary("right", 0)
            .FixBoundary("bottom", p => Math.Sin(Math.PI * p.X))
            .Resolve();
        Assert.Throws<ConflictingConditionsException>(() => constraints.WithValue("right", 1).Reduce(
            new Assembler(Square).CreateMatrix<double>(), new double[Square.UnknownCount]));
    }

    [Fact]
    public void TwoValuesForOneUnknownAreRefusedWithBothNamesAndThePlace()
    {
        ConflictingConditionsException error = Assert.Throws<ConflictingConditionsException>(
            () => new ConstraintSet<double>(Square).FixBoundary("left", 1).FixBoundary("top", 2).Resolve());
        Assert.Contains("'left'", error.Message, StringComparison.Ordinal);
        Assert.Contains("'top'", error.Message, StringComparison.Ordinal);
        Assert.Contains(new Point2D(0, 1).ToString(), error.Message, StringComparison.Ordinal);
    }

    [Fact]
    public void AFloatingPartThatTouchesAFixedOneIsRefused()
    {
        ConflictingConditionsException error = Assert.Throws<ConflictingConditionsException>(
            () => new ConstraintSet<double>(Square).FloatRegion("b", 0).FixBoundary("bottom", 2).Resolve());
        Assert.Contains("'b'", error.Message, StringComparison.Ordinal);
        Assert.Contains("'bottom'", error.Message, StringComparison.Ordinal);
        Assert.Throws<ConflictingConditionsException>(
            () => new ConstraintSet<double>(Square).FloatRegion("b", 0).FloatBoundary("top", 2).Resolve());
    }

    [Fact]
    public void CyclesOfPairsNeedFactorsThatMultiplyToOne()
    {
        // Left to right and bottom to top commute: the corners close the cycle with any two factors.
        _ = new ConstraintSet<Complex>(Square)
            .Pair("left", "right", Complex.ImaginaryOne).Pair("bottom", "top", -Complex.One).Resolve();

        // A field that floats on both sides of an antiperiodic pair would be its own opposite.
        Assert.Throws<ConflictingConditionsException>(
            () => new ConstraintSet<double>(Square).Pair("bottom", "top", -1).FloatBoundary("middle", 1).Resolve());
        _ = new ConstraintSet<double>(Square).Pair("bottom", "top", 1).FloatBoundary("middle", 1).Resolve();
    }

    [Fact]
    public void TheCentreOfATurnIsZeroWhenTheFactorIsNotOne()
    {
        // A quarter disc of one cell layer around the origin, its straight sides paired by a quarter turn.
        Mesh sector = new MeshDefinition
        {
            Vertices = [new(0, 0), new(1, 0), new(Math.Sqrt(0.5), Math.Sqrt(0.5)), new(0, 1)],
            Triangles = [0, 1, 2, 0, 2, 3],
            RegionNames = ["all"],
            Boundaries = new Dictionary<string, IReadOnlyList<(int Start, int End)>>
            {
                ["first"] = [(0, 1)],
                ["second"] = [(0, 3)],
            },
            Arcs = [(1, 2, Math.PI / 4), (2, 3, Math.PI / 4)],
        }.ToMesh();
        var space = new NodeSpace(sector, 2);
        int centre = space.Numbering.FirstOfVertex(0);
        Assert.True(new ConstraintSet<double>(space).Pair("first", "second", -1).Resolve().FreeUnknownOf(centre) < 0);
        Assert.True(new ConstraintSet<double>(space).Pair("first", "second", 1).Resolve().FreeUnknownOf(centre) >= 0);
    }

    [Theory]
    [InlineData(1)]
    [InlineData(3)]
    public void APeriodicQuarterOfARingHasTheFieldOfTheWhole(int degree)
    {
        // u = x y is antiperiodic under a quarter turn, and harmonic.
        static double Exact(Point2D p) => p.X * p.Y;
        var space = new NodeSpace(TestMeshes.RingQuarter(4, 6, triangles: true), degree);
        var assembler = new Assembler(space);
        SparseMatrix<double> matrix = assembler.CreateMatrix<double>();
        assembler.Add(matrix, Term.Stiffness(1.0));
        ResolvedConstraints<double> constraints = new ConstraintSet<double>(space)
            .Pair("start", "end", -1)
            .FixBoundary("inner", Exact)
            .FixBoundary("outer", Exact)
            .Resolve();
        NodeField<double> field = Solve.Field(constraints, matrix, assembler.CreateVector<double>());
        Assert.True(field.DistanceTo(Exact) < (degree == 1 ? 0.05 : 1e-4));

        // Free but for the pair, the line start would take no zero by itself.
        int[] start = [.. space.Numbering.UnknownsOfBoundary("start")];
        Assert.Contains(start, unknown => constraints.FreeUnknownOf(unknown) >= 0);
        Assert.All(start, unknown => Assert.Equal(0, field.Coefficients[unknown], degree == 1 ? 0.05 : 1e-4));
    }

    [Fact]
    public void PartsWithoutAFixedValueAreFound()
    {
        Mesh apart = Mesh.Join(
        [
            QuadrilateralPatch.Straight(new(0, 0), new(1, 0), new(1, 1), new(0, 1), "a").Divide(2, 2),
            new QuadrilateralPatch(
                new OutlinePiece(new(2, 0), new(3, 0), 0, "far"),
                new OutlinePiece(new(3, 0), new(3, 1)),
                new OutlinePiece(new(3, 1), new(2, 1)),
                new OutlinePiece(new(2, 1), new(2, 0)),
                "b").Divide(2, 2),
        ]);
        var space = new NodeSpace(apart, 2);
        ResolvedConstraints<double> constraints = new ConstraintSet<double>(space).FixBoundary("far", 1).Resolve();
        int unknown = constraints.FindUnfixed();
        Assert.True(space.NodePlaces[unknown].X <= 1);
        Assert.Equal(-1, constraints.FindUnfixed(cell => apart.CellRegions[cell] == apart.RegionIndex("b")));
        Assert.Equal(-1, new ConstraintSet<double>(space).FixBoundary("far", 1).FixRegion("a", 0).Resolve().FindUnfixed());
    }

    [Fact]
    public void NamesAndNumbersAreCheckedAtOnce()
    {
        var set = new ConstraintSet<double>(Square);
        Assert.Throws<UnknownNameException>(() => set.FixBoundary("nowhere", 1));
        Assert.Throws<UnknownNameException>(() => set.FixRegion("nowhere", 1));
        Assert.Throws<UnknownNameException>(() => set.FixPoint("nowhere", 1));
        Assert.Throws<ArgumentOutOfRangeException>(() => set.FixBoundary("left", double.NaN));
        Assert.Throws<ArgumentOutOfRangeException>(() => set.Pair("left", "right", 0));
        Assert.Throws<ConflictingConditionsException>(() => set.FixBoundary("left", 1).FixBoundary("left", 2));
        Assert.Throws<UnmatchedBoundariesException>(() => set.Pair("left", "middle", 1).Resolve());
    }
}
