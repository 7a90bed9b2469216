namespace FemCore2D.Geometry;

/// <summary>A k-d tree of points, laid out in one array, to list the points of a rectangle.</summary>
internal sealed class PointTree
{
    private readonly IReadOnlyList<Point2D> points;
    private readonly int[] order;

    public PointTree(IReadOnlyList<Point2D> points)
    {
        this.points = points;
        order = [.. Enumerable.Range(0, points.Count)];
        Arrange(0, order.Length, byX: true);
    }

    /// <summary>Whether any point of the rectangle satisfies a test.</summary>
    public bool Any(Point2D low, Point2D high, Func<int, bool> test) => Any(0, order.Length, byX: true, low, high, test);

    private bool Any(int from, int to, bool byX, Point2D low, Point2D high, Func<int, bool> test)
    {
        while (from < to)
        {
            int middle = (from + to) / 2;
            Point2D point = points[order[middle]];
            bool inX = point.X >= low.X && point.X <= high.X;
            bool inY = point.Y >= low.Y && point.Y <= high.Y;
            if (inX && inY && test(order[middle]))
                return true;
            bool reachesBelow = byX ? low.X <= point.X : low.Y <= point.Y;
            bool reachesAbove = byX ? high.X >= point.X : high.Y >= point.Y;
            byX = !byX;
            if (reachesBelow && reachesAbove)
            {
                if (Any(from, middle, byX, low, high, test))
                    return true;
                from = middle + 1;
            }
            else if (reachesBelow)
            {
                to = middle;
            }
            else
            {
                from = middle + 1;
            }
        }

        return false;
    }

    private void Arrange(int from, int to, bool byX)
    {
        if (to - from <= 1)
            return;
        Comparison<int> comparison = byX
            ? (a, b) => Compare(points[a].X, points[b].X, a, b)
            : (a, b) => Compare(points[a].Y, points[b].Y, a, b);
        order.AsSpan(from, to - from).Sort(comparison);
        int middle = (from + to) / 2;
        Arrange(from, middle, !byX);
        Arrange(middle + 1, to, !byX);
    }

    private static int Compare(double a, double b, int first, int second)
    {
        int order = a.CompareTo(b);
        return order != 0 ? order : first.CompareTo(second);
    }
}
