namespace FemCore2D.Geometry;

/// <summary>
/// A few vertices inside the regions, some edges apart from each other and from all pieces, with which the
/// triangulation of the boundaries starts.
/// </summary>
/// <remarks>
/// Without them, thousands of vertices on one circle would see no other vertex inside it, and each triangle of the
/// start would have that same circle for its own: the slowest case of exact predicates, and of insertion.
/// </remarks>
internal static class Scaffold
{
    private const double SpacingOverSize = 6;
    private const double ClearanceOverSize = 1.5;
    private const int LargestDepth = 20;

    public static List<Point2D> Make(MeshPlan plan, SizeField field, CancellationToken cancellation)
    {
        SizeField distance = new(
            plan.Curves.Select(curve => new SizeSource(curve, 0)), growth: 2, cap: 4 * plan.Extent, plan.Low, plan.High);
        List<Point2D> points = [];
        Vector2D half = 0.5 * new Vector2D(plan.Extent, plan.Extent);
        Divide(plan.Low + half, half.X, 0);
        return points;

        void Divide(Point2D centre, double halfSide, int depth)
        {
            double size = field.At(centre, double.PositiveInfinity);
            if (halfSide > SpacingOverSize * size / 2 && depth < LargestDepth)
            {
                cancellation.ThrowIfCancellationRequested();
                double step = halfSide / 2;
                Divide(centre + new Vector2D(-step, -step), step, depth + 1);
                Divide(centre + new Vector2D(step, -step), step, depth + 1);
                Divide(centre + new Vector2D(-step, step), step, depth + 1);
                Divide(centre + new Vector2D(step, step), step, depth + 1);
                return;
            }

            // Off the grid by an amount that looks random, so that no four points lie on a circle.
            int number = points.Count;
            Vector2D shift = halfSide * 0.3 * new Vector2D(Fraction(number * 0.6180339887498949), Fraction(number * 0.7548776662466927));
            Point2D point = centre + shift;
            double clearance = ClearanceOverSize * field.At(point, double.PositiveInfinity);
            if (distance.At(point, double.PositiveInfinity) > clearance)
                points.Add(point);
        }
    }

    private static double Fraction(double value) => value - Math.Floor(value) - 0.5;
}
