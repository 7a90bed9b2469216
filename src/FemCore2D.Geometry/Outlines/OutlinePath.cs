using System.Collections.Immutable;
using System.Runtime.InteropServices;

namespace FemCore2D.Geometry;

/// <summary>
/// A chain of pieces that is being drawn: each step returns a longer path and leaves this one as it was.
/// </summary>
/// <example>
/// <code>
/// Outline half = Outline.StartAt(new(0, 0))
///     .StraightTo(new(2, 0), "base")
///     .ArcTo(new(0, 0), Math.PI)
///     .Close();
/// </code>
/// </example>
public sealed class OutlinePath
{
    private readonly OutlinePath? before;
    private readonly OutlinePiece last;
    private readonly int count;

    internal OutlinePath(Point2D start)
    {
        Start = Finite(start, 0);
        End = start;
    }

    private OutlinePath(OutlinePath before, OutlinePiece last)
    {
        OutlineChecks.CheckPiece(last, before.count);
        if (last.Start == last.End)
        {
            throw new InvalidSectionException(
                $"Piece {before.count} ({last}) has no length. "
                + "Leave out the repeated point, and draw a circle with Outline.Circle.");
        }

        this.before = before;
        this.last = last;
        count = before.count + 1;
        Start = before.Start;
        End = last.End;
    }

    /// <summary>Where the path begins.</summary>
    public Point2D Start { get; }

    /// <summary>Where the path ends so far.</summary>
    public Point2D End { get; }

    /// <summary>The pieces so far, in order.</summary>
    public ImmutableArray<OutlinePiece> Pieces
    {
        get
        {
            OutlinePiece[] pieces = new OutlinePiece[count];
            for (OutlinePath path = this; path.before is not null; path = path.before)
            {
                pieces[path.count - 1] = path.last;
            }

            return ImmutableCollectionsMarshal.AsImmutableArray(pieces);
        }
    }

    /// <summary>Goes on in a straight line.</summary>
    /// <param name="end">Where the piece ends.</param>
    /// <param name="boundary">The boundary that the piece belongs to, if any.</param>
    /// <exception cref="InvalidSectionException">The piece has no length, or is not finite.</exception>
    public OutlinePath StraightTo(Point2D end, string? boundary = null) => new(this, new OutlinePiece(End, end, 0, boundary));

    /// <summary>Goes on in an arc that turns the direction of travel by an angle.</summary>
    /// <param name="end">Where the piece ends.</param>
    /// <param name="sweepRadians">The angle, positive counterclockwise; less than a full turn.</param>
    /// <param name="boundary">The boundary that the piece belongs to, if any.</param>
    /// <exception cref="InvalidSectionException">The piece has no length, is not finite, or sweeps a full turn or more.</exception>
    public OutlinePath ArcTo(Point2D end, double sweepRadians, string? boundary = null) =>
        new(this, new OutlinePiece(End, end, sweepRadians, boundary));

    /// <summary>Goes on in the arc that passes through a point on its way.</summary>
    /// <param name="through">A point of the arc between its ends.</param>
    /// <param name="end">Where the piece ends.</param>
    /// <param name="boundary">The boundary that the piece belongs to, if any.</param>
    /// <exception cref="InvalidSectionException">The three points do not lie on one arc in this order, or are not finite.</exception>
    public OutlinePath ArcThrough(Point2D through, Point2D end, string? boundary = null)
    {
        Finite(through, count);
        Finite(end, count);
        Vector2D toStart = End - through;
        Vector2D toEnd = end - through;

        // The angle seen from a point of the arc is the supplement of half the sweep (Euclid III.20).
        double cross = toStart.Cross(toEnd);
        double dot = toStart.Dot(toEnd);
        if (cross == 0 && dot >= 0)
        {
            throw new InvalidSectionException(
                $"Piece {count} cannot be an arc from {End} through {through} to {end}: "
                + "the points lie in line, and the middle one is not between the others. Choose a point on the arc.");
        }

        double sweep = 2 * Math.Atan2(Math.Abs(cross), -dot);
        return ArcTo(end, cross > 0 ? -sweep : sweep, boundary);
    }

    /// <summary>Goes on in an arc around a centre.</summary>
    /// <param name="centre">The centre of the arc.</param>
    /// <param name="sweepRadians">The angle, positive counterclockwise; less than a full turn.</param>
    /// <param name="boundary">The boundary that the piece belongs to, if any.</param>
    /// <exception cref="InvalidSectionException">The piece has no length, is not finite, or sweeps a full turn or more.</exception>
    public OutlinePath ArcAround(Point2D centre, double sweepRadians, string? boundary = null) =>
        ArcTo(centre + OutlinePiece.Turned(End - centre, sweepRadians), sweepRadians, boundary);

    /// <summary>Ends the outline; where the path has not come back to its start yet, a straight piece does so.</summary>
    /// <param name="boundary">The boundary that the closing piece belongs to, if there is one.</param>
    /// <exception cref="InvalidSectionException">The path is no outline: it crosses or touches itself, or encloses no area.</exception>
    public Outline Close(string? boundary = null)
    {
        ImmutableArray<OutlinePiece> pieces = Pieces;
        Box2D bounds = pieces.Aggregate(Box2D.Around(Start, Start), (box, piece) => box.Union(piece.Bounds));
        return Outline.Of(Start.DistanceTo(End) > OutlineChecks.ToleranceOf(bounds)
            ? pieces.Add(new OutlinePiece(End, Start, 0, boundary))
            : pieces);
    }

    private static Point2D Finite(Point2D point, int piece) => point.IsFinite
        ? point
        : throw new InvalidSectionException(
            $"A point of piece {piece}, {point}, is not finite. Check the values that the outline is computed from.");
}
