namespace FemCore2D.Geometry;

/// <content>Whether a point lies in a cell, by the cell's true outline.</content>
public sealed partial class Mesh
{
    /// <summary>Whether a cell contains a point, its outline of straight and arc edges included.</summary>
    /// <param name="cell">The cell.</param>
    /// <param name="point">The point, in metres.</param>
    public bool Contains(int cell, Point2D point)
    {
        bool insideChords = true;
        bool beyondChord = false;
        foreach (int edge in EdgesOf(cell))
        {
            double side = SideOfChord(edge, cell, point);
            double sweep = SweepRadiansOf(edge);
            if (sweep != 0)
            {
                bool bulgesOut = sweep > 0 == (arrays.EdgeCells[2 * edge] == cell);
                if (bulgesOut)
                {
                    beyondChord |= side < 0 && CurveOf(edge).BeyondArc(point) <= 0;
                }
                else if (side >= 0 && CurveOf(edge).BeyondArc(point) < 0)
                {
                    return false;
                }
            }

            insideChords &= side >= 0;
        }

        return insideChords | beyondChord;
    }

    /// <summary>Whether a straight cell contains a point off its outline; false for curved cells.</summary>
    internal bool ContainsInside(int cell, Point2D point)
    {
        foreach (int edge in EdgesOf(cell))
        {
            if (SweepRadiansOf(edge) != 0 || SideOfChord(edge, cell, point) <= 0)
            {
                return false;
            }
        }

        return true;
    }

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

    /// <summary>
    /// Positive when a point lies on the side of an edge's chord on which the cell lies; computed in the edge's own
    /// direction, so that both cells of an edge get exactly opposite numbers.
    /// </summary>
    private double SideOfChord(int edge, int cell, Point2D point)
    {
        Point2D from = arrays.Vertices[arrays.EdgeVertices[2 * edge]];
        Point2D to = arrays.Vertices[arrays.EdgeVertices[(2 * edge) + 1]];
        double left = (from - point).Cross(to - point);
        return arrays.EdgeCells[2 * edge] == cell ? left : -left;
    }
}
