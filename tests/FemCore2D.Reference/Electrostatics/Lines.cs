using FemCore2D.Fields;
using FemCore2D.Geometry;

namespace FemCore2D.Reference.Electrostatics;

/// <summary>Transmission lines and capacitors of plane sections against closed forms.</summary>
public class Lines
{
    private const double Tolerance = 1e-6;

    /// <summary>
    /// Coaxial line of IEEE Std 287 (7 mm): concentric cylinders, radii ratio 7.00/3.04.
    /// </summary>
    [Theory]
    [InlineData(2, 0.15e-3, 5, 1e-6)]
    [InlineData(3, 0.25e-3, 5, 1e-8)]
    public void CoaxialLine(int degree, double size, double arcDegrees, double tolerance)
    {
        CrossSection section = CrossSection.Empty
            .Fill(Outline.Circle(Point2D.Origin, 3.5e-3, "outer"), "air")
            .Hole(Outline.Circle(Point2D.Origin, 1.52e-3, "inner"));
        Mesh mesh = Mesher.Generate(section, MeshOptions.Default.WithSize(size).WithLargestArcDegrees(arcDegrees)).Mesh;
        LineParameters line = new ElectrostaticProblem(mesh, degree)
            .WithDielectric("air", 1)
            .WithConductor("outer")
            .WithConductor("inner")
            .SolveLine("inner");

        Check.Relative(50.00853782, line.CharacteristicImpedance, tolerance);
        Check.Relative(66.70142934e-12, line.CapacitancePerMetre, tolerance);
        Check.Relative(166.8105267e-9, line.InductancePerMetre, tolerance);
        Check.Relative(PhysicalConstants.SpeedOfLight, line.Velocity, 1e-12);
    }

    /// <summary>
    /// Eccentric cylinders: C/ε = 2π / acosh((a² + b² - d²) / 2ab), Smythe, Static and Dynamic Electricity.
    /// </summary>
    [Fact]
    public void EccentricCylinders()
    {
        CrossSection section = CrossSection.Empty
            .Fill(Outline.Circle(Point2D.Origin, 3, "outer"), "oil")
            .Hole(Outline.Circle(new Point2D(1, 0), 1, "inner"));
        Mesh mesh = Mesher.Generate(section, MeshOptions.Default.WithSize(0.25).WithLargestArcDegrees(10)).Mesh;
        double capacitance = new ElectrostaticProblem(mesh, 3)
            .WithDielectric("oil", 2.2)
            .WithConductor("outer")
            .WithConductor("inner")
            .SolveCapacitances(["inner"])
            .Maxwell("inner", "inner");

        Check.Relative(6.528502605, capacitance / (2.2 * PhysicalConstants.ElectricConstant), Tolerance);
    }

    /// <summary>
    /// Concentric squares, the inner side half the outer: Schwarz-Christoffel map of the octant. The field is singular
    /// at the inner corners, so the mesh is graded towards them.
    /// </summary>
    [Fact]
    public void ConcentricSquares()
    {
        // An eighth would do; a quarter needs no slanted symmetry plane.
        CrossSection section = CrossSection.Empty
            .Fill(
                Outline.StartAt(new Point2D(0.5, 0)).StraightTo(new Point2D(1, 0)).StraightTo(new Point2D(1, 1), "outer")
                    .StraightTo(new Point2D(0, 1), "outer").StraightTo(new Point2D(0, 0.5))
                    .StraightTo(new Point2D(0.5, 0.5), "inner").Close("inner"),
                "air")
            .FixedPoint(new Point2D(0.5, 0.5), "corner");
        Mesh mesh = Mesher.Generate(
            section, MeshOptions.Default.WithSize(0.1).WithPointSize("corner", 1e-7).WithGrowth(1.6)).Mesh;
        double capacitance = 4 * new ElectrostaticProblem(mesh, 4)
            .WithDielectric("air", 1)
            .WithConductor("outer")
            .WithConductor("inner")
            .SolveCapacitances(["inner"])
            .Maxwell("inner", "inner");

        Check.Relative(10.23409252, capacitance / PhysicalConstants.ElectricConstant, 1e-7);
    }

    /// <summary>
    /// Stripline of zero thickness between plates b apart: Z0 = η0/4 K(k)/K(k'), k = sech(πw/2b), Cohn 1954. The right
    /// half of the section; the side wall is so far away (5 b) that it takes exp(-10π) of the field. The values are
    /// those of the formula as it was printed, with η0 = 120π ohm, so they are scaled to the exact wave impedance.
    /// </summary>
    [Theory]
    [InlineData(0.5, 100.5019787)]
    [InlineData(1, 65.39886848)]
    [InlineData(2, 38.60603046)]
    public void Stripline(double width, double impedance)
    {
        CrossSection section = CrossSection.Empty
            .Fill(
                Outline.StartAt(new Point2D(0, -0.5)).StraightTo(new Point2D(6, -0.5), "plates")
                    .StraightTo(new Point2D(6, 0.5)).StraightTo(new Point2D(0, 0.5), "plates").Close(),
                "filling")
            .Sheet(new Point2D(0, 0), new Point2D(width / 2, 0), "strip")
            .FixedPoint(new Point2D(width / 2, 0), "edge");
        Mesh mesh = Mesher.Generate(
            section, MeshOptions.Default.WithSize(0.1).WithPointSize("edge", 1e-7).WithGrowth(1.6)).Mesh;
        double half = new ElectrostaticProblem(mesh, 4)
            .WithDielectric("filling", 1)
            .WithConductor("plates")
            .WithConductor("strip")
            .SolveCapacitances(["strip"])
            .Maxwell("strip", "strip");

        double exact = impedance * PhysicalConstants.VacuumImpedance / (120 * Math.PI);
        Check.Relative(exact, 1 / (PhysicalConstants.SpeedOfLight * 2 * half), Tolerance);
    }

    /// <summary>
    /// Open microstrip: effective permittivity and impedance, Hammerstad and Jensen 1980, a fit that is itself good to
    /// a fraction of a percent, so 1 % here. The box is 40 times the substrate's height wide and 40 times high.
    /// </summary>
    [Theory]
    [InlineData(0.5, 9.8, 6.2766, 66.538)]
    [InlineData(1, 9.8, 6.5790, 49.289)]
    [InlineData(2, 2.2, 1.8347, 65.727)]
    [InlineData(3, 4.3, 3.3956, 37.868)]
    public void Microstrip(double width, double permittivity, double effective, double impedance)
    {
        CrossSection section = CrossSection.Empty
            .Fill(
                Outline.StartAt(new Point2D(0, 0)).StraightTo(new Point2D(40, 0), "ground")
                    .StraightTo(new Point2D(40, 40), "ground").StraightTo(new Point2D(0, 40), "ground").Close(),
                "air")
            .Fill(Outline.Rectangle(new Point2D(0, 0), 40, 1), "substrate")
            .Sheet(new Point2D(0, 1), new Point2D(width / 2, 1), "strip")
            .FixedPoint(new Point2D(width / 2, 1), "edge");
        Mesh mesh = Mesher.Generate(
            section, MeshOptions.Default.WithSize(4).WithPointSize("edge", 1e-4).WithGrowth(1.4)).Mesh;

        // Half of the symmetric section has half of the capacitance.
        LineParameters half = new ElectrostaticProblem(mesh, 3)
            .WithDielectric("air", 1)
            .WithDielectric("substrate", permittivity)
            .WithConductor("ground")
            .WithConductor("strip")
            .SolveLine("strip");

        Check.Relative(effective, half.EffectivePermittivity, 0.01);
        Check.Relative(impedance, half.CharacteristicImpedance / 2, 0.01);
    }

    /// <summary>
    /// Concentric spheres of radii 1 m and 2 m: C = 4π ε0 / (1/a - 1/b), by half of the axial section.
    /// </summary>
    [Fact]
    public void ConcentricSpheres()
    {
        CrossSection section = CrossSection.Empty
            .Fill(
                Outline.StartAt(new Point2D(0, -2)).ArcTo(new Point2D(0, 2), Math.PI, "outer")
                    .StraightTo(new Point2D(0, 1)).ArcTo(new Point2D(0, -1), -Math.PI, "inner").Close(),
                "air");
        Mesh mesh = Mesher.Generate(section, MeshOptions.Default.WithSize(0.2).WithLargestArcDegrees(10)).Mesh;
        double capacitance = new ElectrostaticProblem(mesh, 3, CoordinateSystem.Axisymmetric)
            .WithDielectric("air", 1)
            .WithConductor("outer")
            .WithConductor("inner")
            .SolveCapacitances(["inner"])
            .Maxwell("inner", "inner");

        Check.Relative(222.5300112e-12, capacitance, Tolerance);
    }
}
