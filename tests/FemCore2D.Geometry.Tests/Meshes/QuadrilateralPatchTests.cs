using FemCore2D.Testing;
using FsCheck.Xunit;

namespace FemCore2D.Geometry.Tests;

[Properties(Arbitrary = [typeof(FieldArbitraries)], MaxTest = 30)]
public class QuadrilateralPatchTests
{
    [Property]
    public void GridOfAStraightPatchIsTheBilinearImage(QuadrilateralCorners corners)
    {
        Mesh mesh = QuadrilateralPatch
            .Straight(corners.A, corners.B, corners.C, corners.D, "plate").Divide(3, 2);
        MeshInvariants.Check(mesh);
        MeshInvariants.Near(corners.Area, mesh.AreaOfRegion("plate"), 1e-11);
        Assert.Equal(6, mesh.QuadrilateralCount);
        Assert.False(mesh.HasArcs);

        double size = mesh.Bounds.Diagonal;
        for (int i = 0; i <= 3; i++)
        {
            for (int j = 0; j <= 2; j++)
            {
                Point2D bilinear = corners.A.Towards(corners.B, i / 3.0).Towards(corners.D.Towards(corners.C, i / 3.0), j / 2.0);
                Assert.True(bilinear.DistanceTo(mesh.Vertices[(4 * j) + i]) < 1e-13 * size);
            }
        }
    }

    [Fact]
    public void ARingSectorIsExactInItsAreaAndInEveryEdge()
    {
        Point2D centre = new(0.3, -0.2);
        Mesh mesh = QuadrilateralPatch
            .RingSector(centre, 1, 3, 0.4, 2, "ring", "inner", "outer", "start", "end")
            .Divide(4, 5, Grading.Growing(3), Grading.FromBothEnds(2));
        MeshInvariants.Check(mesh);
        MeshInvariants.Near(0.5 * (9 - 1) * 2, mesh.AreaOfRegion("ring"));
        MeshInvariants.Near(2, mesh.LengthOfBoundary("inner"));
        MeshInvariants.Near(6, mesh.LengthOfBoundary("outer"));
        MeshInvariants.Near(2, mesh.LengthOfBoundary("start"));
        MeshInvariants.Near(2, mesh.LengthOfBoundary("end"));

        for (int edge = 0; edge < mesh.EdgeCount; edge++)
        {
            (int from, int to) = mesh.EndsOf(edge);
            double radius = mesh.Vertices[from].DistanceTo(centre);
            if (Math.Abs(radius - mesh.Vertices[to].DistanceTo(centre)) < 1e-9)
            {
                // All of a concentric edge keeps the radius.
                for (int i = 1; i < 8; i++)
                {
                    MeshInvariants.Near(radius, mesh.PointOnEdge(edge, i / 8.0).DistanceTo(centre), 1e-14);
                }
            }
            else
            {
                Assert.Equal(0, mesh.SweepRadiansOf(edge));
            }
        }
    }

    [Fact]
    public void TangentsOfEdgesAreTheDerivativesOfTheirPoints()
    {
        Mesh mesh = QuadrilateralPatch.RingSector(Point2D.Origin, 1, 2, 0, 2, "ring").Divide(2, 3);
        for (int edge = 0; edge < mesh.EdgeCount; edge++)
        {
            Vector2D difference = (mesh.PointOnEdge(edge, 0.3 + 1e-5) - mesh.PointOnEdge(edge, 0.3 - 1e-5)) / 2e-5;
            Vector2D tangent = mesh.TangentOnEdge(edge, 0.3);
            Assert.True((difference - tangent).Length < 1e-9);
            MeshInvariants.Near(mesh.LengthOf(edge), tangent.Length);
        }
    }

    [Theory]
    [InlineData(2.0)]
    [InlineData(0.25)]
    public void GrowingDivisionsHaveOneRatioFromStartToEnd(double lastToFirst)
    {
        double[] fractions = Grading.Growing(lastToFirst).Fractions(5);
        double[] lengths = [.. fractions.Skip(1).Zip(fractions, (end, start) => end - start)];
        MeshInvariants.Near(lastToFirst, lengths[4] / lengths[0]);
        Assert.All(lengths.Skip(2).Zip(lengths.Skip(1)), pair => MeshInvariants.Near(lengths[1] / lengths[0], pair.First / pair.Second));
        Assert.Equal((0.0, 1.0), (fractions[0], fractions[5]));
    }

    [Theory]
    [InlineData(5)]
    [InlineData(6)]
    public void DivisionsFromBothEndsAreSymmetric(int count)
    {
        double[] fractions = Grading.FromBothEnds(4).Fractions(count);
        for (int i = 0; i <= count; i++)
        {
            Assert.Equal(1 - fractions[i], fractions[count - i], 1e-15);
        }

        double middle = fractions[(count / 2) + 1] - fractions[count / 2];
        MeshInvariants.Near(4, middle / fractions[1]);
    }

    [Fact]
    public void GivenFractionsAreKept()
    {
        Mesh mesh = QuadrilateralPatch.Straight(new(0, 0), new(2, 0), new(2, 1), new(0, 1), "strip")
            .Divide(3, 1, Grading.At(0, 0.1, 0.4, 1));
        Assert.Equal([0, 0.2, 0.8, 2], mesh.Vertices[..4].ToArray().Select(v => v.X));
        Assert.Throws<ArgumentOutOfRangeException>(() => Grading.At(0, 0.5, 1).Fractions(3));
    }

    [Fact]
    public void BadGradingsAreRefused()
    {
        Assert.Throws<ArgumentException>(() => Grading.At(0, 0.6, 0.5, 1));
        Assert.Throws<ArgumentException>(() => Grading.At(0, 0.5));
        Assert.Throws<ArgumentOutOfRangeException>(() => Grading.Growing(0));
        Assert.Throws<ArgumentOutOfRangeException>(() => Grading.FromBothEnds(double.NaN));
    }

    [Fact]
    public void AnOpenPatchNamesTheGap()
    {
        var exception = Assert.Throws<InvalidMeshException>(() => new QuadrilateralPatch(
            new(new(0, 0), new(1, 0)), new(new(1, 0), new(1, 1)),
            new(new(1, 1.01), new(0, 1)), new(new(0, 1), new(0, 0)), "a"));
        Assert.Equal(new Point2D(1, 1), exception.Place);
        Assert.Contains("Side 2", exception.Message, StringComparison.Ordinal);
        Assert.Contains("(1, 1.01)", exception.Message, StringComparison.Ordinal);
    }

    [Fact]
    public void SidesWithoutLengthOrBeyondATurnOrNotFiniteAreRefused()
    {
        Assert.Throws<InvalidMeshException>(() => QuadrilateralPatch.Straight(
            new(0, 0), new(1, 0), new(1, 0), new(0, 1), "a"));
        Assert.Throws<InvalidMeshException>(() => new QuadrilateralPatch(
            new(new(0, 0), new(1, 0), 7), new(new(1, 0), new(1, 1)),
            new(new(1, 1), new(0, 1)), new(new(0, 1), new(0, 0)), "a"));
        Assert.Throws<InvalidMeshException>(() => QuadrilateralPatch.Straight(
            new(0, 0), new(1, 0), new(double.NaN, 1), new(0, 1), "a"));
        Assert.Throws<InvalidMeshException>(() => QuadrilateralPatch.RingSector(Point2D.Origin, 2, 1, 0, 1, "a"));
        Assert.Throws<ArgumentException>(() => QuadrilateralPatch.Straight(
            new(0, 0), new(1, 0), new(1, 1), new(0, 1), " "));
    }

    [Fact]
    public void AFoldedPatchNamesTheCell()
    {
        // Clockwise; with an inner corner; with an arc that reaches through the opposite side.
        Assert.Contains("clockwise", Assert.Throws<InvalidMeshException>(() => QuadrilateralPatch
            .Straight(new(0, 0), new(0, 1), new(1, 1), new(1, 0), "a").Divide(2, 2)).Message, StringComparison.Ordinal);
        Assert.Throws<InvalidMeshException>(() => QuadrilateralPatch
            .Straight(new(0, 0), new(1, 0), new(0.2, 0.2), new(0, 1), "a").Divide(4, 4));
        var folded = Assert.Throws<InvalidMeshException>(() => new QuadrilateralPatch(
            new(new(0, 0), new(1, 0), -Math.PI), new(new(1, 0), new(1, 0.4)),
            new(new(1, 0.4), new(0, 0.4)), new(new(0, 0.4), new(0, 0)), "lens").Divide(1, 1));
        Assert.Contains("'lens'", folded.Message, StringComparison.Ordinal);
        Assert.NotNull(folded.Place);
    }

    [Fact]
    public void CountsMustBePositiveAndFitIntoAMesh()
    {
        QuadrilateralPatch patch = QuadrilateralPatch.Straight(new(0, 0), new(1, 0), new(1, 1), new(0, 1), "a");
        Assert.Throws<ArgumentOutOfRangeException>(() => patch.Divide(0, 1));
        Assert.Throws<ArgumentOutOfRangeException>(() => patch.Divide(1, -1));
        Assert.Throws<MeshingException>(() => patch.Divide(100_000, 100_000));
        Assert.Throws<InvalidMeshException>(() =>
            QuadrilateralPatch.RingSector(Point2D.Origin, 1, 2, 0, 4, "a").Divide(1, 1));
    }
}
