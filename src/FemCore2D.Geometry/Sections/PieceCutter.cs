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
/// </remarks>
internal sealed class PieceCutter
{
    private readonly IReadOnlyList<OutlinePiece> sources;
    private readonly double tolerance;
    private readonly PieceForm[] forms;
    private readonly BoxIndex tree;
    private readonly PointMerger vertices;
    private readonly int[] starts;
    private readonly int[] ends;
    private readonly List<CutPiece> pieces = [];
    private readonly List<List<PieceUse>> uses = [];
    private readonly Dictionary<(int, int), List<int>> piecesBetween = [];

    /// <summary>Cuts pieces of at most half a turn each, at each other and at extra points.</summary>
    public PieceCutter(IReadOnlyList<OutlinePiece> sources, IReadOnlyList<Point2D> extraPoints, double tolerance)
    {
        this.sources = sources;
        this.tolerance = tolerance;
        forms = [.. sources.Select(p => new PieceForm(p.Start, p.End, p.SweepRadians))];
        tree = new BoxIndex([.. sources.Select(p => p.Bounds.Widened(2 * tolerance))]);
        vertices = new PointMerger(tolerance);
        starts = [.. sources.Select(p => vertices.Add(p.Start))];
        ends = [.. sources.Select(p => vertices.Add(p.End))];
        ExtraVertices = [.. extraPoints.Select(vertices.Add)];
        AddContacts();
        Cut();
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
        List<int> hits = [];
        Span<Point2D> contacts = stackalloc Point2D[2];
        for (int i = 0; i < forms.Length; i++)
        {
            tree.Query(sources[i].Bounds, hits);
            foreach (int j in hits)
            {
                if (j > i && forms[i].Length > 0 && forms[j].Length > 0)
                {
                    int count = PieceContacts.Find(forms[i], forms[j], tolerance, contacts);
                    for (int c = 0; c < count; c++)
                    {
                        vertices.Add(contacts[c]);
                    }
                }
            }
        }
    }

    private void Cut()
    {
        List<(double Fraction, int Vertex)>?[] cuts = new List<(double, int)>?[forms.Length];
        List<int> hits = [];
        for (int v = 0; v < Vertices.Count; v++)
        {
            Point2D place = Vertices[v];
            tree.Query(new Box2D(place, place), hits);
            foreach (int i in hits)
            {
                // A contact may have moved by the tolerance to the vertex that stands for it.
                if (v != starts[i] && v != ends[i]
                    && Math.Abs(forms[i].Side(place)) <= 2 * tolerance * forms[i].Length && forms[i].Spans(place))
                {
                    (cuts[i] ??= []).Add((forms[i].FractionOf(place), v));
                }
            }
        }

        for (int i = 0; i < forms.Length; i++)
        {
            double fraction = 0;
            int vertex = starts[i];
            cuts[i]?.Sort();
            foreach ((double nextFraction, int next) in cuts[i] ?? [])
            {
                AddPart(i, vertex, next, nextFraction - fraction);
                (fraction, vertex) = (nextFraction, next);
            }

            AddPart(i, vertex, ends[i], 1 - fraction);
        }
    }

    private void AddPart(int source, int start, int end, double share)
    {
        if (start == end)
        {
            return;
        }

        CutPiece part = new(start, end, share * sources[source].SweepRadians);
        (int, int) key = (Math.Min(start, end), Math.Max(start, end));
        if (!piecesBetween.TryGetValue(key, out List<int>? between))
        {
            between = [];
            piecesBetween.Add(key, between);
        }

        foreach (int other in between)
        {
            if (MiddleOf(part).DistanceTo(MiddleOf(pieces[other])) <= 4 * tolerance)
            {
                uses[other].Add(new PieceUse(source, pieces[other].Start == start ? 1 : -1));
                return;
            }
        }

        between.Add(pieces.Count);
        uses.Add([new PieceUse(source, 1)]);
        pieces.Add(part);
    }

    private Point2D MiddleOf(CutPiece piece) =>
        new PieceForm(Vertices[piece.Start], Vertices[piece.End], piece.Sweep).AtParameter(0.5).Point;
}
