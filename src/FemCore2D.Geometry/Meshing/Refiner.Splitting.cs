namespace FemCore2D.Geometry;

/// <content>Splitting of segments.</content>
internal sealed unsafe partial class Refiner
{
    private bool SplitWanted()
    {
        // Splitting changes the rim, so the wishes have been written down before.
        bool any = false;
        for (int i = 0; i < wantedSplits.Count; i++)
        {
            any |= TrySplit(wantedSplits[i]);
        }

        wantedSplits.Clear();
        return any;
    }

    private bool CanSplit(int segment)
    {
        int member = segment;
        do
        {
            ref Segment part = ref segments[member];
            if (part.IsFixed)
                return false;
            double length = mesh.PointAt(part.Start).DistanceTo(mesh.PointAt(part.End));
            double size = Math.Min(sizes[part.Start], sizes[part.End]);
            if (length < 2 * Math.Max(edgeFloor, EdgeFloorOfSize * size))
                return false;
            member = part.Mate;
        }
        while (member != segment);
        return true;
    }

    /// <summary>Splits a segment and its mates, if they may be and it can be done.</summary>
    private bool TrySplit(int segment)
    {
        if (!CanSplit(segment))
            return false;
        double fraction = SplitFraction(segment);
        int start = segments[segment].Start;
        int end = segments[segment].End;
        int member = segment;
        int firstNew = -1;
        int lastNew = -1;
        do
        {
            int mate = segments[member].Mate;
            int added = SplitOne(member, fraction, out int blocking);

            // An arc bulges beyond another's chord where circles touch from inside; the other must be split first.
            for (int i = 0; added < 0 && i < 8 && blocking >= 0 && blocking != member && TrySplit(blocking); i++)
            {
                added = SplitOne(member, fraction, out blocking);
            }

            if (added < 0)
            {
                if (member == segment)
                    return false;
                throw new MeshingException(
                    $"The paired boundaries cannot be divided alike: {plan.Describe(segments[member].Piece)} has no room for a vertex where its partner needs one. Give both boundaries a smaller size.");
            }

            if (firstNew < 0)
                firstNew = added;
            else
                segments[lastNew].Mate = added;
            lastNew = added;
            member = mate;
        }
        while (member != segment);
        segments[lastNew].Mate = firstNew;
        EvenOutCusp(start, segment);
        EvenOutCusp(end, firstNew);
        return true;
    }

    /// <summary>Splits the segments beside one at the tip of a cusp that has become shorter than they are.</summary>
    private void EvenOutCusp(int vertex, int segment)
    {
        if (!hasArcs || corners.CuspEndsAt(vertex).Count == 0)
            return;
        double length = LengthOf(segment);
        foreach (int other in cuspEnds.At(vertex))
        {
            if (other != segment && LengthOf(other) > 1.4 * length && segments[segment].Piece != segments[other].Piece)
                TrySplit(other);
        }
    }

    private double LengthOf(int segment) =>
        mesh.PointAt(segments[segment].Start).DistanceTo(mesh.PointAt(segments[segment].End));

    /// <summary>
    /// Where on its piece a segment is split: in the middle, but at a distance of a power of two from a small
    /// corner, so that the pieces that meet there are split alike.
    /// </summary>
    private double SplitFraction(int segment)
    {
        ref Segment part = ref segments[segment];
        double middle = 0.5 * (part.FirstFraction + part.LastFraction);
        bool startIsSmall = corners.IsSmall(part.Start);
        bool endIsSmall = corners.IsSmall(part.End);
        if (startIsSmall == endIsSmall)
            return middle;
        double length = mesh.PointAt(part.Start).DistanceTo(mesh.PointAt(part.End));
        double shell = Math.Pow(2, Math.Round(Math.Log2(length / 2)));
        PieceCurve curve = plan.Rings.Directed(part.Piece);
        double share = new PieceCurve(Point2D.Origin, new Point2D(length, 0), curve.Sweep * (part.LastFraction - part.FirstFraction))
            .FractionAtDistance(shell);
        double step = Math.Clamp(share, 0.2, 0.8) * (part.LastFraction - part.FirstFraction);
        return startIsSmall ? part.FirstFraction + step : part.LastFraction - step;
    }

    /// <summary>Splits one segment and returns the new second part of it, or -1 when there is no room.</summary>
    private int SplitOne(int segment, double fraction, out int blocking)
    {
        Segment whole = segments[segment];
        PieceCurve curve = plan.Rings.Directed(whole.Piece);
        Point2D point = curve.PointAt(fraction);
        int left = segments.HalfEdgeAt(2 * segment);
        int right = segments.HalfEdgeAt((2 * segment) + 1);
        int leftRegion = mesh.RegionOf(left >> 2);
        int rightRegion = mesh.RegionOf(right >> 2);

        // A vertex on an arc leaves the chord on the side where the arc bulges, and the cavity is dug from there;
        // one on a straight piece lies on the edge but for rounding, and both sides belong to the cavity.
        int start = curve.Sweep > 0 ? right : left;
        mesh.Unconstrain(segment);
        mesh.DigCavity(start >> 2, point.X, point.Y, curve.Sweep == 0 ? left : -1);
        int hidden = mesh.HiddenRimEdge(point.X, point.Y);
        blocking = hidden >= 0 && mesh.Link[hidden] < 0 ? ~mesh.Link[hidden] >> 1 : -1;
        if (hidden >= 0 || !mesh.RimHas(whole.Start) || !mesh.RimHas(whole.End))
        {
            mesh.Constrain(segment, left, right);
            return -1;
        }

        double size = field.At(point, double.PositiveInfinity);
        int added = AddVertex(point, size, whole.Piece);
        mesh.FillCavity(added);
        segments[segment].End = added;
        segments[segment].LastFraction = fraction;
        int second = segments.Add(whole with { Start = added, FirstFraction = fraction });
        cuspEnds.Note(second);
        mesh.ConstrainInFan(segment, second, whole.Start, whole.End, leftRegion, rightRegion);
        foreach (int halfEdge in mesh.Rim)
        {
            if (mesh.RegionOf(halfEdge >> 2) < 0)
                continue;
            Offer(halfEdge >> 2);
            if (mesh.Link[halfEdge] < 0 && IsEncroachedFrom(halfEdge))
                segmentQueue.Enqueue(~mesh.Link[halfEdge] >> 1);
        }

        EnqueueIfEncroached(segment);
        EnqueueIfEncroached(second);
        return second;
    }

    private void EnqueueIfEncroached(int segment)
    {
        if (IsEncroached(segment))
            segmentQueue.Enqueue(segment);
    }
}
