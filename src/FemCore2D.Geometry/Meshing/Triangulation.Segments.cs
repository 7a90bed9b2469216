namespace FemCore2D.Geometry;

/// <content>Segments that change their place.</content>
internal sealed unsafe partial class Triangulation
{
    /// <summary>Frees the edge of a segment, which must be constrained again, or replaced, before the next insertion.</summary>
    public void Unconstrain(int segment) =>
        Join(Segments.HalfEdgeAt(2 * segment), Segments.HalfEdgeAt((2 * segment) + 1));

    /// <summary>Puts a segment on an edge.</summary>
    public void Constrain(int segment, int left, int right) => PutSegment(left, segment, right);

    /// <summary>Whether a vertex lies on the rim of the cavity found last.</summary>
    public bool RimHas(int vertex)
    {
        for (int i = 0; i < RimCount; i++)
        {
            if (Origin[rim[i]] == vertex)
                return true;
        }

        return false;
    }

    /// <summary>
    /// After a cavity was filled with the fan of a vertex on a former segment: puts the two parts of it on the fan's
    /// edges, and gives the triangles on either side their regions.
    /// </summary>
    public void ConstrainInFan(int first, int second, int start, int end, int leftRegion, int rightRegion)
    {
        int fromStart = 0;
        int fromEnd = 0;
        for (int i = 0; i < RimCount; i++)
        {
            if (Origin[rim[i]] == start)
                fromStart = i;
            if (Origin[rim[i]] == end)
                fromEnd = i;
        }

        // Counterclockwise around the vertex, the fan from start to end lies on the right of the segment.
        for (int i = fromStart; i != fromEnd; i = i + 1 < RimCount ? i + 1 : 0)
        {
            SetRegion(rim[i] >> 2, rightRegion);
        }

        for (int i = fromEnd; i != fromStart; i = i + 1 < RimCount ? i + 1 : 0)
        {
            SetRegion(rim[i] >> 2, leftRegion);
        }

        int beforeStart = fromStart > 0 ? fromStart - 1 : RimCount - 1;
        int beforeEnd = fromEnd > 0 ? fromEnd - 1 : RimCount - 1;
        PutSegment(rim[beforeStart] + 1, first, rim[fromStart] + 2);
        PutSegment(rim[fromEnd] + 2, second, rim[beforeEnd] + 1);
    }
}
