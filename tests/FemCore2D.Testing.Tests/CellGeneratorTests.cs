using FemCore2D.Geometry;
using FsCheck.Xunit;

namespace FemCore2D.Testing.Tests;

[Properties(Arbitrary = [typeof(FieldArbitraries)])]
public class CellGeneratorTests
{
    [Property]
    public void TrianglesKeepTheirSmallestAngleAndGoCounterclockwise(TriangleCorners triangle)
    {
        Point2D[] corners = triangle.ToArray();
        double sum = 0;
        for (int i = 0; i < 3; i++)
        {
            double angle = AngleAt(corners, i);
            Assert.InRange(angle, (10 - 1e-6) * Math.PI / 180, Math.PI);
            sum += angle;
        }

        Assert.Equal(Math.PI, sum, 1e-9);
        Assert.True(triangle.Area > 0);
        Assert.Equal(triangle.Area, triangle.ToMesh().AreaOf(0), 1e-9 * triangle.Area);
    }

    [Property]
    public void QuadrilateralsAreConvexAndGoCounterclockwise(QuadrilateralCorners quadrilateral)
    {
        Point2D[] corners = quadrilateral.ToArray();
        for (int i = 0; i < 4; i++)
        {
            Assert.InRange(AngleAt(corners, i), 0.01, Math.PI - 0.01);
        }

        Assert.Equal(quadrilateral.Area, quadrilateral.ToMesh().AreaOf(0), 1e-9 * quadrilateral.Area);
    }

    [Property]
    public void ReferencePointsLieInTheirCells(TrianglePoint triangle, SquarePoint square)
    {
        Assert.True(triangle.Place.X >= 0 && triangle.Place.Y >= 0 && triangle.Place.X + triangle.Place.Y <= 1 + 1e-15);
        Assert.True(square.Place is { X: >= 0 and <= 1, Y: >= 0 and <= 1 });
    }

    [Theory]
    [InlineData(0.0)]
    [InlineData(60.0)]
    [InlineData(-5.0)]
    public void AnglesThatNoTriangleHasAreRefused(double degrees) =>
        Assert.Throws<ArgumentOutOfRangeException>(() => CellGenerators.Triangles(degrees));

    private static double AngleAt(Point2D[] corners, int corner)
    {
        Vector2D next = corners[(corner + 1) % corners.Length] - corners[corner];
        Vector2D previous = corners[(corner + corners.Length - 1) % corners.Length] - corners[corner];
        return Math.Atan2(next.Cross(previous), next.Dot(previous));
    }
}
