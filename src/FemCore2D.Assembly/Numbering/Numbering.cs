using FemCore2D.Elements;
using FemCore2D.Geometry;
using FemCore2D.Sparse;

namespace FemCore2D.Assembly;

/// <summary>
/// The global numbers of all unknowns of a mesh, from the number of unknowns on each vertex, each edge and in each
/// interior. Immutable.
/// </summary>
/// <remarks>
/// The numbers follow the mesh's own order of vertices: first come the unknowns of vertex 0, then those of the edges
/// that begin at it (the edge's direction is from its lower to its higher vertex), then those of the interiors of the
/// cells of which it is the lowest vertex, and so on with vertex 1. Neighbours in the mesh thus stay near each other
/// in the matrix, and with one unknown on each vertex and no other, an unknown has the number of its vertex.
/// </remarks>
public sealed partial class Numbering
{
    private readonly UnknownLayout triangles;
    private readonly UnknownLayout quadrilaterals;

    // Null when the number of a vertex's unknown is that of the vertex, or when there are no such unknowns.
    private readonly int[]? vertexStarts;
    private readonly int[]? edgeStarts;
    private readonly int[]? interiorStarts;

    /// <summary>Numbers the unknowns of a mesh.</summary>
    /// <param name="mesh">The mesh.</param>
    /// <param name="triangles">The unknowns of a triangle.</param>
    /// <param name="quadrilaterals">The unknowns of a quadrilateral.</param>
    /// <param name="edgeUnknowns">What the unknowns on an edge are.</param>
    /// <exception cref="ArgumentException">
    /// A layout has a negative number; or the mesh has both kinds of cells and they differ in the unknowns that they
    /// put on a vertex or an edge, which both must share.
    /// </exception>
    /// <exception cref="SizeLimitException">There would be more unknowns than a matrix can have rows.</exception>
    public Numbering(
        Mesh mesh,
        UnknownLayout triangles,
        UnknownLayout quadrilaterals,
        EdgeUnknownKind edgeUnknowns = EdgeUnknownKind.Points)
    {
        ArgumentNullException.ThrowIfNull(mesh);
        CheckLayout(triangles, nameof(triangles));
        CheckLayout(quadrilaterals, nameof(quadrilaterals));
        if (mesh.TriangleCount > 0 && mesh.QuadrilateralCount > 0
            && (triangles.PerVertex != quadrilaterals.PerVertex || triangles.PerEdge != quadrilaterals.PerEdge))
        {
            throw new ArgumentException(
                $"Triangles with {triangles.PerVertex} unknowns a vertex and {triangles.PerEdge} an edge do not fit "
                + $"quadrilaterals with {quadrilaterals.PerVertex} and {quadrilaterals.PerEdge}. Choose elements of "
                + "the same kind and degree.",
                nameof(quadrilaterals));
        }

        Mesh = mesh;
        EdgeUnknowns = edgeUnknowns;
        this.triangles = triangles;
        this.quadrilaterals = quadrilaterals;
        UnknownLayout shared = mesh.TriangleCount > 0 ? triangles : quadrilaterals;
        PerVertex = shared.PerVertex;
        PerEdge = shared.PerEdge;
        Count = CountUnknowns();
        bool interiors = triangles.PerInterior > 0 || quadrilaterals.PerInterior > 0;
        if (PerEdge > 0 || interiors || PerVertex > 1)
        {
            int[] next = FirstOfEachVertex();
            vertexStarts = PerVertex > 0 ? [.. next] : null;
            Advance(next, PerVertex);
            edgeStarts = PerEdge > 0 ? PlaceEdges(next) : null;
            interiorStarts = interiors ? PlaceInteriors(next) : null;
        }
    }

    /// <summary>The mesh.</summary>
    public Mesh Mesh { get; }

    /// <summary>What the unknowns on an edge are.</summary>
    public EdgeUnknownKind EdgeUnknowns { get; }

    /// <summary>The number of unknowns.</summary>
    public int Count { get; }

    /// <summary>The number of unknowns on each vertex.</summary>
    public int PerVertex { get; }

    /// <summary>The number of unknowns on each edge, besides those on its ends.</summary>
    public int PerEdge { get; }

    /// <summary>Whether the unknowns are the vertices, number by number.</summary>
    internal bool IsVertexNumbering => PerVertex == 1 && vertexStarts is null;

    /// <summary>How many unknowns a cell of a kind has, and where.</summary>
    public UnknownLayout LayoutOf(CellKind kind) => kind == CellKind.Triangle ? triangles : quadrilaterals;

    /// <summary>The number of unknowns of a cell of a kind: on its vertices, on its edges and in its interior.</summary>
    public int CellUnknownCount(CellKind kind) => LayoutOf(kind).CountOn(kind);

    /// <summary>The first of the consecutive unknowns of a vertex.</summary>
    /// <exception cref="InvalidOperationException">Vertices have no unknowns.</exception>
    public int FirstOfVertex(int vertex)
    {
        if (PerVertex == 0)
        {
            throw new InvalidOperationException("The vertices of this numbering have no unknowns.");
        }

        return vertexStarts is null ? vertex : vertexStarts[vertex];
    }

    /// <summary>The first of the consecutive unknowns of an edge, which follow the edge's direction.</summary>
    /// <exception cref="InvalidOperationException">Edges have no unknowns.</exception>
    public int FirstOfEdge(int edge) => edgeStarts is null
        ? throw new InvalidOperationException("The edges of this numbering have no unknowns.")
        : edgeStarts[edge];

    /// <summary>The first of the consecutive unknowns in the interior of a cell.</summary>
    /// <exception cref="InvalidOperationException">Interiors have no unknowns.</exception>
    public int FirstOfInterior(int cell) => interiorStarts is null
        ? throw new InvalidOperationException("The interiors of this numbering have no unknowns.")
        : interiorStarts[cell];

    /// <summary>
    /// Lists the unknowns of a cell in the order of its element's shape functions: vertices, edges, interior.
    /// </summary>
    /// <param name="cell">The cell.</param>
    /// <param name="unknowns">Receives the unknowns; at least <see cref="CellUnknownCount"/> long.</param>
    /// <returns>The number of unknowns.</returns>
    public int CellUnknowns(int cell, Span<int> unknowns)
    {
        ReadOnlySpan<int> vertices = Mesh.VerticesOf(cell);
        int count = 0;
        if (vertexStarts is null)
        {
            if (PerVertex == 1)
            {
                vertices.CopyTo(unknowns);
                count = vertices.Length;
            }
        }
        else
        {
            foreach (int vertex in vertices)
            {
                int first = vertexStarts[vertex];
                for (int k = 0; k < PerVertex; k++)
                {
                    unknowns[count++] = first + k;
                }
            }
        }

        if (edgeStarts is not null)
        {
            ReadOnlySpan<int> edges = Mesh.EdgesOf(cell);
            int before = vertices[0];
            for (int i = 0; i < edges.Length; i++)
            {
                int after = vertices[i + 1 < vertices.Length ? i + 1 : 0];
                count = AddEdge(edges[i], before < after, unknowns, count);
                before = after;
            }
        }

        if (interiorStarts is not null)
        {
            int first = interiorStarts[cell];
            int interiors = LayoutOf(Mesh.KindOf(cell)).PerInterior;
            for (int k = 0; k < interiors; k++)
            {
                unknowns[count++] = first + k;
            }
        }

        return count;
    }

    /// <summary>
    /// Which edges of a cell run against the direction that they have for all cells: bit <c>i</c> stands for local
    /// edge <c>i</c>. An element with signed edge unknowns changes signs there.
    /// </summary>
    public int ReversedEdges(int cell)
    {
        ReadOnlySpan<int> vertices = Mesh.VerticesOf(cell);
        int bits = 0;
        for (int i = 0; i < vertices.Length; i++)
        {
            int after = vertices[i + 1 < vertices.Length ? i + 1 : 0];
            bits |= vertices[i] < after ? 0 : 1 << i;
        }

        return bits;
    }

    private int AddEdge(int edge, bool along, Span<int> unknowns, int count)
    {
        int first = edgeStarts![edge];
        bool keep = along || EdgeUnknowns == EdgeUnknownKind.Moments;
        for (int k = 0; k < PerEdge; k++)
        {
            unknowns[count++] = keep ? first + k : first + PerEdge - 1 - k;
        }

        return count;
    }

    private static void CheckLayout(UnknownLayout layout, string name)
    {
        if (layout.PerVertex < 0 || layout.PerEdge < 0 || layout.PerInterior < 0)
        {
            throw new ArgumentException($"A layout cannot have a negative number of unknowns: {layout}.", name);
        }
    }

    private int CountUnknowns()
    {
        long count = ((long)PerVertex * Mesh.VertexCount) + ((long)PerEdge * Mesh.EdgeCount)
            + ((long)triangles.PerInterior * Mesh.TriangleCount)
            + ((long)quadrilaterals.PerInterior * Mesh.QuadrilateralCount);
        if (count >= Array.MaxLength)
        {
            throw new SizeLimitException(
                $"The mesh of {Mesh.CellCount} cells would have {count} unknowns; at most {Array.MaxLength - 1} can be "
                + "numbered. Use a coarser mesh or a lower degree.");
        }

        return (int)count;
    }

    private int[] FirstOfEachVertex()
    {
        int[] starts = new int[Mesh.VertexCount];
        Array.Fill(starts, PerVertex);
        if (PerEdge > 0)
        {
            for (int edge = 0; edge < Mesh.EdgeCount; edge++)
            {
                starts[Mesh.EndsOf(edge).From] += PerEdge;
            }
        }

        for (int cell = 0; cell < Mesh.CellCount; cell++)
        {
            int interiors = LayoutOf(Mesh.KindOf(cell)).PerInterior;
            if (interiors > 0)
            {
                starts[Lowest(Mesh.VerticesOf(cell))] += interiors;
            }
        }

        int total = 0;
        for (int vertex = 0; vertex < starts.Length; vertex++)
        {
            int own = starts[vertex];
            starts[vertex] = total;
            total += own;
        }

        return starts;
    }

    private static void Advance(int[] next, int step)
    {
        for (int vertex = 0; vertex < next.Length; vertex++)
        {
            next[vertex] += step;
        }
    }

    private int[] PlaceEdges(int[] next)
    {
        int[] starts = new int[Mesh.EdgeCount];
        for (int edge = 0; edge < starts.Length; edge++)
        {
            int from = Mesh.EndsOf(edge).From;
            starts[edge] = next[from];
            next[from] += PerEdge;
        }

        return starts;
    }

    private int[] PlaceInteriors(int[] next)
    {
        int[] starts = new int[Mesh.CellCount];
        for (int cell = 0; cell < starts.Length; cell++)
        {
            int lowest = Lowest(Mesh.VerticesOf(cell));
            starts[cell] = next[lowest];
            next[lowest] += LayoutOf(Mesh.KindOf(cell)).PerInterior;
        }

        return starts;
    }

    private static int Lowest(ReadOnlySpan<int> vertices)
    {
        int lowest = vertices[0];
        foreach (int vertex in vertices)
        {
            lowest = Math.Min(lowest, vertex);
        }

        return lowest;
    }
}
