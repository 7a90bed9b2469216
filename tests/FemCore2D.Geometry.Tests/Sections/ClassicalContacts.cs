namespace FemCore2D.Geometry.Tests;

/// <summary>Crossings of lines and circles by the formulas of a first course, as a check on the library's own.</summary>
internal static class ClassicalContacts
{
    public static IEnumerable<Point2D> Of(OutlinePiece a, OutlinePiece b)
    {
        IEnumerable<Point2D> points = (a.IsStraight, b.IsStraight) switch
        {
            (true, true) => LineLine(a, b),
            (true, false) => LineCircle(a, b),
            (false, true) => LineCircle(b, a),
            _ => CircleCircle(a, b),
        };
        return points.Where(p => Spans(a, p) && Spans(b, p));
    }

    private static IEnumerable<Point2D> LineLine(OutlinePiece a, OutlinePiece b)
    {
        double across = a.Chord.Cross(b.Chord);
        if (Math.Abs(across) > 1e-12 * a.Length * b.Length)
        {
            yield return a.PointAt((b.Start - a.Start).Cross(b.Chord) / across);
        }
    }

    private static IEnumerable<Point2D> LineCircle(OutlinePiece line, OutlinePiece arc)
    {
        Vector2D along = line.Chord / line.Length;
        Point2D foot = line.Start + ((arc.Centre - line.Start).Dot(along) * along);
        double squared = (arc.Radius * arc.Radius) - (foot - arc.Centre).LengthSquared;
        if (squared > 0)
        {
            yield return foot + (Math.Sqrt(squared) * along);
            yield return foot - (Math.Sqrt(squared) * along);
        }
    }

    private static IEnumerable<Point2D> CircleCircle(OutlinePiece a, OutlinePiece b)
    {
        Vector2D between = b.Centre - a.Centre;
        double distance = between.Length;
        if (distance < 1e-9 * a.Radius)
        {
            yield break;
        }

        double along = ((distance * distance) + (a.Radius * a.Radius) - (b.Radius * b.Radius)) / (2 * distance);
        double squared = (a.Radius * a.Radius) - (along * along);
        if (squared > 0)
        {
            Vector2D unit = between / distance;
            Point2D foot = a.Centre + (along * unit);
            yield return foot + (Math.Sqrt(squared) * unit.LeftNormal);
            yield return foot - (Math.Sqrt(squared) * unit.LeftNormal);
        }
    }

    private static bool Spans(OutlinePiece piece, Point2D p)
    {
        if (piece.IsStraight)
        {
            double fraction = piece.Chord.Dot(p - piece.Start) / piece.Chord.LengthSquared;
            return fraction is > 1e-7 and < 1 - 1e-7;
        }

        double turned = Math.Atan2((piece.Start - piece.Centre).Cross(p - piece.Centre), (piece.Start - piece.Centre).Dot(p - piece.Centre));
        turned *= Math.Sign(piece.SweepRadians);
        turned = turned < 0 ? turned + (2 * Math.PI) : turned;
        return turned > 1e-7 && turned < Math.Abs(piece.SweepRadians) - 1e-7;
    }
}
