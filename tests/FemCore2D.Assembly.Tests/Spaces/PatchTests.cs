using System.Numerics;
using FemCore2D.Geometry;
using FemCore2D.Sparse;
using FemCore2D.Testing;
using FsCheck.Xunit;

namespace FemCore2D.Assembly.Tests;

/// <summary>Fields that the space contains come out exactly.</summary>
public class PatchTests
{
    [Theory]
    [InlineData(1, true)]
    [InlineData(2, true)]
    [InlineData(3, true)]
    [InlineData(4, true)]
    [InlineData(5, true)]
    [InlineData(1, false)]
    [InlineData(2, false)]
    [InlineData(3, false)]
    public void PolynomialsOfTheDegreeAreReproduced(int degree, bool triangles)
    {
        // u = (x + y/2)^p / p!, with an anisotropic tensor.
        var tensor = Tensor2D.Principal(2.0, 0.5, 0.4);
        double factorial = Enumerable.Range(1, degree).Aggregate(1.0, (product, k) => product * k);
        double Exact(Point2D p) => Math.Pow(p.X + (0.5 * p.Y), degree) / factorial;
        double curvature = tensor.XX + (0.5 * (tensor.XY + tensor.YX)) + (0.25 * tensor.YY);
        double Source(Point2D p) => degree < 2
            ? 0
            : -curvature * degree * (degree - 1) * Math.Pow(p.X + (0.5 * p.Y), degree - 2) / factorial;

        var space = new NodeSpace(TestMeshes.Trapezium(3, triangles), degree);
        var assembler = new Assembler(space);
        SparseMatrix<double> matrix = assembler.CreateMatrix<double>();
        assembler.Add(matrix, Term.Stiffness(tensor));
        double[] load = assembler.CreateVector<double>();
        assembler.Add(load, Term.Source(Coefficient.OfPlace(Source, Math.Max(1, degree - 2))));
        NodeField<double> field = Solve.Field(
            new ConstraintSet<double>(space).FixBoundary("rim", Exact).Resolve(), matrix, load);
        for (int i = 0; i < space.UnknownCount; i++)
        {
            Assert.Equal(Exact(space.NodePlaces[i]), field.Coefficients[i], 1e-12);
        }
    }

    /// <summary>Linear fields pass on curved cells too, since the maps contain them.</summary>
    [Property(MaxTest = 10, Arbitrary = [typeof(FieldArbitraries)])]
    public void LinearFieldsHaveNoResidualInside(Mesh mesh)
    {
        for (int degree = 1; degree <= 3; degree++)
        {
            var space = new NodeSpace(mesh, degree);
            var assembler = new Assembler(space);
            SparseMatrix<double> matrix = assembler.CreateMatrix<double>();
            assembler.Add(matrix, Term.Stiffness(1.0));
            double size = mesh.Vertices.ToArray().Max(p => p.DistanceTo(mesh.Vertices[0]));
            NodeField<double> linear = NodeField.Interpolate(
                space, p => ((p.X - mesh.Vertices[0].X) + (2 * (p.Y - mesh.Vertices[0].Y))) / size);
            double[] residual = matrix.Multiply(linear.Coefficients);
            bool[] rim = new bool[space.UnknownCount];
            int[] unknowns = new int[space.Numbering.EdgeUnknownCount];
            for (int edge = 0; edge < mesh.EdgeCount; edge++)
            {
                if (mesh.IsOuter(edge))
                {
                    space.Numbering.UnknownsOfEdge(edge, unknowns);
                    Array.ForEach(unknowns, unknown => rim[unknown] = true);
                }
            }

            for (int i = 0; i < residual.Length; i++)
            {
                Assert.True(rim[i] || Math.Abs(residual[i]) < 1e-11, $"degree {degree}, {space.NodePlaces[i]}: {residual[i]}");
            }
        }
    }

    [Fact]
    public void ComplexCoefficientsGiveComplexFields()
    {
        // u = exp(i (x + 2y)): -div k grad u + m u = (5k + m) u, with lossy k and m.
        var k = new Complex(2, -0.5);
        var m = new Complex(-1, 3);
        static Complex Exact(Point2D p) => Complex.Exp(Complex.ImaginaryOne * (p.X + (2 * p.Y)));
        double[] distances = [.. new[] { 4, 8 }.Select(n =>
        {
            var space = new NodeSpace(TestMeshes.Trapezium(n, triangles: n > 0), 2);
            var assembler = new Assembler(space);
            SparseMatrix<Complex> matrix = assembler.CreateMatrix<Complex>();
            assembler.Add(matrix, Term.Stiffness(k));
            assembler.Add(matrix, Term.Mass(m));
            Complex[] load = assembler.CreateVector<Complex>();
            assembler.Add(load, Term.Source(Coefficient.OfPlace(p => ((5 * k) + m) * Exact(p))));
            return Solve.Field(new ConstraintSet<Complex>(space).FixBoundary("rim", Exact).Resolve(), matrix, load)
                .DistanceTo(Exact);
        })];
        Assert.InRange(Math.Log2(distances[0] / distances[1]), 2.85, 3.3);
    }

    [Theory]
    [InlineData(true)]
    [InlineData(false)]
    public void FieldsAreFoundAtPlaces(bool triangles)
    {
        var space = new NodeSpace(TestMeshes.Ring(3, 4, triangles), 3);
        NodeField<double> field = NodeField.Interpolate(space, p => p.X - (3 * p.Y));
        Assert.True(field.TryValueAt(new Point2D(1.1, 1.2), out double value));
        Assert.Equal(1.1 - 3.6, value, 1e-12);
        Assert.True(field.TryGradientAt(new Point2D(-1.1, 0.7), out FieldVector<double> gradient));
        Assert.Equal(1, gradient.X, 1e-11);
        Assert.Equal(-3, gradient.Y, 1e-11);
        Assert.False(field.TryValueAt(Point2D.Origin, out _));
        Assert.Throws<ArgumentException>(() => new NodeField<double>(space, new double[3]));
    }
}
