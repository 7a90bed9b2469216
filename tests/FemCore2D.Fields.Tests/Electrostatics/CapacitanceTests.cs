using FemCore2D.Geometry;
using FemCore2D.Solvers;
using FemCore2D.Sparse;
using FsCheck.Xunit;

namespace FemCore2D.Fields.Tests.Electrostatics;

public class CapacitanceTests
{
    private static readonly string[] Wires = ["west", "middle", "east"];

    private static ElectrostaticProblem Problem(Mesh mesh) => Wires.Aggregate(
        Sections.ThreeWiresProblem(mesh), (problem, wire) => problem.WithConductor(wire, 7));

    [Fact]
    public void MaxwellsMatrixIsSymmetricAndTellsEveryCharge()
    {
        Mesh mesh = Sections.ThreeWires();
        CapacitanceMatrix matrix = Problem(mesh).SolveCapacitances(Wires);
        double[] potentials = [2, -1, 4];
        ElectrostaticSolution solution = Sections.ThreeWiresProblem(mesh)
            .WithConductor("west", 2).WithConductor("middle", -1).WithConductor("east", 4).Solve();

        foreach (string row in Wires)
        {
            double charge = 0;
            for (int j = 0; j < Wires.Length; j++)
            {
                Assert.Equal(matrix.Maxwell(row, Wires[j]), matrix.Maxwell(Wires[j], row), 1e-9 * matrix.Maxwell(row, row));
                charge += matrix.Maxwell(row, Wires[j]) * potentials[j];
            }

            Assert.Equal(solution.ChargeOf(row), charge, 1e-8 * Math.Abs(charge));
            Assert.True(matrix.Mutual(row, row) > 0);
        }

        Assert.Equal(-matrix.Maxwell("west", "east"), matrix.Mutual("west", "east"));
        Assert.Equal(
            matrix.ToMaxwellArray()[0, 0] + matrix.ToMaxwellArray()[0, 1] + matrix.ToMaxwellArray()[0, 2],
            matrix.ToMutualArray()[0, 0],
            1e-24);
    }

    [Property(MaxTest = 15)]
    public bool ScalingThePermittivityScalesTheMatrix(FsCheck.PositiveInt tenths)
    {
        double permittivity = 1 + (tenths.Get / 10.0);
        Mesh mesh = Sections.ThreeWires(0.5);
        double air = Problem(mesh).SolveCapacitances(["west"]).Maxwell("west", "west");
        ElectrostaticProblem filled = Wires.Aggregate(
            new ElectrostaticProblem(mesh).WithDielectric("air", permittivity).WithConductor("box"),
            (problem, wire) => problem.WithConductor(wire));
        double scaled = filled.SolveCapacitances(["west"]).Maxwell("west", "west");
        return Math.Abs(scaled - (permittivity * air)) < 1e-9 * scaled;
    }

    [Fact]
    public void GivenPotentialsAndChargesDoNotCount()
    {
        Mesh mesh = Sections.ThreeWires(0.5);
        double plain = Problem(mesh).SolveCapacitances(["west"]).Maxwell("west", "west");
        double charged = Problem(mesh).WithSpaceCharge("air", 1e-6).SolveCapacitances(["west"]).Maxwell("west", "west");
        Assert.Equal(plain, charged);

        ElectrostaticProblem floating = Sections.ThreeWiresProblem(mesh).WithConductor("west").WithConductor("east");
        Assert.Equal(
            floating.WithFloatingConductor("middle").SolveCapacitances(["west"]).Maxwell("west", "west"),
            floating.WithFloatingConductor("middle", 1e-6).SolveCapacitances(["west"]).Maxwell("west", "west"));
    }

    [Fact]
    public void AFloatingWireRaisesNothingButSharesTheField()
    {
        Mesh mesh = Sections.ThreeWires();
        CapacitanceMatrix all = Problem(mesh).SolveCapacitances(Wires);
        ElectrostaticProblem floating = Sections.ThreeWiresProblem(mesh)
            .WithConductor("west").WithConductor("east").WithFloatingConductor("middle");
        CapacitanceMatrix two = floating.SolveCapacitances(["west", "east"]);

        // Eliminating the floating conductor from Maxwell's matrix (Schur complement) gives the same.
        double expected = all.Maxwell("west", "east")
            - (all.Maxwell("west", "middle") * all.Maxwell("middle", "east") / all.Maxwell("middle", "middle"));
        Assert.Equal(expected, two.Maxwell("west", "east"), 1e-8 * Math.Abs(expected));
    }

    [Fact]
    public void AHostsFactorizationGivesTheSame()
    {
        Mesh mesh = Sections.ThreeWires(0.5);
        CapacitanceMatrix own = Problem(mesh).SolveCapacitances(Wires);
        CapacitanceMatrix foreign = Problem(mesh).SolveCapacitances(
            Wires, new SolveSettings { Factorizer = new DenseFactorizer() });
        Assert.Equal(own.Maxwell("west", "middle"), foreign.Maxwell("west", "middle"), 1e-9 * own.Maxwell("west", "west"));
        Assert.Contains(nameof(DenseFactorizer), foreign.Report.Solver, StringComparison.Ordinal);
    }

    [Fact]
    public void TheDirectFactorizationGivesTheSame()
    {
        Mesh mesh = Sections.ThreeWires();
        CapacitanceMatrix iterated = Problem(mesh).SolveCapacitances(Wires);
        CapacitanceMatrix direct = Problem(mesh).SolveCapacitances(
            Wires, new SolveSettings { Factorizer = new DirectFactorizer<double>(FactorizationKind.Cholesky) });
        Assert.Equal(
            iterated.Maxwell("west", "middle"), direct.Maxwell("west", "middle"), 1e-9 * direct.Maxwell("west", "west"));
        Assert.True(direct.Report.RelativeResidual < 1e-12);
    }

    [Fact]
    public void ThePlainTextNamesAllConductorsAndTheUnit()
    {
        string text = Problem(Sections.ThreeWires(0.5)).SolveCapacitances(Wires).ToString();
        Assert.All(Wires, wire => Assert.Contains(wire, text, StringComparison.Ordinal));
        Assert.StartsWith("pF/m", text, StringComparison.Ordinal);
    }

    [Fact]
    public void ALineInOneDielectricSlowsByItsRoot()
    {
        Mesh mesh = Sections.ThreeWires(0.5);
        LineParameters line = new ElectrostaticProblem(mesh).WithDielectric("air", 4).WithConductor("box")
            .WithConductor("west").WithConductor("middle").WithConductor("east").SolveLine("west");
        Assert.Equal(PhysicalConstants.SpeedOfLight / 2, line.Velocity, 1);
        Assert.Equal(4, line.EffectivePermittivity, 1e-8);
        Assert.Equal(
            Math.Sqrt(line.InductancePerMetre / line.CapacitancePerMetre), line.CharacteristicImpedance, 1e-6);
    }

    [Theory]
    [InlineData(0)]
    [InlineData(double.NaN)]
    public void ALineHasPositiveCapacitances(double capacitance) =>
        Assert.Throws<ArgumentOutOfRangeException>(() => new LineParameters(capacitance, 1e-12));

    [Fact]
    public void AFactorizationThatDoesNotSolveIsRefused() => Assert.Throws<IllPosedProblemException>(() =>
        Problem(Sections.ThreeWires(0.5)).SolveCapacitances(Wires, new SolveSettings { Factorizer = new NoFactorizer() }));

    private sealed class NoFactorizer : IFactorizer<double>, IFactorization<double>
    {
        public int Size => 0;

        public IFactorization<double> Factorize(SparseMatrix<double> matrix, CancellationToken cancellationToken = default) => this;

        public void Solve(ReadOnlySpan<double> rightHandSide, Span<double> solution) => solution.Fill(double.NaN);
    }

    /// <summary>A dense factorization such as a host might bring.</summary>
    private sealed class DenseFactorizer : IFactorizer<double>
    {
        public IFactorization<double> Factorize(SparseMatrix<double> matrix, CancellationToken cancellationToken = default)
        {
            double[,] dense = new double[matrix.RowCount, matrix.ColumnCount];
            for (int row = 0; row < matrix.RowCount; row++)
            {
                foreach (int column in matrix.Pattern.ColumnsOf(row))
                {
                    dense[row, column] = matrix[row, column];
                }
            }

            return new Dense(MathNet.Numerics.LinearAlgebra.Matrix<double>.Build.DenseOfArray(dense).Cholesky());
        }

        private sealed class Dense(MathNet.Numerics.LinearAlgebra.Factorization.Cholesky<double> factor) : IFactorization<double>
        {
            public int Size => factor.Factor.RowCount;

            public void Solve(ReadOnlySpan<double> rightHandSide, Span<double> solution) => factor
                .Solve(MathNet.Numerics.LinearAlgebra.Vector<double>.Build.Dense(rightHandSide.ToArray()))
                .AsArray().CopyTo(solution);
        }
    }
}
