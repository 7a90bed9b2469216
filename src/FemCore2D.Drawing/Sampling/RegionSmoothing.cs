using FemCore2D.Geometry;

namespace FemCore2D.Drawing;

/// <summary>
/// Evens out the jumps of a scalar between cells of one region: at corners and middles of edges all cells take the
/// mean of their values, and a quadratic correction carries the change into each cell. Between regions nothing is changed.
/// </summary>
internal sealed class RegionSmoothing
{
    private const int MostNodes = 8;

    private static readonly Point2D[] TriangleNodes =
        [new(0, 0), new(1, 0), new(0, 1), new(0.5, 0), new(0.5, 0.5), new(0, 0.5)];

    private static readonly Point2D[] QuadrilateralNodes =
        [new(0, 0), new(1, 0), new(1, 1), new(0, 1), new(0.5, 0), new(1, 0.5), new(0.5, 1), new(0, 0.5)];

    private readonly CellScalar scalar;
    private readonly float[] corrections;

    private RegionSmoothing(CellScalar scalar, float[] corrections)
    {
        this.scalar = scalar;
        this.corrections = corrections;
    }

    /// <summary>The evened scalar; in cells that do not reach into the window it is left as it is.</summary>
    public static CellScalar Of(CellScalar scalar, Box2D window)
    {
        Mesh mesh = scalar.Mesh;
        double[] values = ReadNodes(scalar, window);
        var means = new Means(mesh);
        for (int cell = 0; cell < mesh.CellCount; cell++)
            means.Add(cell, values.AsSpan(cell * MostNodes));
        var corrections = new float[values.Length];
        for (int cell = 0; cell < mesh.CellCount; cell++)
            means.Subtract(cell, values.AsSpan(cell * MostNodes), corrections.AsSpan(cell * MostNodes));
        var smoothing = new RegionSmoothing(scalar, corrections);
        return new CellScalar(mesh, Math.Max(2, scalar.Degree), smoothing.Evaluate);
    }

    private static double[] ReadNodes(CellScalar scalar, Box2D window)
    {
        Mesh mesh = scalar.Mesh;
        double[] values = new double[mesh.CellCount * MostNodes];
        Array.Fill(values, double.NaN);
        for (int cell = 0; cell < mesh.CellCount; cell++)
        {
            if (!Sight.Reaches(mesh, cell, window))
                continue;
            Point2D[] nodes = mesh.KindOf(cell) == CellKind.Triangle ? TriangleNodes : QuadrilateralNodes;
            scalar.Evaluator(cell, nodes, values.AsSpan(cell * MostNodes, nodes.Length));
        }

        return values;
    }

    private void Evaluate(int cell, ReadOnlySpan<Point2D> reference, Span<double> values)
    {
        scalar.Evaluator(cell, reference, values);
        ReadOnlySpan<float> change = corrections.AsSpan(cell * MostNodes, MostNodes);
        bool isTriangle = scalar.Mesh.KindOf(cell) == CellKind.Triangle;
        for (int i = 0; i < reference.Length; i++)
            values[i] += isTriangle ? OnTriangle(reference[i], change) : OnQuadrilateral(reference[i], change);
    }

    private static double OnTriangle(Point2D reference, ReadOnlySpan<float> change)
    {
        (double x, double y) = reference;
        double z = 1 - x - y;
        return (z * ((2 * z) - 1) * change[0]) + (x * ((2 * x) - 1) * change[1]) + (y * ((2 * y) - 1) * change[2])
            + (4 * ((z * x * change[3]) + (x * y * change[4]) + (y * z * change[5])));
    }

    private static double OnQuadrilateral(Point2D reference, ReadOnlySpan<float> change)
    {
        // Corners are bilinear less half of each neighbouring edge function; edges are bubbles along their side.
        (double x, double y) = reference;
        double low = 4 * x * (1 - x) * (1 - y);
        double right = 4 * y * (1 - y) * x;
        double high = 4 * x * (1 - x) * y;
        double left = 4 * y * (1 - y) * (1 - x);
        return (change[0] * (((1 - x) * (1 - y)) - ((low + left) / 2))) + (change[1] * ((x * (1 - y)) - ((low + right) / 2)))
            + (change[2] * ((x * y) - ((high + right) / 2))) + (change[3] * (((1 - x) * y) - ((high + left) / 2)))
            + (change[4] * low) + (change[5] * right) + (change[6] * high) + (change[7] * left);
    }

    /// <summary>The means at the corners and edges of a mesh, apart for each region.</summary>
    private sealed class Means
    {
        private readonly Mesh mesh;
        private readonly int[] firstAtVertex;
        private readonly List<(int Region, int Next, int Count, double Mean)> corners = [];
        private readonly double[] edgeValues;

        public Means(Mesh mesh)
        {
            this.mesh = mesh;
            firstAtVertex = new int[mesh.VertexCount];
            Array.Fill(firstAtVertex, -1);
            edgeValues = new double[2 * mesh.EdgeCount];
            Array.Fill(edgeValues, double.NaN);
        }

        public void Add(int cell, ReadOnlySpan<double> values)
        {
            ReadOnlySpan<int> vertices = mesh.VerticesOf(cell);
            ReadOnlySpan<int> edges = mesh.EdgesOf(cell);
            for (int i = 0; i < vertices.Length; i++)
            {
                edgeValues[(2 * edges[i]) + SideOf(cell, edges[i])] = values[vertices.Length + i];
                if (!double.IsFinite(values[i]))
                    continue;
                int at = Find(vertices[i], mesh.CellRegions[cell]);
                if (at < 0)
                {
                    corners.Add((mesh.CellRegions[cell], firstAtVertex[vertices[i]], 1, values[i]));
                    firstAtVertex[vertices[i]] = corners.Count - 1;
                    continue;
                }

                (int region, int next, int count, double mean) = corners[at];
                corners[at] = (region, next, count + 1, mean + ((values[i] - mean) / (count + 1)));
            }
        }

        public void Subtract(int cell, ReadOnlySpan<double> values, Span<float> corrections)
        {
            ReadOnlySpan<int> vertices = mesh.VerticesOf(cell);
            ReadOnlySpan<int> edges = mesh.EdgesOf(cell);
            for (int i = 0; i < vertices.Length; i++)
            {
                if (double.IsFinite(values[i]))
                    corrections[i] = (float)(corners[Find(vertices[i], mesh.CellRegions[cell])].Mean - values[i]);
                (int left, int right) = mesh.CellsOf(edges[i]);
                int other = left == cell ? right : left;
                if (other < 0 || mesh.CellRegions[other] != mesh.CellRegions[cell])
                    continue;
                double change = (edgeValues[2 * edges[i]] - edgeValues[(2 * edges[i]) + 1]) / 2;
                if (double.IsFinite(change))
                    corrections[vertices.Length + i] = (float)(left == cell ? -change : change);
            }
        }

        private int SideOf(int cell, int edge) => mesh.CellsOf(edge).Left == cell ? 0 : 1;

        private int Find(int vertex, int region)
        {
            int at = firstAtVertex[vertex];
            while (at >= 0 && corners[at].Region != region)
                at = corners[at].Next;
            return at;
        }
    }
}
