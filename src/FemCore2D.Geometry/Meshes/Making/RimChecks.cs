namespace FemCore2D.Geometry;

/// <summary>
/// Checks how cells that are sound by themselves lie beside each other: whether they cover every point of the plane
/// at most once, and meet along whole edges.
/// </summary>
/// <remarks>
/// Where every inner vertex is surrounded exactly once, and the edges with one cell only (the rim) neither cross nor
/// touch beside their ends, each connected part covers its points once; it then remains to see that no part lies
/// within another.
/// </remarks>
internal static class RimChecks
{
    /// <summary>Checks a mesh.</summary>
    /// <param name="mesh">The mesh, all of its cells sound.</param>
    /// <param name="tolerance">The distance in metres within which points count as one.</param>
    /// <param name="remedy">The end of the message.</param>
    /// <exception cref="InvalidMeshException">Cells overlap, a vertex hangs in an edge, or two vertices coincide.</exception>
    public static void Check(Mesh mesh, double tolerance, string remedy)
    {
        CheckTurns(mesh);
        ReadOnlySpan<int> rim = mesh.OuterEdges;
        var boxes = new Box2D[rim.Length];
        for (int i = 0; i < boxes.Length; i++)
        {
            boxes[i] = mesh.CurveOf(rim[i]).Bounds.Widened(tolerance);
        }

        var tree = new BoxTree(boxes);
        for (int i = 0; i < rim.Length; i++)
        {
            (int from, int to) = mesh.EndsOf(rim[i]);
            CheckVertex(mesh, tree, from, tolerance, remedy);
            CheckVertex(mesh, tree, to, tolerance, remedy);
        }

        for (int i = 0; i < rim.Length; i++)
        {
            var crossings = new Crossings(mesh, rim[i], tolerance);
            tree.VisitIn(boxes[i], ref crossings);
            if (crossings.Found >= 0)
            {
                throw new InvalidMeshException(
                    $"The outer edges {Ends(mesh, rim[i])} and {Ends(mesh, crossings.Found)} cross or touch at " +
                    $"{crossings.Place}, beside their ends. {remedy}", crossings.Place);
            }
        }

        CheckParts(mesh);
    }

    private static string Ends(Mesh mesh, int edge)
    {
        (int from, int to) = mesh.EndsOf(edge);
        return $"from {mesh.Vertices[from]} to {mesh.Vertices[to]}";
    }

    /// <summary>Around an inner vertex exactly one corner contains the direction of the first axis.</summary>
    private static void CheckTurns(Mesh mesh)
    {
        var turns = new byte[mesh.VertexCount];
        for (int cell = 0; cell < mesh.CellCount; cell++)
        {
            ReadOnlySpan<int> corners = mesh.VerticesOf(cell);
            for (int i = 0; i < corners.Length; i++)
            {
                Point2D corner = mesh.Vertices[corners[i]];
                Vector2D next = mesh.Vertices[corners[i + 1 < corners.Length ? i + 1 : 0]] - corner;
                Vector2D previous = mesh.Vertices[corners[i > 0 ? i - 1 : corners.Length - 1]] - corner;
                bool hasAxis = next.Y == 0 ? next.X > 0 : next.Y < 0 && previous.Y > 0;
                if (hasAxis && ++turns[corners[i]] > 1)
                {
                    throw new InvalidMeshException(
                        $"The cells around vertex {corners[i]} at {corner} overlap: they go around it more than once. " +
                        "Give every piece of the plane to one cell.", corner);
                }
            }
        }
    }

    private static void CheckVertex(Mesh mesh, BoxTree tree, int vertex, double tolerance, string remedy)
    {
        Point2D point = mesh.Vertices[vertex];
        var near = new EdgesNear(mesh, vertex, tolerance);
        tree.VisitAt(point, ref near);
        if (near.Found < 0)
        {
            return;
        }

        (int from, int to) = mesh.EndsOf(near.Found);
        foreach (int end in (ReadOnlySpan<int>)[from, to])
        {
            if (mesh.Vertices[end].DistanceTo(point) <= tolerance)
            {
                throw new InvalidMeshException(
                    $"Vertices {Math.Min(vertex, end)} and {Math.Max(vertex, end)} lie at one place, {point}, so that the " +
                    $"cells there are not joined. {remedy}", point);
            }
        }

        throw new InvalidMeshException(
            $"Vertex {vertex} at {point} hangs in the edge {Ends(mesh, near.Found)} instead of ending it. {remedy}", point);
    }

    private static void CheckParts(Mesh mesh)
    {
        var seen = new bool[mesh.CellCount];
        Stack<int> pending = [];
        List<int> seeds = [];
        for (int seed = 0; seed < seen.Length; seed++)
        {
            if (seen[seed])
            {
                continue;
            }

            seeds.Add(seed);
            seen[seed] = true;
            pending.Push(seed);
            while (pending.TryPop(out int cell))
            {
                foreach (int edge in mesh.EdgesOf(cell))
                {
                    (int left, int right) = mesh.CellsOf(edge);
                    int other = left == cell ? right : left;
                    if (other >= 0 && !seen[other])
                    {
                        seen[other] = true;
                        pending.Push(other);
                    }
                }
            }
        }

        if (seeds.Count < 2)
        {
            return;
        }

        foreach (int seed in seeds)
        {
            Point2D point = CellChecks.MiddleOf(mesh, seed);
            if (mesh.Locator.CountAt(point) > 1)
            {
                throw new InvalidMeshException(
                    $"Cell {seed} around {point} lies within another part of the mesh. " +
                    "Give every piece of the plane to one cell.", point);
            }
        }
    }

    private struct EdgesNear(Mesh mesh, int vertex, double tolerance) : BoxTree.IVisitor
    {
        public int Found { get; private set; } = -1;

        public void Visit(int item)
        {
            int edge = mesh.OuterEdges[item];
            (int from, int to) = mesh.EndsOf(edge);
            if (Found < 0 && from != vertex && to != vertex
                && mesh.CurveOf(edge).DistanceTo(mesh.Vertices[vertex]) <= tolerance)
            {
                Found = edge;
            }
        }
    }

    private struct Crossings(Mesh mesh, int edge, double tolerance) : BoxTree.IVisitor
    {
        public int Found { get; private set; } = -1;

        public Point2D Place { get; private set; }

        public void Visit(int item)
        {
            int other = mesh.OuterEdges[item];
            if (Found >= 0 || other == edge)
            {
                return;
            }

            Span<Point2D> contacts = stackalloc Point2D[2];
            PieceForm first = CellChecks.FormOf(mesh.CurveOf(edge));
            if (PieceContacts.Find(first, CellChecks.FormOf(mesh.CurveOf(other)), tolerance, contacts) > 0)
            {
                Found = other;
                Place = contacts[0];
            }
        }
    }
}
