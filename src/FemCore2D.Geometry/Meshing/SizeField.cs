using System.Runtime.InteropServices;

namespace FemCore2D.Geometry;

/// <summary>
/// The wanted edge length at every place: the smallest over all sources of their size plus the slope times the
/// distance, and at most a cap. A quadtree keeps for each square the few sources that matter in it.
/// </summary>
internal sealed class SizeField
{
    private const int FewSources = 6;
    private const int ManySources = 12;
    private const int LargestDepth = 40;

    private readonly SizeSource[] sources;
    private readonly double slope;
    private readonly double cap;
    private readonly Point2D low;
    private readonly double side;
    private readonly List<Node> nodes = [];
    private readonly List<int> kept = [];
    private Node[] tree = [];
    private int[] keptSources = [];

    public SizeField(IEnumerable<SizeSource> sources, double growth, double cap, Point2D low, Point2D high)
    {
        this.sources = [.. sources];
        this.cap = cap;
        slope = growth - 1;
        side = Math.Max(high.X - low.X, high.Y - low.Y);
        this.low = low;
        nodes.Add(default);
        Divide(0, new Point2D(low.X + (side / 2), low.Y + (side / 2)), side / 2, [.. Enumerable.Range(0, this.sources.Length)], 0);
        tree = [.. nodes];
        keptSources = [.. kept];
    }

    /// <summary>A square: the first of its four parts or, where it is whole, the sources that matter in it.</summary>
    private struct Node
    {
        public int FirstChild;
        public int FirstSource;
        public int SourceCount;
    }

    /// <summary>The wanted edge length at a point, not above the cap of its region.</summary>
    public double At(Point2D point, double regionCap)
    {
        double x = Math.Clamp((point.X - low.X) / side, 0, 1);
        double y = Math.Clamp((point.Y - low.Y) / side, 0, 1);
        int index = 0;
        while (tree[index].FirstChild > 0)
        {
            x *= 2;
            y *= 2;
            int right = x >= 1 ? 1 : 0;
            int upper = y >= 1 ? 1 : 0;
            x -= right;
            y -= upper;
            index = tree[index].FirstChild + right + (2 * upper);
        }

        double size = Math.Min(cap, regionCap);
        ref readonly Node node = ref tree[index];
        for (int i = 0; i < node.SourceCount; i++)
        {
            ref readonly SizeSource source = ref sources[keptSources[node.FirstSource + i]];
            if (source.Size < size)
                size = Math.Min(size, source.Size + (slope * source.DistanceTo(point)));
        }

        return size;
    }

    private void Divide(int index, Point2D centre, double half, int[] candidates, int depth)
    {
        double reach = slope * half * Math.Sqrt(2);
        double atCentre = cap;
        Span<double> values = candidates.Length <= 256 ? stackalloc double[candidates.Length] : new double[candidates.Length];
        for (int i = 0; i < candidates.Length; i++)
        {
            ref readonly SizeSource source = ref sources[candidates[i]];
            values[i] = source.Size + (slope * source.DistanceTo(centre));
            atCentre = Math.Min(atCentre, values[i]);
        }

        // A source matters only where it can be the smallest somewhere in the square, and below the cap.
        double least = Math.Min(cap, atCentre + reach);
        List<int> mattering = [];
        List<double> itsValues = [];
        for (int i = 0; i < candidates.Length; i++)
        {
            double lowest = Math.Max(values[i] - reach, sources[candidates[i]].Size);
            if (lowest < least)
            {
                mattering.Add(candidates[i]);
                itsValues.Add(values[i]);
            }
        }

        bool fineEnough = 2 * half <= Math.Max(atCentre - reach, 0);
        if (mattering.Count <= FewSources || fineEnough || depth == LargestDepth)
        {
            int[] order = [.. mattering];
            double[] keys = [.. itsValues];
            Array.Sort(keys, order);
            int count = Math.Min(order.Length, ManySources);
            nodes[index] = new Node { FirstSource = kept.Count, SourceCount = count };
            kept.AddRange(order.AsSpan(0, count));
            return;
        }

        int first = nodes.Count;
        nodes[index] = new Node { FirstChild = first };
        CollectionsMarshal.SetCount(nodes, first + 4);
        int[] passedOn = [.. mattering];
        for (int part = 0; part < 4; part++)
        {
            Vector2D step = new((part & 1) != 0 ? half / 2 : -half / 2, (part & 2) != 0 ? half / 2 : -half / 2);
            Divide(first + part, centre + step, half / 2, passedOn, depth + 1);
        }
    }
}
