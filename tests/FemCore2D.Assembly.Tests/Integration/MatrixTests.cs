using System.Numerics;
using FemCore2D.Geometry;
using FemCore2D.Sparse;
using FemCore2D.Testing;
using FsCheck.Xunit;

namespace FemCore2D.Assembly.Tests;

/// <summary>Matrices and vectors against integrals that are known.</summary>
public class MatrixTests
{
    [Property(MaxTest = 10, Arbitrary = [typeof(FieldArbitraries)])]
    public void MassOfOnesIsTheAreaWhateverTheWayItIsIntegrated(Mesh mesh)
    {
        for (int degree = 1; degree <= (mesh.QuadrilateralCount > 0 ? 3 : 5); degree++)
        {
            var space = new NodeSpace(mesh, degree);
            var assembler = new Assembler(space);
            double[] ones = [.. Enumerable.Repeat(1.0, space.UnknownCount)];
            double[] load = assembler.CreateVector<double>();
            assembler.Add(load, Term.Source(1.0));
            double area = load.Sum();

            SparseMatrix<double> constant = assembler.CreateMatrix<double>();
            assembler.Add(constant, Term.Mass(1.0));
            SparseMatrix<double> pointwise = assembler.CreateMatrix<double>();
            assembler.Add(pointwise, Term.Mass(Coefficient.OfPlace(_ => 1.0)));
            SparseMatrix<Complex> complex = assembler.CreateMatrix<Complex>();
            assembler.Add(complex, Term.Mass(new Complex(2, -3)));

            double scale = constant.LargestMagnitude();
            Assert.Equal(area, constant.Multiply(ones).Sum(), 1e-12 * area);
            Assert.True(constant.IsSymmetric());
            Assert.True(pointwise.IsSymmetric());
            for (int k = 0; k < constant.Values.Length; k++)
            {
                Assert.Equal(constant.Values[k], pointwise.Values[k], 1e-13 * scale);
                Assert.Equal(0, (complex.Values[k] - (new Complex(2, -3) * constant.Values[k])).Magnitude, 1e-13 * scale);
            }
        }
    }

    /// <summary>Every coefficient of a coupling, in the pre-integrated and the pointwise way, against the same integral by numbers.</summary>
    [Theory]
    [InlineData(true, 1)]
    [InlineData(true, 4)]
    [InlineData(false, 2)]
    public void GeneralCouplingsAgreeWithTheFormTheyStandFor(bool triangles, int degree)
    {
        var space = new NodeSpace(TestMeshes.Trapezium(3, triangles), degree);
        var assembler = new Assembler(space, 2);
        var coupling = new Coupling<Complex>(
            new(1, 2), new(0.3, -1), new(2, 0), new(-0.7, 1), new(3, 1), new(0.5, 0.25), new(1, -1), new(-0.4, 2), new(2, 2));
        SparseMatrix<Complex> constant = assembler.CreateMatrix<Complex>();
        assembler.Add(constant, new GivenCoupling(coupling, 0));
        SparseMatrix<Complex> pointwise = assembler.CreateMatrix<Complex>();
        assembler.Add(pointwise, new GivenCoupling(coupling, 2));

        NodeField<Complex> u = NodeField.Interpolate(space, p => new Complex(p.X + (2 * p.Y), p.X - 0.5));
        NodeField<Complex> v = NodeField.Interpolate(space, p => new Complex(1 + p.Y, 0));
        Complex expected = Complex.Zero;
        double area = 0;
        for (int cell = 0; cell < space.Mesh.CellCount; cell++)
        {
            var rule = Elements.QuadratureRule.For(space.Mesh.KindOf(cell), 6);
            for (int q = 0; q < rule.Points.Length; q++)
            {
                double weight = rule.Weights[q] * space.Maps.JacobianAt(cell, rule.Points[q]).Determinant;
                Complex a = u.ValueIn(cell, rule.Points[q]);
                Complex b = v.ValueIn(cell, rule.Points[q]);
                FieldVector<Complex> da = u.GradientIn(cell, rule.Points[q]);
                FieldVector<Complex> db = v.GradientIn(cell, rule.Points[q]);
                area += weight;
                expected += weight * (
                    (b * ((coupling.ValueValue * a) + (coupling.ValueX * da.X) + (coupling.ValueY * da.Y)))
                    + (db.X * ((coupling.XValue * a) + (coupling.XX * da.X) + (coupling.XY * da.Y)))
                    + (db.Y * ((coupling.YValue * a) + (coupling.YX * da.X) + (coupling.YY * da.Y))));
            }
        }

        Assert.Equal(0, (Form(constant, u, v) - expected).Magnitude, 1e-12);
        Assert.Equal(0, (Form(pointwise, u, v) - expected).Magnitude, 1e-12);
        Assert.True(area > 0.5);
    }

    [Theory]
    [InlineData(true)]
    [InlineData(false)]
    public void CoefficientsPerRegionAndOfFieldsActWhereTheyShould(bool triangles)
    {
        Mesh mesh = TestMeshes.Square(2, triangles);
        var space = new NodeSpace(mesh, 2);
        var assembler = new Assembler(space);
        NodeField<double> temperature = NodeField.Interpolate(space, p => p.X * p.Y);
        NodeField<double> ones = NodeField.Interpolate(space, _ => 1.0);

        SparseMatrix<double> regions = assembler.CreateMatrix<double>();
        assembler.Add(regions, Term.Mass(Coefficient.PerRegion(
            mesh, new Dictionary<string, double> { ["a"] = 3, ["b"] = 5 })));
        Assert.Equal(4, Form(regions, ones, ones), 1e-13);

        // The integral of (xy)^2 + 1 over the unit square is 1/9 + 1.
        SparseMatrix<double> ofField = assembler.CreateMatrix<double>();
        assembler.Add(ofField, Term.Mass(Coefficient.OfField(temperature, t => (t * t) + 1, 4)));
        Assert.Equal(10.0 / 9, Form(ofField, ones, ones), 1e-13);

        // The squared gradient of xy is x^2 + y^2; its integral is 2/3.
        double[] load = assembler.CreateVector<double>();
        assembler.Add(load, Term.Source(Coefficient.OfGradient(temperature, g => (g.X * g.X) + (g.Y * g.Y))));
        Assert.Equal(2.0 / 3, load.Sum(), 1e-13);

        SparseMatrix<double> mixed = assembler.CreateMatrix<double>();
        assembler.Add(mixed, Term.Mass(Coefficient.PerRegion(
            mesh,
            new Dictionary<string, Coefficient<double>> { ["a"] = 2.0, ["b"] = Coefficient.OfPlace(p => p.X, 1) })));
        Assert.Equal(1 + 0.375, Form(mixed, ones, ones), 1e-13);

        Assert.Throws<UnknownNameException>(() => Coefficient.PerRegion(
            mesh, new Dictionary<string, double> { ["a"] = 3, ["b"] = 5, ["c"] = 1 }));
        Assert.Throws<ArgumentException>(() => Coefficient.PerRegion(mesh, new Dictionary<string, double> { ["a"] = 3 }));
    }

    [Fact]
    public void DegreesBeyondTheRulesAndForeignMatricesAreRefused()
    {
        var space = new NodeSpace(TestMeshes.Square(2, triangles: true), 5);
        var assembler = new Assembler(space);
        SparseMatrix<double> matrix = assembler.CreateMatrix<double>();
        Assert.Throws<ArgumentOutOfRangeException>(
            () => assembler.Add(matrix, Term.Mass(Coefficient.OfPlace(p => p.X, 11))));
        Assert.Throws<ArgumentOutOfRangeException>(
            () => assembler.Add(matrix, Term.Mass(Coefficient.OfPlace(p => p.X, 1)), extraDegree: 10));
        Assert.Throws<ArgumentException>(
            () => assembler.Add(new SparseMatrix<double>(SparsePattern.Diagonal(space.UnknownCount)), Term.Mass(1.0)));
        Assert.Throws<ArgumentException>(() => assembler.Add(new double[3], Term.Source(1.0)));
    }

    internal static T Form<T>(SparseMatrix<T> matrix, NodeField<T> field, NodeField<T> test)
        where T : unmanaged, INumberBase<T>
    {
        T[] product = matrix.Multiply(field.Coefficients);
        T sum = T.Zero;
        for (int i = 0; i < product.Length; i++)
        {
            sum += test.Coefficients[i] * product[i];
        }

        return sum;
    }

    private readonly struct GivenCoupling(Coupling<Complex> coupling, int degree) : ICellMatrixTerm<Complex>
    {
        public int DegreeIn(int region) => degree;

        public Coupling<Complex> At(in CellPoint point) => coupling;
    }
}
