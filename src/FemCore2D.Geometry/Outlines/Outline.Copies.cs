namespace FemCore2D.Geometry;

/// <content>Copies of an outline at another place, angle or size.</content>
public sealed partial class Outline
{
    /// <summary>The outline moved by a vector.</summary>
    /// <param name="step">The vector, in metres.</param>
    /// <exception cref="InvalidSectionException">The result is not finite, or too far away to be resolved.</exception>
    public Outline Moved(Vector2D step) => Mapped(p => p + step, 1);

    /// <summary>The outline turned about a point.</summary>
    /// <param name="centre">The point that stays.</param>
    /// <param name="radians">The angle, counterclockwise.</param>
    /// <exception cref="InvalidSectionException">The result is not finite.</exception>
    public Outline Rotated(Point2D centre, double radians) =>
        Mapped(p => centre + OutlinePiece.Turned(p - centre, radians), 1);

    /// <summary>The outline scaled about a point.</summary>
    /// <param name="centre">The point that stays.</param>
    /// <param name="factor">The factor, positive.</param>
    /// <exception cref="ArgumentOutOfRangeException">The factor is not positive.</exception>
    /// <exception cref="InvalidSectionException">The result is not finite.</exception>
    public Outline Scaled(Point2D centre, double factor)
    {
        Positive(factor, nameof(factor), "scaled outline", centre);
        return Mapped(p => centre + (factor * (p - centre)), 1);
    }

    /// <summary>The outline mirrored in a line; it then runs the other way round.</summary>
    /// <param name="onLine">A point of the line.</param>
    /// <param name="along">The direction of the line.</param>
    /// <exception cref="ArgumentException">The direction has no length.</exception>
    /// <exception cref="InvalidSectionException">The result is not finite.</exception>
    public Outline Mirrored(Point2D onLine, Vector2D along)
    {
        double squared = along.LengthSquared;
        if (!(squared > 0 && double.IsFinite(squared)))
        {
            throw new ArgumentException($"The line at {onLine} needs a finite direction that is not zero.", nameof(along));
        }

        Vector2D normal = along.LeftNormal;
        return Mapped(p => p - (2 * (p - onLine).Dot(normal) / squared * normal), -1);
    }

    /// <summary>The same outline, run the other way round.</summary>
    public Outline Reversed() => new([.. Pieces.Reverse().Select(p => p.Reversed())], Bounds, -SignedArea);

    /// <summary>
    /// The outline at a constant distance from this one, with arcs around the corners that it passes on their outside.
    /// </summary>
    /// <param name="distance">The distance in metres: positive outward, negative inward.</param>
    /// <returns>
    /// An outline whose pieces keep the boundary names of the pieces that they run along; an arc around a corner takes
    /// the name of its two neighbours where both have the same.
    /// </returns>
    /// <exception cref="ArgumentOutOfRangeException">The distance is not finite.</exception>
    /// <exception cref="InvalidSectionException">
    /// Nothing is left at that distance, or what is left is not one outline: it falls into parts, or closes round a hole.
    /// </exception>
    public Outline Offset(double distance) => OutlineOffset.Of(this, distance);

    internal Outline Mapped(Func<Point2D, Point2D> map, int orientation) =>
        Of(Pieces.Select(p => new OutlinePiece(map(p.Start), map(p.End), orientation * p.SweepRadians, p.Boundary)));
}
