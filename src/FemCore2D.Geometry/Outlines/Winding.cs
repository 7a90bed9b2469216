namespace FemCore2D.Geometry;

/// <summary>
/// How often closed chains of pieces run round a point, counted exactly in integers.
/// </summary>
/// <remarks>
/// A ray to the right counts the chords that it crosses, and an arc adds a turn where the point lies between it and
/// its chord. Both use one and the same side of the chord, so that rounding cannot make them disagree.
/// </remarks>
internal static class Winding
{
    /// <summary>What one piece adds to the winding number of a point that is not on it.</summary>
    public static int Of(in PieceForm piece, Point2D p)
    {
        // On the chord itself the point counts as a little higher, as the ray does at the ends of chords.
        double cross = piece.Chord.Cross(p - piece.Start);
        bool leftOfChord = cross > 0 || (cross == 0 && piece.Chord.X > 0);
        return Of(piece, p, leftOfChord, IsBeyondChord(piece, p, leftOfChord));
    }

    /// <summary>What a piece adds to the winding number of a point that lies on it, moved a little to its left.</summary>
    public static int OfOwn(in PieceForm piece, Point2D p)
    {
        // Left of a counterclockwise arc is the side of its chord, which then lies to the left of the point.
        bool leftOfChord = piece.Sine <= 0;
        return Of(piece, p, leftOfChord, piece.Sine > 0);
    }

    private static int Of(in PieceForm piece, Point2D p, bool leftOfChord, bool inSegment)
    {
        int count = inSegment ? Math.Sign(piece.Sine) : 0;
        if (piece.Start.Y <= p.Y)
        {
            return piece.End.Y > p.Y && leftOfChord ? count + 1 : count;
        }

        return piece.End.Y <= p.Y && !leftOfChord ? count - 1 : count;
    }

    private static bool IsBeyondChord(in PieceForm piece, Point2D p, bool leftOfChord) =>
        piece.Sine > 0 ? !leftOfChord && piece.Side(p) > 0
        : piece.Sine < 0 && leftOfChord && piece.Side(p) < 0;
}
