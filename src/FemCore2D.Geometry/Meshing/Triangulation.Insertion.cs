namespace FemCore2D.Geometry;

/// <content>Insertion of points: the cavity of a point and its filling.</content>
internal sealed unsafe partial class Triangulation
{
    private int[] rim = new int[256];
    private int[] dug = new int[256];
    private int[] pending = new int[256];
    private RimEdge[] rimEdges = new RimEdge[256];

    private struct RimEdge
    {
        public int Start;
        public int Link;
        public int Region;
    }

    /// <summary>
    /// The half-edges around the cavity found last, counterclockwise, each in its triangle inside the cavity; after
    /// <see cref="FillCavity"/> the new triangles' own, in the same order.
    /// </summary>
    public ReadOnlySpan<int> Rim => rim.AsSpan(0, RimCount);

    public int RimCount { get; private set; }

    public int DugCount { get; private set; }

    /// <summary>
    /// Finds all triangles that must go when a point is inserted: those whose circumcircle contains it, as far as
    /// it can be seen past constraints, from a triangle known to be one of them.
    /// </summary>
    /// <param name="triangle">A triangle whose circumcircle contains the point.</param>
    /// <param name="x">The first coordinate of the point.</param>
    /// <param name="y">The second coordinate of the point.</param>
    /// <param name="opened">A half-edge whose other side belongs to the cavity in any case, or -1.</param>
    public void DigCavity(int triangle, double x, double y, int opened = -1)
    {
        int* origin = Origin;
        int* link = Link;
        double* xy = Coordinates;
        int[] rimHere = rim;
        int[] dugHere = dug;
        int[] pendingHere = pending;
        int rims = 0;
        int dugs = 0;
        int waiting = 3;
        dugHere[dugs++] = triangle;
        pendingHere[0] = (4 * triangle) + 2;
        pendingHere[1] = (4 * triangle) + 1;
        pendingHere[2] = 4 * triangle;
        while (waiting > 0)
        {
            // A cavity of n triangles has n + 2 edges around it, and no more than these wait.
            if (dugs + 4 >= dugHere.Length)
            {
                GrowScratch();
                (rimHere, dugHere, pendingHere) = (rim, dug, pending);
            }

            int halfEdge = pendingHere[--waiting];
            int beyond = link[halfEdge];
            if (beyond >= 0)
            {
                int one = Next(beyond);
                int two = Previous(beyond);
                double* a = xy + (2 * origin[beyond]);
                double* b = xy + (2 * origin[one]);
                double* c = xy + (2 * origin[two]);
                if (halfEdge == opened || Predicates.InCircle(a[0], a[1], b[0], b[1], c[0], c[1], x, y) > 0)
                {
                    dugHere[dugs++] = beyond >> 2;
                    pendingHere[waiting++] = two;
                    pendingHere[waiting++] = one;
                    continue;
                }
            }

            rimHere[rims++] = halfEdge;
        }

        RimCount = rims;
        DugCount = dugs;
    }

    /// <summary>
    /// The first edge of the rim that does not have the point strictly on its left, so that the cavity cannot be
    /// filled from it, or -1 when there is none.
    /// </summary>
    public int HiddenRimEdge(double x, double y)
    {
        double* xy = Coordinates;
        for (int i = 0; i < RimCount; i++)
        {
            double* a = xy + (2 * Origin[rim[i]]);
            double* b = xy + (2 * Origin[Next(rim[i])]);
            if (Predicates.Orientation(a[0], a[1], b[0], b[1], x, y) <= 0)
                return rim[i];
        }

        return -1;
    }

    /// <summary>
    /// Replaces the triangles of the cavity by the fan of the vertex. The triangle on each edge of the rim keeps
    /// the region that was there, and its half-edges are: the rim's edge, the one to the vertex, the one back.
    /// </summary>
    public void FillCavity(int vertex)
    {
        int count = RimCount;
        if (rimEdges.Length < count)
            rimEdges = new RimEdge[rim.Length];
        for (int i = 0; i < count; i++)
        {
            int halfEdge = rim[i];
            rimEdges[i] = new RimEdge
            {
                Start = Origin[halfEdge],
                Link = Link[halfEdge],
                Region = Origin[halfEdge | 3],
            };
        }

        // With both sides of a segment on the rim, or without, the fan has two triangles more than were dug.
        for (int i = DugCount; i < count; i++)
        {
            int added = AddTriangle(0, 0, 0) >> 2;
            if (i == dug.Length)
                GrowScratch();
            dug[i] = added;
        }

        int* origin = Origin;
        int* link = Link;
        int previous = 4 * dug[count - 1];
        int current = 4 * dug[0];
        for (int i = 0; i < count; i++)
        {
            RimEdge edge = rimEdges[i];
            int nextIndex = i + 1 < count ? i + 1 : 0;
            int following = 4 * dug[nextIndex];
            origin[current] = edge.Start;
            origin[current + 1] = rimEdges[nextIndex].Start;
            origin[current + 2] = vertex;
            origin[current + 3] = edge.Region;
            Inherit(current, edge.Link);
            link[current + 1] = following + 2;
            link[current + 2] = previous + 1;
            rim[i] = current;
            previous = current;
            current = following;
        }
    }

    /// <summary>
    /// Walks from a triangle to the one that contains a point (on an edge, to either side), across constraints too.
    /// </summary>
    /// <returns>The triangle.</returns>
    public int Locate(int triangle, double x, double y)
    {
        double* xy = Coordinates;
        int entry = -1;

        // A walk that always turns to the first edge with the point behind it ends in a Delaunay triangulation; in
        // a constrained one it could go round in circles, so after many steps the first edge tried changes.
        for (int step = 0; ; step++)
        {
            int leave = -1;
            for (int i = 0; i < 3 && leave < 0; i++)
            {
                int halfEdge = (4 * triangle) + ((i + (step >> 6)) % 3);
                if (halfEdge == entry)
                    continue;
                double* a = xy + (2 * Origin[halfEdge]);
                double* b = xy + (2 * Origin[Next(halfEdge)]);
                if (Predicates.Orientation(a[0], a[1], b[0], b[1], x, y) < 0)
                    leave = halfEdge;
            }

            if (leave < 0)
                return triangle;
            entry = Opposite(leave);
            if (entry < 0)
                throw new InvalidOperationException("A point lies outside the box around the section.");
            triangle = entry >> 2;
        }
    }

    private void GrowScratch()
    {
        Array.Resize(ref rim, 2 * rim.Length);
        Array.Resize(ref dug, 2 * dug.Length);
        Array.Resize(ref pending, 2 * pending.Length);
    }
}
