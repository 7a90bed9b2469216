using System.Collections.Immutable;

namespace FemCore2D.Geometry;

/// <summary>
/// The pieces of an arrangement without the cuts that nothing visible needs any more, and their vertices numbered anew.
/// </summary>
/// <remarks>Where a hidden line was cut at a visible one, the vertex would only force small cells on the mesher.</remarks>
internal sealed class ArrangedLines
{
    private readonly PieceCutter cutter;
    private readonly List<ArrangedPiece> pieces;
    private readonly List<int> origins;
    private readonly int[] degree;
    private readonly (int First, int Second)[] meeting;
    private readonly int[] number;

    /// <summary>Simplifies.</summary>
    /// <param name="cutter">The vertices and sources of the pieces.</param>
    /// <param name="pieces">The visible pieces; the list is used up.</param>
    /// <param name="origins">For each the source that gave it its sweep.</param>
    public ArrangedLines(PieceCutter cutter, List<ArrangedPiece> pieces, List<int> origins)
    {
        this.cutter = cutter;
        this.pieces = pieces;
        this.origins = origins;
        degree = new int[cutter.Vertices.Count];
        meeting = new (int, int)[cutter.Vertices.Count];
        for (int i = 0; i < pieces.Count; i++)
        {
            Meet(pieces[i].Start, i);
            Meet(pieces[i].End, i);
        }

        HashSet<int> isFixed = [.. cutter.ExtraVertices];
        bool[] isGone = new bool[pieces.Count];
        for (int v = 0; v < degree.Length; v++)
        {
            if (degree[v] == 2 && !isFixed.Contains(v))
            {
                TryJoin(v, isGone);
            }
        }

        number = new int[degree.Length];
        Array.Fill(number, -1);
        ImmutableArray<ArrangedPiece>.Builder kept = ImmutableArray.CreateBuilder<ArrangedPiece>(pieces.Count);
        ImmutableArray<Point2D>.Builder vertices = ImmutableArray.CreateBuilder<Point2D>();
        for (int i = 0; i < pieces.Count; i++)
        {
            if (!isGone[i])
            {
                ArrangedPiece piece = pieces[i];
                kept.Add(piece with { Start = Renumbered(piece.Start, vertices), End = Renumbered(piece.End, vertices) });
            }
        }

        foreach (int vertex in cutter.ExtraVertices)
        {
            Renumbered(vertex, vertices);
        }

        Pieces = kept.ToImmutable();
        Vertices = vertices.ToImmutable();
    }

    public ImmutableArray<ArrangedPiece> Pieces { get; }

    public ImmutableArray<Point2D> Vertices { get; }

    /// <summary>The new number of a vertex of the cutter, -1 when it is not needed.</summary>
    public int VertexOf(int vertex) => number[vertex];

    private void Meet(int vertex, int piece)
    {
        meeting[vertex] = degree[vertex] == 0 ? (piece, -1) : (meeting[vertex].First, piece);
        degree[vertex]++;
    }

    private void TryJoin(int vertex, bool[] isGone)
    {
        (int first, int second) = meeting[vertex];
        (int sourceStart, int sourceEnd) = cutter.EndsOf(origins[first]);
        if (origins[first] != origins[second] || vertex == sourceStart || vertex == sourceEnd)
        {
            return;
        }

        // Both parts run the way of their source, so one ends where the other begins.
        (int before, int after) = pieces[first].End == vertex ? (first, second) : (second, first);
        ArrangedPiece into = pieces[before];
        ArrangedPiece from = pieces[after];
        if (into.Boundaries != from.Boundaries)
        {
            return;
        }

        // Their regions are the same, since nothing else divides the plane there.
        pieces[before] = into with { End = from.End, SweepRadians = into.SweepRadians + from.SweepRadians };
        isGone[after] = true;
        (int one, int other) = meeting[from.End];
        meeting[from.End] = (one == after ? before : one, other == after ? before : other);
    }

    private int Renumbered(int vertex, ImmutableArray<Point2D>.Builder vertices)
    {
        if (number[vertex] < 0)
        {
            number[vertex] = vertices.Count;
            vertices.Add(cutter.Vertices[vertex]);
        }

        return number[vertex];
    }
}
