using System.Collections.Immutable;

namespace FemCore2D.Geometry;

/// <summary>
/// A cross-section with all pieces cut at each other: the vertices, and the straight and arc pieces between them,
/// which meet at vertices only.
/// </summary>
internal sealed class Arrangement
{
    public required ImmutableArray<Point2D> Vertices { get; init; }

    public required ImmutableArray<ArrangedPiece> Pieces { get; init; }

    public required ImmutableArray<string> RegionNames { get; init; }

    /// <summary>The sets of boundary names that pieces refer to; one piece has several names where lines coincide.</summary>
    public required ImmutableArray<ImmutableArray<string>> BoundarySets { get; init; }

    public required ImmutableArray<string> PointNames { get; init; }

    /// <summary>The vertex of each named point.</summary>
    public required ImmutableArray<int> PointVertices { get; init; }

    /// <summary>The distance within which points count as one, in metres.</summary>
    public required double Tolerance { get; init; }

    /// <summary>The exact area of a region, in square metres.</summary>
    public double AreaOf(string region)
    {
        int index = RegionNames.IndexOf(region);
        Point2D origin = Vertices[0];
        double sum = 0;
        foreach (ArrangedPiece piece in Pieces)
        {
            int side = (piece.LeftRegion == index ? 1 : 0) - (piece.RightRegion == index ? 1 : 0);
            if (side != 0)
            {
                OutlinePiece line = PieceOf(piece);
                sum += side * ((0.5 * (line.Start - origin).Cross(line.End - origin)) + line.SegmentArea);
            }
        }

        return sum;
    }

    /// <summary>The length of a boundary, in metres.</summary>
    public double LengthOf(string boundary) =>
        Pieces.Where(p => p.Boundaries >= 0 && BoundarySets[p.Boundaries].Contains(boundary)).Sum(p => PieceOf(p).Length);

    private OutlinePiece PieceOf(ArrangedPiece piece) =>
        new(Vertices[piece.Start], Vertices[piece.End], piece.SweepRadians);
}

/// <summary>A straight or arc piece of an <see cref="Arrangement"/>.</summary>
/// <param name="Start">The vertex at which it begins.</param>
/// <param name="End">The vertex at which it ends.</param>
/// <param name="SweepRadians">The angle that the arc sweeps, positive counterclockwise, 0 for a straight piece; at most a half turn either way.</param>
/// <param name="LeftRegion">The region on the left, an index into the names, -1 outside the section.</param>
/// <param name="RightRegion">The region on the right, likewise.</param>
/// <param name="Boundaries">An index into the sets of boundary names, -1 when it has no name.</param>
internal readonly record struct ArrangedPiece(
    int Start, int End, double SweepRadians, int LeftRegion, int RightRegion, int Boundaries);
