namespace FemCore2D.Geometry.Tests;

/// <content>Delaunay property, angles, and bent cells.</content>
internal sealed partial class MeshAudit
{
    private void EdgesAreDelaunay()
    {
        for (int edge = 0; edge < mesh.EdgeCount; edge++)
        {
            (int left, int right) = mesh.CellsOf(edge);
            if (left < 0 || right < 0 || pieceOfEdge[edge] >= 0)
                continue;
            ReadOnlySpan<int> v = mesh.VerticesOf(left);
            (int from, int to) = mesh.EndsOf(edge);
            int apex = mesh.VerticesOf(right).ToArray().Single(vertex => vertex != from && vertex != to);
            Assert.True(Predicates.InCircle(
                mesh.Vertices[v[0]], mesh.Vertices[v[1]], mesh.Vertices[v[2]], mesh.Vertices[apex]) <= 0);
        }
    }

    private void AnglesAreMet()
    {
        List<(Point2D Place, double Degrees)> corners = SmallCorners();
        for (int cell = 0; cell < mesh.CellCount; cell++)
        {
            ReadOnlySpan<int> v = mesh.VerticesOf(cell);
            Point2D[] p = [mesh.Vertices[v[0]], mesh.Vertices[v[1]], mesh.Vertices[v[2]]];
            double smallest = Enumerable.Range(0, 3).Min(i => AngleBetween(p[(i + 1) % 3] - p[i], p[(i + 2) % 3] - p[i]));
            if (smallest >= options.SmallestAngleDegrees - 1e-9)
                continue;
            double longest = Enumerable.Range(0, 3).Max(i => p[i].DistanceTo(p[(i + 1) % 3]));
            Assert.True(
                corners.Any(corner => p.Min(corner.Place.DistanceTo) <= longest * Math.Clamp(90 / corner.Degrees, 4, 360)),
                $"The cell at {p[0]}, {p[1]}, {p[2]} has an angle of {smallest} degrees away from small corners.");
        }

        Assert.All(report.ForcedAngles, forced => Assert.NotNull(forced.InputDegrees));
    }

    private List<(Point2D Place, double Degrees)> SmallCorners()
    {
        List<(Point2D, double)> corners = [];
        for (int vertex = 0; vertex < arrangement.Vertices.Length; vertex++)
        {
            List<Vector2D> directions = [];
            for (int piece = 0; piece < curves.Length; piece++)
            {
                if (arrangement.Pieces[piece].Start == vertex)
                    directions.Add(curves[piece].Departure(atEnd: false));
                if (arrangement.Pieces[piece].End == vertex)
                    directions.Add(curves[piece].Departure(atEnd: true));
            }

            for (int i = 0; i < directions.Count; i++)
            {
                for (int k = 0; k < i; k++)
                {
                    double degrees = AngleBetween(directions[i], directions[k]);
                    if (degrees < 61)
                        corners.Add((arrangement.Vertices[vertex], degrees));
                }
            }
        }

        return corners;
    }

    /// <summary>The map of degree 2 of every cell with bent edges has a positive Jacobian, but for the tips of cusps.</summary>
    private void CurvedCellsAreValid()
    {
        for (int cell = 0; cell < mesh.CellCount && mesh.HasArcs; cell++)
        {
            ReadOnlySpan<int> v = mesh.VerticesOf(cell);
            ReadOnlySpan<int> edges = mesh.EdgesOf(cell);
            Vector2D[] corner = new Vector2D[3];
            Vector2D[] middle = new Vector2D[3];
            bool isBent = false;
            for (int i = 0; i < 3; i++)
            {
                (int from, _) = mesh.EndsOf(edges[i]);
                double sweep = mesh.SweepRadiansOf(edges[i]) * (from == v[i] ? 1 : -1);
                isBent |= sweep != 0;
                Point2D a = mesh.Vertices[v[i]];
                corner[i] = a - mesh.Vertices[v[0]];
                middle[i] = new PieceCurve(a, mesh.Vertices[v[(i + 1) % 3]], sweep).PointAt(0.5) - mesh.Vertices[v[0]];
            }

            double area = corner[1].Cross(corner[2]);
            for (int i = 0; i <= 8 && isBent; i++)
            {
                for (int k = 0; i + k <= 8; k++)
                {
                    double jacobian = Jacobian(corner, middle, i / 8.0, k / 8.0);
                    bool isCorner = (i == 0 || i == 8) && (k == 0 || k == 8);
                    Assert.True(
                        jacobian > (isCorner ? -1e-9 : 0) * area,
                        $"The curved cell at {mesh.Vertices[v[0]]}, {mesh.Vertices[v[1]]}, {mesh.Vertices[v[2]]} overlaps itself: {jacobian / area}.");
                }
            }
        }
    }

    private static double Jacobian(Vector2D[] corner, Vector2D[] middle, double b, double c)
    {
        double a = 1 - b - c;
        Vector2D alongB = ((1 - (4 * a)) * corner[0]) + (((4 * b) - 1) * corner[1])
            + (4 * (a - b) * middle[0]) + (4 * c * middle[1]) - (4 * c * middle[2]);
        Vector2D alongC = ((1 - (4 * a)) * corner[0]) + (((4 * c) - 1) * corner[2])
            - (4 * b * middle[0]) + (4 * b * middle[1]) + (4 * (a - c) * middle[2]);
        return alongB.Cross(alongC);
    }

    private static double AngleBetween(Vector2D a, Vector2D b) => Math.Atan2(Math.Abs(a.Cross(b)), a.Dot(b)) * 180 / Math.PI;
}
