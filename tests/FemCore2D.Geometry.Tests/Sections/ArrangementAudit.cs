namespace FemCore2D.Geometry.Tests;

/// <summary>Checks of an arrangement by brute force, with other formulas than those that made it.</summary>
internal static class ArrangementAudit
{
    public static void Check(CrossSection section)
    {
        Arrangement arrangement = section.Arrange();
        OutlinePiece[] pieces = [.. arrangement.Pieces.Select(p => Line(arrangement, p))];
        PiecesMeetAtVerticesOnly(arrangement, pieces);
        RegionsAgreeRoundVertices(arrangement, pieces);
        SidesShowWhatWasPaintedLast(section, arrangement, pieces);
    }

    public static OutlinePiece Line(Arrangement arrangement, ArrangedPiece piece) =>
        new(arrangement.Vertices[piece.Start], arrangement.Vertices[piece.End], piece.SweepRadians);

    public static void PiecesMeetAtVerticesOnly(Arrangement arrangement, OutlinePiece[] pieces)
    {
        double size = Size(arrangement);
        for (int i = 0; i < pieces.Length; i++)
        {
            Assert.NotEqual(arrangement.Pieces[i].Start, arrangement.Pieces[i].End);
            Assert.True(Math.Abs(pieces[i].SweepRadians) <= Math.PI * (1 + 1e-12));
            for (int j = i + 1; j < pieces.Length; j++)
            {
                foreach (Point2D contact in ClassicalContacts.Of(pieces[i], pieces[j]))
                {
                    int[] shared = [.. Ends(arrangement.Pieces[i]).Intersect(Ends(arrangement.Pieces[j]))];
                    Assert.True(
                        shared.Any(v => arrangement.Vertices[v].DistanceTo(contact) < 1e-6 * size),
                        $"{pieces[i]} meets {pieces[j]} at {contact}, which is no common vertex.");
                }
            }
        }

        for (int i = 0; i < arrangement.Vertices.Length; i++)
        {
            for (int j = i + 1; j < arrangement.Vertices.Length; j++)
            {
                Assert.True(arrangement.Vertices[i].DistanceTo(arrangement.Vertices[j]) > arrangement.Tolerance);
            }
        }
    }

    /// <summary>Going round a vertex, one piece's left must be the next piece's right.</summary>
    public static void RegionsAgreeRoundVertices(Arrangement arrangement, OutlinePiece[] pieces)
    {
        var leaving = arrangement.Pieces.SelectMany((p, i) => new[]
        {
            (Vertex: p.Start, Line: pieces[i], Left: p.LeftRegion, Right: p.RightRegion),
            (Vertex: p.End, Line: pieces[i].Reversed(), Left: p.RightRegion, Right: p.LeftRegion),
        });
        foreach (var star in leaving.GroupBy(l => l.Vertex))
        {
            // On a circle small enough to cut every piece once, their order is that of the angles. It must stay large
            // beside the tolerance, within which pieces may bend; shorter ones show by their chords where they lead.
            double radius = 0.2 * star.Select(l => l.Line.Length).Where(l => l > 100 * arrangement.Tolerance).DefaultIfEmpty(1).Min();
            Point2D centre = arrangement.Vertices[star.Key];
            var sorted = star.Select(l => (l.Left, l.Right, Angle: AngleAt(l.Line, centre, radius))).OrderBy(l => l.Angle).ToArray();
            for (int i = 0; i < sorted.Length; i++)
            {
                Assert.True(
                    sorted[i].Left == sorted[(i + 1) % sorted.Length].Right,
                    $"The regions disagree round the vertex at {centre}.");
            }
        }
    }

    /// <summary>Close to the middle of a piece, each side must show the region that a search through the items finds.</summary>
    public static void SidesShowWhatWasPaintedLast(CrossSection section, Arrangement arrangement, OutlinePiece[] pieces)
    {
        double step = 1e-8 * Size(arrangement);
        for (int i = 0; i < pieces.Length; i++)
        {
            if (pieces[i].Length < 1e-3 * Size(arrangement))
            {
                continue;
            }

            Vector2D normal = pieces[i].TangentAt(0.5).LeftNormal;
            Assert.Equal(section.RegionAt(pieces[i].Midpoint + (step * normal)), Name(arrangement, arrangement.Pieces[i].LeftRegion));
            Assert.Equal(section.RegionAt(pieces[i].Midpoint - (step * normal)), Name(arrangement, arrangement.Pieces[i].RightRegion));
        }
    }

    private static double AngleAt(OutlinePiece line, Point2D centre, double radius)
    {
        if (radius > line.Length)
        {
            return Math.Atan2(line.Chord.Y, line.Chord.X);
        }

        double fraction = line.IsStraight
            ? radius / line.Length
            : 2 * Math.Asin(radius / (2 * line.Radius)) / Math.Abs(line.SweepRadians);
        Vector2D ray = line.PointAt(fraction) - centre;
        return Math.Atan2(ray.Y, ray.X);
    }

    private static string? Name(Arrangement arrangement, int region) => region < 0 ? null : arrangement.RegionNames[region];

    private static IEnumerable<int> Ends(ArrangedPiece piece) => [piece.Start, piece.End];

    private static double Size(Arrangement arrangement) =>
        arrangement.Vertices.Aggregate(Box2D.Empty, (box, v) => box.Union(new Box2D(v, v))).Diagonal;
}
