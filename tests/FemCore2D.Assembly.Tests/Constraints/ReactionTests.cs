using FemCore2D.Geometry;
using FemCore2D.Sparse;

namespace FemCore2D.Assembly.Tests;

/// <summary>Problems between concentric circles, whose charges and potentials are known in closed form.</summary>
public class ReactionTests
{
    private static readonly double Flux = 2 * Math.PI / Math.Log(2);

    [Theory]
    [InlineData(2, true)]
    [InlineData(3, true)]
    [InlineData(2, false)]
    [InlineData(3, false)]
    public void ReactionsOfARingAreItsChargesWithTheOrderOfTheEnergy(int degree, bool triangles)
    {
        // Concentric cylinders of radii 1 and 2: charge 2 pi / ln 2 per volt (Smythe, Static and Dynamic Electricity).
        int coarse = degree == 2 ? 8 : 4;
        double[] errors = [.. new[] { coarse, 2 * coarse }.Select(n =>
        {
            System system = Stiffness(TestMeshes.Ring(n, 3 * n / 2, triangles), degree);
            ResolvedConstraints<double> constraints = new ConstraintSet<double>(system.Space)
                .FixBoundary("inner", 1).FixBoundary("outer", 0).Resolve();
            double[] residual = Residual(system, constraints, system.Load);
            double inner = constraints.Reaction("inner", residual);
            Assert.Equal(0, inner + constraints.Reaction("outer", residual), 1e-10);
            return Math.Abs(inner - Flux);
        })];

        // Twice the order of the field in energy.
        Assert.InRange(Math.Log2(errors[0] / errors[1]), (2 * degree) - 0.15, (2 * degree) + 0.5);
    }

    [Theory]
    [InlineData(true)]
    [InlineData(false)]
    public void AFloatingCircleTakesThePotentialThatItsChargeDemands(bool triangles)
    {
        System system = Stiffness(TestMeshes.Ring(5, 5, triangles), 3);
        ResolvedConstraints<double> constraints = new ConstraintSet<double>(system.Space)
            .FloatBoundary("inner", Flux).FixBoundary("outer", 0).Resolve();
        double[] free = Solve.System(
            constraints.Reduce(system.Matrix), constraints.Reduce(system.Matrix, system.Load));
        double[] solution = constraints.Expand(free);
        double[] residual = constraints.Residual(system.Matrix, system.Load, solution);
        Assert.Equal(1, constraints.ValueOf("inner", free), 1e-5);
        Assert.Equal(Flux, constraints.Reaction("inner", residual), 1e-10);
        foreach (int unknown in system.Space.Numbering.UnknownsOfBoundary("inner"))
        {
            Assert.Equal(constraints.ValueOf("inner", free), solution[unknown]);
        }

        // Another total with the same matrix: twice the charge, twice the potential.
        ResolvedConstraints<double> twice = constraints.WithValue("inner", 2 * Flux);
        double[] doubled = Solve.System(twice.Reduce(system.Matrix), twice.Reduce(system.Matrix, system.Load));
        Assert.Equal(2 * constraints.ValueOf("inner", free), twice.ValueOf("inner", doubled), 1e-11);
    }

    [Fact]
    public void RobinConditionsHoldWhatTheyShould()
    {
        // k du/dr + h (u - 20) = 0 outside, u = 100 inside: u = 100 - b ln r with b = 80 h / (k/2 + h ln 2).
        const double K = 3;
        const double H = 7;
        const double B = 80 * H;
        double slope = B / ((K / 2) + (H * Math.Log(2)));
        System system = Stiffness(TestMeshes.Ring(5, 6, triangles: true), 3, K);
        system.Assembler.AddOnBoundary(system.Matrix, Term.BoundaryMass(H), "outer");
        system.Assembler.AddOnBoundary(system.Load, Term.BoundaryFlux(H * 20), "outer");
        ResolvedConstraints<double> constraints = new ConstraintSet<double>(system.Space).FixBoundary("inner", 100).Resolve();
        NodeField<double> field = Solve.Field(constraints, system.Matrix, system.Load);
        foreach (int unknown in system.Space.Numbering.UnknownsOfBoundary("outer"))
        {
            Assert.Equal(100 - (slope * Math.Log(2)), field.Coefficients[unknown], 1e-3);
        }

        double[] residual = constraints.Residual(system.Matrix, system.Load, field.Coefficients);
        Assert.Equal(2 * Math.PI * K * slope, constraints.Reaction("inner", residual), 1e-3);
    }

    [Theory]
    [InlineData(true)]
    [InlineData(false)]
    public void FluxOnEdgesUsesTheOutwardNormalAndTheTrueLength(bool triangles)
    {
        System system = Stiffness(TestMeshes.Ring(2, 6, triangles), 3);
        system.Assembler.AddOnBoundary(system.Load, new NormalComponent(), "outer", extraDegree: 2);

        // The flux of (x, y) out of the mesh is twice its area, exactly so for the cells as they are bent.
        double[] area = system.Assembler.CreateVector<double>();
        system.Assembler.Add(area, Term.Source(1.0));
        double outer = system.Load.Sum();
        Array.Clear(system.Load);
        system.Assembler.AddOnBoundary(system.Load, new NormalComponent(), "inner", extraDegree: 2);
        double inner = system.Load.Sum();
        Assert.Equal(2 * area.Sum(), outer + inner, 1e-12);
        Assert.Equal(8 * Math.PI, outer, 1e-4);
        Assert.Equal(-2 * Math.PI, inner, 1e-4);

        Array.Clear(system.Load);
        system.Assembler.AddOnBoundary(system.Load, Term.BoundaryFlux(1.0), "inner");
        Assert.Equal(2 * Math.PI, system.Load.Sum(), 1e-5);
    }

    private static System Stiffness(Mesh mesh, int degree, double coefficient = 1)
    {
        var space = new NodeSpace(mesh, degree);
        var assembler = new Assembler(space);
        SparseMatrix<double> matrix = assembler.CreateMatrix<double>();
        assembler.Add(matrix, Term.Stiffness(coefficient));
        return new System(space, assembler, matrix, assembler.CreateVector<double>());
    }

    private static double[] Residual(System system, ResolvedConstraints<double> constraints, double[] load) =>
        constraints.Residual(
            system.Matrix, load, Solve.PositiveField(constraints, system.Matrix, load).Coefficients);

    private sealed record System(NodeSpace Space, Assembler Assembler, SparseMatrix<double> Matrix, double[] Load);

    private readonly struct NormalComponent : IEdgeVectorTerm<double>
    {
        public int DegreeIn(int region) => 2;

        public double At(in EdgePoint point) => (point.Place - Point2D.Origin).Dot(point.Normal);
    }
}
