using FemCore2D.Geometry;

namespace FemCore2D.Drawing;

/// <summary>An arc between two points, or the straight line when its sweep is zero.</summary>
internal readonly struct CircularArc
{
    private readonly Point2D start;
    private readonly Point2D end;
    private readonly Point2D centre;
    private readonly double sweep;

    public CircularArc(Point2D start, Point2D end, double sweepRadians)
    {
        this.start = start;
        this.end = end;
        sweep = sweepRadians;
        Vector2D chord = end - start;
        centre = sweepRadians == 0
            ? start
            : start.Towards(end, 0.5) + (chord.LeftNormal / (2 * Math.Tan(sweepRadians / 2)));
    }

    public double Radius => centre.DistanceTo(start);

    /// <summary>The point after a fraction of the sweep.</summary>
    public Point2D At(double fraction)
    {
        if (sweep == 0)
            return start.Towards(end, fraction);
        (double sine, double cosine) = Math.SinCos(sweep * fraction);
        Vector2D arm = start - centre;
        return centre + new Vector2D((cosine * arm.X) - (sine * arm.Y), (sine * arm.X) + (cosine * arm.Y));
    }

    /// <summary>How far the arc stands off its chord after a fraction of the sweep.</summary>
    public Vector2D BulgeAt(double fraction) => At(fraction) - start.Towards(end, fraction);
}
