using FemCore2D.Geometry;
using FsCheck;
using FsCheck.Fluent;

namespace FemCore2D.Testing;

/// <summary>Generators of cells, and of points within reference cells.</summary>
public static class CellGenerators
{
    /// <summary>Triangles of any position, direction and size from a micrometre to a kilometre, none nearly flat.</summary>
    /// <param name="leastAngleDegrees">The smallest angle that may occur, in degrees, below 60.</param>
    /// <exception cref="ArgumentOutOfRangeException">The angle is not between 0 and 60 degrees.</exception>
    public static Gen<TriangleCorners> Triangles(double leastAngleDegrees = 10)
    {
        ArgumentOutOfRangeException.ThrowIfNegativeOrZero(leastAngleDegrees);
        ArgumentOutOfRangeException.ThrowIfGreaterThanOrEqual(leastAngleDegrees, 60);
        double least = leastAngleDegrees * Math.PI / 180;
        double spare = Math.PI - (3 * least);
        return
            from size in Sizes
            from place in Placements(size)
            from first in NumberGenerators.Between(0, 1)
            from second in NumberGenerators.Between(0, 1)
            select WithAngles(place, size, least + (spare * first), least + (spare * (1 - first) * second));
    }

    /// <summary>
    /// Convex quadrilaterals of any position, direction and size: parallelograms, trapezia, rectangles and others.
    /// </summary>
    public static Gen<QuadrilateralCorners> Quadrilaterals() =>
        from size in Sizes
        from place in Placements(size)
        from slenderness in NumberGenerators.MagnitudeBetween(0.1, 1)
        from shear in NumberGenerators.Between(-0.5, 0.5)
        from shift in Gen.OneOf(Gen.Constant(Vector2D.Zero), Shifts)
        let height = slenderness * size
        select new QuadrilateralCorners(
            place(Vector2D.Zero),
            place(new Vector2D(size, 0)),
            place(new Vector2D(size * (1 + shear + shift.X), height * (1 + shift.Y))),
            place(new Vector2D(size * shear, height)));

    /// <summary>Points of the reference triangle, with its vertices, edges and interior.</summary>
    public static Gen<TrianglePoint> PointsOfTriangle() =>
        from x in NumberGenerators.Between(0, 1)
        from y in NumberGenerators.Between(0, 1)
        select new TrianglePoint(x + y <= 1 ? new Point2D(x, y) : new Point2D(1 - x, 1 - y));

    /// <summary>Points of the reference square, with its vertices, edges and interior.</summary>
    public static Gen<SquarePoint> PointsOfSquare() =>
        from x in NumberGenerators.Between(0, 1)
        from y in NumberGenerators.Between(0, 1)
        select new SquarePoint(new Point2D(x, y));

    private static Gen<double> Sizes => NumberGenerators.MagnitudeBetween(1e-6, 1e3);

    private static Gen<Vector2D> Shifts =>
        from x in NumberGenerators.Between(-0.3, 0.3)
        from y in NumberGenerators.Between(-0.3, 0.3)
        select new Vector2D(x, y);

    /// <summary>Turns and moves offsets from a first corner.</summary>
    internal static Gen<Func<Vector2D, Point2D>> Placements(double size) =>
        from x in NumberGenerators.Between(-10, 10)
        from y in NumberGenerators.Between(-10, 10)
        from turn in Gen.OneOf(Gen.Constant(0.0), NumberGenerators.Between(-Math.PI, Math.PI))
        let axis = Vector2D.AtAngle(turn)
        let origin = new Point2D(x * size, y * size)
        select (Func<Vector2D, Point2D>)(offset => origin + ((offset.X * axis) + (offset.Y * axis.LeftNormal)));

    private static TriangleCorners WithAngles(
        Func<Vector2D, Point2D> place, double size, double first, double second)
    {
        double side = size * Math.Sin(second) / Math.Sin(first + second);
        return new TriangleCorners(
            place(Vector2D.Zero), place(new Vector2D(size, 0)), place(side * Vector2D.AtAngle(first)));
    }
}
