using FemCore2D.Assembly;
using FemCore2D.Geometry;
using FemCore2D.Solvers;

namespace FemCore2D.Fields.Tests.Electrostatics;

/// <summary>Each bad problem is refused at the call that makes it so, with object, place and remedy.</summary>
public class BadProblemTests
{
    private static readonly Mesh Square = Sections.Square();

    private static ElectrostaticProblem Air() => new ElectrostaticProblem(Square).WithDielectric("air", 1);

    [Fact]
    public void UnknownNamesListTheKnownOnes()
    {
        Assert.Contains("'air'", Assert.Throws<UnknownNameException>(() => Air().WithDielectric("oil", 2)).Message, StringComparison.Ordinal);
        Assert.Contains("'top'", Assert.Throws<UnknownNameException>(() => Air().WithConductor("tip")).Message, StringComparison.Ordinal);
        Assert.Throws<UnknownNameException>(() => Air().WithSurfaceCharge("air", 1));
        Assert.Throws<UnknownNameException>(() => Air().WithPeriodicity("left", "rihgt"));
        ElectrostaticSolution solution = Air().WithConductor("top").Solve();
        Assert.Throws<UnknownNameException>(() => solution.ChargeOf("bottom"));
        Assert.Throws<UnknownNameException>(() => Air().WithConductor("top").SolveCapacitances(["bottom"]));
        Assert.Throws<UnknownNameException>(() => Air().WithFloatingConductor("top").SolveCapacitances(["top"]));
    }

    [Fact]
    public void FloatingPotentialIsRefused()
    {
        var fault = Assert.Throws<IllPosedProblemException>(() => Air().WithSpaceCharge("air", 1e-9).Solve());
        Assert.Contains("No potential is fixed", fault.Message, StringComparison.Ordinal);
        Assert.Throws<IllPosedProblemException>(() => Air().WithFloatingConductor("top", 1e-9).Solve());
    }

    [Fact]
    public void APartThatNothingTiesDownIsFound()
    {
        Mesh mesh = Mesher.Generate(
            CrossSection.Empty
                .Fill(Outline.Rectangle(Point2D.Origin, 1, 1, "plate"), "air")
                .Fill(Outline.Rectangle(new Point2D(3, 0), 1, 1), "island"),
            MeshOptions.Default.WithSize(0.5)).Mesh;
        var fault = Assert.Throws<IllPosedProblemException>(() => new ElectrostaticProblem(mesh)
            .WithDielectric("air", 1).WithDielectric("island", 1).WithConductor("plate").Solve());
        Assert.Contains("around (", fault.Message, StringComparison.Ordinal);
    }

    [Fact]
    public void ARegionWithoutMaterialIsNamed()
    {
        var fault = Assert.Throws<IllPosedProblemException>(
            () => new ElectrostaticProblem(Square).WithConductor("top").Solve());
        Assert.Contains("'air'", fault.Message, StringComparison.Ordinal);
    }

    [Fact]
    public void NothingToSolveIsRefused() => Assert.Throws<IllPosedProblemException>(
        () => new ElectrostaticProblem(Square).WithConductor("air").Solve());

    [Fact]
    public void SecondConditionsOnTheSameNameAreRefused()
    {
        Assert.Throws<ConflictingConditionsException>(() => Air().WithDielectric("air", 2));
        Assert.Throws<ConflictingConditionsException>(() => Air().WithConductor("air"));
        Assert.Throws<ConflictingConditionsException>(() => Air().WithConductor("top").WithConductor("top", 1));
        Assert.Throws<ConflictingConditionsException>(() => Air().WithConductor("top").WithPotential("top", p => p.X));
        Assert.Throws<ConflictingConditionsException>(() => Air().WithPotential("top", p => p.X).WithConductor("top"));
        Assert.Throws<ConflictingConditionsException>(() => Air().WithConductor("top").WithSurfaceCharge("top", 1));
        Assert.Throws<ConflictingConditionsException>(() => Air().WithSurfaceCharge("top", 1).WithSurfaceCharge("top", 1));
        Assert.Throws<ConflictingConditionsException>(() => Air().WithPeriodicity("left", "left"));
        Assert.Throws<ConflictingConditionsException>(
            () => Air().WithPeriodicity("left", "right").WithConductor("right"));
    }

    [Fact]
    public void AChargedRimOfAConductorIsRefused()
    {
        Mesh mesh = Mesher.Generate(
            CrossSection.Empty
                .Fill(Outline.Rectangle(Point2D.Origin, 1, 1, "plate"), "air")
                .Fill(Outline.Circle(new Point2D(0.5, 0.5), 0.2, "rim"), "wire"),
            MeshOptions.Default.WithSize(0.3)).Mesh;
        var fault = Assert.Throws<ConflictingConditionsException>(() => new ElectrostaticProblem(mesh)
            .WithDielectric("air", 1).WithConductor("plate").WithFloatingConductor("wire").WithSurfaceCharge("rim", 1e-9).Solve());
        Assert.Contains("'rim'", fault.Message, StringComparison.Ordinal);
    }

    [Fact]
    public void ContradictingPotentialsNameThePlace()
    {
        var fault = Assert.Throws<ConflictingConditionsException>(
            () => Air().WithConductor("bottom", 1).WithConductor("right", 2).Solve());
        Assert.Contains("'bottom'", fault.Message, StringComparison.Ordinal);
        Assert.Contains("'right'", fault.Message, StringComparison.Ordinal);
        Assert.Contains("(1, 0)", fault.Message, StringComparison.Ordinal);
        Assert.Throws<ConflictingConditionsException>(
            () => Air().WithConductor("bottom").WithFloatingConductor("right").Solve());

        // Equal potentials may meet, until one of them is driven.
        ElectrostaticProblem touching = Air().WithConductor("bottom").WithConductor("right");
        Assert.Equal(0, touching.Solve().Energy);
        Assert.Throws<ConflictingConditionsException>(() => touching.SolveCapacitances(["right"]));
    }

    [Fact]
    public void UnmatchedSidesAreRefused()
    {
        Mesh mesh = Mesher.Generate(
            CrossSection.Empty.Fill(Outline.Rectangle(Point2D.Origin, 1, 1, "bottom", "right", "top", "left"), "air"),
            MeshOptions.Default.WithSize(0.3).WithBoundarySize("left", 0.05)).Mesh;
        Assert.Throws<UnmatchedBoundariesException>(() => new ElectrostaticProblem(mesh)
            .WithDielectric("air", 1).WithConductor("top").WithPeriodicity("left", "right").Solve());
        Assert.Throws<UnmatchedBoundariesException>(() => new ElectrostaticProblem(mesh)
            .WithDielectric("air", 1).WithConductor("right").WithPeriodicity("bottom", "left").Solve());
    }

    [Theory]
    [InlineData(double.NaN)]
    [InlineData(double.PositiveInfinity)]
    [InlineData(0)]
    [InlineData(-1)]
    public void BadPermittivitiesAreRefused(double permittivity)
    {
        Assert.Throws<ArgumentOutOfRangeException>(() => new ElectrostaticProblem(Square).WithDielectric("air", permittivity));
        Assert.ThrowsAny<ArgumentException>(() => Permittivity.Anisotropic(2, permittivity));
    }

    [Fact]
    public void BadNumbersAreRefused()
    {
        Assert.Throws<ArgumentOutOfRangeException>(() => Air().WithConductor("top", double.NaN));
        Assert.Throws<ArgumentOutOfRangeException>(() => Air().WithFloatingConductor("top", double.NegativeInfinity));
        Assert.Throws<ArgumentOutOfRangeException>(() => Air().WithSpaceCharge("air", double.NaN));
        Assert.Throws<ArgumentOutOfRangeException>(() => new ElectrostaticProblem(Square, 0));
        Assert.Throws<ArgumentOutOfRangeException>(() => Air().WithThinLayer("top", 0));
        Assert.Throws<ArgumentOutOfRangeException>(() => Air().WithThinLayer("top", 1, double.NaN));
        Assert.Throws<ArgumentOutOfRangeException>(() => new SolveSettings { RelativeTolerance = double.NaN });
        Assert.Throws<ArgumentOutOfRangeException>(() => new SolveSettings { IterationLimit = 0 });
        Assert.Throws<ArgumentOutOfRangeException>(() => new ElectrostaticProblem(Square, 6));
        Assert.Throws<ArgumentException>(() => Air().WithConductor("top").SolveCapacitances([]));
        Assert.Throws<ArgumentException>(() => Air().WithConductor("top").SolveCapacitances(["top", "top"]));
    }

    [Fact]
    public void FunctionsThatGiveNonsenseAreCaught()
    {
        Assert.Throws<ConflictingConditionsException>(() => Air().WithPotential("top", _ => double.NaN).Solve());
        var fault = Assert.Throws<IllPosedProblemException>(
            () => Air().WithConductor("top").WithSpaceCharge("air", _ => double.NaN).Solve());
        Assert.Contains("'air' at (", fault.Message, StringComparison.Ordinal);
        fault = Assert.Throws<IllPosedProblemException>(() => new ElectrostaticProblem(Square)
            .WithDielectric("air", Permittivity.OfPlace(_ => -1.0)).WithConductor("top").Solve());
        Assert.Contains("at (", fault.Message, StringComparison.Ordinal);
    }

    [Fact]
    public void ASectionLeftOfTheAxisIsRefused()
    {
        Mesh mesh = Mesher.Generate(
            CrossSection.Empty.Fill(Outline.Circle(Point2D.Origin, 1), "air"), MeshOptions.Default.WithSize(0.5)).Mesh;
        Assert.Throws<IllPosedProblemException>(() => new ElectrostaticProblem(mesh, 2, CoordinateSystem.Axisymmetric));
    }

    [Fact]
    public void IterationsThatDoNotArriveAreReported()
    {
        var fault = Assert.Throws<NotConvergedException>(
            () => Air().WithConductor("top", 1).WithConductor("bottom").Solve(new SolveSettings { IterationLimit = 1 }));
        Assert.Equal(1, fault.Report.Iterations);
    }

    [Fact]
    public void WorkStopsWhenAsked()
    {
        using CancellationTokenSource stop = new();
        Stopper progress = new(stop);
        Assert.ThrowsAny<OperationCanceledException>(() => Air().WithConductor("top", 1).WithConductor("bottom")
            .Solve(progress: progress, cancellationToken: stop.Token));
        Assert.True(progress.Reports > 0);
    }

    private sealed class Stopper(CancellationTokenSource source) : IProgress<SolveProgress>
    {
        public int Reports { get; private set; }

        public void Report(SolveProgress value)
        {
            Reports++;
            if (value.Stage == SolveStage.Solver)
            {
                source.Cancel();
            }
        }
    }
}
