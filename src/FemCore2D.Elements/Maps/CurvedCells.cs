using System.Runtime.CompilerServices;
using FemCore2D.Geometry;

namespace FemCore2D.Elements;

/// <summary>The nodes of all cells that bend with an arc, and their isoparametric maps.</summary>
/// <remarks>
/// Edge nodes lie on the arc at equal fractions of its sweep. Interior nodes follow by blending the rise of the arcs over
/// their chords into the cell, so that the derivatives of the map shrink with the cell size as fast as the optimal
/// convergence rates need: on squares by transfinite interpolation (W. J. Gordon and C. A. Hall, 1973), on triangles by
/// its counterpart of B. Szabo and I. Babuska (1991), which meets the conditions of M. Lenoir (1986).
/// </remarks>
internal sealed class CurvedCells
{
    private const int MaximumNodes = 16;

    private readonly int degree;
    private readonly LagrangeTriangle triangle;
    private readonly LagrangeQuadrilateral quadrilateral;

    /// <summary>For each cell the place of its first node, or -1 when it is straight; empty when all are.</summary>
    private readonly int[] firstNodes;
    private readonly Point2D[] nodes;

    public CurvedCells(Mesh mesh, int degree)
    {
        this.degree = degree;
        triangle = new LagrangeTriangle(degree);
        quadrilateral = new LagrangeQuadrilateral(degree);
        (firstNodes, int nodeCount) = degree > 1 && mesh.HasArcs ? NumberNodes(mesh) : ([], 0);
        nodes = new Point2D[nodeCount];
        for (int cell = 0; cell < firstNodes.Length; cell++)
        {
            if (firstNodes[cell] >= 0)
            {
                PlaceNodes(mesh, cell, nodes.AsSpan(firstNodes[cell]));
            }
        }
    }

    public bool Any => nodes.Length > 0;

    public bool Contains(int cell) => firstNodes.Length > 0 && firstNodes[cell] >= 0;

    /// <summary>The vector from the first vertex to the place of a point.</summary>
    [SkipLocalsInit]
    public Vector2D OffsetOf(int cell, CellKind kind, Point2D reference)
    {
        Span<double> shapes = stackalloc double[MaximumNodes];
        int count = kind == CellKind.Triangle ? triangle.UnknownCount : quadrilateral.UnknownCount;
        if (kind == CellKind.Triangle)
        {
            triangle.Values(reference, shapes);
        }
        else
        {
            quadrilateral.Values(reference, shapes);
        }

        ReadOnlySpan<Point2D> own = nodes.AsSpan(firstNodes[cell], count);
        Vector2D sum = default;
        for (int i = 1; i < own.Length; i++)
        {
            sum += shapes[i] * (own[i] - own[0]);
        }

        return sum;
    }

    [SkipLocalsInit]
    public Jacobian JacobianAt(int cell, CellKind kind, Point2D reference)
    {
        Span<Vector2D> slopes = stackalloc Vector2D[MaximumNodes];
        int count = kind == CellKind.Triangle ? triangle.UnknownCount : quadrilateral.UnknownCount;
        if (kind == CellKind.Triangle)
        {
            triangle.Gradients(reference, slopes);
        }
        else
        {
            quadrilateral.Gradients(reference, slopes);
        }

        ReadOnlySpan<Point2D> own = nodes.AsSpan(firstNodes[cell], count);
        Vector2D xi = default;
        Vector2D eta = default;
        for (int i = 1; i < own.Length; i++)
        {
            Vector2D step = own[i] - own[0];
            xi += slopes[i].X * step;
            eta += slopes[i].Y * step;
        }

        return new Jacobian(xi, eta);
    }

    private (int[] FirstNodes, int NodeCount) NumberNodes(Mesh mesh)
    {
        int[] first = new int[mesh.CellCount];
        Array.Fill(first, -1);
        for (int edge = 0; edge < mesh.EdgeCount; edge++)
        {
            if (mesh.SweepRadiansOf(edge) != 0)
            {
                (int left, int right) = mesh.CellsOf(edge);
                first[left >= 0 ? left : right] = 0;
                first[right >= 0 ? right : left] = 0;
            }
        }

        int next = 0;
        for (int cell = 0; cell < first.Length; cell++)
        {
            if (first[cell] >= 0)
            {
                first[cell] = next;
                next = checked(next + (cell < mesh.TriangleCount ? triangle.UnknownCount : quadrilateral.UnknownCount));
            }
        }

        return (first, next);
    }

    private void PlaceNodes(Mesh mesh, int cell, Span<Point2D> own)
    {
        ReadOnlySpan<int> vertices = mesh.VerticesOf(cell);
        int corners = vertices.Length;
        for (int i = 0; i < corners; i++)
        {
            own[i] = mesh.Vertices[vertices[i]];
        }

        int next = corners;
        for (int edge = 0; edge < corners; edge++)
        {
            for (int k = 1; k < degree; k++)
            {
                double fraction = (double)k / degree;
                own[next++] = own[edge].Towards(own[(edge + 1) % corners], fraction) + Rise(mesh, cell, edge, fraction);
            }
        }

        ReadOnlySpan<Point2D> lattice = corners == 3 ? triangle.NodePoints : quadrilateral.NodePoints;
        for (; next < lattice.Length; next++)
        {
            own[next] = corners == 3
                ? InsideTriangle(mesh, cell, own, lattice[next])
                : InsideQuadrilateral(mesh, cell, own, lattice[next]);
        }
    }

    /// <summary>The rise of a local edge over its chord, at a fraction counted in the local direction.</summary>
    private static Vector2D Rise(Mesh mesh, int cell, int localEdge, double fraction)
    {
        int edge = mesh.EdgesOf(cell)[localEdge];
        double sweep = mesh.SweepRadiansOf(edge);
        if (sweep == 0)
        {
            return default;
        }

        // In the edge's own direction, so that both cells of an edge compute the same bits.
        (int from, int to) = mesh.EndsOf(edge);
        bool along = mesh.VerticesOf(cell)[localEdge] == from;
        return ArcPoint.Rise(mesh.Vertices[to] - mesh.Vertices[from], sweep, along ? fraction : 1 - fraction);
    }

    private static Point2D InsideTriangle(Mesh mesh, int cell, ReadOnlySpan<Point2D> corners, Point2D reference)
    {
        Barycentric at = Barycentric.OfReference(reference);
        ReadOnlySpan<double> weights = [at.First, at.Second, at.Third];
        Point2D place = at.PlaceIn(corners[0], corners[1], corners[2]);
        for (int edge = 0; edge < 3; edge++)
        {
            double start = weights[edge];
            double end = weights[(edge + 1) % 3];
            double fraction = (1 + end - start) / 2;
            place += start * end / (fraction * (1 - fraction)) * Rise(mesh, cell, edge, fraction);
        }

        return place;
    }

    private static Point2D InsideQuadrilateral(Mesh mesh, int cell, ReadOnlySpan<Point2D> corners, Point2D reference)
    {
        (double xi, double eta) = (reference.X, reference.Y);
        return corners[0] + new BilinearMap(corners[0], corners[1], corners[2], corners[3]).OffsetOf(reference)
            + ((1 - eta) * Rise(mesh, cell, 0, xi))
            + (xi * Rise(mesh, cell, 1, eta))
            + (eta * Rise(mesh, cell, 2, 1 - xi))
            + ((1 - xi) * Rise(mesh, cell, 3, 1 - eta));
    }
}
