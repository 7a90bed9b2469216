namespace FemCore2D.Geometry;

/// <summary>The straight line or arc of a piece, by the fraction of its length.</summary>
/// <param name="Start">Where it begins.</param>
/// <param name="End">Where it ends.</param>
/// <param name="Sweep">The angle that its arc sweeps, positive counterclockwise, 0 when straight; at most a half turn.</param>
internal readonly record struct PieceCurve(Point2D Start, Point2D End, double Sweep)
{
    public double Length
    {
        get
        {
            double chord = Start.DistanceTo(End);
            double half = Math.Abs(Sweep) / 2;
            return half == 0 ? chord : chord * half / Math.Sin(half);
        }
    }

    /// <summary>The radius of the arc; infinite when straight.</summary>
    public double Radius => Sweep == 0 ? double.PositiveInfinity : Start.DistanceTo(End) / (2 * Math.Sin(Math.Abs(Sweep) / 2));

    /// <summary>The centre of the arc.</summary>
    public Point2D Centre => Start.Towards(End, 0.5) + ((0.5 / Math.Tan(Sweep / 2)) * (End - Start).LeftNormal);

    /// <summary>The point at a fraction of the length.</summary>
    public Point2D PointAt(double fraction)
    {
        if (fraction <= 0)
            return Start;
        if (fraction >= 1)
            return End;
        if (Sweep == 0)
            return fraction <= 0.5 ? Start.Towards(End, fraction) : End.Towards(Start, 1 - fraction);

        // From the nearer end along the chord of the part, which needs no centre and so bears arcs of any radius.
        return fraction <= 0.5
            ? Start + Turned(End - Start, fraction, -1)
            : End + Turned(Start - End, 1 - fraction, 1);
    }

    /// <summary>The unit tangent at the start, or at the end pointing back into the piece.</summary>
    public Vector2D Departure(bool atEnd)
    {
        Vector2D chord = atEnd ? Start - End : End - Start;
        (double sine, double cosine) = Math.SinCos(atEnd ? Sweep / 2 : -Sweep / 2);
        Vector2D turned = new((cosine * chord.X) - (sine * chord.Y), (sine * chord.X) + (cosine * chord.Y));
        return turned / turned.Length;
    }

    /// <summary>The fraction of the piece, seen from its start, whose chord has a length.</summary>
    public double FractionAtDistance(double distance)
    {
        if (Sweep == 0)
            return distance / Start.DistanceTo(End);
        double ratio = Math.Min(1, distance / (2 * Radius));
        return 2 * Math.Asin(ratio) / Math.Abs(Sweep);
    }

    private Vector2D Turned(Vector2D chord, double fraction, int sign)
    {
        double scale = Math.Sin(fraction * Sweep / 2) / Math.Sin(Sweep / 2);
        (double sine, double cosine) = Math.SinCos(sign * (1 - fraction) * Sweep / 2);
        return new Vector2D(
            scale * ((cosine * chord.X) - (sine * chord.Y)), scale * ((sine * chord.X) + (cosine * chord.Y)));
    }
}
