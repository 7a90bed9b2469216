namespace FemCore2D.Geometry;

/// <summary>A straight or circular side of a <see cref="QuadrilateralPatch"/>.</summary>
/// <param name="Start">Where it begins, in metres.</param>
/// <param name="End">Where it ends, in metres.</param>
/// <param name="SweepRadians">
/// The angle that its arc sweeps, positive counterclockwise; zero for a straight side; less than a full turn.
/// </param>
/// <param name="Boundary">The name of the boundary along it, or none.</param>
public readonly record struct PatchSide(Point2D Start, Point2D End, double SweepRadians = 0, string? Boundary = null)
{
    /// <summary>The side that runs along an arc around a centre.</summary>
    /// <param name="centre">The centre of the arc, in metres.</param>
    /// <param name="radius">The radius, in metres, positive.</param>
    /// <param name="startRadians">The direction from the centre to the start, counterclockwise from the first axis.</param>
    /// <param name="sweepRadians">The angle swept, positive counterclockwise.</param>
    /// <param name="boundary">The name of the boundary along it, or none.</param>
    public static PatchSide Arc(
        Point2D centre, double radius, double startRadians, double sweepRadians, string? boundary = null)
    {
        ArgumentOutOfRangeException.ThrowIfNegativeOrZero(radius);
        return new PatchSide(
            centre + (radius * Vector2D.AtAngle(startRadians)),
            centre + (radius * Vector2D.AtAngle(startRadians + sweepRadians)),
            sweepRadians,
            boundary);
    }

    internal EdgeCurve Curve => new(Start, End, SweepRadians);
}
