using System.Numerics;
using FemCore2D.Geometry;
using FemCore2D.Sparse;
using FsCheck.Xunit;
using MathNet.Numerics.LinearAlgebra;

namespace FemCore2D.Assembly.Tests;

/// <summary>The elimination against dense algebra: a saddle-point system with one multiplier a condition.</summary>
public class EliminationTests
{
    /// <summary>
    /// Random conditions on the unit square: the sides bottom and top paired by a phase, left fixed by a function, the
    /// inner line floating, right fixed or free.
    /// </summary>
    [Property(MaxTest = 40)]
    public void SolutionsAreThoseOfTheSystemWithMultipliers(
        bool triangles, bool pair, bool floating, bool fixRight, byte phase, byte degreeChoice)
    {
        int degree = 1 + (degreeChoice % 3);
        var space = new NodeSpace(TestMeshes.Square(1, triangles), degree);
        var assembler = new Assembler(space);
        SparseMatrix<Complex> matrix = assembler.CreateMatrix<Complex>();
        assembler.Add(matrix, Term.Stiffness(Coefficient.OfPlace(p => new Complex(1 + p.X, 0.3 * p.Y), 1)));
        assembler.Add(matrix, Term.Mass(new Complex(0.5, 0.1)));
        assembler.Add(matrix, new Drift());
        Complex[] load = assembler.CreateVector<Complex>();
        assembler.Add(load, Term.Source(Coefficient.OfPlace(p => new Complex(1, p.X - p.Y), 1)));

        var factor = floating ? Complex.One : Complex.FromPolarCoordinates(1, phase / 40.0);
        var total = new Complex(0.7, -0.2);
        var right = new Complex(2, 1);
        Complex Left(Point2D p) => Complex.FromPolarCoordinates(1, (pair ? phase / 40.0 : 1) * (floating ? 0 : p.Y));
        ConstraintSet<Complex> set = new ConstraintSet<Complex>(space).FixBoundary("left", Left);
        set = pair ? set.Pair("bottom", "top", factor) : set;
        set = floating ? set.FloatBoundary("middle", total) : set;
        set = fixRight && !pair ? set.FixBoundary("right", right) : set;
        ResolvedConstraints<Complex> constraints = set.Resolve();

        // Rows a u = b, one a condition of one unknown.
        List<(Dictionary<int, Complex> Row, Complex Value)> rows = [];
        foreach (int unknown in space.Numbering.UnknownsOfBoundary("left"))
        {
            rows.Add((new() { [unknown] = 1 }, Left(space.NodePlaces[unknown])));
        }

        if (pair)
        {
            foreach (int bottom in space.Numbering.UnknownsOfBoundary("bottom"))
            {
                Point2D image = space.NodePlaces[bottom] + new Vector2D(0, 1);
                int top = space.Numbering.UnknownsOfBoundary("top").Single(i => space.NodePlaces[i].DistanceTo(image) < 1e-9);
                if (space.NodePlaces[bottom].X > 1e-9)
                {
                    rows.Add((new() { [top] = 1, [bottom] = -factor }, 0));
                }
            }
        }

        int[] middle = floating ? [.. space.Numbering.UnknownsOfBoundary("middle")] : [];
        foreach (int unknown in middle.Skip(1))
        {
            if (!pair || space.NodePlaces[unknown].Y < 1 - 1e-9 || Math.Abs(space.NodePlaces[middle[0]].Y - 1) < 1e-9)
            {
                rows.Add((new() { [unknown] = 1, [middle[0]] = -1 }, 0));
            }
        }

        if (fixRight && !pair)
        {
            foreach (int unknown in space.Numbering.UnknownsOfBoundary("right"))
            {
                rows.Add((new() { [unknown] = 1 }, right));
            }
        }

        // K u + A^H m = f, A u = b: multipliers do no work on fields that meet the homogeneous conditions.
        int n = space.UnknownCount;
        Matrix<Complex> saddle = Matrix<Complex>.Build.Dense(n + rows.Count, n + rows.Count);
        saddle.SetSubMatrix(0, 0, Solve.DenseOf(matrix));
        var both = CreateVector.Dense<Complex>(n + rows.Count);
        for (int i = 0; i < n; i++)
        {
            both[i] = load[i];
        }

        if (floating)
        {
            both[middle[0]] += total;
        }

        for (int r = 0; r < rows.Count; r++)
        {
            foreach ((int unknown, Complex coefficient) in rows[r].Row)
            {
                saddle[n + r, unknown] = coefficient;
                saddle[unknown, n + r] = Complex.Conjugate(coefficient);
            }

            both[n + r] = rows[r].Value;
        }

        var expected = saddle.Solve(both);
        NodeField<Complex> field = Solve.Field(constraints, matrix, load);
        for (int i = 0; i < n; i++)
        {
            Assert.Equal(0, (field.Coefficients[i] - expected[i]).Magnitude, 1e-9);
        }

        Complex[] residual = constraints.Residual(matrix, load, field.Coefficients);
        if (floating)
        {
            Assert.Equal(0, (constraints.Reaction("middle", residual) - total).Magnitude, 1e-10);
        }
    }

    [Theory]
    [InlineData(1, true)]
    [InlineData(2, true)]
    [InlineData(3, false)]
    public void HermitianSystemsStaySoToTheBit(int degree, bool triangles)
    {
        // Both pairs of sides are tied by phases, so that many entries come together from several.
        var space = new NodeSpace(TestMeshes.Square(1, triangles), degree);
        var assembler = new Assembler(space);
        SparseMatrix<Complex> matrix = assembler.CreateMatrix<Complex>();
        assembler.Add(matrix, Term.Stiffness(new Complex(1.1, 0)));
        assembler.Add(matrix, Term.Mass(Coefficient.OfPlace(p => new Complex(1 / (1 + p.X), 0))));
        ResolvedConstraints<Complex> constraints = new ConstraintSet<Complex>(space)
            .Pair("left", "right", Complex.FromPolarCoordinates(1, 0.7))
            .Pair("bottom", "top", Complex.FromPolarCoordinates(1, 1.9))
            .Resolve();
        SparseMatrix<Complex> reduced = constraints.Reduce(matrix);
        Assert.True(reduced.RowCount < matrix.RowCount);
        Assert.True(reduced.IsHermitian());
        Assert.Equal(-1, constraints.FindUnfixed(_ => false));
    }

    [Fact]
    public void RealTiesKeepSymmetryToTheBit()
    {
        var space = new NodeSpace(TestMeshes.Square(1, triangles: true), 1);
        var assembler = new Assembler(space);
        SparseMatrix<double> matrix = assembler.CreateMatrix<double>();
        assembler.Add(matrix, Term.Stiffness(Coefficient.OfPlace(p => 1 / (1 + p.X + (2 * p.Y)))));
        ResolvedConstraints<double> constraints = new ConstraintSet<double>(space)
            .Pair("left", "right", -1).Pair("bottom", "top", 1).Resolve();
        Assert.True(constraints.Reduce(matrix).IsSymmetric());
    }

    [Fact]
    public void RefillInPlaceFollowsTheFullMatrixAndItsPatternIsShared()
    {
        var space = new NodeSpace(TestMeshes.Square(3, triangles: true), 2);
        var assembler = new Assembler(space);
        SparseMatrix<double> matrix = assembler.CreateMatrix<double>();
        assembler.Add(matrix, Term.Stiffness(1.0));
        ResolvedConstraints<double> first = new ConstraintSet<double>(space)
            .FixBoundary("left", 0).FloatRegion("b", 1).Resolve();
        ResolvedConstraints<double> second = first.WithValue("left", 5);
        SparseMatrix<double> reduced = first.Reduce(matrix);
        double before = reduced.Values[0];
        matrix.Values.Clear();
        assembler.Add(matrix, Term.Stiffness(4.0));
        second.Reduce(matrix, reduced);
        Assert.Equal(4 * before, reduced.Values[0], 1e-14);
        Assert.Throws<ArgumentException>(
            () => first.Reduce(matrix, new SparseMatrix<double>(SparsePattern.Diagonal(reduced.RowCount))));
    }

    private readonly struct Drift : ICellMatrixTerm<Complex>
    {
        public int DegreeIn(int region) => 0;

        public Coupling<Complex> At(in CellPoint point) =>
            Coupling.ValueWithGradient(new Complex(0.4, 0), new Complex(-0.2, 0.1));
    }
}
