using System.Runtime.CompilerServices;

namespace FemCore2D.Geometry;

/// <summary>
/// A constrained Delaunay triangulation in flat arrays, without an object or an allocation per triangle.
/// </summary>
/// <remarks>
/// <para>Triangle <c>t</c> has the half-edges <c>4t</c>, <c>4t + 1</c> and <c>4t + 2</c>, counterclockwise.
/// <see cref="Origin"/> holds the vertex at which a half-edge starts, and in the fourth place the triangle's region.
/// <see cref="Link"/> holds the opposite half-edge or, where the edge is constrained, the complement of a side:
/// sides <c>2s</c> and <c>2s + 1</c> are the left and the right of segment <c>s</c>. In the fourth place it holds
/// whether the triangle waits in a queue.</para>
/// <para>The whole plane around the section is triangulated too, out to a box, so that a segment always has a
/// triangle on both sides; only the box's own edges have none outside.</para>
/// <para>A. Bowyer and D. F. Watson (both Computer Journal 24, 1981) for the insertion of points.</para>
/// </remarks>
internal sealed unsafe partial class Triangulation
{
    private double[] coordinates;
    private int[] origins;
    private int[] links;
    private int vertexCapacity;
    private int triangleCapacity;

    public Triangulation(int expectedVertices)
    {
        vertexCapacity = Math.Max(expectedVertices, 64);
        triangleCapacity = 2 * vertexCapacity;
        coordinates = GC.AllocateUninitializedArray<double>(2 * vertexCapacity, pinned: true);
        origins = GC.AllocateUninitializedArray<int>(4 * triangleCapacity, pinned: true);
        links = GC.AllocateUninitializedArray<int>(4 * triangleCapacity, pinned: true);
        Refresh();
    }

    /// <summary>Two coordinates a vertex.</summary>
    public double* Coordinates { get; private set; }

    public int* Origin { get; private set; }

    public int* Link { get; private set; }

    public int VertexCount { get; private set; }

    public int TriangleCount { get; private set; }

    public SegmentList Segments { get; } = new();

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static int Next(int halfEdge) => (halfEdge & 3) == 2 ? halfEdge - 2 : halfEdge + 1;

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static int Previous(int halfEdge) => (halfEdge & 3) == 0 ? halfEdge + 2 : halfEdge - 1;

    public Point2D PointAt(int vertex) => new(Coordinates[2 * vertex], Coordinates[(2 * vertex) + 1]);

    public int StartOf(int halfEdge) => Origin[halfEdge];

    public int EndOf(int halfEdge) => Origin[Next(halfEdge)];

    /// <summary>The vertex of the triangle that the half-edge does not touch.</summary>
    public int ApexOf(int halfEdge) => Origin[Previous(halfEdge)];

    public int RegionOf(int triangle) => Origin[(4 * triangle) + 3];

    public void SetRegion(int triangle, int region) => Origin[(4 * triangle) + 3] = region;

    public bool IsConstrained(int halfEdge) => Link[halfEdge] < 0;

    /// <summary>The half-edge on the other side, across a constraint too; -1 outside the box.</summary>
    public int Opposite(int halfEdge)
    {
        int link = Link[halfEdge];
        return link >= 0 ? link : Segments.HalfEdgeAt(~link ^ 1);
    }

    public int AddVertex(Point2D point)
    {
        if (VertexCount == vertexCapacity)
        {
            vertexCapacity += vertexCapacity / 2;
            coordinates = Grown(coordinates, 2 * vertexCapacity);
            Refresh();
        }

        Coordinates[2 * VertexCount] = point.X;
        Coordinates[(2 * VertexCount) + 1] = point.Y;
        return VertexCount++;
    }

    /// <summary>Makes room for a number of vertices, and for twice as many triangles.</summary>
    public void Reserve(int vertices)
    {
        if (vertices > vertexCapacity)
        {
            vertexCapacity = vertices;
            coordinates = Grown(coordinates, 2 * vertexCapacity);
        }

        if (2 * vertices > triangleCapacity)
        {
            triangleCapacity = 2 * vertices;
            origins = Grown(origins, 4 * triangleCapacity);
            links = Grown(links, 4 * triangleCapacity);
        }

        Refresh();
    }

    /// <summary>Adds the four corners of a box around everything and its two triangles.</summary>
    /// <returns>The first of the four corner vertices.</returns>
    public int AddBox(Point2D low, Point2D high)
    {
        int first = AddVertex(low);
        AddVertex(new(high.X, low.Y));
        AddVertex(high);
        AddVertex(new(low.X, high.Y));
        int lower = AddTriangle(first, first + 1, first + 2);
        int upper = AddTriangle(first, first + 2, first + 3);
        Join(lower + 2, upper);
        PutSegment(lower, Segments.AddBoxEdge(first, first + 1));
        PutSegment(lower + 1, Segments.AddBoxEdge(first + 1, first + 2));
        PutSegment(upper + 1, Segments.AddBoxEdge(first + 2, first + 3));
        PutSegment(upper + 2, Segments.AddBoxEdge(first + 3, first));
        return first;
    }

    /// <summary>Makes two half-edges each other's opposite.</summary>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    private void Join(int one, int other)
    {
        Link[one] = other;
        Link[other] = one;
    }

    /// <summary>Gives a half-edge the link that a replaced one had to what lies beyond it.</summary>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    private void Inherit(int halfEdge, int link)
    {
        Link[halfEdge] = link;
        if (link >= 0)
            Link[link] = halfEdge;
        else
            Segments.SetHalfEdge(~link, halfEdge);
    }

    /// <summary>Puts a segment, which runs along the half-edge, on it and its opposite.</summary>
    private void PutSegment(int halfEdge, int segment, int opposite = -1)
    {
        Link[halfEdge] = ~(2 * segment);
        Segments.SetHalfEdge(2 * segment, halfEdge);
        Segments.SetHalfEdge((2 * segment) + 1, opposite);
        if (opposite >= 0)
            Link[opposite] = ~((2 * segment) + 1);
    }

    /// <summary>Adds a triangle that is not linked yet and returns its first half-edge.</summary>
    private int AddTriangle(int a, int b, int c)
    {
        if (TriangleCount == triangleCapacity)
        {
            triangleCapacity += triangleCapacity / 2;
            origins = Grown(origins, 4 * triangleCapacity);
            links = Grown(links, 4 * triangleCapacity);
            Refresh();
        }

        int first = 4 * TriangleCount++;
        Origin[first] = a;
        Origin[first + 1] = b;
        Origin[first + 2] = c;
        Origin[first + 3] = -1;
        Link[first + 3] = 0;
        return first;
    }

    private void Refresh()
    {
        // The arrays are pinned, so their addresses hold as long as this object holds the arrays.
        Coordinates = (double*)Unsafe.AsPointer(ref coordinates[0]);
        Origin = (int*)Unsafe.AsPointer(ref origins[0]);
        Link = (int*)Unsafe.AsPointer(ref links[0]);
    }

    private static T[] Grown<T>(T[] array, int length)
    {
        T[] grown = GC.AllocateUninitializedArray<T>(length, pinned: true);
        array.CopyTo(grown, 0);
        return grown;
    }
}
