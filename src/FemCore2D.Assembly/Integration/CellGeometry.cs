using System.Runtime.CompilerServices;
using FemCore2D.Elements;
using FemCore2D.Geometry;

namespace FemCore2D.Assembly;

/// <summary>The map of one cell, at hand for the inner loops: straight cells are computed here, curved ones by their maps.</summary>
internal readonly struct CellGeometry
{
    private readonly Point2D origin;
    private readonly Vector2D alongXi;
    private readonly Vector2D alongEta;
    private readonly Vector2D twist;
    private readonly CellMaps? curved;
    private readonly int cell;

    /// <summary>The map of a straight triangle.</summary>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public CellGeometry(Point2D first, Point2D second, Point2D third)
    {
        origin = first;
        alongXi = second - first;
        alongEta = third - first;
        IsAffine = true;
    }

    private CellGeometry(CellMaps maps, int cell)
    {
        Mesh mesh = maps.Mesh;
        this.cell = cell;
        ReadOnlySpan<int> corners = mesh.VerticesOf(cell);
        ReadOnlySpan<Point2D> vertices = mesh.Vertices;
        origin = vertices[corners[0]];
        alongXi = vertices[corners[1]] - origin;
        alongEta = vertices[corners[^1]] - origin;
        IsAffine = maps.IsAffine(cell);
        if (IsAffine)
        {
            return;
        }

        if (!maps.IsCurved(cell))
        {
            twist = vertices[corners[2]] - vertices[corners[1]] - alongEta;
        }
        else
        {
            curved = maps;
        }
    }

    /// <summary>Whether the derivative of the map is the same everywhere.</summary>
    public bool IsAffine { get; }

    /// <summary>The map of any cell.</summary>
    public static CellGeometry Of(CellMaps maps, int cell) => new(maps, cell);

    /// <summary>The derivative of an affine map.</summary>
    public Jacobian Jacobian
    {
        [MethodImpl(MethodImplOptions.AggressiveInlining)]
        get => new(alongXi, alongEta);
    }

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public Jacobian JacobianAt(Point2D reference) => IsAffine
        ? Jacobian
        : curved is null
        ? new Jacobian(alongXi + (reference.Y * twist), alongEta + (reference.X * twist))
        : curved.JacobianAt(cell, reference);

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public Point2D PlaceAt(Point2D reference) => curved is null
        ? origin + (reference.X * alongXi) + (reference.Y * alongEta) + (reference.X * reference.Y * twist)
        : curved.PlaceOf(cell, reference);
}
