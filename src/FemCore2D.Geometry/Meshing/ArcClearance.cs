namespace FemCore2D.Geometry;

/// <summary>
/// Halves edges on arcs until no vertex lies between an arc and its chord.
/// </summary>
/// <remarks>
/// Then no two chords cross either: a chord that enters the lens between an arc and its chord must end in it, or
/// leave through the arc; in that case the arc of the other chord, which does not cross the first, runs around an
/// end of the first, and that end lies in the lens of the other.
/// </remarks>
internal sealed class ArcClearance
{
    private const double SmallestSweep = 1e-7;

    private readonly MeshPlan plan;
    private readonly List<double>[] fractions;
    private readonly CancellationToken cancellation;
    private readonly List<Point2D> points = [];

    public ArcClearance(MeshPlan plan, List<double>[] fractions, CancellationToken cancellation)
    {
        this.plan = plan;
        this.fractions = fractions;
        this.cancellation = cancellation;
    }

    public void Establish()
    {
        if (plan.Curves.All(curve => curve.Sweep == 0))
            return;
        bool changed = true;
        while (changed)
        {
            cancellation.ThrowIfCancellationRequested();
            changed = HalveSharedChords();
            points.Clear();
            points.AddRange(plan.Arrangement.Vertices);
            for (int piece = 0; piece < fractions.Length; piece++)
            {
                PieceCurve curve = plan.Rings.Directed(piece);
                points.AddRange(fractions[piece][1..^1].Select(curve.PointAt));
            }

            PointTree tree = new(points);
            for (int piece = 0; piece < fractions.Length; piece++)
            {
                if (plan.Curves[piece].Sweep != 0)
                    changed |= HalveObstructed(piece, tree);
            }
        }
    }

    private bool HalveObstructed(int piece, PointTree tree)
    {
        PieceCurve curve = plan.Rings.Directed(piece);
        List<double> cuts = fractions[piece];
        List<double> halves = [];
        for (int i = 1; i < cuts.Count; i++)
        {
            PieceCurve part = new(curve.PointAt(cuts[i - 1]), curve.PointAt(cuts[i]), curve.Sweep * (cuts[i] - cuts[i - 1]));
            if (Math.Abs(part.Sweep) > SmallestSweep && IsObstructed(part, tree))
                halves.Add(0.5 * (cuts[i - 1] + cuts[i]));
        }

        return Insert(piece, halves);
    }

    private bool IsObstructed(PieceCurve part, PointTree tree)
    {
        Point2D crown = part.PointAt(0.5);
        Vector2D rise = crown - part.Start.Towards(part.End, 0.5);
        Point2D one = part.Start + rise;
        Point2D other = part.End + rise;
        Point2D low = new(
            Math.Min(Math.Min(part.Start.X, part.End.X), Math.Min(one.X, other.X)),
            Math.Min(Math.Min(part.Start.Y, part.End.Y), Math.Min(one.Y, other.Y)));
        Point2D high = new(
            Math.Max(Math.Max(part.Start.X, part.End.X), Math.Max(one.X, other.X)),
            Math.Max(Math.Max(part.Start.Y, part.End.Y), Math.Max(one.Y, other.Y)));
        return tree.Any(low, high, point => IsInLens(part, points[point]));
    }

    /// <summary>Whether a point other than the ends lies between an arc and its chord, on the chord, or on the arc.</summary>
    private static bool IsInLens(PieceCurve part, Point2D point)
    {
        if (point == part.Start || point == part.End)
            return false;
        int sign = Math.Sign(part.Sweep);

        // The arc bulges to the right of its chord when it turns to the left.
        if (sign * Predicates.Orientation(part.Start, part.End, point) > 0)
            return false;

        // From the arc the chord is seen under a half turn less half the sweep, from the lens under more.
        Vector2D toStart = part.Start - point;
        Vector2D toEnd = part.End - point;
        double seen = Math.Atan2(Math.Abs(toStart.Cross(toEnd)), toStart.Dot(toEnd));
        return seen >= Math.PI - (Math.Abs(part.Sweep) / 2) - 1e-9;
    }

    /// <summary>Halves the arcs of which another piece has the same two ends, edge for edge.</summary>
    private bool HalveSharedChords()
    {
        HashSet<(int, int)> chords = [];
        HashSet<(int, int)> shared = [];
        for (int piece = 0; piece < fractions.Length; piece++)
        {
            if (fractions[piece].Count == 2 && !chords.Add(ChordOf(piece)))
                shared.Add(ChordOf(piece));
        }

        bool changed = false;
        for (int piece = 0; piece < fractions.Length && shared.Count > 0; piece++)
        {
            if (fractions[piece].Count == 2 && plan.Curves[piece].Sweep != 0 && shared.Contains(ChordOf(piece)))
                changed |= Insert(piece, [0.5]);
        }

        return changed;
    }

    private (int Lower, int Higher) ChordOf(int piece)
    {
        ArrangedPiece arranged = plan.Arrangement.Pieces[piece];
        return (Math.Min(arranged.Start, arranged.End), Math.Max(arranged.Start, arranged.End));
    }

    private bool Insert(int piece, List<double> halves)
    {
        if (halves.Count == 0)
            return false;
        if (plan.Divisions[piece] > 0)
        {
            PieceCurve curve = plan.Rings.Directed(piece);
            throw new MeshingException(
                $"With the division asked for on {plan.Describe(piece)}, another line would pass between an arc and its chord near {curve.PointAt(halves[0])}. Divide it more finely.");
        }

        foreach (int member in plan.Rings.Of(piece))
        {
            List<double> cuts = fractions[member];
            foreach (double half in halves.Where(half => !cuts.Contains(half)))
            {
                cuts.Add(half);
            }

            cuts.Sort();
        }

        return true;
    }
}
