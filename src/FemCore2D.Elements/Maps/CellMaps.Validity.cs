using FemCore2D.Geometry;

namespace FemCore2D.Elements;

/// <content>The check that no cell folds over.</content>
public sealed partial class CellMaps
{
    /// <summary>Intervals along each reference coordinate between the points at which curved cells are checked.</summary>
    private const int CheckIntervals = 6;

    private void CheckJacobians()
    {
        ReadOnlySpan<Point2D> corners = ReferenceCell.Vertices(CellKind.Quadrilateral);
        ReadOnlySpan<Point2D> inTriangle = Lattice(CellKind.Triangle);
        ReadOnlySpan<Point2D> inQuadrilateral = Lattice(CellKind.Quadrilateral);
        for (int cell = 0; cell < Mesh.CellCount; cell++)
        {
            bool isTriangle = cell < Mesh.TriangleCount;

            // The determinant of a straight cell is linear along each reference coordinate: its vertices decide.
            ReadOnlySpan<Point2D> points = curved.Contains(cell)
                ? isTriangle ? inTriangle : inQuadrilateral
                : isTriangle ? corners[..1] : corners;
            foreach (Point2D point in points)
            {
                double determinant = JacobianAt(cell, point).Determinant;
                if (!(determinant > 0 && double.IsFinite(determinant)))
                {
                    throw Fold(cell, point, determinant);
                }
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

    private static Point2D[] Lattice(CellKind cell)
    {
        List<Point2D> points = [];
        for (int j = 0; j <= CheckIntervals; j++)
        {
            int end = cell == CellKind.Triangle ? CheckIntervals - j : CheckIntervals;
            for (int i = 0; i <= end; i++)
            {
                points.Add(new Point2D((double)i / CheckIntervals, (double)j / CheckIntervals));
            }
        }

        return [.. points];
    }
}
