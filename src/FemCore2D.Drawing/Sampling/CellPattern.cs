using FemCore2D.Geometry;

namespace FemCore2D.Drawing;

/// <summary>
/// A division of the reference cell into facets that meets given numbers of steps along its edges, so that cells
/// divided differently still fit together without a gap.
/// </summary>
/// <param name="Reference">The points; corners first.</param>
/// <param name="Places">For each point the local edge on which it lies and its step along it; edge -1 in the interior. Corner i is step 0 of edge i.</param>
/// <param name="Facets">Three points a facet, counterclockwise.</param>
internal sealed record CellPattern(Point2D[] Reference, (int Edge, int Step)[] Places, int[] Facets)
{
    /// <summary>Makes the pattern for a cell.</summary>
    /// <param name="kind">The shape of the cell.</param>
    /// <param name="steps">The number of steps along each edge, each a power of two.</param>
    public static CellPattern Make(CellKind kind, ReadOnlySpan<int> steps)
    {
        int n = 1;
        foreach (int count in steps)
            n = Math.Max(n, count);

        var points = new List<Point2D>();
        var places = new List<(int Edge, int Step)>();
        var known = new Dictionary<(int, int), int>();
        int corners = kind == CellKind.Triangle ? 3 : 4;
        for (int i = 0; i < corners; i++)
        {
            known[(i, 0)] = i;
            points.Add(PointOnEdge(kind, i, 0));
            places.Add((i, 0));
        }

        int[,] grid = new int[n + 1, n + 1];
        for (int j = 0; j <= n; j++)
        {
            for (int i = 0; i <= (kind == CellKind.Triangle ? n - j : n); i++)
            {
                (int edge, int step) = EdgeOf(kind, i, j, n);
                if (edge < 0)
                {
                    grid[i, j] = points.Count;
                    points.Add(new Point2D((double)i / n, (double)j / n));
                    places.Add((-1, 0));
                    continue;
                }

                int kept = Snap(step, n, steps[edge]);
                (int, int) key = kept == steps[edge] ? ((edge + 1) % corners, 0) : (edge, kept);
                if (!known.TryGetValue(key, out int point))
                {
                    point = points.Count;
                    known[key] = point;
                    points.Add(PointOnEdge(kind, edge, (double)kept / steps[edge]));
                    places.Add(key);
                }

                grid[i, j] = point;
            }
        }

        return new CellPattern([.. points], [.. places], Triangulate(kind, grid, n));
    }

    private static int[] Triangulate(CellKind kind, int[,] grid, int n)
    {
        var facets = new List<int>();
        for (int j = 0; j < n; j++)
        {
            for (int i = 0; i < (kind == CellKind.Triangle ? n - j : n); i++)
            {
                Add(grid[i, j], grid[i + 1, j], grid[i, j + 1]);
                if (kind == CellKind.Quadrilateral || i + j < n - 1)
                    Add(grid[i + 1, j], grid[i + 1, j + 1], grid[i, j + 1]);
            }
        }

        return [.. facets];

        void Add(int a, int b, int c)
        {
            // Points drawn together onto a coarser edge leave facets of no area.
            if (a == b || b == c || c == a)
                return;
            facets.Add(a);
            facets.Add(b);
            facets.Add(c);
        }
    }

    private static (int Edge, int Step) EdgeOf(CellKind kind, int i, int j, int n)
    {
        if (kind == CellKind.Triangle)
        {
            if (j == 0 && i < n)
                return (0, i);
            if (i + j == n && i > 0)
                return (1, j);
            return i == 0 ? (2, n - j) : (-1, 0);
        }

        if (j == 0 && i < n)
            return (0, i);
        if (i == n && j < n)
            return (1, j);
        if (j == n && i > 0)
            return (2, n - i);
        return i == 0 ? (3, n - j) : (-1, 0);
    }

    /// <summary>The step of the coarser edge to which a step of the finer division goes; next to a corner, the corner.</summary>
    private static int Snap(int step, int fine, int coarse)
    {
        int ratio = fine / coarse;
        int below = step / ratio;
        int rest = 2 * (step % ratio);
        bool goesUp = rest > ratio || (rest == ratio && step == fine - 1 && step > 1);
        return goesUp ? below + 1 : below;
    }

    private static Point2D PointOnEdge(CellKind kind, int edge, double t) => (kind, edge) switch
    {
        (_, 0) => new Point2D(t, 0),
        (CellKind.Triangle, 1) => new Point2D(1 - t, t),
        (CellKind.Triangle, _) => new Point2D(0, 1 - t),
        (_, 1) => new Point2D(1, t),
        (_, 2) => new Point2D(1 - t, 1),
        _ => new Point2D(0, 1 - t),
    };
}
