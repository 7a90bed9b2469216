using FemCore2D.Geometry;

namespace FemCore2D.Elements;

/// <summary>
/// The maps from the reference cells to all cells of a mesh, of a chosen geometric degree: cells with an edge on an
/// arc bend with it from degree 2 on, all others are straight. Immutable; safe to read from many threads.
/// </summary>
/// <remarks>
/// Straight triangles are affine and straight quadrilaterals bilinear images of the reference cell; both need nothing
/// but the vertices. Curved cells are isoparametric: polynomials through nodes of which those on an arc lie exactly on
/// it; only their nodes are stored.
/// </remarks>
public sealed partial class CellMaps
{
    /// <summary>The highest degree of curved cells.</summary>
    public const int MaximumDegree = 3;

    private readonly CurvedCells curved;

    /// <summary>Prepares the maps of a mesh and checks that none folds over.</summary>
    /// <param name="mesh">The mesh.</param>
    /// <param name="degree">The degree of the polynomials that describe curved cells: 1 (all straight) to 3.</param>
    /// <exception cref="ArgumentOutOfRangeException">The degree is not one of these.</exception>
    /// <exception cref="InvalidCellException">The Jacobian is not positive throughout a cell, straight or curved.</exception>
    public CellMaps(Mesh mesh, int degree)
    {
        ArgumentNullException.ThrowIfNull(mesh);
        ArgumentOutOfRangeException.ThrowIfLessThan(degree, 1);
        ArgumentOutOfRangeException.ThrowIfGreaterThan(degree, MaximumDegree);
        Mesh = mesh;
        Degree = degree;
        curved = new CurvedCells(mesh, degree);
        CheckJacobians();
    }

    /// <summary>The mesh.</summary>
    public Mesh Mesh { get; }

    /// <summary>The degree of the maps of curved cells.</summary>
    public int Degree { get; }

    /// <summary>Whether a cell bends with an arc, so that its map is a polynomial of <see cref="Degree"/>.</summary>
    public bool IsCurved(int cell) => curved.Contains(cell);

    /// <summary>Whether the map of a cell is affine (a straight triangle or a parallelogram), so that its Jacobian is the same everywhere.</summary>
    public bool IsAffine(int cell) =>
        !curved.Contains(cell) && (cell < Mesh.TriangleCount || Bilinear(cell).IsAffine);

    /// <summary>The place in the real cell of a point of the reference cell.</summary>
    public Point2D PlaceOf(int cell, Point2D reference) => FirstVertexOf(cell) + OffsetOf(cell, reference);

    /// <summary>The places in the real cell of many points of the reference cell.</summary>
    /// <param name="cell">The cell.</param>
    /// <param name="references">The points, in coordinates of the reference cell.</param>
    /// <param name="places">Receives one place a point; at least as long.</param>
    public void PlacesOf(int cell, ReadOnlySpan<Point2D> references, Span<Point2D> places)
    {
        places = places[..references.Length];
        Point2D origin = FirstVertexOf(cell);
        if (curved.Contains(cell))
        {
            CellKind kind = Mesh.KindOf(cell);
            for (int i = 0; i < references.Length; i++)
            {
                places[i] = origin + curved.OffsetOf(cell, kind, references[i]);
            }
        }
        else if (cell < Mesh.TriangleCount)
        {
            Jacobian jacobian = Affine(cell);
            for (int i = 0; i < references.Length; i++)
            {
                places[i] = origin + jacobian.ToRealStep(references[i] - Point2D.Origin);
            }
        }
        else
        {
            BilinearMap map = Bilinear(cell);
            for (int i = 0; i < references.Length; i++)
            {
                places[i] = origin + map.OffsetOf(references[i]);
            }
        }
    }

    /// <summary>The derivative of the map at a point of the reference cell.</summary>
    public Jacobian JacobianAt(int cell, Point2D reference) =>
        curved.Contains(cell) ? curved.JacobianAt(cell, Mesh.KindOf(cell), reference)
        : cell < Mesh.TriangleCount ? Affine(cell)
        : Bilinear(cell).JacobianAt(reference);

    /// <summary>The derivatives of the map at many points of the reference cell.</summary>
    /// <param name="cell">The cell.</param>
    /// <param name="references">The points, in coordinates of the reference cell.</param>
    /// <param name="jacobians">Receives one derivative a point; at least as long.</param>
    public void JacobiansAt(int cell, ReadOnlySpan<Point2D> references, Span<Jacobian> jacobians)
    {
        jacobians = jacobians[..references.Length];
        if (curved.Contains(cell))
        {
            CellKind kind = Mesh.KindOf(cell);
            for (int i = 0; i < references.Length; i++)
            {
                jacobians[i] = curved.JacobianAt(cell, kind, references[i]);
            }
        }
        else if (cell < Mesh.TriangleCount)
        {
            jacobians.Fill(Affine(cell));
        }
        else
        {
            BilinearMap map = Bilinear(cell);
            for (int i = 0; i < references.Length; i++)
            {
                jacobians[i] = map.JacobianAt(references[i]);
            }
        }
    }

    private Point2D FirstVertexOf(int cell) => Mesh.Vertices[Mesh.VerticesOf(cell)[0]];

    /// <summary>
    /// The vector from the first vertex of a cell to the place of a point: all maps are computed relative to it, so that
    /// small cells far from the origin keep their digits.
    /// </summary>
    private Vector2D OffsetOf(int cell, Point2D reference) =>
        curved.Contains(cell) ? curved.OffsetOf(cell, Mesh.KindOf(cell), reference)
        : cell < Mesh.TriangleCount ? Affine(cell).ToRealStep(reference - Point2D.Origin)
        : Bilinear(cell).OffsetOf(reference);

    private Jacobian Affine(int triangle)
    {
        ReadOnlySpan<Point2D> vertices = Mesh.Vertices;
        ReadOnlySpan<int> corners = Mesh.Triangles.Slice(3 * triangle, 3);
        Point2D origin = vertices[corners[0]];
        return new Jacobian(vertices[corners[1]] - origin, vertices[corners[2]] - origin);
    }

    private BilinearMap Bilinear(int cell)
    {
        ReadOnlySpan<Point2D> vertices = Mesh.Vertices;
        ReadOnlySpan<int> corners = Mesh.VerticesOf(cell);
        return new BilinearMap(vertices[corners[0]], vertices[corners[1]], vertices[corners[2]], vertices[corners[3]]);
    }
}
