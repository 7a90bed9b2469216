using System.Collections.Immutable;

namespace FemCore2D.Geometry;

/// <summary>
/// A conforming mesh of triangles and quadrilaterals: immutable, safe to read from many threads.
/// </summary>
/// <remarks>
/// <para>Cells are numbered with all triangles first and all quadrilaterals after them; each lists its vertices
/// counterclockwise, and its local edge <c>i</c> joins its local vertices <c>i</c> and <c>i + 1</c> (cyclically).</para>
/// <para>Every edge has one direction for all its cells: from the lower to the higher vertex number.</para>
/// <para>An edge on a circular arc knows the angle that it sweeps, so that a curved map can put its points exactly
/// on the arc.</para>
/// </remarks>
public sealed partial class Mesh
{
    private readonly MeshArrays arrays;

    internal Mesh(MeshArrays arrays) => this.arrays = arrays;

    internal MeshArrays Arrays => arrays;

    /// <summary>The number of vertices.</summary>
    public int VertexCount => arrays.Vertices.Length;

    /// <summary>The number of edges.</summary>
    public int EdgeCount => arrays.EdgeVertices.Length / 2;

    /// <summary>The number of cells of both kinds.</summary>
    public int CellCount => TriangleCount + QuadrilateralCount;

    /// <summary>The number of triangles; they are the cells from 0 on.</summary>
    public int TriangleCount => arrays.Triangles.Length / 3;

    /// <summary>The number of quadrilaterals; they are the cells from <see cref="TriangleCount"/> on.</summary>
    public int QuadrilateralCount => arrays.Quadrilaterals.Length / 4;

    /// <summary>The vertices, in metres.</summary>
    public ReadOnlySpan<Point2D> Vertices => arrays.Vertices;

    /// <summary>The vertices of all triangles, three a triangle, counterclockwise.</summary>
    public ReadOnlySpan<int> Triangles => arrays.Triangles;

    /// <summary>The vertices of all quadrilaterals, four each, counterclockwise.</summary>
    public ReadOnlySpan<int> Quadrilaterals => arrays.Quadrilaterals;

    /// <summary>The region of every cell, as an index into <see cref="RegionNames"/>.</summary>
    public ReadOnlySpan<int> CellRegions => arrays.CellRegions;

    /// <summary>The names of the regions.</summary>
    public ImmutableArray<string> RegionNames => arrays.RegionNames;

    /// <summary>The names of the boundaries (named lines, inside the section or around it).</summary>
    public ImmutableArray<string> BoundaryNames => arrays.BoundaryNames;

    /// <summary>The names of the fixed points.</summary>
    public ImmutableArray<string> PointNames => arrays.PointNames;

    /// <summary>Whether any edge follows an arc.</summary>
    public bool HasArcs => arrays.EdgeSweeps.Length > 0;

    /// <summary>The shape of a cell.</summary>
    public CellKind KindOf(int cell) => cell < TriangleCount ? CellKind.Triangle : CellKind.Quadrilateral;

    /// <summary>The vertices of a cell, counterclockwise: three or four.</summary>
    public ReadOnlySpan<int> VerticesOf(int cell)
    {
        int triangles = TriangleCount;
        return cell < triangles
            ? arrays.Triangles.AsSpan(3 * cell, 3)
            : arrays.Quadrilaterals.AsSpan(4 * (cell - triangles), 4);
    }

    /// <summary>The edges of a cell; the i-th joins its i-th vertex to the next one.</summary>
    public ReadOnlySpan<int> EdgesOf(int cell)
    {
        int triangles = TriangleCount;
        return cell < triangles
            ? arrays.CellEdges.AsSpan(3 * cell, 3)
            : arrays.CellEdges.AsSpan((3 * triangles) + (4 * (cell - triangles)), 4);
    }

    /// <summary>The two vertices of an edge; the first has the lower number, which gives the edge its direction.</summary>
    public (int From, int To) EndsOf(int edge) =>
        (arrays.EdgeVertices[2 * edge], arrays.EdgeVertices[(2 * edge) + 1]);

    /// <summary>The cells on the left and on the right of an edge's direction; -1 where there is none.</summary>
    public (int Left, int Right) CellsOf(int edge) => (arrays.EdgeCells[2 * edge], arrays.EdgeCells[(2 * edge) + 1]);

    /// <summary>
    /// The angle swept by the arc on which an edge lies, in radians, seen in the edge's direction: positive when the
    /// arc turns counterclockwise, zero for a straight edge.
    /// </summary>
    public double SweepRadiansOf(int edge) => arrays.EdgeSweeps.Length == 0 ? 0 : arrays.EdgeSweeps[edge];

    /// <summary>Whether an edge has a cell on one side only.</summary>
    public bool IsOuter(int edge) => arrays.EdgeCells[2 * edge] < 0 || arrays.EdgeCells[(2 * edge) + 1] < 0;

    /// <summary>The index of a region in <see cref="RegionNames"/>.</summary>
    /// <exception cref="UnknownNameException">No region has that name.</exception>
    public int RegionIndex(string region) => IndexOf("region", region, arrays.RegionNames);

    /// <summary>The edges of a named boundary, ascending.</summary>
    /// <exception cref="UnknownNameException">No boundary has that name.</exception>
    public ReadOnlySpan<int> BoundaryEdges(string boundary) =>
        arrays.BoundaryEdges[IndexOf("boundary", boundary, arrays.BoundaryNames)];

    /// <summary>The vertex at a named fixed point.</summary>
    /// <exception cref="UnknownNameException">No fixed point has that name.</exception>
    public int VertexAt(string point) => arrays.PointVertices[IndexOf("point", point, arrays.PointNames)];

    /// <inheritdoc/>
    public override string ToString() => string.Create(
        null,
        $"Mesh of {VertexCount} vertices, {EdgeCount} edges, {TriangleCount} triangles and {QuadrilateralCount} quadrilaterals");

    private static int IndexOf(string kind, string name, ImmutableArray<string> names)
    {
        ArgumentNullException.ThrowIfNull(name);
        int index = names.IndexOf(name);
        return index >= 0 ? index : throw new UnknownNameException(kind, name, names);
    }
}
