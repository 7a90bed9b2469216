namespace FemCore2D.Geometry;

/// <summary>
/// A mesh as plain arrays of one's own, to be checked and completed by <see cref="ToMesh"/>.
/// </summary>
/// <example>
/// Two triangles that make a square:
/// <code>
/// Mesh mesh = new MeshDefinition
/// {
///     Vertices = [new(0, 0), new(1, 0), new(1, 1), new(0, 1)],
///     Triangles = [0, 1, 2, 0, 2, 3],
///     RegionNames = ["iron"],
///     Boundaries = new Dictionary&lt;string, IReadOnlyList&lt;(int, int)&gt;&gt; { ["bottom"] = [(0, 1)] },
/// }.ToMesh();
/// </code>
/// </example>
public sealed class MeshDefinition
{
    /// <summary>The vertices, in metres; each belongs to a cell.</summary>
    public required IReadOnlyList<Point2D> Vertices { get; init; }

    /// <summary>The vertices of the triangles, three each, counterclockwise.</summary>
    public IReadOnlyList<int> Triangles { get; init; } = [];

    /// <summary>The vertices of the convex quadrilaterals, four each, counterclockwise.</summary>
    public IReadOnlyList<int> Quadrilaterals { get; init; } = [];

    /// <summary>The names of the regions, each once.</summary>
    public required IReadOnlyList<string> RegionNames { get; init; }

    /// <summary>
    /// For each triangle, then for each quadrilateral, an index into <see cref="RegionNames"/>; may be left empty when
    /// there is one region only.
    /// </summary>
    public IReadOnlyList<int> CellRegions { get; init; } = [];

    /// <summary>For each boundary name the pairs of vertices of its edges, in either direction.</summary>
    public IReadOnlyDictionary<string, IReadOnlyList<(int Start, int End)>> Boundaries { get; init; } =
        new Dictionary<string, IReadOnlyList<(int Start, int End)>>();

    /// <summary>
    /// The edges on circular arcs, each with the angle swept from its start to its end, in radians, positive
    /// counterclockwise, at most a half turn.
    /// </summary>
    public IReadOnlyList<(int Start, int End, double SweepRadians)> Arcs { get; init; } = [];

    /// <summary>The vertices at named points.</summary>
    public IReadOnlyDictionary<string, int> Points { get; init; } = new Dictionary<string, int>();

    /// <summary>The distance within which two places count as one, relative to the diagonal of the mesh.</summary>
    public double RelativeTolerance { get; init; } = 1e-9;

    /// <summary>Checks everything and makes the mesh; the order of vertices and cells is kept.</summary>
    /// <exception cref="ArgumentException">A list has a length that does not fit, or a name is empty or used twice.</exception>
    /// <exception cref="InvalidMeshException">
    /// A vertex is not finite or belongs to no cell; a cell refers to a vertex or region that does not exist, repeats a
    /// vertex, is listed clockwise, flat, not convex or folded; cells overlap; a vertex hangs in an edge of another
    /// cell or coincides with another vertex; a boundary or arc runs along no edge.
    /// </exception>
    public Mesh ToMesh() => new DefinitionReader(this).Read();
}
