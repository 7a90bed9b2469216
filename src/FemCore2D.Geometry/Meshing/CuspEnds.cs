namespace FemCore2D.Geometry;

/// <summary>
/// The segments at the tips of cusps, which must stay equally long: the first cell between pieces that touch each
/// other, bent to both, is valid only when its two sides are.
/// </summary>
internal sealed class CuspEnds
{
    private readonly MeshPlan plan;
    private readonly InputCorners corners;
    private readonly SegmentList segments;
    private readonly int[] firstSegments;
    private readonly int[] lastSegments;

    public CuspEnds(MeshPlan plan, InputCorners corners, SegmentList segments)
    {
        this.plan = plan;
        this.corners = corners;
        this.segments = segments;
        firstSegments = new int[plan.Curves.Length];
        lastSegments = new int[plan.Curves.Length];
        for (int segment = 0; segment < segments.Count; segment++)
        {
            Note(segment);
        }
    }

    /// <summary>Takes note of a segment that may be the last of its piece.</summary>
    public void Note(int segment)
    {
        ref Segment part = ref segments[segment];
        if (part.Piece < 0)
            return;
        if (part.FirstFraction == 0)
            firstSegments[part.Piece] = segment;
        if (part.LastFraction == 1)
            lastSegments[part.Piece] = segment;
    }

    /// <summary>The segments that leave a vertex in one direction with others.</summary>
    public IEnumerable<int> At(int vertex)
    {
        foreach ((int piece, bool atEnd) in corners.CuspEndsAt(vertex))
        {
            yield return atEnd != plan.Rings.IsReversed(piece) ? lastSegments[piece] : firstSegments[piece];
        }
    }
}
