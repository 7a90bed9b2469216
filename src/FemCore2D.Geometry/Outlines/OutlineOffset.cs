using System.Collections.Immutable;

namespace FemCore2D.Geometry;

/// <summary>The outline at a constant distance from another.</summary>
/// <remarks>
/// Every piece is moved along its normal and every corner bridged by an arc around it, also where this makes the chain
/// run backwards; the points round which the result runs at least once are those of the offset shape. After Chen and
/// McMains, "Polygon offsetting by computing winding numbers" (2005), with arcs for pieces.
/// </remarks>
internal static class OutlineOffset
{
    public static Outline Of(Outline outline, double distance)
    {
        if (!double.IsFinite(distance))
        {
            throw new ArgumentOutOfRangeException(nameof(distance), distance, $"The offset of the {outline} needs a finite distance.");
        }

        bool clockwise = outline.SignedArea < 0;
        Outline forward = clockwise ? outline.Reversed() : outline;
        double tolerance = OutlineChecks.ToleranceOf(outline.Bounds.Widened(Math.Abs(distance)));
        if (Math.Abs(distance) <= tolerance)
        {
            return outline;
        }

        ImmutableArray<OutlinePiece> raw = OutlineChecks.Halved(RawPieces(forward, distance));
        List<List<OutlinePiece>> loops = raw.IsEmpty ? [] : Loops(raw, tolerance);
        loops.RemoveAll(loop => !IsAtDistance(forward, loop, distance));
        if (loops.Count != 1)
        {
            throw new InvalidSectionException(loops.Count == 0
                ? $"Nothing is left of the {outline} at an offset of {distance:G6} m. Use a smaller distance inward."
                : $"At an offset of {distance:G6} m the {outline} becomes {loops.Count} outlines. "
                    + "Use a smaller distance, or draw the parts as shapes of their own.");
        }

        Outline result = Outline.Of(loops[0]);
        return clockwise ? result.Reversed() : result;
    }

    private static ImmutableArray<OutlinePiece> RawPieces(Outline outline, double distance)
    {
        ImmutableArray<OutlinePiece> pieces = outline.Pieces;
        ImmutableArray<OutlinePiece>.Builder raw = ImmutableArray.CreateBuilder<OutlinePiece>(2 * pieces.Length);
        for (int i = 0; i < pieces.Length; i++)
        {
            OutlinePiece piece = pieces[i];
            OutlinePiece next = pieces[(i + 1) % pieces.Length];
            Vector2D leaving = -piece.TangentAt(1).LeftNormal;
            Vector2D entering = -next.TangentAt(0).LeftNormal;
            OutlinePiece moved = piece with
            {
                Start = piece.Start + (distance * -piece.TangentAt(0).LeftNormal),
                End = piece.End + (distance * leaving),
            };
            AddUnlessPoint(raw, moved, Math.Abs(distance));

            // Smooth joints need no arc; rounding in the tangents must not make one.
            double turn = Math.Atan2(leaving.Cross(entering), leaving.Dot(entering));
            string? boundary = piece.Boundary == next.Boundary ? piece.Boundary : null;
            OutlinePiece corner = new(moved.End, next.Start + (distance * entering), turn, boundary);
            AddUnlessPoint(raw, corner, Math.Abs(distance));
        }

        return raw.ToImmutable();
    }

    private static void AddUnlessPoint(ImmutableArray<OutlinePiece>.Builder raw, OutlinePiece piece, double scale)
    {
        if (piece.Start.DistanceTo(piece.End) > OutlineChecks.RelativeTolerance * scale)
        {
            raw.Add(piece);
        }
    }

    private static List<List<OutlinePiece>> Loops(ImmutableArray<OutlinePiece> raw, double tolerance)
    {
        PieceCutter cutter = new(raw, [], tolerance);
        int[] turns = new int[raw.Length];
        Array.Fill(turns, 1);
        PieceWindings windings = new(cutter, new int[raw.Length], turns, 1);
        Dictionary<int, List<OutlinePiece>> leaving = [];
        Dictionary<OutlinePiece, int> endVertex = [];
        for (int i = 0; i < cutter.Pieces.Count; i++)
        {
            windings.CountAt(i);
            bool isLeft = windings.Left(0) > 0;
            if (isLeft == windings.Right(0) > 0)
            {
                continue;
            }

            // The inside is kept on the left.
            CutPiece part = cutter.Pieces[i];
            OutlinePiece piece = new(
                cutter.Vertices[part.Start], cutter.Vertices[part.End], part.Sweep, raw[cutter.UsesOf(i)[0].Source].Boundary);
            (int start, int end, piece) = isLeft ? (part.Start, part.End, piece) : (part.End, part.Start, piece.Reversed());
            if (!leaving.TryGetValue(start, out List<OutlinePiece>? list))
            {
                list = [];
                leaving.Add(start, list);
            }

            list.Add(piece);
            endVertex[piece] = end;
        }

        return Chains(leaving, endVertex);
    }

    private static List<List<OutlinePiece>> Chains(
        Dictionary<int, List<OutlinePiece>> leaving, Dictionary<OutlinePiece, int> endVertex)
    {
        List<List<OutlinePiece>> loops = [];
        foreach (int start in leaving.Keys.Order())
        {
            while (leaving[start].Count > 0)
            {
                List<OutlinePiece> loop = [];
                int vertex = start;
                do
                {
                    // Where loops touch, the sharpest left turn stays in the same one.
                    List<OutlinePiece> choices = leaving[vertex];
                    OutlinePiece next = loop.Count == 0 ? choices[0] : choices.MaxBy(p => Turn(loop[^1], p));
                    choices.Remove(next);
                    loop.Add(next);
                    vertex = endVertex[next];
                }
                while (vertex != start);
                loops.Add(loop);
            }
        }

        return loops;
    }

    private static double Turn(OutlinePiece before, OutlinePiece after)
    {
        Vector2D arriving = before.TangentAt(1);
        Vector2D leaving = after.TangentAt(0);
        return Math.Atan2(arriving.Cross(leaving), arriving.Dot(leaving));
    }

    /// <summary>Whether a loop keeps the distance; what an outline too small for it turns into does not.</summary>
    private static bool IsAtDistance(Outline outline, List<OutlinePiece> loop, double distance)
    {
        double nearest = double.PositiveInfinity;
        Point2D place = loop.MaxBy(p => p.Length).Midpoint;
        foreach (OutlinePiece piece in outline.Pieces)
        {
            nearest = Math.Min(nearest, Distance(piece, place));
        }

        return outline.Contains(place) == distance < 0
            && nearest >= Math.Abs(distance) - (2 * OutlineChecks.ToleranceOf(outline.Bounds.Widened(Math.Abs(distance))));
    }

    private static double Distance(OutlinePiece piece, Point2D place)
    {
        double toEnds = Math.Min(piece.Start.DistanceTo(place), piece.End.DistanceTo(place));
        if (piece.IsStraight)
        {
            double fraction = Math.Clamp(piece.Chord.Dot(place - piece.Start) / piece.Chord.LengthSquared, 0, 1);
            return Math.Min(toEnds, piece.PointAt(fraction).DistanceTo(place));
        }

        // The foot on the circle counts where it lies on the arc's side of the chord.
        Point2D centre = piece.Centre;
        Vector2D ray = place - centre;
        Point2D foot = ray == Vector2D.Zero ? piece.Midpoint : centre + (piece.Radius / ray.Length * ray);
        bool isOnArc = piece.Chord.Cross(foot - piece.Start) * piece.SweepRadians <= 0;
        return isOnArc ? Math.Min(toEnds, foot.DistanceTo(place)) : toEnds;
    }
}
