namespace FemCore2D.Geometry;

/// <content>Lengths, areas and points of edges and cells, arcs included.</content>
public sealed partial class Mesh
{
    /// <summary>The smallest box around the mesh, arcs included.</summary>
    public Box2D Bounds
    {
        get
        {
            Box2D box = Box2D.Empty;
            foreach (Point2D vertex in Vertices)
            {
                box = box.With(vertex);
            }

            for (int edge = 0; edge < arrays.EdgeSweeps.Length; edge++)
            {
                box = arrays.EdgeSweeps[edge] != 0 ? box.Union(CurveOf(edge).Bounds) : box;
            }

            return box;
        }
    }

    /// <summary>The point of an edge after a fraction of its length, in the edge's direction; on the arc of a curved edge.</summary>
    /// <param name="edge">The edge.</param>
    /// <param name="fraction">From 0 at its first vertex to 1 at its second.</param>
    public Point2D PointOnEdge(int edge, double fraction) => CurveOf(edge).PointAt(fraction);

    /// <summary>
    /// The derivative of <see cref="PointOnEdge"/> with respect to the fraction: tangent to the edge, as long as the edge.
    /// </summary>
    /// <param name="edge">The edge.</param>
    /// <param name="fraction">From 0 at its first vertex to 1 at its second.</param>
    public Vector2D TangentOnEdge(int edge, double fraction) => LengthOf(edge) * CurveOf(edge).TangentAt(fraction);

    /// <summary>The length of an edge, along its arc if it has one, in metres.</summary>
    public double LengthOf(int edge) => CurveOf(edge).Length;

    /// <summary>The area of a cell within its straight and arc edges, in square metres.</summary>
    public double AreaOf(int cell)
    {
        ReadOnlySpan<int> corners = VerticesOf(cell);
        Point2D first = arrays.Vertices[corners[0]];
        double twice = 0;
        Vector2D previous = arrays.Vertices[corners[1]] - first;
        for (int i = 2; i < corners.Length; i++)
        {
            Vector2D next = arrays.Vertices[corners[i]] - first;
            twice += previous.Cross(next);
            previous = next;
        }

        double area = 0.5 * twice;
        if (HasArcs)
        {
            foreach (int edge in EdgesOf(cell))
            {
                if (arrays.EdgeSweeps[edge] != 0)
                {
                    double beyond = CurveOf(edge).SegmentArea;
                    area += arrays.EdgeCells[2 * edge] == cell ? beyond : -beyond;
                }
            }
        }

        return area;
    }

    /// <summary>The area of a region, in square metres.</summary>
    /// <exception cref="UnknownNameException">No region has that name.</exception>
    public double AreaOfRegion(string region)
    {
        double area = 0;
        foreach (int cell in CellsIn(region))
        {
            area += AreaOf(cell);
        }

        return area;
    }

    /// <summary>The length of a boundary along its straight and arc edges, in metres.</summary>
    /// <exception cref="UnknownNameException">No boundary has that name.</exception>
    public double LengthOfBoundary(string boundary)
    {
        double length = 0;
        foreach (int edge in BoundaryEdges(boundary))
        {
            length += LengthOf(edge);
        }

        return length;
    }

    /// <summary>Whether any edge of a cell follows an arc.</summary>
    public bool IsCurved(int cell)
    {
        if (HasArcs)
        {
            foreach (int edge in EdgesOf(cell))
            {
                if (arrays.EdgeSweeps[edge] != 0)
                {
                    return true;
                }
            }
        }

        return false;
    }

    /// <summary>The line of an edge in its own direction.</summary>
    internal OutlinePiece CurveOf(int edge) => new(
        arrays.Vertices[arrays.EdgeVertices[2 * edge]],
        arrays.Vertices[arrays.EdgeVertices[(2 * edge) + 1]],
        SweepRadiansOf(edge));

    /// <summary>The line of a local edge of a cell, counterclockwise around the cell.</summary>
    internal OutlinePiece SideOf(int cell, int localEdge)
    {
        int edge = EdgesOf(cell)[localEdge];
        OutlinePiece curve = CurveOf(edge);
        return arrays.EdgeCells[2 * edge] == cell ? curve : curve.Reversed();
    }

    /// <summary>The smallest box around a cell.</summary>
    internal Box2D BoxOf(int cell)
    {
        Box2D box = Box2D.Empty;
        foreach (int vertex in VerticesOf(cell))
        {
            box = box.With(arrays.Vertices[vertex]);
        }

        if (HasArcs)
        {
            foreach (int edge in EdgesOf(cell))
            {
                box = arrays.EdgeSweeps[edge] != 0 ? box.Union(CurveOf(edge).Bounds) : box;
            }

            // The extreme points of arcs are rounded.
            double largest = Math.Max(
                Math.Max(Math.Abs(box.Lower.X), Math.Abs(box.Upper.X)),
                Math.Max(Math.Abs(box.Lower.Y), Math.Abs(box.Upper.Y)));
            return box.Widened(1e-15 * largest);
        }

        return box;
    }
}
