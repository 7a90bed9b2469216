namespace FemCore2D.Geometry;

/// <content>Whether a point lies in a cell, by the cell's true outline.</content>
public sealed partial class Mesh
{
    /// <summary>Whether a cell contains a point, its outline of straight and arc edges included.</summary>
    /// <param name="cell">The cell.</param>
    /// <param name="point">The point, in metres.</param>
    public bool Contains(int cell, Point2D point) =>
        IsCurved(cell) ? IsWithinArcs(cell, point) : LeastSide(cell, point) >= 0;

    /// <summary>Whether a straight cell contains a point off its outline; false for curved cells.</summary>
    internal bool ContainsInside(int cell, Point2D point) => LeastSide(cell, point) > 0 && !IsCurved(cell);

    /// <summary>The distance from a point to the outline of a cell.</summary>
    internal double DistanceToOutline(int cell, Point2D point)
    {
        double distance = double.PositiveInfinity;
        foreach (int edge in EdgesOf(cell))
        {
            distance = Math.Min(distance, CurveOf(edge).DistanceTo(point));
        }

        return distance;
    }

    /// <summary>Positive where a point lies within all chords of a cell, zero where on one: exact in its sign.</summary>
    private double LeastSide(int cell, Point2D point)
    {
        ReadOnlySpan<int> corners = VerticesOf(cell);
        double least = double.PositiveInfinity;
        Point2D start = arrays.Vertices[corners[^1]];
        foreach (int corner in corners)
        {
            Point2D end = arrays.Vertices[corner];
            least = Math.Min(least, Predicates.Orientation(start, end, point));
            if (!(least >= 0))
            {
                break;
            }

            start = end;
        }

        return least;
    }

    /// <summary>
    /// A curved cell is the area within its chords, with that between chord and arc added where the arc bulges out of
    /// it and taken away where it bulges in. The chord itself counts with the area it borders from the cell that the
    /// arc bulges into.
    /// </summary>
    private bool IsWithinArcs(int cell, Point2D point)
    {
        bool isWithinChords = true;
        bool isBeyondChord = false;
        foreach (int edge in EdgesOf(cell))
        {
            bool isOnLeft = arrays.EdgeCells[2 * edge] == cell;
            OutlinePiece curve = CurveOf(edge);
            double left = Predicates.Orientation(curve.Start, curve.End, point);
            double side = isOnLeft ? left : -left;
            isWithinChords &= side >= 0;
            if (curve.IsStraight)
            {
                continue;
            }

            bool bulgesOut = curve.SweepRadians > 0 == isOnLeft;
            if (bulgesOut)
            {
                isBeyondChord |= side < 0 && curve.BeyondArc(point) <= 0;
            }
            else if (side >= 0 && curve.BeyondArc(point) < 0)
            {
                return false;
            }
        }

        return isWithinChords | isBeyondChord;
    }
}
