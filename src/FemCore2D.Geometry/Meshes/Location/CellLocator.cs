namespace FemCore2D.Geometry;

/// <summary>
/// Finds the cell of a mesh in which a point lies, in logarithmic time: immutable, safe to use from many threads.
/// </summary>
/// <remarks>
/// A cell reaches to its true outline: a point between the chord and the arc of a curved edge belongs to the cell that
/// bends over it. A cell contains its outline; where several cells contain a point, the lowest-numbered is meant.
/// On which side of a straight edge a point lies is decided exactly, and both cells of an arc decide by one and the
/// same computed number, so that no gap opens between cells.
/// </remarks>
public sealed class CellLocator
{
    private readonly BoxTree tree;

    /// <summary>Prepares the search: sorts the cells of a mesh into a tree of boxes.</summary>
    /// <param name="mesh">The mesh.</param>
    public CellLocator(Mesh mesh)
    {
        ArgumentNullException.ThrowIfNull(mesh);
        Mesh = mesh;
        var boxes = new Box2D[mesh.CellCount];
        for (int cell = 0; cell < boxes.Length; cell++)
        {
            boxes[cell] = mesh.BoxOf(cell);
        }

        tree = new BoxTree(boxes);
    }

    /// <summary>The mesh.</summary>
    public Mesh Mesh { get; }

    /// <summary>The cell that contains a point, or -1 when none does.</summary>
    /// <param name="point">The point, in metres.</param>
    public int CellAt(Point2D point)
    {
        var search = new ContainingCell(Mesh, point);
        tree.VisitAt(point, ref search);
        return search.Lowest;
    }

    /// <summary>The cell that contains each of many points, or -1 where none does.</summary>
    /// <param name="points">The points, in metres.</param>
    /// <param name="cells">Receives a cell for each point.</param>
    /// <param name="reach">
    /// A distance in metres: a point in no cell, but no farther than this from one, is given to the nearest. Zero by
    /// default. Points sampled on the rim of a mesh are outside of it by as much as their rounding error.
    /// </param>
    /// <exception cref="ArgumentException"><paramref name="cells"/> is shorter than <paramref name="points"/>.</exception>
    /// <exception cref="ArgumentOutOfRangeException"><paramref name="reach"/> is negative or not a number.</exception>
    public void CellsAt(ReadOnlySpan<Point2D> points, Span<int> cells, double reach = 0)
    {
        if (cells.Length < points.Length)
        {
            throw new ArgumentException(
                $"There are {points.Length} points but room for {cells.Length} cells only.", nameof(cells));
        }

        ArgumentOutOfRangeException.ThrowIfNegative(reach);
        if (double.IsNaN(reach))
        {
            throw new ArgumentOutOfRangeException(nameof(reach), "The reach is not a number.");
        }

        int last = -1;
        for (int i = 0; i < points.Length; i++)
        {
            // Neighbouring points mostly share a cell, and one that contains a point off its outline is the only one.
            if (last < 0 || !Mesh.ContainsInside(last, points[i]))
            {
                last = CellAt(points[i]);
                if (last < 0 && reach > 0)
                {
                    last = NearestWithin(points[i], reach).Cell;
                }
            }

            cells[i] = last;
        }
    }

    /// <summary>The cell that contains a point or else lies nearest to it.</summary>
    /// <param name="point">The point, in metres, anywhere in the plane.</param>
    /// <param name="distance">The distance from the point to the cell in metres, zero inside.</param>
    /// <returns>The cell; the lowest-numbered of several; -1 in a mesh without cells or for a point that is not finite.</returns>
    public int NearestCell(Point2D point, out double distance)
    {
        int cell = CellAt(point);
        if (cell >= 0)
        {
            distance = 0;
            return cell;
        }

        (cell, distance) = NearestWithin(point, double.PositiveInfinity);
        return cell;
    }

    /// <summary>Whether more than one cell contains a point; used where overlap is a fault.</summary>
    internal int CountAt(Point2D point)
    {
        var search = new ContainingCell(Mesh, point);
        tree.VisitAt(point, ref search);
        return search.Count;
    }

    private (int Cell, double Distance) NearestWithin(Point2D point, double reach)
    {
        if (!point.IsFinite)
        {
            return (-1, double.PositiveInfinity);
        }

        var search = new NearestOutline(Mesh, point, reach);
        tree.VisitNear(point, ref search);
        return (search.Cell, search.Distance);
    }

    private struct ContainingCell(Mesh mesh, Point2D point) : BoxTree.IVisitor
    {
        public int Lowest { get; private set; } = -1;

        public int Count { get; private set; }

        public void Visit(int item)
        {
            if (mesh.Contains(item, point))
            {
                Count++;
                Lowest = Lowest < 0 ? item : Math.Min(Lowest, item);
            }
        }
    }

    private struct NearestOutline(Mesh mesh, Point2D point, double reach) : BoxTree.INearVisitor
    {
        // The sum of rounding errors in a distance must not cut off the cell that attains it.
        private const double Slack = 1 + 1e-12;

        public int Cell { get; private set; } = -1;

        public double Distance { get; private set; } = reach;

        public readonly double ReachSquared => Distance * Distance * Slack;

        public void Visit(int item)
        {
            double distance = mesh.DistanceToOutline(item, point);
            if (distance < Distance || (distance == Distance && (Cell < 0 || item < Cell)))
            {
                Cell = item;
                Distance = distance;
            }
        }
    }
}
