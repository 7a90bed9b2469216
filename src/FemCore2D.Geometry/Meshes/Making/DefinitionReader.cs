using System.Collections.Immutable;

namespace FemCore2D.Geometry;

/// <summary>Checks a <see cref="MeshDefinition"/> and makes its mesh.</summary>
internal sealed class DefinitionReader
{
    private const string Remedy =
        "Let neighbouring cells refer to the same two vertices along their whole common edge.";

    private readonly MeshDefinition definition;
    private readonly Point2D[] vertices;
    private readonly int[] triangles;
    private readonly int[] quadrilaterals;

    public DefinitionReader(MeshDefinition definition)
    {
        this.definition = definition;
        vertices = [.. definition.Vertices];
        triangles = [.. definition.Triangles];
        quadrilaterals = [.. definition.Quadrilaterals];
    }

    public Mesh Read()
    {
        CheckLists();
        CheckVertices();
        int[] regions = ReadRegions();
        CheckCells(triangles, 3, 0);
        CheckCells(quadrilaterals, 4, triangles.Length / 3);
        CheckAllVerticesUsed();

        string[] boundaries = [.. definition.Boundaries.Keys];
        CheckNames("boundary", boundaries);
        CheckNames("point", [.. definition.Points.Keys]);
        CheckNames("region, boundary or point", [.. definition.RegionNames, .. boundaries, .. definition.Points.Keys]);
        foreach ((string name, int vertex) in definition.Points)
        {
            CheckIndex(vertex, $"Point '{name}'");
        }

        Mesh mesh = new MeshBuilder
        {
            Vertices = vertices,
            Triangles = triangles,
            Quadrilaterals = quadrilaterals,
            CellRegions = regions,
            RegionNames = [.. definition.RegionNames],
            MarkedEdges = ReadMarks(boundaries),
            BoundarySets = [.. boundaries.Select(name => ImmutableArray.Create(name))],
            PointNames = [.. definition.Points.Keys],
            PointVertices = [.. definition.Points.Values],
        }.Build();
        var checks = new CellChecks(mesh);
        for (int cell = 0; cell < mesh.CellCount; cell++)
        {
            checks.CheckUnfolded(cell, "List the vertices of a convex cell counterclockwise.");
        }

        RimChecks.Check(mesh, definition.RelativeTolerance * mesh.Bounds.Diagonal, Remedy);
        return mesh;
    }

    private void CheckLists()
    {
        if (triangles.Length % 3 != 0 || quadrilaterals.Length % 4 != 0)
        {
            throw new ArgumentException(
                $"The triangles have {triangles.Length} entries and the quadrilaterals {quadrilaterals.Length}. " +
                "Give three vertices a triangle and four a quadrilateral.");
        }

        if (triangles.Length + quadrilaterals.Length == 0)
        {
            throw new InvalidMeshException("The mesh has no cells. Give triangles or quadrilaterals.");
        }

        if (!(definition.RelativeTolerance >= 0 && definition.RelativeTolerance < 0.1))
        {
            throw new ArgumentException(
                $"The relative tolerance is {definition.RelativeTolerance}. Give a small number, such as 1e-9.");
        }

        CheckNames("region", definition.RegionNames);
    }

    private static void CheckNames(string kind, IReadOnlyList<string> names)
    {
        HashSet<string> known = [];
        foreach (string name in names)
        {
            if (string.IsNullOrWhiteSpace(name) || !known.Add(name))
            {
                throw new ArgumentException(
                    $"The {kind} name '{name}' is empty or used twice. Give every {kind} a name of its own.");
            }
        }
    }

    private void CheckVertices()
    {
        for (int i = 0; i < vertices.Length; i++)
        {
            if (!vertices[i].IsFinite)
            {
                throw new InvalidMeshException($"Vertex {i} is at {vertices[i]}. Give finite coordinates.");
            }
        }
    }

    private int[] ReadRegions()
    {
        int cellCount = (triangles.Length / 3) + (quadrilaterals.Length / 4);
        int[] regions = definition.CellRegions.Count == 0 && definition.RegionNames.Count == 1
            ? new int[cellCount]
            : [.. definition.CellRegions];
        if (regions.Length != cellCount)
        {
            throw new ArgumentException(
                $"There are {cellCount} cells but {regions.Length} entries of cell regions. Give one for each cell.");
        }

        for (int cell = 0; cell < regions.Length; cell++)
        {
            if ((uint)regions[cell] >= (uint)definition.RegionNames.Count)
            {
                throw new InvalidMeshException(
                    $"Cell {cell} is in region {regions[cell]}, but the mesh names {definition.RegionNames.Count} regions. " +
                    "Give an index into the names of the regions, counted from 0.");
            }
        }

        return regions;
    }

    private void CheckCells(int[] cells, int size, int firstCell)
    {
        for (int place = 0; place < cells.Length; place++)
        {
            int cell = firstCell + (place / size);
            int vertex = cells[place];
            CheckIndex(vertex, $"Cell {cell}");
            for (int other = place - (place % size); other < place; other++)
            {
                if (cells[other] == vertex)
                {
                    throw new InvalidMeshException(
                        $"Cell {cell} lists vertex {vertex} at {vertices[vertex]} twice. " +
                        "Give every corner of a cell a vertex of its own.", vertices[vertex]);
                }
            }
        }
    }

    private void CheckIndex(int vertex, string owner)
    {
        if ((uint)vertex >= (uint)vertices.Length)
        {
            throw new InvalidMeshException(
                $"{owner} refers to vertex {vertex}, but there are {vertices.Length} vertices. " +
                "Give indices of vertices, counted from 0.");
        }
    }

    private void CheckAllVerticesUsed()
    {
        var used = new bool[vertices.Length];
        foreach (int vertex in triangles)
        {
            used[vertex] = true;
        }

        foreach (int vertex in quadrilaterals)
        {
            used[vertex] = true;
        }

        int unused = Array.IndexOf(used, false);
        if (unused >= 0)
        {
            throw new InvalidMeshException(
                $"Vertex {unused} at {vertices[unused]} belongs to no cell. Leave it out.", vertices[unused]);
        }
    }

    private List<MarkedEdge> ReadMarks(string[] boundaries)
    {
        List<MarkedEdge> marks = [];
        for (int i = 0; i < boundaries.Length; i++)
        {
            string owner = $"Boundary '{boundaries[i]}'";
            foreach ((int start, int end) in definition.Boundaries[boundaries[i]])
            {
                CheckIndex(start, owner);
                CheckIndex(end, owner);
                marks.Add(new MarkedEdge(start, end, 0, i));
            }
        }

        HashSet<(int Lower, int Higher)> bent = [];
        foreach ((int start, int end, double sweep) in definition.Arcs)
        {
            CheckIndex(start, "An arc");
            CheckIndex(end, "An arc");
            if (!(Math.Abs(sweep) <= Math.PI))
            {
                throw new InvalidMeshException(
                    $"The arc from {vertices[start]} to {vertices[end]} sweeps {sweep:G9} rad. " +
                    "Give an angle of at most a half turn either way.", vertices[start]);
            }

            if (!bent.Add((Math.Min(start, end), Math.Max(start, end))))
            {
                throw new InvalidMeshException(
                    $"The arc from {vertices[start]} to {vertices[end]} is given twice. Give every edge one arc.",
                    vertices[start]);
            }

            marks.Add(new MarkedEdge(start, end, sweep, -1));
        }

        return marks;
    }
}
