namespace FemCore2D.Geometry;

/// <summary>Where two straight or arc pieces cross or touch.</summary>
internal static class PieceContacts
{
    /// <summary>Whether a point lies on a piece, within a distance.</summary>
    public static bool IsOn(in PieceForm piece, Point2D p, double tolerance) =>
        (Math.Abs(piece.Side(p)) <= tolerance * piece.Length && piece.Spans(p))
        || p.DistanceTo(piece.Start) <= tolerance
        || p.DistanceTo(piece.End) <= tolerance;

    /// <summary>
    /// Finds the at most two points in which pieces cross or touch. Contacts that an end of one piece on the other
    /// already tells, and the inside of stretches where both coincide within the tolerance, are left out.
    /// </summary>
    /// <remarks>
    /// The side of the second piece, taken along the rational form of the first, is a quadratic polynomial in
    /// Bernstein form (both circles pass through the same points at infinity), so one formula serves lines and arcs.
    /// </remarks>
    public static int Find(in PieceForm first, in PieceForm second, double tolerance, Span<Point2D> contacts)
    {
        double limit = tolerance * second.Length;
        double atStart = second.Side(first.Start);
        double atEnd = second.Side(first.End);
        (Point2D halfway, double weight) = first.AtParameter(0.5);
        double middle = (2 * weight * second.Side(halfway)) - (0.5 * (atStart + atEnd));

        bool oneSided = (atStart > limit && middle > limit && atEnd > limit)
            || (atStart < -limit && middle < -limit && atEnd < -limit);
        bool coincident = Math.Abs(atStart) <= limit && Math.Abs(middle) <= limit && Math.Abs(atEnd) <= limit;
        if (oneSided || coincident)
        {
            return 0;
        }

        int count = 0;
        double curvature = atStart - (2 * middle) + atEnd;
        double discriminant = (middle * middle) - (atStart * atEnd);
        double turn = (atStart - middle) / curvature;
        if (turn >= 0 && turn <= 1 && Math.Abs(discriminant) <= limit * Math.Abs(curvature))
        {
            // The first piece touches the second, or overlaps it by less than the tolerance.
            Accept(first, second, first.AtParameter(turn).Point, tolerance, contacts, ref count);
            return count;
        }

        if (discriminant <= 0)
        {
            return 0;
        }

        double q = -(middle + Math.CopySign(Math.Sqrt(discriminant), middle));
        TryRoot(first, second, q / (q + atEnd), tolerance, contacts, ref count);
        TryRoot(first, second, atStart / (atStart + q), tolerance, contacts, ref count);
        return count;
    }

    private static void TryRoot(
        in PieceForm first, in PieceForm second, double u, double tolerance, Span<Point2D> contacts, ref int count)
    {
        if (u >= 0 && u <= 1)
        {
            Accept(first, second, first.AtParameter(u).Point, tolerance, contacts, ref count);
        }
    }

    private static void Accept(
        in PieceForm first, in PieceForm second, Point2D point, double tolerance, Span<Point2D> contacts, ref int count)
    {
        if (second.Spans(point)
            && !IsTold(first, second, first.Start, point, tolerance)
            && !IsTold(first, second, first.End, point, tolerance)
            && !IsTold(second, first, second.Start, point, tolerance)
            && !IsTold(second, first, second.End, point, tolerance))
        {
            contacts[count++] = point;
        }
    }

    /// <summary>Whether an end of one piece lies on the other and both coincide from there to the contact.</summary>
    private static bool IsTold(in PieceForm owner, in PieceForm other, Point2D end, Point2D contact, double tolerance)
    {
        if (!IsOn(other, end, tolerance))
        {
            return false;
        }

        if (end.DistanceTo(contact) <= tolerance)
        {
            return true;
        }

        OutlinePiece piece = new(owner.Start, owner.End, owner.Sweep);
        double from = end == owner.Start ? 0 : 1;
        Point2D between = piece.PointAt(0.5 * (from + owner.FractionOf(contact)));
        return Math.Abs(other.Side(between)) <= tolerance * other.Length;
    }
}
