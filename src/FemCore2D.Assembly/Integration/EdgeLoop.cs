using System.Numerics;
using FemCore2D.Elements;
using FemCore2D.Geometry;
using FemCore2D.Sparse;

namespace FemCore2D.Assembly;

/// <summary>
/// Adds terms on edges. Edges of a boundary are few beside the cells, so that one thread does them in their order.
/// </summary>
internal sealed class EdgeLoop(NodeSpace space, int extraDegree)
{
    private readonly TraceTable?[] triangles = new TraceTable?[EdgeRule.MaximumDegree + 1];
    private readonly TraceTable?[] quadrilaterals = new TraceTable?[EdgeRule.MaximumDegree + 1];

    public void AddMatrix<T, TTerm>(SparseMatrix<T> matrix, TTerm term, ReadOnlySpan<int> edges)
        where T : unmanaged, INumberBase<T>
        where TTerm : struct, IEdgeMatrixTerm<T>
    {
        Span<int> unknowns = stackalloc int[space.Numbering.EdgeUnknownCount];
        Span<T> values = matrix.Values;
        ReadOnlySpan<int> rowStarts = matrix.Pattern.RowStarts;
        foreach (int edge in edges)
        {
            Side side = SideOf(edge, unknowns);
            TraceTable tables = TablesFor(side, (2 * space.Degree) + term.DegreeIn(side.Region));
            for (int q = 0; q < tables.PointCount; q++)
            {
                EdgePoint point = PointAt(tables, side, q);
                T weighted = Scalar.Scale(term.At(point), point.Weight);
                ReadOnlySpan<double> shapes = tables.ValuesAt(q);
                for (int i = 0; i < shapes.Length; i++)
                {
                    int row = unknowns[i];
                    int start = rowStarts[row];
                    ReadOnlySpan<int> columns = matrix.Pattern.ColumnsOf(row);
                    for (int j = 0; j < shapes.Length; j++)
                    {
                        // The product of the shapes is taken first, so that the matrix is symmetric to the bit.
                        values[start + columns.BinarySearch(unknowns[j])] +=
                            Scalar.Scale(weighted, shapes[i] * shapes[j]);
                    }
                }
            }
        }
    }

    public void AddVector<T, TTerm>(Span<T> vector, TTerm term, ReadOnlySpan<int> edges)
        where T : unmanaged, INumberBase<T>
        where TTerm : struct, IEdgeVectorTerm<T>
    {
        Span<int> unknowns = stackalloc int[space.Numbering.EdgeUnknownCount];
        foreach (int edge in edges)
        {
            Side side = SideOf(edge, unknowns);
            TraceTable tables = TablesFor(side, space.Degree + term.DegreeIn(side.Region));
            for (int q = 0; q < tables.PointCount; q++)
            {
                EdgePoint point = PointAt(tables, side, q);
                T weighted = Scalar.Scale(term.At(point), point.Weight);
                ReadOnlySpan<double> shapes = tables.ValuesAt(q);
                for (int i = 0; i < shapes.Length; i++)
                {
                    vector[unknowns[i]] += Scalar.Scale(weighted, shapes[i]);
                }
            }
        }
    }

    /// <summary>Finds the cell from which an edge is seen, and the edge's unknowns in that cell's direction.</summary>
    private Side SideOf(int edge, Span<int> unknowns)
    {
        Mesh mesh = space.Mesh;
        (int left, int right) = mesh.CellsOf(edge);
        int cell = left >= 0 ? left : right;
        int local = mesh.EdgesOf(cell).IndexOf(edge);
        space.Numbering.UnknownsOfEdge(edge, unknowns);
        if (left < 0)
        {
            unknowns[..2].Reverse();
            unknowns[2..].Reverse();
        }

        return new Side(edge, cell, mesh.CellRegions[cell], mesh.KindOf(cell), local, mesh.SweepRadiansOf(edge) != 0);
    }

    private TraceTable TablesFor(Side side, int degree)
    {
        // The length along a curved edge is no polynomial: twice the degree of its map makes up for it.
        int needed = degree + extraDegree + (side.Curved ? 2 * (space.Maps.Degree - 1) : 0);
        if (needed > EdgeRule.MaximumDegree)
        {
            throw new ArgumentOutOfRangeException(
                nameof(degree),
                $"The term needs quadrature of degree {needed} on edge {side.Edge}, but rules end at "
                + $"{EdgeRule.MaximumDegree}. Lower the degree of its coefficient, the extra degree or the degree of the space.");
        }

        TraceTable?[] tables = side.Kind == CellKind.Triangle ? triangles : quadrilaterals;
        return tables[needed] ??= new TraceTable(space.ElementOn(side.Kind), EdgeRule.For(needed));
    }

    private EdgePoint PointAt(TraceTable tables, Side side, int q)
    {
        Point2D reference = ReferenceCell.PointOnEdge(side.Kind, side.LocalEdge, tables.Rule.Parameters[q]);
        Jacobian map = space.Maps.JacobianAt(side.Cell, reference);
        Vector2D step = ReferenceCell.EdgeVector(side.Kind, side.LocalEdge);
        Vector2D tangent = (step.X * map.Xi) + (step.Y * map.Eta);
        double speed = tangent.Length;

        // A cell lies on the left of its edges, so that the outside is on the right.
        Vector2D normal = -(tangent / speed).LeftNormal;
        return new EdgePoint(
            side.Edge, side.Cell, side.Region, reference, space.Maps.PlaceOf(side.Cell, reference), normal,
            tables.Rule.Weights[q] * speed);
    }

    private readonly record struct Side(int Edge, int Cell, int Region, CellKind Kind, int LocalEdge, bool Curved);
}
