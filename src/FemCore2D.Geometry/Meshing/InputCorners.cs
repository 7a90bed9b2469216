namespace FemCore2D.Geometry;

/// <summary>The angles between the pieces that meet at a vertex of the arrangement, where they are small.</summary>
internal sealed class InputCorners
{
    private const double SmallDegrees = 60.5;
    private const double CuspDegrees = 0.25;

    /// <summary>How wide the gap of a cusp may be, by its distance from the tip, to be left as it is.</summary>
    private const double NarrowRatio = 0.035;

    private readonly record struct Departure(double Angle, int Piece, bool AtEnd, int Region);

    private readonly MeshPlan plan;
    private readonly double[] smallest;
    private readonly int[] smallCorners;
    private readonly Dictionary<(int, int), (int One, int Other)> cornersOfPieces = [];
    private readonly Dictionary<(int, int), int> cusps = [];
    private readonly SortedDictionary<int, List<(int Piece, bool AtEnd)>> cuspEnds = [];

    public InputCorners(MeshPlan plan)
    {
        this.plan = plan;
        smallest = new double[plan.Arrangement.Vertices.Length];
        Array.Fill(smallest, double.PositiveInfinity);
        List<Departure>[] departures = new List<Departure>[smallest.Length];
        for (int piece = 0; piece < plan.Curves.Length; piece++)
        {
            ArrangedPiece arranged = plan.Arrangement.Pieces[piece];
            Note(arranged.Start, piece, atEnd: false, arranged.LeftRegion);
            Note(arranged.End, piece, atEnd: true, arranged.RightRegion);
        }

        for (int vertex = 0; vertex < departures.Length; vertex++)
        {
            if (departures[vertex] is not { Count: > 1 } around)
                continue;
            around.Sort((a, b) => (a.Angle, a.Piece).CompareTo((b.Angle, b.Piece)));
            NoteCusps(around, vertex);
            for (int i = 0; i < around.Count; i++)
            {
                (double angle, int piece, _, int region) = around[i];
                (double nextAngle, int nextPiece, _, _) = around[(i + 1) % around.Count];
                double between = nextAngle - angle + (i + 1 < around.Count ? 0 : 2 * Math.PI);
                double degrees = between * 180 / Math.PI;
                if (degrees > SmallDegrees || piece == nextPiece)
                    continue;
                (int, int) key = (Math.Min(piece, nextPiece), Math.Max(piece, nextPiece));
                cornersOfPieces[key] = cornersOfPieces.TryGetValue(key, out (int One, int Other) known)
                    ? known with { Other = vertex }
                    : (vertex, vertex);

                // In a cusp rounding decides which side comes first, so the region between is not to be trusted.
                if (region >= 0 || degrees < CuspDegrees)
                    smallest[vertex] = Math.Min(smallest[vertex], degrees);
            }
        }

        smallCorners = [.. Enumerable.Range(0, smallest.Length).Where(IsSmall)];

        void Note(int vertex, int piece, bool atEnd, int leftRegion)
        {
            Vector2D direction = plan.Curves[piece].Departure(atEnd);
            (departures[vertex] ??= []).Add(new Departure(Math.Atan2(direction.Y, direction.X), piece, atEnd, leftRegion));
        }
    }

    /// <summary>Notes all pieces that leave in one direction: rounding alone decides which of them is next to which.</summary>
    private void NoteCusps(List<Departure> around, int vertex)
    {
        for (int i = 0; i < around.Count; i++)
        {
            for (int k = i + 1; k < around.Count; k++)
            {
                double between = around[k].Angle - around[i].Angle;
                if (Math.Min(between, (2 * Math.PI) - between) * 180 / Math.PI < CuspDegrees)
                {
                    (int one, int other) = (around[i].Piece, around[k].Piece);
                    cusps[(Math.Min(one, other), Math.Max(one, other))] = vertex;
                    NoteCuspEnd(around[i], vertex);
                    NoteCuspEnd(around[k], vertex);
                }
            }
        }
    }

    private void NoteCuspEnd(Departure departure, int vertex)
    {
        if (!cuspEnds.TryGetValue(vertex, out List<(int, bool)>? ends))
            cuspEnds.Add(vertex, ends = []);
        if (!ends.Contains((departure.Piece, departure.AtEnd)))
            ends.Add((departure.Piece, departure.AtEnd));
    }

    /// <summary>Whether pieces meet at the vertex at a small angle.</summary>
    public bool IsSmall(int vertex) => vertex < smallest.Length && smallest[vertex] < SmallDegrees;

    /// <summary>The smallest angle between pieces at the vertex, in degrees; infinite where none is small.</summary>
    public double DegreesAt(int vertex) => vertex < smallest.Length ? smallest[vertex] : double.PositiveInfinity;

    /// <summary>
    /// Whether two points lie on two pieces that meet at a small angle, about equally far from their corner.
    /// </summary>
    public bool IsAcrossSmallCorner(int pieceA, Point2D a, int pieceB, Point2D b)
    {
        return pieceA >= 0 && pieceB >= 0 && pieceA != pieceB
            && cornersOfPieces.TryGetValue((Math.Min(pieceA, pieceB), Math.Max(pieceA, pieceB)), out (int One, int Other) found)
            && (AreEquallyFar(found.One, a, b) || AreEquallyFar(found.Other, a, b));
    }

    /// <summary>
    /// Whether a place lies where two pieces that touch each other have hardly parted yet, so that no triangle
    /// between them can have good angles.
    /// </summary>
    /// <param name="pieceA">A piece.</param>
    /// <param name="pieceB">Another piece.</param>
    /// <param name="place">The place.</param>
    /// <param name="gap">The distance between the pieces there.</param>
    public bool IsInCusp(int pieceA, int pieceB, Point2D place, double gap) =>
        cusps.Count > 0 && pieceA >= 0 && pieceB >= 0 && pieceA != pieceB
        && cusps.TryGetValue((Math.Min(pieceA, pieceB), Math.Max(pieceA, pieceB)), out int vertex)
        && gap < NarrowRatio * PlaceOf(vertex).DistanceTo(place);

    /// <summary>The ends of pieces that leave the vertex in one direction with another; empty where there is no cusp.</summary>
    public IReadOnlyList<(int Piece, bool AtEnd)> CuspEndsAt(int vertex) =>
        cuspEnds.TryGetValue(vertex, out List<(int, bool)>? ends) ? ends : [];

    /// <summary>The vertices with cusps.</summary>
    public IEnumerable<int> CuspVertices => cuspEnds.Keys;

    private bool AreEquallyFar(int vertex, Point2D a, Point2D b)
    {
        Point2D corner = plan.Arrangement.Vertices[vertex];
        double toA = corner.DistanceTo(a);
        double toB = corner.DistanceTo(b);
        return Math.Abs(toA - toB) <= 1e-6 * Math.Max(toA, toB);
    }

    /// <summary>The small corner nearest to a triangle, if it is about as near as the triangle is long; otherwise -1.</summary>
    public int NearestSmall(Point2D a, Point2D b, Point2D c)
    {
        double longest = Math.Max(a.DistanceTo(b), Math.Max(b.DistanceTo(c), c.DistanceTo(a)));
        double nearest = double.PositiveInfinity;
        int best = -1;
        foreach (int vertex in smallCorners)
        {
            Point2D corner = PlaceOf(vertex);
            double distance = Math.Min(corner.DistanceTo(a), Math.Min(corner.DistanceTo(b), corner.DistanceTo(c)));

            // Between the sides of an angle the cells are as long as the gap is wide, or longer.
            double reach = longest * Math.Clamp(90 / smallest[vertex], 4, 360);
            if (distance < reach && distance < nearest)
            {
                best = vertex;
                nearest = distance;
            }
        }

        return best;
    }

    public Point2D PlaceOf(int vertex) => plan.Arrangement.Vertices[vertex];
}
