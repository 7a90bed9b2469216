using FemCore2D.Geometry;

namespace FemCore2D.Assembly;

/// <summary>
/// Finds which unknown of a boundary corresponds to which of its partner under the translation or rotation that
/// carries the one onto the other and the inside of the section to the outside.
/// </summary>
internal sealed class BoundaryMatch
{
    private const double RelativeTolerance = 1e-6;

    private readonly Numbering numbering;
    private readonly Mesh mesh;
    private readonly string boundary;
    private readonly string partner;

    public BoundaryMatch(Numbering numbering, string boundary, string partner)
    {
        this.numbering = numbering;
        mesh = numbering.Mesh;
        this.boundary = boundary;
        this.partner = partner;
    }

    /// <summary>The pairs of unknowns, of the boundary first and of its partner second.</summary>
    /// <exception cref="UnmatchedBoundariesException">No such motion exists.</exception>
    public List<(int First, int Second)> FindPairs()
    {
        int[] first = ChainOf(boundary);
        int[] second = ChainOf(partner);
        if (first.Length != second.Length)
        {
            throw new UnmatchedBoundariesException(
                $"The boundary '{boundary}' has {first.Length} vertices, its partner '{partner}' {second.Length}. "
                + "Mesh the two as a pair.");
        }

        double worst = double.PositiveInfinity;
        foreach (bool turned in (ReadOnlySpan<bool>)[false, true])
        {
            int[] candidate = turned ? [.. Enumerable.Reverse(second)] : second;
            double misfit = Misfit(first, candidate, out bool carriesInsideOut);
            if (misfit <= RelativeTolerance && carriesInsideOut)
            {
                return UnknownPairs(first, candidate);
            }

            worst = Math.Min(worst, misfit);
        }

        throw new UnmatchedBoundariesException(
            $"No translation or rotation carries the boundary '{boundary}' from {mesh.Vertices[first[0]]} to "
            + $"{mesh.Vertices[first[^1]]} onto '{partner}' from {mesh.Vertices[second[0]]} to "
            + $"{mesh.Vertices[second[^1]]} vertex by vertex, with the section on opposite sides (the best misses by "
            + $"{worst:G2} of the length). Mesh the two as a pair.");
    }

    /// <summary>The vertices of a boundary in order from one end to the other.</summary>
    private int[] ChainOf(string name)
    {
        ReadOnlySpan<int> edges = mesh.BoundaryEdges(name);
        Dictionary<int, (int First, int Second)> neighbours = [];
        foreach (int edge in edges)
        {
            (int from, int to) = mesh.EndsOf(edge);
            Link(from, to);
            Link(to, from);
        }

        int[] ends = [.. neighbours.Where(pair => pair.Value.Second < 0).Select(pair => pair.Key).Order()];
        if (ends.Length != 2)
        {
            throw NoChain();
        }

        List<int> chain = [ends[0]];
        int before = -1;
        for (int vertex = ends[0]; vertex != ends[1];)
        {
            (int a, int b) = neighbours[vertex];
            int next = a != before ? a : b;
            before = vertex;
            vertex = next;
            chain.Add(vertex);
        }

        return chain.Count == neighbours.Count ? [.. chain] : throw NoChain();

        void Link(int from, int to)
        {
            if (!neighbours.TryGetValue(from, out (int First, int Second) known))
            {
                neighbours[from] = (to, -1);
            }
            else
            {
                neighbours[from] = known.Second < 0 ? (known.First, to) : throw NoChain();
            }
        }

        UnmatchedBoundariesException NoChain() => new(
            $"The boundary '{name}' is not one open chain of edges, so it cannot be paired. "
            + "Give each side of the pair a name of its own.");
    }

    /// <summary>How far the vertices miss their partners, relative to the length, after the motion that carries end to end.</summary>
    private double Misfit(int[] first, int[] second, out bool carriesInsideOut)
    {
        Point2D from = mesh.Vertices[first[0]];
        Point2D to = mesh.Vertices[second[0]];
        Vector2D span = mesh.Vertices[first[^1]] - from;
        Vector2D image = mesh.Vertices[second[^1]] - to;
        double length = span.Length;
        double cosine = span.Dot(image) / (length * length);
        double sine = span.Cross(image) / (length * length);
        double misfit = Math.Abs(image.Length - length) / length;
        for (int i = 0; i < first.Length; i++)
        {
            Vector2D offset = Turn(mesh.Vertices[first[i]] - from);
            misfit = Math.Max(misfit, (to + offset).DistanceTo(mesh.Vertices[second[i]]) / length);
        }

        Vector2D outward = OutwardNormal(first[0], first[1], boundary);
        carriesInsideOut = Turn(outward).Dot(OutwardNormal(second[0], second[1], partner)) < 0;
        return misfit;

        Vector2D Turn(Vector2D v) => new((cosine * v.X) - (sine * v.Y), (sine * v.X) + (cosine * v.Y));
    }

    private Vector2D OutwardNormal(int start, int end, string name)
    {
        int edge = EdgeBetween(start, end, name);
        (int from, int to) = mesh.EndsOf(edge);
        (int left, int right) = mesh.CellsOf(edge);
        if (left >= 0 && right >= 0)
        {
            throw new UnmatchedBoundariesException(
                $"The boundary '{name}' has cells on both sides at {mesh.Vertices[start]}, so it cannot be paired. "
                + "Pair boundaries on the rim of the section.");
        }

        Vector2D normal = (mesh.Vertices[to] - mesh.Vertices[from]).LeftNormal;
        return left >= 0 ? -normal : normal;
    }

    private int EdgeBetween(int start, int end, string name)
    {
        foreach (int edge in mesh.BoundaryEdges(name))
        {
            (int from, int to) = mesh.EndsOf(edge);
            if ((from == start && to == end) || (from == end && to == start))
            {
                return edge;
            }
        }

        throw new InvalidOperationException($"'{name}' has no edge from vertex {start} to {end}.");
    }

    private List<(int First, int Second)> UnknownPairs(int[] first, int[] second)
    {
        List<(int, int)> pairs = [];
        for (int i = 0; i < first.Length && numbering.PerVertex > 0; i++)
        {
            for (int k = 0; k < numbering.PerVertex; k++)
            {
                pairs.Add((numbering.FirstOfVertex(first[i]) + k, numbering.FirstOfVertex(second[i]) + k));
            }
        }

        if (numbering.PerEdge > 0)
        {
            Dictionary<(int, int), int> firstEdges = EdgesByEnds(boundary);
            Dictionary<(int, int), int> secondEdges = EdgesByEnds(partner);
            for (int i = 0; i + 1 < first.Length; i++)
            {
                int a = numbering.FirstOfEdge(firstEdges[Ordered(first[i], first[i + 1])]);
                int b = numbering.FirstOfEdge(secondEdges[Ordered(second[i], second[i + 1])]);
                bool alike = (first[i] < first[i + 1]) == (second[i] < second[i + 1]);
                for (int k = 0; k < numbering.PerEdge; k++)
                {
                    pairs.Add((a + k, b + (alike ? k : numbering.PerEdge - 1 - k)));
                }
            }
        }

        return pairs;
    }

    private Dictionary<(int, int), int> EdgesByEnds(string name)
    {
        Dictionary<(int, int), int> edges = [];
        foreach (int edge in mesh.BoundaryEdges(name))
        {
            edges[mesh.EndsOf(edge)] = edge;
        }

        return edges;
    }

    private static (int Lower, int Higher) Ordered(int a, int b) => a < b ? (a, b) : (b, a);
}
