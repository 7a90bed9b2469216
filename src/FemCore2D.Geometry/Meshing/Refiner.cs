using System.Globalization;

namespace FemCore2D.Geometry;

/// <summary>
/// Adds vertices to a constrained Delaunay triangulation until its triangles have the wanted sizes and angles.
/// </summary>
/// <remarks>
/// <para>Segments whose diametral circle contains a vertex are split; bad triangles get a vertex at or before their
/// circumcentre: J. Ruppert, "A Delaunay refinement algorithm for quality 2-dimensional mesh generation", Journal of
/// Algorithms 18 (1995); L. P. Chew (1993); A. Üngör, "Off-centers: A new type of Steiner points for computing
/// size-optimal quality-guaranteed Delaunay triangulations", Computational Geometry 42 (2009). Triangles that are
/// too large get a vertex that makes a well-sized triangle with their shortest edge: S. Rebay, "Efficient
/// unstructured mesh generation by means of Delaunay triangulation and Bowyer-Watson algorithm", Journal of
/// Computational Physics 106 (1993).</para>
/// <para>Triangles wait in the order of their making, so the same input gives the same mesh.</para>
/// </remarks>
internal sealed unsafe partial class Refiner
{
    private const double EdgeFloorOfSize = 1e-4;
    private const int ProgressInterval = 1 << 14;

    private readonly MeshPlan plan;
    private readonly SizeField field;
    private readonly Triangulation mesh;
    private readonly SegmentList segments;
    private readonly InputCorners corners;
    private readonly IntQueue triangleQueue = new();
    private readonly IntQueue segmentQueue = new();
    private readonly List<int> wantedSplits = [];
    private readonly double estimatedCells;
    private readonly IProgress<MeshingProgress>? progress;
    private readonly CancellationToken cancellation;
    private readonly double edgeFloor;
    private readonly double sineSquared;
    private readonly double offCentre;
    private readonly double[] regionCaps;
    private readonly bool hasArcs;
    private readonly CuspEnds cuspEnds;
    private double[] sizes;
    private int[] pieceOfVertex;

    public Refiner(
        MeshPlan plan,
        SizeField field,
        Triangulation mesh,
        BoundaryDivision division,
        double estimatedCells,
        IProgress<MeshingProgress>? progress,
        CancellationToken cancellation)
    {
        this.plan = plan;
        this.field = field;
        this.mesh = mesh;
        this.estimatedCells = estimatedCells;
        this.progress = progress;
        this.cancellation = cancellation;
        segments = mesh.Segments;
        corners = division.Corners;
        cuspEnds = new CuspEnds(plan, corners, segments);
        regionCaps = plan.RegionCaps;
        hasArcs = plan.Curves.Any(curve => curve.Sweep != 0);
        edgeFloor = 8 * plan.Arrangement.Tolerance;
        double angle = plan.Options.SmallestAngleDegrees * Math.PI / 180;
        sineSquared = Math.Sin(angle) * Math.Sin(angle);

        // A little nearer than the place where the new triangle's angle would be just large enough.
        offCentre = 0.475 / Math.Tan(angle / 2);
        sizes = new double[Math.Max(64, mesh.VertexCount)];
        pieceOfVertex = new int[sizes.Length];
        for (int vertex = 0; vertex < mesh.VertexCount; vertex++)
        {
            sizes[vertex] = field.At(mesh.PointAt(vertex), double.PositiveInfinity);
            pieceOfVertex[vertex] = vertex < division.PieceOfVertex.Count ? division.PieceOfVertex[vertex] : -2;
        }
    }

    /// <summary>The piece on which a vertex was put, -1 for one of the arrangement's own, -2 for one inside a region.</summary>
    public int PieceOf(int vertex) => pieceOfVertex[vertex];

    /// <summary>The wanted edge length at a vertex.</summary>
    public double SizeOf(int vertex) => sizes[vertex];

    public InputCorners Corners => corners;

    public void Refine()
    {
        for (int triangle = 0; triangle < mesh.TriangleCount; triangle++)
        {
            Offer(triangle);
        }

        for (int segment = 0; segment < segments.Count; segment++)
        {
            if (IsEncroached(segment))
                segmentQueue.Enqueue(segment);
        }

        for (long step = 0; ; step++)
        {
            if ((step & (ProgressInterval - 1)) == 0)
                Report();
            if (segmentQueue.TryDequeue(out int segment))
            {
                if (IsEncroached(segment))
                    TrySplit(segment);
            }
            else if (triangleQueue.TryDequeue(out int triangle))
            {
                mesh.Link[(4 * triangle) + 3] = 0;
                if (mesh.RegionOf(triangle) >= 0)
                    Improve(triangle);
            }
            else
            {
                return;
            }
        }
    }

    private void Report()
    {
        cancellation.ThrowIfCancellationRequested();
        progress?.Report(new MeshingProgress(MeshingStage.Refining, mesh.TriangleCount, estimatedCells));
        if (mesh.TriangleCount > 2L * plan.CellLimit)
        {
            throw new MeshingException(string.Create(CultureInfo.InvariantCulture,
                $"The mesh has passed twice the limit of {plan.CellLimit} cells, though its sizes alone need only about {estimatedCells:G3}: the section has details far finer than the sizes. Remove thin gaps and short pieces, ask for a smaller least angle, or raise the limit of cells."));
        }
    }

    /// <summary>Queues a triangle if something is to be done about it.</summary>
    private void Offer(int triangle)
    {
        if (mesh.RegionOf(triangle) >= 0 && mesh.Link[(4 * triangle) + 3] == 0 && FaultsOf(triangle) != Faults.None)
        {
            mesh.Link[(4 * triangle) + 3] = 1;
            triangleQueue.Enqueue(triangle);
        }
    }

    private void Improve(int triangle)
    {
        Faults faults = FaultsOf(triangle);
        if (faults == Faults.None)
            return;
        Shape shape = ShapeOf(triangle);
        if ((faults & Faults.Large) != 0 && TryInsert(triangle, PointForSize(triangle, shape), isForAngle: false))
            return;
        if ((faults & Faults.Bent) != 0 && TrySplit(MostBentSegment(triangle)))
        {
            Offer(triangle);
            return;
        }

        if ((faults & Faults.Skinny) != 0 && !IsForcedByCorner(shape))
            TryInsert(triangle, PointForAngle(shape), isForAngle: true);
    }

    /// <summary>The place that makes a well-sized triangle with the shortest edge, not beyond the circumcentre.</summary>
    private Point2D PointForSize(int triangle, in Shape shape)
    {
        double size = 0.5 * (sizes[shape.VertexA] + sizes[shape.VertexB]);
        size = Math.Min(size * (1 + (0.43 * (plan.Options.Growth - 1))), regionCaps[mesh.RegionOf(triangle)]);
        double wanted = Math.Max(size * size, 0.5 * shape.ShortestSquared);
        double distance = Math.Min(shape.CircumcentreDistance, Math.Sqrt(wanted - (shape.ShortestSquared / 4)));
        return shape.Middle + (distance * shape.Normal);
    }

    /// <summary>The off-centre: where the shortest edge is seen under the smallest angle, not beyond the circumcentre.</summary>
    private Point2D PointForAngle(in Shape shape)
    {
        double distance = Math.Min(shape.CircumcentreDistance, offCentre * Math.Sqrt(shape.ShortestSquared));
        return shape.Middle + (distance * shape.Normal);
    }

    /// <summary>Inserts a vertex or, where it would come too near to segments, splits these.</summary>
    /// <returns>Whether anything was done.</returns>
    private bool TryInsert(int triangle, Point2D point, bool isForAngle)
    {
        if (!ContainsInCircle(triangle, point))
            return false;
        mesh.DigCavity(triangle, point.X, point.Y);
        int hidden = mesh.HiddenRimEdge(point.X, point.Y);
        if (hidden >= 0)
        {
            if (mesh.Link[hidden] >= 0 || !TrySplit(~mesh.Link[hidden] >> 1))
                return false;
            Offer(triangle);
            return true;
        }

        bool mayInsert = true;
        bool mustSplit = false;
        double nearest = double.PositiveInfinity;
        foreach (int halfEdge in mesh.Rim)
        {
            int vertex = mesh.StartOf(halfEdge);
            Point2D a = mesh.PointAt(vertex);
            nearest = Math.Min(nearest, (point - a).LengthSquared);
            if (mesh.Link[halfEdge] >= 0)
                continue;
            Point2D b = mesh.PointAt(mesh.EndOf(halfEdge));
            if ((a - point).Dot(b - point) >= 0)
                continue;
            int segment = ~mesh.Link[halfEdge] >> 1;
            double length = (b - a).LengthSquared;
            double wanted = 0.5 * (sizes[vertex] + sizes[mesh.EndOf(halfEdge)]);
            if (!CanSplit(segment))
            {
                // Vertices may come near an edge that must stay whole, but not so near as to spoil the angle.
                double height = (b - a).Cross(point - a);
                mayInsert &= height > 0.28 * length;
            }
            else
            {
                mayInsert = false;
                if (isForAngle || length > 2 * wanted * wanted)
                {
                    mustSplit = true;
                    wantedSplits.Add(segment);
                }
            }
        }

        if (mustSplit)
        {
            if (!SplitWanted())
                return false;
            Offer(triangle);
            return true;
        }

        double size = field.At(point, regionCaps[mesh.RegionOf(triangle)]);
        double floor = isForAngle ? Math.Max(edgeFloor, EdgeFloorOfSize * size) : 0.55 * size;
        if (!mayInsert || nearest < floor * floor)
            return false;

        int added = AddVertex(point, size, -2);
        mesh.FillCavity(added);
        foreach (int halfEdge in mesh.Rim)
        {
            Offer(halfEdge >> 2);
        }

        return true;
    }

    private int AddVertex(Point2D point, double size, int piece)
    {
        int vertex = mesh.AddVertex(point);
        if (vertex >= sizes.Length)
        {
            Array.Resize(ref sizes, sizes.Length * 2);
            Array.Resize(ref pieceOfVertex, sizes.Length);
        }

        sizes[vertex] = size;
        pieceOfVertex[vertex] = piece;
        return vertex;
    }

    private bool ContainsInCircle(int triangle, Point2D point) =>
        Predicates.InCircle(
            mesh.PointAt(mesh.StartOf(4 * triangle)),
            mesh.PointAt(mesh.StartOf((4 * triangle) + 1)),
            mesh.PointAt(mesh.StartOf((4 * triangle) + 2)),
            point) > 0;
}
