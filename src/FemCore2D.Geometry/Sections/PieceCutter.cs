namespace FemCore2D.Geometry;

/// <summary>A part of one or more coincident pieces between two vertices that nothing else meets on its way.</summary>
/// <param name="Start">The vertex at which it begins.</param>
/// <param name="End">The vertex at which it ends.</param>
/// <param name="Sweep">The angle that the arc sweeps, 0 when straight.</param>
internal readonly record struct CutPiece(int Start, int End, double Sweep);

/// <summary>That a cut piece is part of a given piece.</summary>
/// <param name="Source">The index of the given piece.</param>
/// <param name="Direction">1 when both run the same way, -1 otherwise.</param>
internal readonly record struct PieceUse(int Source, int Direction);

/// <summary>
/// Cuts pieces at each other, so that what remains meets at vertices only, and unites what coincides.
/// </summary>
/// <remarks>
/// The rule is one for crossings, T-junctions, touching and overlapping: the vertices are all ends, extra points and
/// contacts of two pieces, with those closer than the tolerance united; each piece is then cut at every vertex on it.
/// A piece that bends by a part of the tolerance to meet a vertex may come to lie across another one, so cutting is
/// repeated until no piece bends.
/// </remarks>
internal sealed class PieceCutter
{
    private const int MostRounds = 8;

    private readonly double tolerance;
    private readonly PointMerger vertices;
    private readonly int[] starts;
    private readonly int[] ends;
    private readonly Dictionary<(int, int), List<int>> piecesBetween = [];
    private List<CutPiece> pieces = [];
    private List<List<PieceUse>> uses = [];
    private PieceForm[] forms = [];
    private BoxIndex tree = new([]);

    /// <summary>The farthest that a piece bent in the last round to meet a vertex, and where.</summary>
    private double bent;
    private Point2D bentTo;

    /// <summary>Cuts pieces of at most half a turn each, at each other and at extra points.</summary>
    public PieceCutter(IReadOnlyList<OutlinePiece> sources, IReadOnlyList<Point2D> extraPoints, double tolerance)
    {
        this.tolerance = tolerance;
        vertices = new PointMerger(tolerance);
        starts = [.. sources.Select(p => vertices.Add(p.Start))];
        ends = [.. sources.Select(p => vertices.Add(p.End))];
        ExtraVertices = [.. extraPoints.Select(vertices.Add)];
        for (int i = 0; i < sources.Count; i++)
        {
            if (starts[i] != ends[i])
            {
                pieces.Add(new CutPiece(starts[i], ends[i], sources[i].SweepRadians));
                uses.Add([new PieceUse(i, 1)]);
            }
        }

        for (int round = 0; round == 0 || bent > 1e-3 * tolerance; round++)
        {
            if (round == MostRounds)
            {
                throw SectionChecks.TooClose(bentTo, tolerance);
            }

            AddContacts();
            Cut();
        }
    }

    public IReadOnlyList<Point2D> Vertices => vertices.Points;

    /// <summary>The vertices of the extra points, in their order.</summary>
    public IReadOnlyList<int> ExtraVertices { get; }

    public IReadOnlyList<CutPiece> Pieces => pieces;

    /// <summary>The vertices at the ends of a given piece.</summary>
    public (int Start, int End) EndsOf(int source) => (starts[source], ends[source]);

    /// <summary>The given pieces that a cut piece is part of; the first gave it its direction and sweep.</summary>
    public IReadOnlyList<PieceUse> UsesOf(int piece) => uses[piece];

    private void AddContacts()
    {
        forms = [.. pieces.Select(FormOf)];
        Box2D[] boxes = [.. pieces.Select(p => new OutlinePiece(Vertices[p.Start], Vertices[p.End], p.Sweep).Bounds)];
        tree = new BoxIndex([.. boxes.Select(b => b.Widened(2 * tolerance))]);
        List<int> hits = [];
        Span<Point2D> contacts = stackalloc Point2D[2];
        for (int i = 0; i < forms.Length; i++)
        {
            tree.Query(boxes[i], hits);
            foreach (int j in hits)
            {
                int count = j > i ? PieceContacts.Find(forms[i], forms[j], tolerance, contacts) : 0;
                for (int c = 0; c < count; c++)
                {
                    vertices.Add(contacts[c]);
                }
            }
        }
    }

    /// <summary>Cuts every piece at the vertices on it.</summary>
    private void Cut()
    {
        bent = 0;
        List<(double Fraction, int Vertex)>?[] cuts = new List<(double, int)>?[forms.Length];
        List<int> hits = [];
        for (int v = 0; v < Vertices.Count; v++)
        {
            Point2D place = Vertices[v];
            tree.Query(new Box2D(place, place), hits);
            foreach (int i in hits)
            {
                if (v == pieces[i].Start || v == pieces[i].End || !IsOn(forms[i], place))
                {
                    continue;
                }

                (cuts[i] ??= []).Add((forms[i].FractionOf(place), v));
                double distance = Math.Abs(forms[i].DistanceTo(place));
                if (distance > bent)
                {
                    (bent, bentTo) = (distance, place);
                }
            }
        }

        (List<CutPiece> whole, List<List<PieceUse>> usesOfWhole) = (pieces, uses);
        (pieces, uses) = ([], []);
        piecesBetween.Clear();
        for (int i = 0; i < whole.Count; i++)
        {
            double fraction = 0;
            int vertex = whole[i].Start;
            cuts[i]?.Sort();
            foreach ((double nextFraction, int next) in cuts[i] ?? [])
            {
                AddPart(new CutPiece(vertex, next, (nextFraction - fraction) * whole[i].Sweep), usesOfWhole[i]);
                (fraction, vertex) = (nextFraction, next);
            }

            AddPart(new CutPiece(vertex, whole[i].End, (1 - fraction) * whole[i].Sweep), usesOfWhole[i]);
        }
    }

    /// <summary>Whether a piece is cut at a vertex.</summary>
    private bool IsOn(in PieceForm form, Point2D vertex)
    {
        // A contact may have moved by the tolerance to the vertex that stands for it. Both parts must be shorter than
        // the piece, or a few vertices about the tolerance apart would have it cut back and forth without end.
        double length = form.Length;
        return Math.Abs(form.DistanceTo(vertex)) <= 2 * tolerance
            && form.Spans(vertex)
            && (length > 10 * tolerance
                || (vertex.DistanceTo(form.Start) < length && vertex.DistanceTo(form.End) < length));
    }

    private void AddPart(CutPiece part, List<PieceUse> usesOfWhole)
    {
        (int, int) key = (Math.Min(part.Start, part.End), Math.Max(part.Start, part.End));
        if (!piecesBetween.TryGetValue(key, out List<int>? between))
        {
            between = [];
            piecesBetween.Add(key, between);
        }

        foreach (int other in between)
        {
            if (MiddleOf(part).DistanceTo(MiddleOf(pieces[other])) <= 4 * tolerance)
            {
                int direction = pieces[other].Start == part.Start ? 1 : -1;
                uses[other].AddRange(usesOfWhole.Select(use => use with { Direction = direction * use.Direction }));
                return;
            }
        }

        between.Add(pieces.Count);
        uses.Add([.. usesOfWhole]);
        pieces.Add(part);
    }

    private PieceForm FormOf(CutPiece piece) => new(Vertices[piece.Start], Vertices[piece.End], piece.Sweep);

    private Point2D MiddleOf(CutPiece piece) => FormOf(piece).AtParameter(0.5).Point;
}
