using FemCore2D.Geometry;

namespace FemCore2D.Drawing;

/// <summary>Divides the cells of a mesh into facets and gathers the values of a scalar on them.</summary>
internal sealed class FacetMeshBuilder
{
    private const double SameWithin = 1e-9;

    private readonly CellScalar scalar;
    private readonly Mesh mesh;
    private readonly int[] steps;
    private readonly int[] edgeOffsets;
    private readonly Dictionary<int, CellPattern> patterns = [];
    private readonly List<Point2D> sites = [];
    private readonly List<int> sampleSites = [];
    private readonly List<int> sampleRegions = [];
    private readonly List<double> sampleValues = [];
    private readonly List<int> facets = [];

    private FacetMeshBuilder(CellScalar scalar, double pixelsPerMetre)
    {
        this.scalar = scalar;
        mesh = scalar.Mesh;
        steps = EdgeDivision.Choose(mesh, scalar.Degree, pixelsPerMetre);
        edgeOffsets = new int[steps.Length];
        int count = mesh.VertexCount;
        for (int edge = 0; edge < steps.Length; edge++)
        {
            edgeOffsets[edge] = count;
            count += steps[edge] - 1;
        }

        sites.AddRange(mesh.Vertices);
        sites.AddRange(Enumerable.Repeat(default(Point2D), count - mesh.VertexCount));
    }

    /// <summary>Builds the facets of the cells that reach into a window.</summary>
    /// <param name="scalar">What is drawn.</param>
    /// <param name="pixelsPerMetre">The scale of the picture, which tells how fine the facets must be.</param>
    /// <param name="window">The part of the plane that is seen.</param>
    /// <param name="averages">Whether cells of one region that differ at a shared point get their mean there.</param>
    public static FacetMesh Build(CellScalar scalar, double pixelsPerMetre, Box2D window, bool averages)
    {
        bool evens = averages && scalar.Degree > 0 && !scalar.IsContinuous;
        var builder = new FacetMeshBuilder(evens ? RegionSmoothing.Of(scalar, window) : scalar, pixelsPerMetre);
        for (int cell = 0; cell < builder.mesh.CellCount; cell++)
        {
            if (Sight.Reaches(builder.mesh, cell, window))
                builder.AddCell(cell);
        }

        return builder.Finish(evens);
    }

    private void AddCell(int cell)
    {
        CellPattern pattern = PatternOf(cell);
        int first = sampleValues.Count;
        int count = pattern.Reference.Length;
        double[] rented = System.Buffers.ArrayPool<double>.Shared.Rent(count);
        Span<double> values = rented.AsSpan(0, count);
        scalar.Evaluator(cell, pattern.Reference, values);
        sampleValues.AddRange(values);
        System.Buffers.ArrayPool<double>.Shared.Return(rented);

        var shape = new CellShape(mesh, cell);
        ReadOnlySpan<int> corners = mesh.VerticesOf(cell);
        ReadOnlySpan<int> edges = mesh.EdgesOf(cell);
        int region = mesh.CellRegions[cell];
        for (int i = 0; i < count; i++)
        {
            sampleRegions.Add(region);
            (int local, int step) = pattern.Places[i];
            if (i < corners.Length)
            {
                sampleSites.Add(corners[i]);
            }
            else if (local < 0)
            {
                sampleSites.Add(sites.Count);
                sites.Add(shape.PlaceOf(pattern.Reference[i]));
            }
            else
            {
                int edge = edges[local];
                bool isForward = mesh.EndsOf(edge).From == corners[local];
                int site = edgeOffsets[edge] + (isForward ? step : steps[edge] - step) - 1;
                sampleSites.Add(site);
                sites[site] = shape.PlaceOf(pattern.Reference[i]);
            }
        }

        foreach (int point in pattern.Facets)
            facets.Add(first + point);
    }

    private CellPattern PatternOf(int cell)
    {
        ReadOnlySpan<int> edges = mesh.EdgesOf(cell);
        Span<int> counts = stackalloc int[edges.Length];
        int key = edges.Length;
        for (int i = 0; i < edges.Length; i++)
        {
            counts[i] = steps[edges[i]];
            key = (key << 3) | System.Numerics.BitOperations.Log2((uint)counts[i]);
        }

        if (!patterns.TryGetValue(key, out CellPattern? pattern))
        {
            pattern = CellPattern.Make(mesh.KindOf(cell), counts);
            patterns.Add(key, pattern);
        }

        return pattern;
    }

    private FacetMesh Finish(bool averages)
    {
        (double lowest, double highest) = RangeOf(sampleValues);
        double tolerance = SameWithin * (highest - lowest);
        int[] sampleNodes = Merge(averages, tolerance, out List<int> nodeSites, out List<double> values);
        (double low, double high) = RangeOf(values);

        // A facet with a corner that has no value is a hole in the picture.
        var kept = new List<int>(facets.Count);
        for (int i = 0; i < facets.Count; i += 3)
        {
            int a = sampleNodes[facets[i]];
            int b = sampleNodes[facets[i + 1]];
            int c = sampleNodes[facets[i + 2]];
            if (a >= 0 && b >= 0 && c >= 0)
                kept.AddRange([a, b, c]);
        }

        int[] facetNodes = [.. kept];
        int[] places = [.. nodeSites];
        (int[] sideEdges, int[] edgeSides) = FacetEdges.Number(facetNodes, places, sites.Count);
        return new FacetMesh
        {
            Sites = [.. sites],
            NodeSites = places,
            Values = [.. values],
            Facets = facetNodes,
            SideEdges = sideEdges,
            EdgeSides = edgeSides,
            Minimum = low,
            Maximum = high,
        };
    }

    private static (double Low, double High) RangeOf(List<double> all)
    {
        double low = double.PositiveInfinity;
        double high = double.NegativeInfinity;
        foreach (double value in all)
        {
            if (double.IsFinite(value))
            {
                low = Math.Min(low, value);
                high = Math.Max(high, value);
            }
        }

        return low <= high ? (low, high) : (double.NaN, double.NaN);
    }

    private int[] Merge(bool averages, double tolerance, out List<int> nodeSites, out List<double> values)
    {
        int[] firstAt = new int[sites.Count];
        Array.Fill(firstAt, -1);
        nodeSites = [];
        values = [];
        var next = new List<int>();
        var regions = new List<int>();
        var counts = new List<int>();
        int[] sampleNodes = new int[sampleValues.Count];
        for (int sample = 0; sample < sampleNodes.Length; sample++)
        {
            double value = sampleValues[sample];
            int site = sampleSites[sample];
            int region = sampleRegions[sample];
            if (!double.IsFinite(value))
            {
                sampleNodes[sample] = -1;
                continue;
            }

            int node = firstAt[site];
            while (node >= 0 && (averages ? regions[node] != region : !(Math.Abs(values[node] - value) <= tolerance)))
                node = next[node];
            if (node < 0)
            {
                node = values.Count;
                nodeSites.Add(site);
                values.Add(value);
                regions.Add(region);
                counts.Add(1);
                next.Add(firstAt[site]);
                firstAt[site] = node;
            }
            else if (averages)
            {
                counts[node]++;
                values[node] += (value - values[node]) / counts[node];
            }

            sampleNodes[sample] = node;
        }

        if (averages)
            JoinRegions(sampleNodes, firstAt, next, values, tolerance);
        return sampleNodes;
    }

    /// <summary>Where the means of two regions agree the scalar is continuous across them: they share a node.</summary>
    private static void JoinRegions(int[] sampleNodes, int[] firstAt, List<int> next, List<double> values, double tolerance)
    {
        int[] alias = [.. Enumerable.Range(0, values.Count)];
        foreach (int first in firstAt)
        {
            for (int node = first; node >= 0; node = next[node])
            {
                for (int other = first; other != node; other = next[other])
                {
                    if (alias[other] == other && Math.Abs(values[other] - values[node]) <= tolerance)
                    {
                        alias[node] = other;
                        break;
                    }
                }
            }
        }

        foreach (ref int node in sampleNodes.AsSpan())
        {
            if (node >= 0)
                node = alias[node];
        }
    }
}
