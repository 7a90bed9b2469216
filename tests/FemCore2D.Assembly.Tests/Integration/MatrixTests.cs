using System.Numerics;
using FemCore2D.Geometry;
using FemCore2D.Sparse;
using FemCore2D.Testing;
using FsCheck.Xunit;

namespace FemCore2D.Assembly.Tests;

/// <summary>Matrices and vectors against integrals that are known.</summary>
public class MatrixTests
{
    [Property(MaxTest = 20, Arbitrary = [typeof(FieldArbitraries)])]
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
}
