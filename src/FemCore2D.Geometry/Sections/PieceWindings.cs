namespace FemCore2D.Geometry;

/// <summary>How often each of several closed chains runs round the two sides of a cut piece, or round a point.</summary>
internal sealed class PieceWindings
{
    private readonly PieceCutter cutter;
    private readonly int[] owners;
    private readonly int[] turns;
    private readonly PieceForm[] forms;
    private readonly Point2D[] middles;
    private readonly BoxIndex tree;
    private readonly double farRight;
    private readonly List<int> hits = [];
    private readonly int[] left;
    private readonly int[] step;
    private readonly bool[] isTouched;
    private readonly List<int> touched = [];

    /// <summary>Prepares the counting.</summary>
    /// <param name="cutter">The cut pieces.</param>
    /// <param name="owners">The chain of each source piece, or -1 when it is part of none.</param>
    /// <param name="turns">1 or -1 for each source piece: whether its chain counts as run forwards or backwards.</param>
    /// <param name="ownerCount">The number of chains.</param>
    public PieceWindings(PieceCutter cutter, int[] owners, int[] turns, int ownerCount)
    {
        this.cutter = cutter;
        this.owners = owners;
        this.turns = turns;
        left = new int[ownerCount];
        step = new int[ownerCount];
        isTouched = new bool[ownerCount];

        int count = cutter.Pieces.Count;
        forms = new PieceForm[count];
        middles = new Point2D[count];
        Box2D[] boxes = new Box2D[count];
        Box2D all = Box2D.Empty;
        for (int i = 0; i < count; i++)
        {
            CutPiece piece = cutter.Pieces[i];
            Point2D start = cutter.Vertices[piece.Start];
            Point2D end = cutter.Vertices[piece.End];
            forms[i] = new PieceForm(start, end, piece.Sweep);
            middles[i] = forms[i].AtParameter(0.5).Point;
            boxes[i] = new OutlinePiece(start, end, piece.Sweep).Bounds.Union(Box2D.Around(middles[i], middles[i]));
            all = all.Union(boxes[i]);
        }

        tree = new BoxIndex(boxes);
        farRight = all.Upper.X;
    }

    /// <summary>The chains counted last that may have a side other than 0, in no particular order.</summary>
    public IReadOnlyList<int> Touched => touched;

    /// <summary>The number of turns of a chain round the left of the piece, or round the point, counted last.</summary>
    public int Left(int owner) => left[owner];

    /// <summary>The number of turns of a chain round the right of the piece counted last.</summary>
    public int Right(int owner) => left[owner] - step[owner];

    /// <summary>The middle of a cut piece.</summary>
    public Point2D MiddleOf(int piece) => middles[piece];

    /// <summary>Counts the turns on both sides of the middle of a cut piece.</summary>
    public void CountAt(int piece)
    {
        PieceForm form = forms[piece];
        Count(middles[piece], piece);
        foreach (PieceUse use in cutter.UsesOf(piece))
        {
            if (owners[use.Source] >= 0)
            {
                Touch(owners[use.Source]);
                step[owners[use.Source]] += use.Direction * turns[use.Source];
            }
        }

        // A level straight piece lies along the ray: what was counted is the side above it.
        double y = middles[piece].Y;
        bool isLevel = form.Sine == 0 && !(Math.Min(form.Start.Y, form.End.Y) <= y && y < Math.Max(form.Start.Y, form.End.Y));
        if (isLevel && form.Chord.X < 0)
        {
            foreach (int owner in touched)
            {
                left[owner] += step[owner];
            }
        }
    }

    /// <summary>Counts the turns round a point.</summary>
    public void CountAt(Point2D point) => Count(point, -1);

    private void Count(Point2D point, int own)
    {
        foreach (int owner in touched)
        {
            left[owner] = 0;
            step[owner] = 0;
            isTouched[owner] = false;
        }

        touched.Clear();
        tree.Query(new Box2D(point, point with { X = Math.Max(point.X, farRight) }), hits);
        foreach (int hit in hits)
        {
            int winding = hit == own ? Winding.OfOwn(forms[hit], point) : Winding.Of(forms[hit], point);
            if (winding != 0)
            {
                foreach (PieceUse use in cutter.UsesOf(hit))
                {
                    if (owners[use.Source] >= 0)
                    {
                        Touch(owners[use.Source]);
                        left[owners[use.Source]] += winding * use.Direction * turns[use.Source];
                    }
                }
            }
        }
    }

    private void Touch(int owner)
    {
        if (!isTouched[owner])
        {
            isTouched[owner] = true;
            touched.Add(owner);
        }
    }
}
