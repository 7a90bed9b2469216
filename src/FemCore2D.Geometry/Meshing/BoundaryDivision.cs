using System.Globalization;

namespace FemCore2D.Geometry;

/// <summary>
/// The pieces divided into edges of the wanted size: the vertices and segments from which a triangulation starts.
/// </summary>
internal sealed class BoundaryDivision
{
    private readonly MeshPlan plan;
    private readonly SizeField field;
    private readonly List<double>[] fractions;
    private readonly CancellationToken cancellation;

    public BoundaryDivision(MeshPlan plan, SizeField field, CancellationToken cancellation)
    {
        this.plan = plan;
        this.field = field;
        this.cancellation = cancellation;
        fractions = new List<double>[plan.Curves.Length];
        long edges = 0;
        for (int piece = 0; piece < fractions.Length; piece++)
        {
            cancellation.ThrowIfCancellationRequested();
            int leader = plan.Rings.Of(piece).Min();
            fractions[piece] = leader < piece ? [.. fractions[leader]] : Divide(piece);
            edges += fractions[piece].Count - 1;
            if (edges > plan.CellLimit)
            {
                throw new MeshingException(string.Create(CultureInfo.InvariantCulture,
                    $"The boundaries alone need more edges than the limit of {plan.CellLimit} cells; the size on {plan.Describe(piece)} is {plan.PieceSizes[piece]:G4} m. Ask for larger sizes or raise the limit of cells."));
            }
        }

        Corners = new InputCorners(plan);
        EvenOutCusps();
        new ArcClearance(plan, fractions, cancellation).Establish();
        EvenOutCusps();
        Collect();
    }

    public InputCorners Corners { get; }

    /// <summary>The vertices of the arrangement first, then those within pieces.</summary>
    public List<Point2D> Vertices { get; } = [];

    /// <summary>The piece in which each vertex lies, -1 for the arrangement's own.</summary>
    public List<int> PieceOfVertex { get; } = [];

    public List<Segment> Segments { get; } = [];

    /// <summary>Where a piece is cut, from 0 to 1 in its direction of division, with about equal shares of the wanted edges.</summary>
    private List<double> Divide(int piece)
    {
        int edges = plan.Divisions[piece];
        PieceCurve curve = plan.Rings.Directed(piece);
        int fewest = Math.Max(1, (int)Math.Ceiling((Math.Abs(curve.Sweep) * 180 / Math.PI / plan.Options.LargestArcDegrees) - 1e-9));
        if (edges > 0)
        {
            if (edges < fewest)
            {
                throw new MeshingException(string.Create(CultureInfo.InvariantCulture,
                    $"A division into {edges} edges of {plan.Describe(piece)}, which sweeps {Math.Abs(curve.Sweep) * 180 / Math.PI:G4} degrees, would exceed {plan.Options.LargestArcDegrees:G4} degrees an edge. Divide it into {fewest} or more."));
            }

            return [.. Enumerable.Range(0, edges + 1).Select(i => (double)i / edges)];
        }

        // The number of edges that fit up to each of a row of places, half an edge apart.
        double length = curve.Length;
        List<double> places = [0];
        List<double> counts = [0];
        double size = SizeAt(piece, 0);
        bool isUniform = true;
        while (places[^1] < 1)
        {
            if ((places.Count & 1023) == 0)
                cancellation.ThrowIfCancellationRequested();
            double place = Math.Min(1, places[^1] + (0.5 * size / length));
            double sizeThere = SizeAt(piece, place);
            if (sizeThere < 0.5 * size)
            {
                place = Math.Min(place, places[^1] + (sizeThere / length));
                sizeThere = SizeAt(piece, place);
            }

            counts.Add(counts[^1] + ((place - places[^1]) * length * 0.5 * ((1 / size) + (1 / sizeThere))));
            places.Add(place);
            isUniform &= Math.Abs(sizeThere - size) <= 1e-12 * size;
            size = sizeThere;
            if (counts[^1] > plan.CellLimit)
                break;
        }

        edges = Math.Max(fewest, (int)Math.Ceiling(Math.Min(counts[^1], plan.CellLimit) - 0.1));
        List<double> cuts = [0];
        for (int i = 1, k = 1; i < edges; i++)
        {
            double count = counts[^1] * i / edges;
            while (counts[k] < count)
            {
                k++;
            }

            double share = (count - counts[k - 1]) / (counts[k] - counts[k - 1]);
            cuts.Add(isUniform ? (double)i / edges : places[k - 1] + (share * (places[k] - places[k - 1])));
        }

        cuts.Add(1);
        return LimitArcs(cuts, Math.Abs(curve.Sweep) * 180 / Math.PI / plan.Options.LargestArcDegrees);
    }

    private static List<double> LimitArcs(List<double> cuts, double largestArcs)
    {
        if (largestArcs <= 1)
            return cuts;
        List<double> result = [0];
        for (int i = 1; i < cuts.Count; i++)
        {
            double step = cuts[i] - cuts[i - 1];
            int parts = Math.Max(1, (int)Math.Ceiling((step * largestArcs) - 1e-9));
            for (int part = 1; part < parts; part++)
            {
                result.Add(cuts[i - 1] + (step * part / parts));
            }

            result.Add(cuts[i]);
        }

        return result;
    }

    /// <summary>Makes the edges at the tip of a cusp equally long.</summary>
    private void EvenOutCusps()
    {
        foreach (int vertex in Corners.CuspVertices)
        {
            IReadOnlyList<(int Piece, bool AtEnd)> ends = Corners.CuspEndsAt(vertex);
            double shortest = ends.Min(end => FirstChord(end.Piece, FromLast(end)));
            foreach ((int Piece, bool AtEnd) end in ends)
            {
                if (plan.Divisions[end.Piece] == 0 && FirstChord(end.Piece, FromLast(end)) > shortest * (1 + 1e-9))
                    CutAtDistance(end.Piece, FromLast(end), shortest);
            }
        }
    }

    private bool FromLast((int Piece, bool AtEnd) end) => end.AtEnd != plan.Rings.IsReversed(end.Piece);

    private double FirstChord(int piece, bool fromLast)
    {
        PieceCurve curve = plan.Rings.Directed(piece);
        List<double> cuts = fractions[piece];
        return fromLast
            ? curve.End.DistanceTo(curve.PointAt(cuts[^2]))
            : curve.Start.DistanceTo(curve.PointAt(cuts[1]));
    }

    private void CutAtDistance(int piece, bool fromLast, double distance)
    {
        double fraction = plan.Rings.Directed(piece).FractionAtDistance(distance);
        double cut = fromLast ? 1 - fraction : fraction;
        foreach (int member in plan.Rings.Of(piece))
        {
            List<double> cuts = fractions[member];
            int place = fromLast ? cuts.Count - 1 : 1;
            cuts.Insert(place, cut);

            // The cut that was the first moves on where it would leave an edge much shorter than its neighbours.
            int old = fromLast ? place - 1 : place + 1;
            int beyond = fromLast ? place - 2 : place + 2;
            if (beyond >= 0 && beyond < cuts.Count && Math.Abs(cuts[old] - cut) < 0.5 * fraction)
                cuts[old] = 0.5 * (cut + cuts[beyond]);
        }
    }

    private double SizeAt(int piece, double fraction)
    {
        double size = double.PositiveInfinity;
        foreach (int member in plan.Rings.Of(piece))
        {
            ArrangedPiece arranged = plan.Arrangement.Pieces[member];
            double cap = Math.Min(plan.CapOf(arranged.LeftRegion), plan.CapOf(arranged.RightRegion));
            size = Math.Min(size, field.At(plan.Rings.Directed(member).PointAt(fraction), cap));
        }

        return size;
    }

    private void Collect()
    {
        Vertices.AddRange(plan.Arrangement.Vertices);
        PieceOfVertex.AddRange(Enumerable.Repeat(-1, Vertices.Count));
        int[] firstSegment = new int[fractions.Length];
        for (int piece = 0; piece < fractions.Length; piece++)
        {
            ArrangedPiece arranged = plan.Arrangement.Pieces[piece];
            bool reversed = plan.Rings.IsReversed(piece);
            PieceCurve curve = plan.Rings.Directed(piece);
            List<double> cuts = fractions[piece];
            firstSegment[piece] = Segments.Count;
            int last = reversed ? arranged.Start : arranged.End;
            int from = reversed ? arranged.End : arranged.Start;
            for (int i = 1; i < cuts.Count; i++)
            {
                int to = last;
                if (i < cuts.Count - 1)
                {
                    to = Vertices.Count;
                    Vertices.Add(curve.PointAt(cuts[i]));
                    PieceOfVertex.Add(piece);
                }

                Segments.Add(new Segment
                {
                    Start = from,
                    End = to,
                    Piece = piece,
                    FirstFraction = cuts[i - 1],
                    LastFraction = cuts[i],
                    Mate = -1,
                    IsFixed = plan.Divisions[piece] > 0,
                });
                from = to;
            }
        }

        for (int piece = 0; piece < fractions.Length; piece++)
        {
            int mates = firstSegment[plan.Rings.Next(piece)];
            for (int i = 0; i < fractions[piece].Count - 1; i++)
            {
                Segments[firstSegment[piece] + i] = Segments[firstSegment[piece] + i] with { Mate = mates + i };
            }
        }
    }
}
