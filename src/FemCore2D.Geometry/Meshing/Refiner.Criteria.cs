namespace FemCore2D.Geometry;

/// <content>What is wrong with a triangle or a segment.</content>
internal sealed unsafe partial class Refiner
{
    /// <summary>How much larger than that of a well-sized triangle a circumradius may be.</summary>
    private const double LargestRatio = 1.4;

    private const double SmallestBentSweep = 0.01;

    [Flags]
    private enum Faults
    {
        None = 0,

        /// <summary>The circumradius is too large for the wanted size.</summary>
        Large = 1,

        /// <summary>An angle is too small.</summary>
        Skinny = 2,

        /// <summary>With an edge bent to its arc, the triangle would overlap itself, or nearly so.</summary>
        Bent = 4,
    }

    /// <summary>A triangle seen from its shortest edge AB.</summary>
    private struct Shape
    {
        public int Base;
        public int VertexA;
        public int VertexB;
        public int VertexC;
        public Point2D A;
        public Point2D B;
        public Point2D C;
        public double ShortestSquared;

        public readonly Point2D Middle => A.Towards(B, 0.5);

        /// <summary>How far before the middle of AB the circumcentre lies.</summary>
        public readonly double CircumcentreDistance
        {
            get
            {
                Vector2D toApex = C - Middle;
                return (toApex.LengthSquared - (ShortestSquared / 4)) / (2 * toApex.Dot(Normal));
            }
        }

        public readonly Vector2D Normal => (B - A).LeftNormal / Math.Sqrt(ShortestSquared);
    }

    private Faults FaultsOf(int triangle)
    {
        int first = 4 * triangle;
        int v0 = mesh.Origin[first];
        int v1 = mesh.Origin[first + 1];
        int v2 = mesh.Origin[first + 2];
        Point2D p0 = mesh.PointAt(v0);
        Point2D p1 = mesh.PointAt(v1);
        Point2D p2 = mesh.PointAt(v2);
        double l0 = (p1 - p0).LengthSquared;
        double l1 = (p2 - p1).LengthSquared;
        double l2 = (p0 - p2).LengthSquared;
        double cross = (p1 - p0).Cross(p2 - p0);
        double crossSquared = cross * cross;
        double product = l0 * l1 * l2;

        // The circumradius squared is the product over four times the cross product squared; a third of the size
        // squared is that of the wanted equilateral triangle.
        double size = (sizes[v0] + sizes[v1] + sizes[v2]) * (1.0 / 3);
        size = Math.Min(size, regionCaps[mesh.Origin[first + 3]]) * LargestRatio;
        Faults faults = Faults.None;
        if (3 * product > 4 * crossSquared * size * size)
            faults |= Faults.Large;
        if (crossSquared * Math.Min(l0, Math.Min(l1, l2)) < sineSquared * product)
            faults |= Faults.Skinny;
        if (hasArcs && IsTooBent(triangle))
            faults |= Faults.Bent;
        return faults;
    }

    private Shape ShapeOf(int triangle)
    {
        int shortest = 4 * triangle;
        double least = LengthSquared(shortest);
        for (int halfEdge = shortest + 1; halfEdge < (4 * triangle) + 3; halfEdge++)
        {
            double length = LengthSquared(halfEdge);
            if (length < least)
            {
                least = length;
                shortest = halfEdge;
            }
        }

        Shape shape = new()
        {
            Base = shortest,
            VertexA = mesh.StartOf(shortest),
            VertexB = mesh.EndOf(shortest),
            VertexC = mesh.ApexOf(shortest),
            ShortestSquared = least,
        };
        shape.A = mesh.PointAt(shape.VertexA);
        shape.B = mesh.PointAt(shape.VertexB);
        shape.C = mesh.PointAt(shape.VertexC);
        return shape;
    }

    private double LengthSquared(int halfEdge) =>
        (mesh.PointAt(mesh.EndOf(halfEdge)) - mesh.PointAt(mesh.StartOf(halfEdge))).LengthSquared;

    /// <summary>Whether a vertex lies inside the circle that has the segment for a diameter, on a side with cells.</summary>
    private bool IsEncroached(int segment) =>
        IsEncroachedFrom(segments.HalfEdgeAt(2 * segment)) || IsEncroachedFrom(segments.HalfEdgeAt((2 * segment) + 1));

    private bool IsEncroachedFrom(int halfEdge)
    {
        if (halfEdge < 0 || mesh.RegionOf(halfEdge >> 2) < 0)
            return false;
        int vertex = mesh.ApexOf(halfEdge);
        Point2D apex = mesh.PointAt(vertex);
        Point2D start = mesh.PointAt(mesh.StartOf(halfEdge));
        Point2D end = mesh.PointAt(mesh.EndOf(halfEdge));
        if ((start - apex).Dot(end - apex) >= 0)
            return false;
        double gap = (start - apex).Cross(end - apex) / start.DistanceTo(end);
        return !corners.IsInCusp(segments[~mesh.Link[halfEdge] >> 1].Piece, pieceOfVertex[vertex], apex, gap);
    }

    /// <summary>
    /// Whether a skinny triangle only shows the small angle between two pieces: its shortest edge joins them at
    /// equal distances from their corner, or its smallest angle is the corner itself.
    /// </summary>
    /// <remarks>G. L. Miller, S. E. Pav and N. J. Walkington, "When and why Delaunay refinement algorithms work",
    /// International Journal of Computational Geometry and Applications 15 (2005).</remarks>
    private bool IsForcedByCorner(in Shape shape)
    {
        if (mesh.IsConstrained(Triangulation.Next(shape.Base)) && mesh.IsConstrained(Triangulation.Previous(shape.Base)))
            return true;
        int a = pieceOfVertex[shape.VertexA];
        int b = pieceOfVertex[shape.VertexB];
        int c = pieceOfVertex[shape.VertexC];
        if (corners.IsAcrossSmallCorner(a, shape.A, b, shape.B))
            return true;
        if (a < 0 || b < 0 || c < 0 || (a == b && b == c))
            return false;
        double longest = Math.Max((shape.C - shape.A).Length, (shape.C - shape.B).Length);
        double gap = (shape.B - shape.A).Cross(shape.C - shape.A) / longest;
        return corners.IsInCusp(a, a == b ? c : b, shape.C, gap);
    }

    /// <summary>
    /// Whether an angle of the triangle is not clearly larger than the angles by which its arcs bend into it.
    /// </summary>
    private bool IsTooBent(int triangle)
    {
        int first = 4 * triangle;
        if (mesh.Link[first] >= 0 && mesh.Link[first + 1] >= 0 && mesh.Link[first + 2] >= 0)
            return false;
        double b0 = InwardBend(first);
        double b1 = InwardBend(first + 1);
        double b2 = InwardBend(first + 2);
        return (b0 > 0 || b1 > 0 || b2 > 0) && (IsTooBentAt(first, b2, b0) || IsTooBentAt(first + 1, b0, b1) || IsTooBentAt(first + 2, b1, b2));
    }

    private bool IsTooBentAt(int halfEdge, double bendBefore, double bendAfter)
    {
        double bend = Math.Max(bendBefore, 0) + Math.Max(bendAfter, 0);
        if (bend < SmallestBentSweep / 2)
            return false;
        int before = Triangulation.Previous(halfEdge);
        Point2D corner = mesh.PointAt(mesh.StartOf(halfEdge));
        Vector2D one = mesh.PointAt(mesh.EndOf(halfEdge)) - corner;
        Vector2D other = mesh.PointAt(mesh.StartOf(before)) - corner;
        double angle = Math.Atan2(one.Cross(other), one.Dot(other));
        double left = angle - bendBefore - bendAfter;

        // Where two pieces touch each other the angle between them is nothing, however short the edges.
        bool isTouch = mesh.IsConstrained(halfEdge) && mesh.IsConstrained(before) && left < 0.01;
        return !isTouch && left < 0.25 * bend;
    }

    /// <summary>Half the sweep of the arc on a half-edge, positive when it bulges into the half-edge's triangle.</summary>
    private double InwardBend(int halfEdge)
    {
        if (mesh.Link[halfEdge] >= 0)
            return 0;
        int side = ~mesh.Link[halfEdge];
        double half = 0.5 * SweepOf(side >> 1);

        // A positive sweep bulges to the right.
        return (side & 1) == 0 ? -half : half;
    }

    private int MostBentSegment(int triangle)
    {
        int first = 4 * triangle;
        int best = first;
        for (int halfEdge = first + 1; halfEdge < first + 3; halfEdge++)
        {
            if (InwardBend(halfEdge) > InwardBend(best))
                best = halfEdge;
        }

        return ~mesh.Link[best] >> 1;
    }

    private double SweepOf(int segment)
    {
        ref Segment part = ref segments[segment];
        return part.Piece < 0 ? 0 : plan.Rings.Directed(part.Piece).Sweep * (part.LastFraction - part.FirstFraction);
    }
}
