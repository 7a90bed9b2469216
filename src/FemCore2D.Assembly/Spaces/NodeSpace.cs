using System.Collections.Immutable;
using FemCore2D.Elements;
using FemCore2D.Geometry;
using FemCore2D.Sparse;

namespace FemCore2D.Assembly;

/// <summary>
/// The continuous functions on a mesh that are polynomials of one degree in every cell, known by their values at
/// nodes. Immutable, and safe to use from many threads.
/// </summary>
/// <remarks>
/// On cells that are bent along arcs, the polynomials are those of the reference cell. The arcs themselves are described
/// to degree 3 at most, which leaves an error of the order of the fourth power of the cell size: on curved sections the
/// rates of degree 4 and 5 end there.
/// </remarks>
public sealed class NodeSpace
{
    private readonly CellTables? triangles;
    private readonly CellTables? quadrilaterals;
    private readonly Lazy<Point2D[]> places;
    private RefillPlan? plan;
    private CellLocator? locator;

    /// <summary>Creates the space.</summary>
    /// <param name="mesh">The mesh.</param>
    /// <param name="degree">The degree: 1 to 5 on triangles, 1 to 3 when the mesh has quadrilaterals.</param>
    /// <param name="geometryDegree">
    /// The degree of the maps of cells along arcs, 1 (chords in place of arcs) to 3; by default that of the space, up
    /// to 3.
    /// </param>
    /// <exception cref="ArgumentOutOfRangeException">A degree is out of its range.</exception>
    /// <exception cref="SizeLimitException">There would be more unknowns than a matrix can have rows.</exception>
    public NodeSpace(Mesh mesh, int degree, int? geometryDegree = null)
    {
        ArgumentNullException.ThrowIfNull(mesh);
        int highest = mesh.QuadrilateralCount > 0 ? 3 : 5;
        if (degree < 1 || degree > highest)
        {
            throw new ArgumentOutOfRangeException(
                nameof(degree),
                degree,
                mesh.QuadrilateralCount > 0
                    ? "On a mesh with quadrilaterals the degree of a space is 1 to 3."
                    : "On a mesh of triangles the degree of a space is 1 to 5.");
        }

        Mesh = mesh;
        Degree = degree;
        Maps = new CellMaps(mesh, geometryDegree ?? Math.Min(degree, 3));
        INodeElement triangle = NodeElement.Lagrange(CellKind.Triangle, degree);
        triangles = mesh.TriangleCount > 0 ? new CellTables(triangle) : null;
        quadrilaterals = mesh.QuadrilateralCount > 0
            ? new CellTables(NodeElement.Lagrange(CellKind.Quadrilateral, degree))
            : null;
        PresentTables = [.. new[] { triangles, quadrilaterals }.OfType<CellTables>()];
        Numbering = new Numbering(
            mesh, triangle.Layout, quadrilaterals?.Element.Layout ?? new UnknownLayout(1, degree - 1, 0));
        AllTrianglesStraight = Maps.Degree == 1 || !mesh.HasArcs;
        places = new Lazy<Point2D[]>(FindPlaces);
    }

    /// <summary>The mesh.</summary>
    public Mesh Mesh { get; }

    /// <summary>The degree of the polynomials.</summary>
    public int Degree { get; }

    /// <summary>The maps from the reference cells to the cells.</summary>
    public CellMaps Maps { get; }

    /// <summary>The numbers of the unknowns.</summary>
    public Numbering Numbering { get; }

    /// <summary>The number of unknowns.</summary>
    public int UnknownCount => Numbering.Count;

    /// <summary>The node of each unknown, in metres.</summary>
    public ReadOnlySpan<Point2D> NodePlaces => places.Value;

    internal ImmutableArray<CellTables> PresentTables { get; }

    /// <summary>Whether every triangle has an affine map.</summary>
    internal bool AllTrianglesStraight { get; }

    /// <summary>The locator of the mesh, made at first use.</summary>
    internal CellLocator Locator => LazyInitializer.EnsureInitialized(ref locator, () => new CellLocator(Mesh));

    /// <summary>The element on cells of a kind.</summary>
    /// <exception cref="ArgumentException">The mesh has no cell of that kind.</exception>
    public INodeElement ElementOn(CellKind kind) => TablesOn(kind).Element;

    internal CellTables TablesOn(CellKind kind) => (kind == CellKind.Triangle ? triangles : quadrilaterals)
        ?? throw new ArgumentException($"The mesh has no {kind}.", nameof(kind));

    /// <summary>The plan for refilling matrices, made at first use and shared by all assemblers of the space.</summary>
    internal RefillPlan PlanWith(ParallelOptions options)
    {
        RefillPlan? known = Volatile.Read(ref plan);
        if (known is not null)
        {
            return known;
        }

        // Two threads may both make one; they are equal, and all later callers must share the one that stays.
        var made = new RefillPlan(Numbering, options);
        return Interlocked.CompareExchange(ref plan, made, null) ?? made;
    }

    private Point2D[] FindPlaces()
    {
        if (Numbering.IsVertexNumbering)
        {
            return Mesh.Vertices.ToArray();
        }

        var found = new Point2D[UnknownCount];
        Span<int> unknowns = stackalloc int[32];
        for (int cell = 0; cell < Mesh.CellCount; cell++)
        {
            ReadOnlySpan<Point2D> nodes = TablesOn(Mesh.KindOf(cell)).Element.NodePoints;
            int count = Numbering.CellUnknowns(cell, unknowns);
            var geometry = CellGeometry.Of(Maps, cell);
            for (int i = 0; i < count; i++)
            {
                found[unknowns[i]] = geometry.PlaceAt(nodes[i]);
            }
        }

        // Vertices exactly, whatever the rounding of the maps.
        for (int vertex = 0; vertex < Mesh.VertexCount; vertex++)
        {
            found[Numbering.FirstOfVertex(vertex)] = Mesh.Vertices[vertex];
        }

        return found;
    }
}
