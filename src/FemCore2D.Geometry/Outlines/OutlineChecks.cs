using System.Collections.Immutable;

namespace FemCore2D.Geometry;

/// <summary>What makes a chain of pieces an outline: closed, of finite extent, and meeting itself nowhere.</summary>
internal static class OutlineChecks
{
    /// <summary>Lengths below this fraction of the size of an outline or section count as nothing.</summary>
    public const double RelativeTolerance = 1e-9;

    /// <summary>Rounding of the coordinates, which bounds the tolerance from below far away from the origin.</summary>
    private const double Rounding = 64 * 2.220446049250313e-16;

    /// <summary>The distance within which points of something with these bounds count as one.</summary>
    public static double ToleranceOf(Box2D bounds)
    {
        double farthest = Math.Max(
            Math.Max(Math.Abs(bounds.Lower.X), Math.Abs(bounds.Upper.X)),
            Math.Max(Math.Abs(bounds.Lower.Y), Math.Abs(bounds.Upper.Y)));
        return Math.Max(RelativeTolerance * bounds.Diagonal, Rounding * farthest);
    }

    /// <summary>Checks each piece by itself: finite numbers, less than a full turn, a name that is one.</summary>
    public static void CheckPiece(OutlinePiece piece, int index)
    {
        if (!piece.Start.IsFinite || !piece.End.IsFinite || !double.IsFinite(piece.SweepRadians))
        {
            throw new InvalidSectionException(
                $"Piece {index} ({piece}) has a coordinate or sweep that is not a finite number. "
                + "Check the values that the outline is computed from.");
        }

        if (Math.Abs(piece.SweepRadians) >= 2 * Math.PI)
        {
            throw new InvalidSectionException(
                $"Piece {index} ({piece}) sweeps a full turn or more. "
                + "Draw a circle with Outline.Circle, or divide the arc into two.");
        }

        if (piece.Boundary is not null && string.IsNullOrWhiteSpace(piece.Boundary))
        {
            throw new InvalidSectionException(
                $"Piece {index} ({piece}) has a blank boundary name. Give it a name, or null for none.");
        }
    }

    public static void CheckLengths(ImmutableArray<OutlinePiece> pieces, double tolerance)
    {
        for (int i = 0; i < pieces.Length; i++)
        {
            if (pieces[i].Start.DistanceTo(pieces[i].End) <= tolerance)
            {
                throw new InvalidSectionException(
                    $"Piece {i} ({pieces[i]}) has no length: its ends are closer than the tolerance of {tolerance:G3} m. "
                    + "Remove the repeated point.");
            }
        }
    }

    /// <summary>Joins pieces end to start and returns them with exactly equal joints.</summary>
    public static ImmutableArray<OutlinePiece> Joined(ImmutableArray<OutlinePiece> pieces, double tolerance, bool closed)
    {
        ImmutableArray<OutlinePiece>.Builder joined = ImmutableArray.CreateBuilder<OutlinePiece>(pieces.Length);
        joined.AddRange(pieces);
        for (int i = closed ? 0 : 1; i < pieces.Length; i++)
        {
            int before = i == 0 ? pieces.Length - 1 : i - 1;
            if (pieces[before].End.DistanceTo(pieces[i].Start) > tolerance)
            {
                throw new InvalidSectionException(i == 0
                    ? $"The outline is open: it ends at {pieces[before].End} but began at {pieces[0].Start}. "
                        + "Add the piece that closes it."
                    : $"The chain is broken: piece {before} ends at {pieces[before].End} but piece {i} begins at {pieces[i].Start}. Begin each piece where the one before ends.");
            }

            joined[before] = joined[before] with { End = pieces[i].Start };
        }

        return joined.MoveToImmutable();
    }

    /// <summary>Throws where two pieces of a closed chain meet anywhere but at their joint.</summary>
    public static void CheckSimple(ImmutableArray<OutlinePiece> pieces, double tolerance)
    {
        // Arcs above half a turn are looked at in two halves, which are neighbours like any other pieces.
        ImmutableArray<OutlinePiece> parts = Halved(pieces);
        PieceForm[] forms = [.. parts.Select(p => new PieceForm(p.Start, p.End, p.SweepRadians))];
        Box2D[] boxes = [.. parts.Select(p => p.Bounds.Widened(tolerance))];
        BoxIndex tree = new(boxes);
        List<int> hits = [];
        Span<Point2D> contacts = stackalloc Point2D[2];
        for (int i = 0; i < forms.Length; i++)
        {
            tree.Query(boxes[i], hits);
            foreach (int j in hits)
            {
                bool isNext = j == i + 1;
                bool isBefore = i == 0 && j == forms.Length - 1;
                if (j > i && FindContact(forms[i], forms[j], isNext, isBefore, tolerance, contacts) is Point2D place)
                {
                    throw new InvalidSectionException(
                        $"The outline crosses or touches itself at {place}, where the {parts[i]} meets the {parts[j]}. "
                        + "Draw it as separate outlines, or cut an inner edge out as a hole.");
                }
            }
        }
    }

    /// <summary>A point in which two pieces meet other than at their joints; <see langword="null"/> if there is none.</summary>
    /// <param name="a">A piece.</param>
    /// <param name="b">Another piece.</param>
    /// <param name="isNext">Whether the second piece goes on where the first ends.</param>
    /// <param name="isBefore">Whether the second piece ends where the first begins.</param>
    /// <param name="tolerance">The distance within which points count as one.</param>
    /// <param name="contacts">Room for two points.</param>
    public static Point2D? FindContact(
        in PieceForm a, in PieceForm b, bool isNext, bool isBefore, double tolerance, Span<Point2D> contacts)
    {
        if (PieceContacts.Find(a, b, tolerance, contacts) > 0)
        {
            return contacts[0];
        }

        Point2D? place =
            !isBefore && PieceContacts.IsOn(b, a.Start, tolerance) ? a.Start
            : !isNext && PieceContacts.IsOn(b, a.End, tolerance) ? a.End
            : !isNext && PieceContacts.IsOn(a, b.Start, tolerance) ? b.Start
            : !isBefore && PieceContacts.IsOn(a, b.End, tolerance) ? b.End
            : null;
        Point2D halfway = a.AtParameter(0.5).Point;
        return place ?? (isNext && isBefore && PieceContacts.IsOn(b, halfway, tolerance) ? halfway : null);
    }

    /// <summary>The pieces, with every arc above half a turn divided into two equal ones.</summary>
    public static ImmutableArray<OutlinePiece> Halved(ImmutableArray<OutlinePiece> pieces)
    {
        if (pieces.All(p => Math.Abs(p.SweepRadians) <= Math.PI))
        {
            return pieces;
        }

        ImmutableArray<OutlinePiece>.Builder parts = ImmutableArray.CreateBuilder<OutlinePiece>(pieces.Length + 1);
        foreach (OutlinePiece piece in pieces)
        {
            if (Math.Abs(piece.SweepRadians) <= Math.PI)
            {
                parts.Add(piece);
            }
            else
            {
                double half = 0.5 * piece.SweepRadians;
                Point2D middle = piece.Midpoint;
                parts.Add(piece with { End = middle, SweepRadians = half });
                parts.Add(piece with { Start = middle, SweepRadians = half });
            }
        }

        return parts.ToImmutable();
    }
}
