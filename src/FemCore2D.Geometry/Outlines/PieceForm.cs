namespace FemCore2D.Geometry;

/// <summary>
/// A piece of at most half a turn as one equation that holds for lines and circles alike, without a centre.
/// </summary>
/// <remarks>
/// With A and B the ends and h half the sweep, a point P is on the line or circle where
/// <c>cos h ((B - A) x (P - A)) - sin h ((A - P) . (B - P)) = 0</c>: the inscribed angle theorem of Euclid (III.21).
/// The expression is positive on the left. A piece is also the rational curve of degree 2 in Bernstein form with
/// weights 1, cos h, 1, so that another such equation along it is a polynomial of degree 2 only.
/// </remarks>
internal readonly struct PieceForm
{
    public PieceForm(Point2D start, Point2D end, double sweep)
    {
        Start = start;
        End = end;
        Sweep = sweep;
        Chord = end - start;
        Length = Chord.Length;
        (Sine, Cosine) = sweep == 0 ? (0.0, 1.0) : Math.SinCos(0.5 * sweep);
    }

    public Point2D Start { get; }

    public Point2D End { get; }

    public double Sweep { get; }

    public Vector2D Chord { get; }

    /// <summary>The length of the chord.</summary>
    public double Length { get; }

    public double Sine { get; }

    public double Cosine { get; }

    /// <summary>Positive on the left of the line or circle, negative on the right; near it, the distance times the chord.</summary>
    public double Side(Point2D p) => (Cosine * Chord.Cross(p - Start)) - (Sine * (Start - p).Dot(End - p));

    /// <summary>The distance of a nearby point from the line or circle, positive on the left.</summary>
    public double DistanceTo(Point2D p) => Side(p) / Length;

    /// <summary>Whether a point of the line or circle lies between the ends.</summary>
    public bool Spans(Point2D p)
    {
        if (Sine == 0)
        {
            double along = Chord.Dot(p - Start);
            return along >= 0 && along <= Length * Length;
        }

        double cross = Chord.Cross(p - Start);
        return Sine > 0 ? cross <= 0 : cross >= 0;
    }

    /// <summary>The fraction of the length at which a point of the piece lies.</summary>
    public double FractionOf(Point2D p)
    {
        if (Sine == 0)
        {
            return Chord.Dot(p - Start) / (Length * Length);
        }

        // A chord is the sine of half its sweep, to scale; the nearer end keeps that well away from a right angle.
        double half = Math.Abs(0.5 * Sweep);
        double fromStart = p.DistanceTo(Start);
        double fromEnd = p.DistanceTo(End);
        return fromStart < fromEnd
            ? Math.Asin(Math.Min(1, fromStart / Length * Math.Abs(Sine))) / half
            : 1 - (Math.Asin(Math.Min(1, fromEnd / Length * Math.Abs(Sine))) / half);
    }

    /// <summary>The point with parameter <paramref name="u"/> of the rational form, and the weight there.</summary>
    public (Point2D Point, double Weight) AtParameter(double u)
    {
        double v = 1 - u;
        double weight = (v * v) + (2 * u * v * Cosine) + (u * u);
        Vector2D rightNormal = -Chord.LeftNormal;
        Vector2D middle = (0.5 * Cosine * Chord) + (0.5 * Sine * rightNormal);
        return (Start + (((2 * u * v * middle) + (u * u * Chord)) / weight), weight);
    }
}
