using FemCore2D.Geometry;
using FemCore2D.Sparse;

namespace FemCore2D.Benchmarks;

/// <summary>Matrices with the patterns of meshes.</summary>
internal static class DirectSystems
{
    /// <summary>The Laplacian of a square grid by differences.</summary>
    public static SparseMatrix<double> FivePoint(int side)
    {
        int n = side * side;
        int[] starts = new int[n + 1];
        List<int> columns = new(5 * n);
        List<double> values = new(5 * n);
        for (int i = 0; i < n; i++)
        {
            int x = i % side;
            int y = i / side;
            Put(y > 0, i - side, -1.0);
            Put(x > 0, i - 1, -1.0);
            Put(true, i, 4.0);
            Put(x < side - 1, i + 1, -1.0);
            Put(y < side - 1, i + side, -1.0);
            starts[i + 1] = columns.Count;
        }

        return new SparseMatrix<double>(SparsePattern.FromCompressedRows(n, starts, [.. columns]), values.ToArray());

        void Put(bool inside, int column, double value)
        {
            if (!inside)
                return;
            columns.Add(column);
            values.Add(value);
        }
    }

    /// <summary>
    /// A positive definite matrix with the pattern of Lagrange elements on triangles: squares cut along a diagonal chosen
    /// by chance, vertices numbered along short rows of patches as a mesher leaves them.
    /// </summary>
    public static (SparseMatrix<double> Matrix, Point2D[] Points) Triangles(int side, int degree)
    {
        int vertices = (side + 1) * (side + 1);
        Random random = new(5);
        int[] numbers = NumberByPatches(side + 1);
        Dictionary<(int, int), int> edges = [];
        List<Point2D> points = [.. new Point2D[vertices]];
        for (int v = 0; v < vertices; v++)
            points[numbers[v]] = new Point2D(v % (side + 1), v / (side + 1));
        List<int> rows = [];
        List<int> columns = [];
        List<double> values = [];
        List<int> nodes = [];
        int next = vertices;
        for (int y = 0; y < side; y++)
        {
            for (int x = 0; x < side; x++)
            {
                int a = numbers[y * (side + 1) + x];
                int b = numbers[y * (side + 1) + x + 1];
                int c = numbers[(y + 1) * (side + 1) + x + 1];
                int d = numbers[(y + 1) * (side + 1) + x];
                if (random.Next(2) == 0)
                {
                    Add(a, b, c);
                    Add(a, c, d);
                }
                else
                {
                    Add(a, b, d);
                    Add(b, c, d);
                }
            }
        }

        return (SparseMatrices.FromTriplets<double>(next, next, [.. rows], [.. columns], [.. values]), [.. points]);

        void Add(int a, int b, int c)
        {
            nodes.Clear();
            nodes.AddRange([a, b, c]);
            foreach ((int p, int q) in new[] { (a, b), (b, c), (c, a) })
            {
                (int, int) edge = (Math.Min(p, q), Math.Max(p, q));
                if (!edges.TryGetValue(edge, out int first))
                {
                    edges[edge] = first = next;
                    next += degree - 1;
                    for (int k = 1; k < degree; k++)
                        points.Add(points[edge.Item1].Towards(points[edge.Item2], k / (double)degree));
                }

                for (int k = 1; k < degree; k++)
                    nodes.Add(first + k - 1);
            }

            for (int k = 0; k < (degree - 1) * (degree - 2) / 2; k++)
            {
                points.Add(points[a].Towards(points[b].Towards(points[c], 0.5), 2.0 / 3.0));
                nodes.Add(next++);
            }

            foreach (int i in nodes)
            {
                foreach (int j in nodes)
                {
                    rows.Add(i);
                    columns.Add(j);
                    values.Add(i == j ? nodes.Count - 1 + 1e-3 : -1.0);
                }
            }
        }
    }

    private static int[] NumberByPatches(int side)
    {
        const int Patch = 32;
        int[] numbers = new int[side * side];
        int next = 0;
        for (int py = 0; py < side; py += Patch)
        {
            for (int px = 0; px < side; px += Patch)
            {
                for (int y = py; y < Math.Min(side, py + Patch); y++)
                {
                    for (int x = px; x < Math.Min(side, px + Patch); x++)
                        numbers[y * side + x] = next++;
                }
            }
        }

        return numbers;
    }
}
