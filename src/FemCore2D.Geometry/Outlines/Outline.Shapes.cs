namespace FemCore2D.Geometry;

/// <content>The common shapes; all run counterclockwise.</content>
public sealed partial class Outline
{
    /// <summary>A rectangle parallel to the axes, with a name for each side that needs one.</summary>
    /// <param name="corner">The lower left corner, in metres.</param>
    /// <param name="width">The extent along the first axis, positive.</param>
    /// <param name="height">The extent along the second axis, positive.</param>
    /// <param name="bottom">The boundary along the lower side.</param>
    /// <param name="right">The boundary along the right side.</param>
    /// <param name="top">The boundary along the upper side.</param>
    /// <param name="left">The boundary along the left side.</param>
    /// <exception cref="ArgumentOutOfRangeException">The width or height is not positive.</exception>
    /// <exception cref="InvalidSectionException">The numbers make no outline.</exception>
    public static Outline Rectangle(
        Point2D corner,
        double width,
        double height,
        string? bottom = null,
        string? right = null,
        string? top = null,
        string? left = null)
    {
        Positive(width, nameof(width), "rectangle", corner);
        Positive(height, nameof(height), "rectangle", corner);
        double x = corner.X + width;
        double y = corner.Y + height;
        return StartAt(corner)
            .StraightTo(new Point2D(x, corner.Y), bottom)
            .StraightTo(new Point2D(x, y), right)
            .StraightTo(new Point2D(corner.X, y), top)
            .StraightTo(corner, left)
            .Close();
    }

    /// <summary>A rectangle parallel to the axes with its corners rounded.</summary>
    /// <param name="corner">The lower left corner of the rectangle before rounding, in metres.</param>
    /// <param name="width">The extent along the first axis, positive.</param>
    /// <param name="height">The extent along the second axis, positive.</param>
    /// <param name="radius">The radius of the corners, positive and at most half of the shorter side.</param>
    /// <exception cref="ArgumentOutOfRangeException">A length is not positive, or the corners do not fit.</exception>
    /// <exception cref="InvalidSectionException">The numbers make no outline.</exception>
    public static Outline RoundedRectangle(Point2D corner, double width, double height, double radius)
    {
        Positive(width, nameof(width), "rounded rectangle", corner);
        Positive(height, nameof(height), "rounded rectangle", corner);
        Positive(radius, nameof(radius), "rounded rectangle", corner);
        double across = width - (2 * radius);
        double along = height - (2 * radius);
        double tolerance = OutlineChecks.RelativeTolerance * (width + height);
        if (Math.Min(across, along) < -tolerance)
        {
            throw new ArgumentOutOfRangeException(
                nameof(radius), radius, $"The corners of the rounded rectangle at {corner} do not fit: "
                    + "use a radius of at most half the shorter side.");
        }

        // A side that the corners leave no room for is left out.
        OutlinePath path = StartAt(new Point2D(corner.X + radius, corner.Y));
        double left = corner.X;
        double bottom = corner.Y;
        double right = left + width;
        double top = bottom + height;
        bool wide = across > tolerance;
        bool high = along > tolerance;
        double innerRight = wide ? right - radius : left + radius;
        double innerTop = high ? top - radius : bottom + radius;
        path = wide ? path.StraightTo(new Point2D(innerRight, bottom)) : path;
        path = path.ArcTo(new Point2D(right, bottom + radius), Math.PI / 2);
        path = high ? path.StraightTo(new Point2D(right, innerTop)) : path;
        path = path.ArcTo(new Point2D(innerRight, top), Math.PI / 2);
        path = wide ? path.StraightTo(new Point2D(left + radius, top)) : path;
        path = path.ArcTo(new Point2D(left, innerTop), Math.PI / 2);
        path = high ? path.StraightTo(new Point2D(left, bottom + radius)) : path;
        return path.ArcTo(path.Start, Math.PI / 2).Close();
    }

    /// <summary>The outline of straight pieces through corners; the last corner is joined to the first.</summary>
    /// <param name="corners">At least three corners, in order round the outline, in metres.</param>
    /// <exception cref="ArgumentException">There are fewer than three corners.</exception>
    /// <exception cref="InvalidSectionException">The corners make no outline.</exception>
    public static Outline Polygon(params ReadOnlySpan<Point2D> corners)
    {
        if (corners.Length < 3)
        {
            throw new ArgumentException(
                $"A polygon needs at least three corners, and {corners.Length} were given.", nameof(corners));
        }

        OutlinePiece[] pieces = new OutlinePiece[corners.Length];
        for (int i = 0; i < corners.Length; i++)
        {
            pieces[i] = new OutlinePiece(corners[i], corners[(i + 1) % corners.Length]);
        }

        return Of(pieces);
    }

    /// <summary>A circle, drawn as four quarter arcs.</summary>
    /// <param name="centre">The centre, in metres.</param>
    /// <param name="radius">The radius, positive.</param>
    /// <param name="boundary">The boundary that the circle belongs to, if any.</param>
    /// <exception cref="ArgumentOutOfRangeException">The radius is not positive.</exception>
    /// <exception cref="InvalidSectionException">The centre is not finite, or too far away for the radius to be resolved.</exception>
    public static Outline Circle(Point2D centre, double radius, string? boundary = null)
    {
        Positive(radius, nameof(radius), "circle", centre);
        Point2D right = new(centre.X + radius, centre.Y);
        return StartAt(right)
            .ArcTo(new Point2D(centre.X, centre.Y + radius), Math.PI / 2, boundary)
            .ArcTo(new Point2D(centre.X - radius, centre.Y), Math.PI / 2, boundary)
            .ArcTo(new Point2D(centre.X, centre.Y - radius), Math.PI / 2, boundary)
            .ArcTo(right, Math.PI / 2, boundary)
            .Close();
    }

    /// <summary>A sector of a disc: two radii and the arc between them.</summary>
    /// <param name="centre">The centre of the disc, in metres.</param>
    /// <param name="radius">Its radius, positive.</param>
    /// <param name="startRadians">The direction of the first radius, counterclockwise from the first axis.</param>
    /// <param name="sweepRadians">The angle of the sector, positive and less than a full turn.</param>
    /// <exception cref="ArgumentOutOfRangeException">The radius or the sweep is not in its range.</exception>
    /// <exception cref="InvalidSectionException">The numbers make no outline.</exception>
    public static Outline Sector(Point2D centre, double radius, double startRadians, double sweepRadians)
    {
        Positive(radius, nameof(radius), "sector", centre);
        CheckSweep(sweepRadians, "sector", centre);
        return StartAt(centre)
            .StraightTo(centre + (radius * Vector2D.AtAngle(startRadians)))
            .ArcTo(centre + (radius * Vector2D.AtAngle(startRadians + sweepRadians)), sweepRadians)
            .Close();
    }

    /// <summary>A sector of a ring: two arcs around one centre and the radial lines that join their ends.</summary>
    /// <param name="centre">The centre of the ring, in metres.</param>
    /// <param name="innerRadius">The radius of the inner arc, positive.</param>
    /// <param name="outerRadius">The radius of the outer arc, larger than the inner one.</param>
    /// <param name="startRadians">The direction of the first radial line, counterclockwise from the first axis.</param>
    /// <param name="sweepRadians">The angle of the sector, positive and less than a full turn.</param>
    /// <exception cref="ArgumentOutOfRangeException">A radius or the sweep is not in its range.</exception>
    /// <exception cref="InvalidSectionException">The numbers make no outline.</exception>
    public static Outline RingSector(
        Point2D centre, double innerRadius, double outerRadius, double startRadians, double sweepRadians)
    {
        Positive(innerRadius, nameof(innerRadius), "ring sector", centre);
        Positive(outerRadius - innerRadius, nameof(outerRadius), "ring sector", centre);
        CheckSweep(sweepRadians, "ring sector", centre);
        Vector2D first = Vector2D.AtAngle(startRadians);
        Vector2D second = Vector2D.AtAngle(startRadians + sweepRadians);
        return StartAt(centre + (innerRadius * first))
            .StraightTo(centre + (outerRadius * first))
            .ArcTo(centre + (outerRadius * second), sweepRadians)
            .StraightTo(centre + (innerRadius * second))
            .ArcTo(centre + (innerRadius * first), -sweepRadians)
            .Close();
    }

    internal static void Positive(double value, string name, string shape, Point2D place)
    {
        if (!(value > 0 && double.IsFinite(value)))
        {
            throw new ArgumentOutOfRangeException(
                name, value, $"The {shape} at {place} needs a positive, finite {(name.EndsWith("adius", StringComparison.Ordinal) ? "radius (the outer one larger than the inner)" : name)}.");
        }
    }

    private static void CheckSweep(double sweepRadians, string shape, Point2D place)
    {
        if (!(sweepRadians > 0 && sweepRadians < 2 * Math.PI))
        {
            throw new ArgumentOutOfRangeException(
                nameof(sweepRadians), sweepRadians, $"The {shape} at {place} needs a sweep above 0 and below a full turn. "
                    + "For a full turn use a circle or a ring.");
        }
    }
}
