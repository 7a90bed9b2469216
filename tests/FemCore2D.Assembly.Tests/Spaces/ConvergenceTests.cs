using FemCore2D.Geometry;
using FemCore2D.Sparse;

namespace FemCore2D.Assembly.Tests;

/// <summary>The rates at which solutions with smooth fields approach them: p+1 in L2, p in energy.</summary>
public class ConvergenceTests
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
    public void SolutionsOnAStraightDomainHaveTheOrderOfTheirDegree(int degree, bool triangles) =>
        CheckRates(degree, degree <= 3 ? 6 : 3, n => TestMeshes.Trapezium(n, triangles), "rim");

    [Theory]
    [InlineData(1, true)]
    [InlineData(2, true)]
    [InlineData(3, true)]
    [InlineData(1, false)]
    [InlineData(2, false)]
    [InlineData(3, false)]
    public void SolutionsOnADiscHaveTheOrderOfTheirDegree(int degree, bool triangles) =>
        CheckRates(degree, 4, n => TestMeshes.Disc(n, n, triangles), "rim");

    [Theory]
    [InlineData(1, true)]
    [InlineData(2, true)]
    [InlineData(3, true)]
    [InlineData(1, false)]
    [InlineData(2, false)]
    [InlineData(3, false)]
    public void SolutionsOnARingHaveTheOrderOfTheirDegree(int degree, bool triangles) =>
        CheckRates(degree, 4, n => TestMeshes.Ring(n, n, triangles), "inner", "outer");

    private static void CheckRates(int degree, int start, Func<int, Mesh> mesh, params string[] boundaries)
    {
        (double coarse, double coarseEnergy) = Errors(mesh(start), degree, boundaries);
        (double fine, double fineEnergy) = Errors(mesh(2 * start), degree, boundaries);
        Assert.InRange(Math.Log2(coarse / fine), degree + 1 - 0.15, degree + 2);
        Assert.InRange(Math.Log2(coarseEnergy / fineEnergy), degree - 0.1, degree + 1);
    }

    private static (double L2, double Energy) Errors(Mesh mesh, int degree, string[] boundaries)
    {
        // u = exp(x/2) sin(y), for which -div grad u = 3/4 u.
        static double Exact(Point2D p) => Math.Exp(0.5 * p.X) * Math.Sin(p.Y);
        static FieldVector<double> Gradient(Point2D p) =>
            new(0.5 * Exact(p), Math.Exp(0.5 * p.X) * Math.Cos(p.Y));

        var space = new NodeSpace(mesh, degree);
        var assembler = new Assembler(space);
        SparseMatrix<double> stiffness = assembler.CreateMatrix<double>();
        assembler.Add(stiffness, Term.Stiffness(1.0));
        double[] load = assembler.CreateVector<double>();
        assembler.Add(load, Term.Source(Coefficient.OfPlace(p => 0.75 * Exact(p), degree + 1)));
        var constraints = new ConstraintSet<double>(space);
        foreach (string boundary in boundaries)
        {
            constraints = constraints.FixBoundary(boundary, Exact);
        }

        NodeField<double> field = Solve.PositiveField(constraints.Resolve(), stiffness, load);
        return (field.DistanceTo(Exact), field.GradientDistanceTo(Gradient));
    }
}
