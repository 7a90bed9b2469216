using System.Collections.Immutable;

namespace FemCore2D.Geometry;

/// <summary>Joins meshes at their coinciding outer vertices.</summary>
internal sealed class MeshJoin
{
    private const string Remedy =
        "Divide both sides of the common line alike, along the same line or arc, or raise the relative tolerance.";

    private readonly IReadOnlyList<Mesh> meshes;
    private readonly int[] firstVertices;
    private readonly double tolerance;
    private readonly int[] numbers;
    private readonly Point2D[] vertices;

    public MeshJoin(IReadOnlyList<Mesh> meshes, double relativeTolerance)
    {
        this.meshes = meshes;
        firstVertices = new int[meshes.Count];
        List<int> candidates = [];
        Box2D box = Box2D.Empty;
        long count = 0;
        for (int i = 0; i < meshes.Count; i++)
        {
            ArgumentNullException.ThrowIfNull(meshes[i], nameof(meshes));
            CheckRoom(count);
            firstVertices[i] = (int)count;
            count += meshes[i].VertexCount;
            box = box.Union(meshes[i].Bounds);
            SortedSet<int> outer = [];
            foreach (int edge in meshes[i].OuterEdges)
            {
                (int from, int to) = meshes[i].EndsOf(edge);
                outer.Add(from + firstVertices[i]);
                outer.Add(to + firstVertices[i]);
            }

            candidates.AddRange(outer);
        }

        CheckRoom(count);
        tolerance = relativeTolerance * box.Diagonal;
        Point2D[] points = [.. meshes.SelectMany(mesh => mesh.Vertices.ToArray())];
        numbers = VertexMerge.Representatives(points, [.. candidates], tolerance);
        int kept = 0;
        for (int i = 0; i < numbers.Length; i++)
        {
            bool isFirst = numbers[i] == i;
            points[kept] = isFirst ? points[i] : points[kept];
            numbers[i] = isFirst ? kept++ : numbers[numbers[i]];
        }

        vertices = points[..kept];
    }

    public Mesh Join()
    {
        ImmutableArray<string> regionNames = [.. meshes.SelectMany(mesh => mesh.RegionNames).Distinct()];
        (ImmutableArray<string> pointNames, int[] pointVertices) = JoinPoints();
        List<MarkedEdge> marks = [];
        List<ImmutableArray<string>> sets = [];
        JoinMarks(marks, sets);
        bool isLabelled = meshes.Any(mesh => mesh.Arrays.BisectionEdges.Length > 0);
        Mesh joined = new MeshBuilder
        {
            Vertices = vertices,
            Triangles = JoinCells(mesh => mesh.Triangles, 3),
            Quadrilaterals = JoinCells(mesh => mesh.Quadrilaterals, 4),
            CellRegions =
            [
                .. meshes.SelectMany(mesh => Regions(mesh, regionNames, 0, mesh.TriangleCount)),
                .. meshes.SelectMany(mesh => Regions(mesh, regionNames, mesh.TriangleCount, mesh.CellCount)),
            ],
            RegionNames = regionNames,
            MarkedEdges = marks,
            BoundarySets = [.. sets],
            BoundaryNames = [.. meshes.SelectMany(mesh => mesh.BoundaryNames).Distinct()],
            PointNames = pointNames,
            PointVertices = pointVertices,
            BisectionEdges = isLabelled ? [.. meshes.SelectMany(Labels)] : [],
        }.Build();
        RimChecks.Check(joined, tolerance, Remedy);
        return joined;
    }

    private static void CheckRoom(long count)
    {
        if (8 * count > Array.MaxLength)
        {
            throw new MeshingException(
                $"The meshes to join have {count} vertices or more, too many for one mesh. Join fewer or coarser ones.");
        }
    }

    private static IEnumerable<byte> Labels(Mesh mesh)
    {
        var halves = new HalfCells(mesh);
        return Enumerable.Range(0, mesh.TriangleCount).Select(triangle => (byte)halves.BisectionLine(triangle));
    }

    private static int[] Regions(Mesh mesh, ImmutableArray<string> names, int from, int to)
    {
        int[] indices = [.. mesh.RegionNames.Select(name => names.IndexOf(name))];
        int[] regions = mesh.CellRegions[from..to].ToArray();
        for (int i = 0; i < regions.Length; i++)
        {
            regions[i] = indices[regions[i]];
        }

        return regions;
    }

    private int[] JoinCells(Func<Mesh, ReadOnlySpan<int>> cellsOf, int size)
    {
        List<int> joined = [];
        for (int i = 0; i < meshes.Count; i++)
        {
            ReadOnlySpan<int> cells = cellsOf(meshes[i]);
            for (int place = 0; place < cells.Length; place++)
            {
                int vertex = numbers[firstVertices[i] + cells[place]];
                for (int other = place - (place % size); other < place; other++)
                {
                    if (joined[joined.Count - (place - other)] == vertex)
                    {
                        throw new InvalidMeshException(
                            $"Two vertices of one cell at {vertices[vertex]} lie nearer to each other than the tolerance of " +
                            $"{tolerance:G3} m. Lower the relative tolerance.", vertices[vertex]);
                    }
                }

                joined.Add(vertex);
            }
        }

        return [.. joined];
    }

    private (ImmutableArray<string> Names, int[] Vertices) JoinPoints()
    {
        List<string> names = [];
        List<int> places = [];
        for (int i = 0; i < meshes.Count; i++)
        {
            foreach (string name in meshes[i].PointNames)
            {
                int vertex = numbers[firstVertices[i] + meshes[i].VertexAt(name)];
                int known = names.IndexOf(name);
                if (known < 0)
                {
                    names.Add(name);
                    places.Add(vertex);
                }
                else if (places[known] != vertex)
                {
                    throw new InvalidMeshException(
                        $"The point '{name}' is at {vertices[places[known]]} in one mesh and at {vertices[vertex]} in " +
                        "another. Give the points different names.", vertices[vertex]);
                }
            }
        }

        return ([.. names], [.. places]);
    }

    private void JoinMarks(List<MarkedEdge> marks, List<ImmutableArray<string>> sets)
    {
        // An edge on the rim may be found in two meshes; both must describe one and the same line.
        Dictionary<(int Lower, int Higher), double> rim = [];
        for (int i = 0; i < meshes.Count; i++)
        {
            Mesh mesh = meshes[i];
            BoundaryMarks boundaries = BoundaryMarks.Of(mesh);
            for (int edge = 0; edge < mesh.EdgeCount; edge++)
            {
                (int from, int to) = mesh.EndsOf(edge);
                int start = numbers[firstVertices[i] + from];
                int end = numbers[firstVertices[i] + to];
                double sweep = mesh.SweepRadiansOf(edge);
                if (mesh.IsOuter(edge))
                {
                    sweep = MatchRim(rim, start, end, sweep);
                }

                int set = boundaries.SetOfEdge[edge];
                if (sweep != 0 || set >= 0)
                {
                    marks.Add(new MarkedEdge(start, end, sweep, set < 0 ? -1 : sets.Count + set));
                }
            }

            sets.AddRange(boundaries.Sets);
        }
    }

    private double MatchRim(Dictionary<(int Lower, int Higher), double> rim, int start, int end, double sweep)
    {
        bool isForward = start < end;
        (int, int) key = isForward ? (start, end) : (end, start);
        double inOrder = isForward ? sweep : -sweep;
        if (!rim.TryGetValue(key, out double known))
        {
            rim.Add(key, inOrder);
            return sweep;
        }

        var first = new OutlinePiece(vertices[key.Item1], vertices[key.Item2], known);
        OutlinePiece second = first with { SweepRadians = inOrder };
        if (Math.Abs(first.Rise - second.Rise) > tolerance)
        {
            throw new InvalidMeshException(
                $"Between {first.Start} and {first.End} one mesh sweeps {known:G6} rad and the other {inOrder:G6} rad, so " +
                $"that their outlines differ. {Remedy}", first.PointAt(0.5));
        }

        return isForward ? known : -known;
    }
}
