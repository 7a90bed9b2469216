using FemCore2D.Geometry;

namespace FemCore2D.Elements;

/// <content>The maps of the edges.</content>
public sealed partial class CellMaps
{
    /// <summary>The place at a parameter of a local edge of a cell.</summary>
    /// <param name="cell">The cell.</param>
    /// <param name="localEdge">The local edge.</param>
    /// <param name="parameter">0 at the edge's local start, 1 at its local end.</param>
    public Point2D PlaceOnEdge(int cell, int localEdge, double parameter) =>
        PlaceOf(cell, ReferenceCell.PointOnEdge(Mesh.KindOf(cell), localEdge, parameter));

    /// <summary>
    /// The change of place for a unit step of the parameter along a local edge of a cell, in the local direction.
    /// Its length is the ratio of metres to parameter; turned clockwise by a right angle it points out of the cell.
    /// </summary>
    /// <param name="cell">The cell.</param>
    /// <param name="localEdge">The local edge.</param>
    /// <param name="parameter">0 at the edge's local start, 1 at its local end.</param>
    public Vector2D TangentOnEdge(int cell, int localEdge, double parameter)
    {
        CellKind kind = Mesh.KindOf(cell);
        return JacobianAt(cell, ReferenceCell.PointOnEdge(kind, localEdge, parameter))
            .ToRealStep(ReferenceCell.EdgeVector(kind, localEdge));
    }

    /// <summary>The unit vector that points out of a cell at a parameter of one of its local edges.</summary>
    /// <param name="cell">The cell.</param>
    /// <param name="localEdge">The local edge.</param>
    /// <param name="parameter">0 at the edge's local start, 1 at its local end.</param>
    public Vector2D OuterNormalOnEdge(int cell, int localEdge, double parameter)
    {
        Vector2D tangent = TangentOnEdge(cell, localEdge, parameter);
        return -(tangent / tangent.Length).LeftNormal;
    }

    /// <summary>The length of an edge of the mesh, along its curve, in metres.</summary>
    /// <param name="edge">The edge, by its number in the mesh.</param>
    public double LengthOf(int edge)
    {
        (int cell, int localEdge) = CellOnEdge(edge);
        if (!curved.Contains(cell))
        {
            return TangentOnEdge(cell, localEdge, 0).Length;
        }

        EdgeRule rule = EdgeRule.For(19);
        double length = 0;
        for (int q = 0; q < rule.Count; q++)
        {
            length += rule.Weights[q] * TangentOnEdge(cell, localEdge, rule.Parameters[q]).Length;
        }

        return length;
    }

    /// <summary>A cell at an edge of the mesh, and the edge's local number in it.</summary>
    /// <param name="edge">The edge, by its number in the mesh.</param>
    /// <returns>
    /// The cell on the left, whose local direction is that of the edge, or, where there is none, the cell on the right,
    /// whose local direction is the opposite.
    /// </returns>
    public (int Cell, int LocalEdge) CellOnEdge(int edge)
    {
        (int left, int right) = Mesh.CellsOf(edge);
        int cell = left >= 0 ? left : right;
        return (cell, Mesh.EdgesOf(cell).IndexOf(edge));
    }
}
