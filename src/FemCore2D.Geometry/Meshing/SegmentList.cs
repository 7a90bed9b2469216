using System.Runtime.CompilerServices;

namespace FemCore2D.Geometry;

/// <summary>
/// The constrained edges of a triangulation: each is a part of an arranged piece and runs in the piece's own
/// direction of division.
/// </summary>
internal sealed class SegmentList
{
    private Segment[] segments = new Segment[64];
    private int[] halfEdges = new int[128];

    public int Count { get; private set; }

    public ref Segment this[int segment] => ref segments[segment];

    /// <summary>The half-edge on a side: the left of segment s is side 2s, its right 2s + 1.</summary>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public int HalfEdgeAt(int side) => halfEdges[side];

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public void SetHalfEdge(int side, int halfEdge) => halfEdges[side] = halfEdge;

    public int Add(Segment segment)
    {
        if (Count == segments.Length)
        {
            Array.Resize(ref segments, 2 * Count);
            Array.Resize(ref halfEdges, 4 * Count);
        }

        segments[Count] = segment;
        halfEdges[2 * Count] = -1;
        halfEdges[(2 * Count) + 1] = -1;
        return Count++;
    }

    public int AddBoxEdge(int start, int end) => Add(new Segment
    {
        Start = start,
        End = end,
        Piece = -1,
        FirstFraction = 0,
        LastFraction = 1,
        Mate = Count,
        IsFixed = true,
    });
}

/// <summary>A constrained edge.</summary>
internal struct Segment
{
    public int Start;

    public int End;

    /// <summary>The arranged piece that it is a part of, -1 for an edge of the box.</summary>
    public int Piece;

    /// <summary>Where on the piece it starts.</summary>
    public double FirstFraction;

    /// <summary>Where on the piece it ends.</summary>
    public double LastFraction;

    /// <summary>The next in the ring of segments that are divided alike; itself when there is no other.</summary>
    public int Mate;

    /// <summary>Whether it must never be split.</summary>
    public bool IsFixed;
}
