namespace FemCore2D.Geometry;

/// <summary>Finds which of some points coincide within a tolerance.</summary>
internal static class VertexMerge
{
    /// <summary>For each point the lowest-numbered one with which it coincides, directly or by way of others.</summary>
    /// <param name="points">All points.</param>
    /// <param name="candidates">The points that may coincide with others; the rest stay alone.</param>
    /// <param name="tolerance">The distance in metres within which two are one.</param>
    public static int[] Representatives(Point2D[] points, int[] candidates, double tolerance)
    {
        int[] representatives = new int[points.Length];
        for (int i = 0; i < representatives.Length; i++)
        {
            representatives[i] = i;
        }

        var boxes = new Box2D[candidates.Length];
        for (int i = 0; i < boxes.Length; i++)
        {
            boxes[i] = new Box2D(points[candidates[i]], points[candidates[i]]).Widened(tolerance);
        }

        var tree = new BoxTree(boxes);
        foreach (int candidate in candidates)
        {
            var union = new Union(points, candidates, representatives, candidate, tolerance);
            tree.VisitAt(points[candidate], ref union);
        }

        for (int i = 0; i < representatives.Length; i++)
        {
            representatives[i] = Root(representatives, i);
        }

        return representatives;
    }

    private static int Root(int[] representatives, int point)
    {
        while (representatives[point] != point)
        {
            representatives[point] = representatives[representatives[point]];
            point = representatives[point];
        }

        return point;
    }

    private readonly struct Union(
        Point2D[] points, int[] candidates, int[] representatives, int point, double tolerance) : BoxTree.IVisitor
    {
        public void Visit(int item)
        {
            int other = candidates[item];
            if (other < point && points[other].DistanceTo(points[point]) <= tolerance)
            {
                int first = Root(representatives, other);
                int second = Root(representatives, point);
                representatives[Math.Max(first, second)] = Math.Min(first, second);
            }
        }
    }
}
