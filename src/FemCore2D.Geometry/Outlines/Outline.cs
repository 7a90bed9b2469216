using System.Collections.Immutable;

namespace FemCore2D.Geometry;

/// <summary>
/// A closed chain of straight and circular-arc pieces that meets itself nowhere; immutable.
/// </summary>
/// <remarks>
/// Lengths below 1e-9 of the diagonal of its bounds count as nothing: ends that are closer count as joined, pieces
/// that are shorter count as faulty. An outline may run either way round; nothing but the sign of
/// <see cref="SignedArea"/> depends on it.
/// </remarks>
public sealed partial class Outline
{
    private Outline(ImmutableArray<OutlinePiece> pieces, Box2D bounds, double signedArea)
    {
        Pieces = pieces;
        Bounds = bounds;
        SignedArea = signedArea;
    }

    /// <summary>The pieces in order; each begins exactly where the one before it ends, and the first where the last ends.</summary>
    public ImmutableArray<OutlinePiece> Pieces { get; }

    /// <summary>The smallest box around the outline.</summary>
    public Box2D Bounds { get; }

    /// <summary>The exact area inside, arcs included, in square metres: positive when the outline runs counterclockwise.</summary>
    public double SignedArea { get; }

    /// <summary>The exact area inside, arcs included, in square metres.</summary>
    public double Area => Math.Abs(SignedArea);

    /// <summary>The length around, along the arcs, in metres.</summary>
    public double Perimeter => Pieces.Sum(p => p.Length);

    /// <summary>Begins an outline, piece by piece.</summary>
    /// <param name="start">Where it begins, in metres.</param>
    /// <exception cref="InvalidSectionException">The point is not finite.</exception>
    public static OutlinePath StartAt(Point2D start) => new(start);

    /// <summary>Makes an outline of pieces that follow each other all the way round.</summary>
    /// <param name="pieces">The pieces, each beginning where the one before it ends.</param>
    /// <exception cref="InvalidSectionException">
    /// The chain is open or broken, crosses or touches itself, encloses nothing, or has a piece that is not finite,
    /// has no length or sweeps a full turn.
    /// </exception>
    public static Outline Of(IEnumerable<OutlinePiece> pieces)
    {
        ArgumentNullException.ThrowIfNull(pieces);
        ImmutableArray<OutlinePiece> chain = [.. pieces];
        if (chain.Length == 0)
        {
            throw new InvalidSectionException("An outline needs pieces, and none was given. Add at least two that close.");
        }

        Box2D bounds = Box2D.Empty;
        for (int i = 0; i < chain.Length; i++)
        {
            OutlineChecks.CheckPiece(chain[i], i);
            bounds = bounds.Union(chain[i].Bounds);
        }

        double tolerance = OutlineChecks.ToleranceOf(bounds);
        if (!double.IsFinite(tolerance))
        {
            throw new InvalidSectionException(
                $"The outline that begins at {chain[0].Start} is too large for its size to be a number. Use metres.");
        }

        chain = OutlineChecks.Joined(chain, tolerance, closed: true);
        OutlineChecks.CheckLengths(chain, tolerance);
        double area = AreaOf(chain);
        OutlineChecks.CheckSimple(chain, tolerance);
        return Math.Abs(area) > tolerance * bounds.Diagonal
            ? new Outline(chain, bounds, area)
            : throw new InvalidSectionException(
                $"The outline that begins at {chain[0].Start} encloses no area. Draw a line of no thickness as a sheet.");
    }

    /// <summary>Whether a point lies inside; for points on the outline itself rounding decides.</summary>
    /// <param name="point">The point, in metres.</param>
    public bool Contains(Point2D point)
    {
        if (!Bounds.Contains(point))
        {
            return false;
        }

        int winding = 0;
        foreach (OutlinePiece piece in Pieces)
        {
            winding += Winding.Of(new PieceForm(piece.Start, piece.End, piece.SweepRadians), point);
        }

        return winding != 0;
    }

    /// <summary>The outline with every piece put under one boundary name.</summary>
    /// <param name="boundary">The name, or <see langword="null"/> to take all names away.</param>
    public Outline Named(string? boundary) => Named(boundary, _ => true);

    /// <summary>The outline with some of its pieces put under a boundary name; the others keep theirs.</summary>
    /// <param name="boundary">The name, or <see langword="null"/> to take the names of these pieces away.</param>
    /// <param name="where">Tells which pieces are meant.</param>
    /// <exception cref="ArgumentException">The name is blank.</exception>
    public Outline Named(string? boundary, Func<OutlinePiece, bool> where)
    {
        ArgumentNullException.ThrowIfNull(where);
        if (boundary is not null)
        {
            ArgumentException.ThrowIfNullOrWhiteSpace(boundary);
        }

        return new Outline([.. Pieces.Select(p => where(p) ? p with { Boundary = boundary } : p)], Bounds, SignedArea);
    }

    /// <summary>The area inside less other outlines: a shape with holes.</summary>
    /// <param name="holes">Outlines inside this one that do not meet it or each other.</param>
    /// <exception cref="InvalidSectionException">A hole is not inside, or meets the outline or another hole.</exception>
    public Shape Without(params ReadOnlySpan<Outline> holes) => new(this, [.. holes]);

    /// <inheritdoc/>
    public override string ToString() =>
        $"outline of {Pieces.Length} pieces between {Bounds.Lower} and {Bounds.Upper}";

    internal static double AreaOf(ImmutableArray<OutlinePiece> pieces)
    {
        Point2D origin = pieces[0].Start;
        double sum = 0;
        foreach (OutlinePiece piece in pieces)
        {
            sum += (0.5 * (piece.Start - origin).Cross(piece.End - origin)) + piece.SegmentArea;
        }

        return sum;
    }
}
