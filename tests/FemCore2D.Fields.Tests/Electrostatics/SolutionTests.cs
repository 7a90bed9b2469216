using FemCore2D.Assembly;
using FemCore2D.Geometry;

namespace FemCore2D.Fields.Tests.Electrostatics;

public class SolutionTests
{
    private const double Eps0 = PhysicalConstants.ElectricConstant;

    [Theory]
    [InlineData(1)]
    [InlineData(2)]
    [InlineData(5)]
    public void UniformFieldIsExact(int degree)
    {
        ElectrostaticSolution solution = new ElectrostaticProblem(Sections.Square(), degree)
            .WithDielectric("air", 2)
            .WithConductor("bottom")
            .WithConductor("top", 10)
            .Solve();

        Point2D place = new(0.3, 0.7);
        Assert.Equal(7, solution.PotentialAt(place), 1e-9);
        Assert.Equal(0, solution.FieldAt(place).X, 1e-8);
        Assert.Equal(-10, solution.FieldAt(place).Y, 1e-8);
        Assert.Equal(2 * Eps0 * 10, solution.ChargeOf("top"), 1e-9 * Eps0);
        Assert.Equal(-2 * Eps0 * 10, solution.ChargeOf("bottom"), 1e-9 * Eps0);
        Assert.Equal(0.5 * 2 * Eps0 * 100, solution.Energy, 1e-8 * Eps0);
        Assert.Equal(10, solution.LargestField("air").Magnitude, 1e-7);
        Assert.True(solution.EstimatedRelativeFieldError < 1e-8);
    }

    /// <summary>Two layers in series: the field is that of two capacitors (closed form).</summary>
    [Fact]
    public void LayersAreCapacitorsInSeries()
    {
        Mesh mesh = Mesher.Generate(
            CrossSection.Empty
                .Fill(Outline.Rectangle(Point2D.Origin, 1, 0.25, bottom: "bottom"), "glass")
                .Fill(Outline.Rectangle(new Point2D(0, 0.25), 1, 0.75, top: "top"), "air"),
            MeshOptions.Default.WithSize(0.2)).Mesh;
        ElectrostaticSolution solution = new ElectrostaticProblem(mesh, 1)
            .WithDielectric("glass", 5)
            .WithDielectric("air", 1)
            .WithConductor("bottom")
            .WithConductor("top", 1)
            .Solve();

        double capacitance = Eps0 / ((0.25 / 5) + 0.75);
        Assert.Equal(capacitance, solution.ChargeOf("top"), 1e-10 * capacitance);
        Assert.Equal(capacitance / (5 * Eps0), solution.LargestField("glass").Magnitude, 1e-8);
        Assert.Equal(capacitance / Eps0, solution.LargestField("air").Magnitude, 1e-8);
    }

    /// <summary>A space charge ρ = -ε Δφ with φ = sin(πx) sinh(y) + x² y: rates p + 1 in the potential.</summary>
    [Theory]
    [InlineData(1)]
    [InlineData(2)]
    [InlineData(3)]
    [InlineData(4)]
    public void ManufacturedPotentialConverges(int degree)
    {
        static double Exact(Point2D p) => (Math.Sin(Math.PI * p.X) * Math.Sinh(p.Y)) + (p.X * p.X * p.Y);
        static double Laplacian(Point2D p) =>
            ((1 - (Math.PI * Math.PI)) * Math.Sin(Math.PI * p.X) * Math.Sinh(p.Y)) + (2 * p.Y);

        double Error(Mesh mesh) => new ElectrostaticProblem(mesh, degree)
            .WithDielectric("air", 3)
            .WithSpaceCharge("air", p => -3 * Eps0 * Laplacian(p))
            .WithPotential("bottom", Exact).WithPotential("right", Exact)
            .WithPotential("top", Exact).WithPotential("left", Exact)
            .Solve()
            .Potential.DistanceTo(Exact);

        Mesh coarse = Sections.Square(0.25);
        double first = Error(coarse);
        double second = Error(coarse.RefineAll().Mesh);
        double rate = Math.Log2(first / second);
        Assert.True(rate > degree + 1 - 0.2, $"The rate is {rate:F2} from {first:E2} to {second:E2}.");
    }

    /// <summary>A periodic row of plates has a uniform field across, so only ε_yy of a tilted tensor counts.</summary>
    [Fact]
    public void AnisotropicPlatesFollowTheTensor()
    {
        Permittivity tilted = Permittivity.Anisotropic(6, 2, 30);
        ElectrostaticSolution solution = new ElectrostaticProblem(Sections.PairedSquare(), 2)
            .WithDielectric("air", tilted)
            .WithPeriodicity("left", "right")
            .WithConductor("bottom")
            .WithConductor("top", 1)
            .Solve();

        Assert.Equal(Eps0 * tilted.At(Point2D.Origin).YY, solution.ChargeOf("top"), 1e-9 * Eps0);
    }

    /// <summary>A permittivity ε = 1 + y between plates: C = ε0 / ln 2 per unit width (closed form).</summary>
    [Fact]
    public void PermittivityMayChangeWithPlace()
    {
        ElectrostaticSolution solution = new ElectrostaticProblem(Sections.Square(0.1), 4)
            .WithDielectric("air", Permittivity.OfPlace(p => 1 + p.Y))
            .WithConductor("bottom")
            .WithConductor("top", 1)
            .Solve();

        Assert.Equal(Eps0 / Math.Log(2), solution.ChargeOf("top"), 1e-9 * Eps0);
    }

    /// <summary>A charged surface between earthed plates: the potential is a tent (closed form).</summary>
    [Fact]
    public void SurfaceChargeMakesATent()
    {
        Mesh mesh = Mesher.Generate(
            CrossSection.Empty
                .Fill(Outline.Rectangle(Point2D.Origin, 1, 1, "bottom", null, "top"), "air")
                .Sheet(new Point2D(0, 0.25), new Point2D(1, 0.25), "film"),
            MeshOptions.Default.WithSize(0.2)).Mesh;
        const double density = 1e-9;
        ElectrostaticSolution solution = new ElectrostaticProblem(mesh, 1)
            .WithDielectric("air", 1)
            .WithSurfaceCharge("film", density)
            .WithConductor("bottom")
            .WithConductor("top")
            .Solve();

        Assert.Equal(density * 0.25 * 0.75 / Eps0, solution.PotentialAt(new Point2D(0.4, 0.25)), 1e-8);
        Assert.Equal(-0.75 * density, solution.ChargeOf("bottom"), 1e-9 * density);
        Assert.Equal(-0.25 * density, solution.ChargeOf("top"), 1e-9 * density);
    }

    /// <summary>A uniformly charged ball in an earthed shell (closed form by Gauss's law), by its axial section.</summary>
    [Fact]
    public void ChargedBallInAShell()
    {
        CrossSection section = CrossSection.Empty
            .Fill(Outline.Sector(Point2D.Origin, 2, -Math.PI / 2, Math.PI).Named("shell", piece => !piece.IsStraight), "air")
            .Fill(Outline.Sector(Point2D.Origin, 1, -Math.PI / 2, Math.PI), "ball");
        Mesh mesh = Mesher.Generate(section, MeshOptions.Default.WithSize(0.1).WithLargestArcDegrees(5)).Mesh;
        const double density = 3e-9;
        ElectrostaticSolution solution = new ElectrostaticProblem(mesh, 3, CoordinateSystem.Axisymmetric)
            .WithDielectric("air", 1)
            .WithDielectric("ball", 1)
            .WithSpaceCharge("ball", density)
            .WithConductor("shell")
            .Solve();

        double charge = density * 4 * Math.PI / 3;
        double centre = charge / (4 * Math.PI * Eps0) * (1.5 - 0.5);
        Assert.Equal(-charge, solution.ChargeOf("shell"), 5e-8 * charge);
        Assert.Equal(centre, solution.PotentialAt(Point2D.Origin), 1e-5 * centre);
    }

    [Fact]
    public void FloatingConductorTakesThePotentialOfItsCharge()
    {
        Mesh mesh = Sections.ThreeWires();
        ElectrostaticProblem problem = Sections.ThreeWiresProblem(mesh).WithConductor("west", 5).WithConductor("east", -2);
        ElectrostaticSolution held = problem.WithConductor("middle", 3).Solve();
        ElectrostaticSolution floating = problem.WithFloatingConductor("middle", held.ChargeOf("middle")).Solve();

        Assert.Equal(3, floating.PotentialOf("middle"), 1e-7);
        Assert.Equal(held.Energy, floating.Energy, 1e-7 * held.Energy);
        Assert.Equal(held.ChargeOf("west"), floating.ChargeOf("west"), 1e-7 * Math.Abs(held.ChargeOf("west")));
    }

    [Fact]
    public void ChargesSumToNothingAndMakeTheEnergy()
    {
        ElectrostaticSolution solution = Sections.ThreeWiresProblem(Sections.ThreeWires())
            .WithConductor("west", 5).WithConductor("east", -2).WithConductor("middle", 3).Solve();
        double sum = solution.Conductors.Sum(solution.ChargeOf);
        double work = solution.Conductors.Sum(name => 0.5 * solution.ChargeOf(name) * solution.PotentialOf(name));

        Assert.Equal(0, sum, 1e-9 * Math.Abs(solution.ChargeOf("west")));
        Assert.Equal(solution.Energy, work, 1e-9 * work);
    }

    /// <summary>Half of a symmetric section with an odd potential: the antiperiodic cell agrees with the full one.</summary>
    [Fact]
    public void AntiperiodicCellIsHalfOfThePeriodicOne()
    {
        static Mesh Row(int wires)
        {
            CrossSection section = CrossSection.Empty.Fill(
                Outline.Rectangle(Point2D.Origin, wires, 1, "bottom", "right", "top", "left"), "air");
            for (int i = 0; i < wires; i++)
            {
                section = section.Fill(Outline.Circle(new Point2D(i + 0.5, 0.5), 0.2), $"wire {i}");
            }

            return Mesher.Generate(
                section, MeshOptions.Default.WithSize(0.12).WithPair("left", "right")).Mesh;
        }

        ElectrostaticSolution half = new ElectrostaticProblem(Row(1), 3)
            .WithDielectric("air", 1).WithConductor("wire 0", 1).WithConductor("bottom").WithConductor("top")
            .WithAntiperiodicity("left", "right").Solve();
        ElectrostaticSolution full = new ElectrostaticProblem(Row(2), 3)
            .WithDielectric("air", 1).WithConductor("wire 0", 1).WithConductor("wire 1", -1)
            .WithConductor("bottom").WithConductor("top")
            .WithPeriodicity("left", "right").Solve();

        Assert.Equal(full.Energy, 2 * half.Energy, 1e-6 * full.Energy);
        Assert.Equal(full.ChargeOf("wire 0"), half.ChargeOf("wire 0"), 1e-6 * half.ChargeOf("wire 0"));
    }

    /// <summary>A thin layer before an electrode is a capacitor in series (closed form).</summary>
    [Fact]
    public void ThinLayerIsACapacitorInSeries()
    {
        const double layer = 3 * Eps0;
        ElectrostaticSolution solution = new ElectrostaticProblem(Sections.Square(), 2)
            .WithDielectric("air", 1)
            .WithConductor("bottom")
            .WithThinLayer("top", layer, 8)
            .Solve();

        // One metre of air in series with the layer: 3/4 of the voltage lies across the air.
        Assert.Equal(6, solution.PotentialAt(new Point2D(0.2, 1)), 1e-8);
        Assert.Equal(-6 * Eps0, solution.ChargeOf("bottom"), 1e-8 * Eps0);
        Assert.Equal(0.5 * Eps0 * 36, solution.Energy, 1e-7 * Eps0);

        // The layer's conductor holds the potential, so nothing else needs to.
        ElectrostaticSolution alone = new ElectrostaticProblem(Sections.Square())
            .WithDielectric("air", 1).WithThinLayer("top", layer, 8).Solve();
        Assert.Equal(8, alone.PotentialAt(new Point2D(0.5, 0.5)), 1e-7);
    }

    /// <summary>An antiperiodic part needs no fixed potential: no constant but zero is its own opposite.</summary>
    [Fact]
    public void AntiperiodicPartIsFixedByItself()
    {
        // ρ = ε0 π² cos(πx) has the antiperiodic potential cos(πx).
        ElectrostaticSolution solution = new ElectrostaticProblem(Sections.PairedSquare(0.1), 4)
            .WithDielectric("air", 1)
            .WithSpaceCharge("air", p => Eps0 * Math.PI * Math.PI * Math.Cos(Math.PI * p.X))
            .WithAntiperiodicity("left", "right")
            .Solve();
        Assert.Equal(Math.Cos(0.3 * Math.PI), solution.PotentialAt(new Point2D(0.3, 0.6)), 1e-5);
    }

    [Fact]
    public void LineSamplesKnowTheirHoles()
    {
        Mesh mesh = Mesher.Generate(
            CrossSection.Empty
                .Fill(Outline.Circle(Point2D.Origin, 2, "outer"), "air")
                .Hole(Outline.Circle(Point2D.Origin, 1, "inner")),
            MeshOptions.Default.WithSize(0.3)).Mesh;
        ElectrostaticSolution solution = new ElectrostaticProblem(mesh)
            .WithDielectric("air", 1).WithConductor("outer").WithConductor("inner", 1).Solve();

        var samples = solution.AlongLine(new Point2D(-1.9, 0.01), new Point2D(1.9, 0.01), 39);
        Assert.Equal(39, samples.Length);
        Assert.True(double.IsNaN(samples[19].Potential));
        Assert.Equal(3.8, samples[^1].Distance, 1e-12);
        Assert.Equal(Math.Log(2 / 1.9) / Math.Log(2), samples[0].Potential, 1e-3);
        Assert.Throws<ArgumentOutOfRangeException>(() => solution.PotentialAt(Point2D.Origin));
    }

    [Fact]
    public void TheErrorEstimateFollowsTheError()
    {
        // φ = x² - y² by its boundary values, degree 1; the square of its gradient integrates to 8/3.
        static double Exact(Point2D p) => (p.X * p.X) - (p.Y * p.Y);
        ElectrostaticSolution solution = new ElectrostaticProblem(Sections.Square(0.08), 1)
            .WithDielectric("air", 1)
            .WithPotential("bottom", Exact).WithPotential("right", Exact)
            .WithPotential("top", Exact).WithPotential("left", Exact)
            .Solve();

        double error = solution.Potential.GradientDistanceTo(p => new FieldVector<double>(2 * p.X, -2 * p.Y))
            / Math.Sqrt(8.0 / 3);
        Assert.InRange(solution.EstimatedRelativeFieldError / error, 0.7, 1.4);
    }
}
