using FemCore2D.Geometry;

namespace FemCore2D.Elements;

/// <content>The check that no cell folds over.</content>
public sealed partial class CellMaps
{
    private void CheckJacobians()
    {
        ReadOnlySpan<Point2D> corners = ReferenceCell.Vertices(CellKind.Quadrilateral);
        for (int cell = 0; cell < Mesh.CellCount; cell++)
        {
            if (curved.Contains(cell))
            {
                continue;
            }

            // The determinant of a straight cell is linear along each reference coordinate: its vertices decide.
            foreach (Point2D corner in cell < Mesh.TriangleCount ? corners[..1] : corners)
            {
                double determinant = JacobianAt(cell, corner).Determinant;
                if (!(determinant > 0 && double.IsFinite(determinant)))
                {
                    throw Fold(cell, corner, determinant);
                }
            }
        }

        if (curved.Any)
        {
            CheckCurvedCells();
        }
    }

    private void CheckCurvedCells()
    {
        PositivityCheck triangle = new(CellKind.Triangle, Degree);
        PositivityCheck quadrilateral = new(CellKind.Quadrilateral, Degree);
        for (int cell = 0; cell < Mesh.CellCount; cell++)
        {
            PositivityCheck check = cell < Mesh.TriangleCount ? triangle : quadrilateral;
            if (curved.Contains(cell) && check.TryFindFold(new Determinant(this, cell), out Point2D fold))
            {
                throw Fold(cell, fold, JacobianAt(cell, fold).Determinant);
            }
        }
    }

    private InvalidCellException Fold(int cell, Point2D reference, double determinant)
    {
        Point2D place = PlaceOf(cell, reference);
        string remedy = curved.Contains(cell)
            ? "An arc bends the cell too far: refine the mesh along the arc, or use maps of degree 1."
            : "List its vertices counterclockwise, apart from each other and convex.";
        return new InvalidCellException(
            $"Cell {cell} ({Mesh.KindOf(cell)}, region '{Mesh.RegionNames[Mesh.CellRegions[cell]]}') collapses or folds "
            + $"over at {place}: its Jacobian is {determinant:G3} there, but must be positive. {remedy}",
            cell,
            place);
    }

    private readonly struct Determinant(CellMaps maps, int cell) : IDeterminant
    {
        public double DeterminantAt(Point2D reference) => maps.JacobianAt(cell, reference).Determinant;
    }
}
