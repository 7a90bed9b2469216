namespace FemCore2D.Geometry;

/// <content>Edges that must be there: found or made by flips.</content>
internal sealed unsafe partial class Triangulation
{
    private int[] outgoing = [];
    private readonly List<int> crossed = [];
    private readonly List<int> made = [];

    /// <summary>Finds for each vertex a half-edge that starts there; needed before constraints are inserted.</summary>
    public void FindOutgoing()
    {
        outgoing = new int[VertexCount];
        for (int triangle = 0; triangle < TriangleCount; triangle++)
        {
            NoteOutgoing(4 * triangle);
        }
    }

    /// <summary>
    /// Makes the edge of a segment by flipping all edges that cross it, then flips back to the Delaunay property.
    /// </summary>
    /// <returns>A vertex that lies on the segment or the start of another segment that crosses it, or -1 when all went well.</returns>
    /// <remarks>S. W. Sloan, "A fast algorithm for generating constrained Delaunay triangulations", Computers and
    /// Structures 47 (1993).</remarks>
    public int InsertSegment(int segment)
    {
        int start = Segments[segment].Start;
        int end = Segments[segment].End;
        int edge = FindEdgeOrCrossings(start, end, out int obstacle);
        if (obstacle >= 0)
            return obstacle;

        made.Clear();
        while (edge < 0)
        {
            // An edge that cannot be flipped yet, or crosses still, waits behind the others, whose flips free it.
            int halfEdge = crossed[0];
            crossed.RemoveAt(0);
            if (!IsConvexAround(halfEdge))
            {
                crossed.Add(halfEdge);
                continue;
            }

            int diagonal = Flip(halfEdge);
            int from = StartOf(diagonal);
            int to = EndOf(diagonal);
            if ((from == start && to == end) || (from == end && to == start))
                edge = from == start ? diagonal : Link[diagonal];
            else if (from != start && from != end && to != start && to != end && Crosses(start, end, from, to))
                crossed.Add(diagonal);
            else
                made.Add(diagonal);
        }

        if (IsConstrained(edge))
            return start;
        PutSegment(edge, segment, Link[edge]);
        RestoreDelaunay();
        return -1;
    }

    /// <summary>Gives all triangles the region of the segments around them, and those outside -1.</summary>
    /// <param name="regionOfSide">The region on a side of a segment.</param>
    /// <returns>A triangle in which two regions meet without a segment between, or -1 when there is none.</returns>
    public int Flood(Func<int, int> regionOfSide)
    {
        const int Unknown = -2;
        for (int triangle = 0; triangle < TriangleCount; triangle++)
        {
            SetRegion(triangle, Unknown);
        }

        Stack<int> waiting = new();
        for (int side = 0; side < 2 * Segments.Count; side++)
        {
            int halfEdge = Segments.HalfEdgeAt(side);
            if (halfEdge < 0)
                continue;
            int region = regionOfSide(side);
            int present = RegionOf(halfEdge >> 2);
            if (present != Unknown && present != region)
                return halfEdge >> 2;
            if (present == Unknown)
            {
                SetRegion(halfEdge >> 2, region);
                waiting.Push(halfEdge >> 2);
            }

            while (waiting.TryPop(out int triangle))
            {
                for (int i = 0; i < 3; i++)
                {
                    int link = Link[(4 * triangle) + i];
                    if (link >= 0 && RegionOf(link >> 2) == Unknown)
                    {
                        SetRegion(link >> 2, region);
                        waiting.Push(link >> 2);
                    }
                }
            }
        }

        return -1;
    }

    private int FindEdgeOrCrossings(int start, int end, out int obstacle)
    {
        crossed.Clear();
        obstacle = -1;
        Point2D a = PointAt(start);
        Point2D b = PointAt(end);
        int first = outgoing[start];
        int spoke = first;
        int crossing = -1;
        do
        {
            int x = EndOf(spoke);
            if (x == end)
                return spoke;
            double side = Predicates.Orientation(a, b, PointAt(x));
            if (side == 0 && (PointAt(x) - a).Dot(b - a) > 0)
            {
                obstacle = x;
                return -1;
            }

            if (side < 0 && Predicates.Orientation(a, b, PointAt(ApexOf(spoke))) > 0)
            {
                crossing = Next(spoke);
                break;
            }

            spoke = Opposite(Previous(spoke));
        }
        while (spoke != first);

        while (crossing >= 0)
        {
            if (IsConstrained(crossing))
            {
                obstacle = StartOf(crossing);
                return -1;
            }

            crossed.Add(crossing);
            int beyond = Link[crossing];
            int apex = ApexOf(beyond);
            if (apex == end)
                return -1;
            double side = Predicates.Orientation(a, b, PointAt(apex));
            if (side == 0)
            {
                obstacle = apex;
                return -1;
            }

            crossing = side > 0 ? Next(beyond) : Previous(beyond);
        }

        throw new InvalidOperationException("No triangle at the start of a segment faces its end.");
    }

    private void RestoreDelaunay()
    {
        for (bool changed = true; changed;)
        {
            changed = false;
            for (int i = 0; i < made.Count; i++)
            {
                int halfEdge = made[i];
                if (IsConstrained(halfEdge) || !IsConvexAround(halfEdge))
                    continue;
                if (Predicates.InCircle(
                        PointAt(StartOf(halfEdge)),
                        PointAt(EndOf(halfEdge)),
                        PointAt(ApexOf(halfEdge)),
                        PointAt(ApexOf(Link[halfEdge]))) > 0)
                {
                    made[i] = Flip(halfEdge);
                    changed = true;
                }
            }
        }
    }

    private bool Crosses(int a, int b, int c, int d)
    {
        double one = Predicates.Orientation(PointAt(a), PointAt(b), PointAt(c));
        double other = Predicates.Orientation(PointAt(a), PointAt(b), PointAt(d));
        return (one > 0 && other < 0) || (one < 0 && other > 0);
    }

    private bool IsConvexAround(int halfEdge)
    {
        Point2D start = PointAt(StartOf(halfEdge));
        Point2D end = PointAt(EndOf(halfEdge));
        Point2D left = PointAt(ApexOf(halfEdge));
        Point2D right = PointAt(ApexOf(Link[halfEdge]));
        return Predicates.Orientation(left, right, end) > 0 && Predicates.Orientation(right, left, start) > 0;
    }

    /// <summary>Replaces an edge by the other diagonal and returns a half-edge of that.</summary>
    private int Flip(int halfEdge)
    {
        int next = Next(halfEdge);
        int previous = Previous(halfEdge);
        int other = Link[halfEdge];
        int otherNext = Next(other);
        int otherPrevious = Previous(other);
        int outer = Link[otherPrevious];
        int inner = Link[previous];
        Origin[halfEdge] = Origin[otherPrevious];
        Origin[other] = Origin[previous];
        Inherit(halfEdge, outer);
        Inherit(other, inner);
        Join(previous, otherPrevious);
        Renamed(crossed, otherPrevious, halfEdge, previous, other);
        Renamed(made, otherPrevious, halfEdge, previous, other);
        NoteOutgoing(halfEdge & ~3);
        NoteOutgoing(other & ~3);
        return previous;
    }

    private static void Renamed(List<int> halfEdges, int old1, int new1, int old2, int new2)
    {
        for (int i = 0; i < halfEdges.Count; i++)
        {
            if (halfEdges[i] == old1)
                halfEdges[i] = new1;
            else if (halfEdges[i] == old2)
                halfEdges[i] = new2;
        }
    }

    private void NoteOutgoing(int first)
    {
        outgoing[Origin[first]] = first;
        outgoing[Origin[first + 1]] = first + 1;
        outgoing[Origin[first + 2]] = first + 2;
    }
}
