using FemCore2D.Geometry;

namespace FemCore2D.Drawing;

/// <summary>Traces on facets the lines of one value, and the outlines of the area above it.</summary>
/// <remarks>
/// Values a millionth of the whole range below a level count as having reached it: plateaus at a level, whose values
/// differ by rounding only, then lie wholly on one side instead of being crossed at random.
/// </remarks>
internal static class LevelTracer
{
    private const double Slack = 1e-6;

    /// <summary>The lines along which the scalar has a value, higher values on their left.</summary>
    public static List<Polyline> Lines(FacetMesh mesh, double level)
    {
        var chainer = new SegmentChainer();
        AddCrossings(mesh, level, chainer);
        return chainer.Join();
    }

    /// <summary>
    /// Closed outlines of the area where the scalar is at least a value, that area on their left. Edges inside the area
    /// appear in no outline, so that it can be filled without a seam.
    /// </summary>
    public static List<Polyline> OutlinesAbove(FacetMesh mesh, double level)
    {
        var chainer = new SegmentChainer();
        AddCrossings(mesh, level, chainer);
        for (int edge = 0; edge < mesh.EdgeCount; edge++)
        {
            int left = mesh.EdgeSides[2 * edge];
            int right = mesh.EdgeSides[(2 * edge) + 1];
            if (mesh.IsContinuous(edge) || (IsWhollyAbove(mesh, left, level) && IsWhollyAbove(mesh, right, level)))
                continue;
            AddPartAbove(mesh, left, level, chainer);
            AddPartAbove(mesh, right, level, chainer);
        }

        return chainer.Join();
    }

    private static void AddCrossings(FacetMesh mesh, double level, SegmentChainer chainer)
    {
        ReadOnlySpan<double> values = mesh.Values;
        ReadOnlySpan<int> facets = mesh.Facets;
        double reached = Reached(mesh, level);
        for (int side = 0; side < facets.Length; side += 3)
        {
            bool a = values[facets[side]] >= reached;
            bool b = values[facets[side + 1]] >= reached;
            bool c = values[facets[side + 2]] >= reached;
            if (a == b && b == c)
                continue;
            int leaving = a && !b ? side : b && !c ? side + 1 : side + 2;
            int entering = !a && b ? side : !b && c ? side + 1 : side + 2;
            chainer.Add(
                KeyOf(mesh, leaving), Crossing(mesh, leaving, level), KeyOf(mesh, entering), Crossing(mesh, entering, level));
        }
    }

    private static bool IsWhollyAbove(FacetMesh mesh, int side, double level)
    {
        if (side < 0)
            return false;
        (int start, int end) = mesh.NodesOfSide(side);
        double reached = Reached(mesh, level);
        return mesh.Values[start] >= reached && mesh.Values[end] >= reached;
    }

    private static void AddPartAbove(FacetMesh mesh, int side, double level, SegmentChainer chainer)
    {
        if (side < 0)
            return;
        (int start, int end) = mesh.NodesOfSide(side);
        double reached = Reached(mesh, level);
        bool isStartAbove = mesh.Values[start] >= reached;
        bool isEndAbove = mesh.Values[end] >= reached;
        if (!isStartAbove && !isEndAbove)
            return;
        int from = mesh.NodeSites[start];
        int to = mesh.NodeSites[end];
        int corner = 2 * mesh.EdgeCount;
        if (isStartAbove && isEndAbove)
            chainer.Add(corner + from, mesh.Sites[from], corner + to, mesh.Sites[to]);
        else if (isStartAbove)
            chainer.Add(corner + from, mesh.Sites[from], KeyOf(mesh, side), Crossing(mesh, side, level));
        else
            chainer.Add(KeyOf(mesh, side), Crossing(mesh, side, level), corner + to, mesh.Sites[to]);
    }

    private static double Reached(FacetMesh mesh, double level) => level - (Slack * (mesh.Maximum - mesh.Minimum));

    /// <summary>The key of the crossing on a side: one for both sides of an edge where the scalar is continuous.</summary>
    private static int KeyOf(FacetMesh mesh, int side)
    {
        int edge = mesh.SideEdges[side];
        return mesh.EdgeSides[2 * edge] == side || mesh.IsContinuous(edge) ? edge : mesh.EdgeCount + edge;
    }

    private static Point2D Crossing(FacetMesh mesh, int side, double level)
    {
        (int start, int end) = mesh.NodesOfSide(side);
        double from = mesh.Values[start];
        double to = mesh.Values[end];
        double fraction = Math.Clamp((level - from) / (to - from), 0, 1);
        return mesh.Sites[mesh.NodeSites[start]].Towards(mesh.Sites[mesh.NodeSites[end]], fraction);
    }
}
