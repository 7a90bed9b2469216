namespace FemCore2D.Geometry;

/// <summary>Triangulates the vertices of the divided boundaries, with the segments as constraints and regions flooded.</summary>
internal static unsafe class BoundaryTriangulation
{
    public static Triangulation Make(
        MeshPlan plan, BoundaryDivision division, List<Point2D> scaffold, CancellationToken cancellation)
    {
        int count = division.Vertices.Count + scaffold.Count;
        Triangulation result = new(count + 4);
        foreach (Point2D vertex in division.Vertices.Concat(scaffold))
        {
            result.AddVertex(vertex);
        }

        Vector2D margin = new(plan.Extent, plan.Extent);
        result.AddBox(plan.Low - margin, plan.High + margin);
        InsertVertices(result, count, cancellation);
        InsertSegments(result, plan, division, cancellation);

        int clash = result.Flood(side => RegionOfSide(result, plan, side));
        return clash < 0
            ? result
            : throw new MeshingException(
                $"Two regions meet near {result.PointAt(result.StartOf(4 * clash))} without a line between them. The section is not closed there within its tolerance.");
    }

    private static void InsertVertices(Triangulation result, int count, CancellationToken cancellation)
    {
        int triangle = 0;
        foreach (int vertex in HilbertOrder.Of(result.Coordinates, count))
        {
            cancellation.ThrowIfCancellationRequested();
            Point2D point = result.PointAt(vertex);
            triangle = result.Locate(triangle, point.X, point.Y);
            for (int i = 0; i < 3; i++)
            {
                if (result.PointAt(result.StartOf((4 * triangle) + i)) == point)
                    throw new MeshingException($"Two vertices of the section coincide at {point}. Merge them or move them apart.");
            }

            result.DigCavity(triangle, point.X, point.Y);
            result.FillCavity(vertex);
            triangle = result.Rim[0] >> 2;
        }
    }

    private static void InsertSegments(
        Triangulation result, MeshPlan plan, BoundaryDivision division, CancellationToken cancellation)
    {
        result.FindOutgoing();
        int first = result.Segments.Count;
        foreach (Segment segment in division.Segments)
        {
            cancellation.ThrowIfCancellationRequested();
            int index = result.Segments.Add(segment with { Mate = first + segment.Mate });
            int obstacle = result.InsertSegment(index);
            if (obstacle >= 0)
            {
                throw new MeshingException(
                    $"Lines come so near to each other at {result.PointAt(obstacle)}, on {plan.Describe(segment.Piece)}, that their edges would cross. Move them apart or let them touch.");
            }
        }
    }

    private static int RegionOfSide(Triangulation result, MeshPlan plan, int side)
    {
        int piece = result.Segments[side >> 1].Piece;
        if (piece < 0)
            return -1;
        ArrangedPiece arranged = plan.Arrangement.Pieces[piece];
        bool isLeft = (side & 1) == 0;
        return isLeft != plan.Rings.IsReversed(piece) ? arranged.LeftRegion : arranged.RightRegion;
    }
}
