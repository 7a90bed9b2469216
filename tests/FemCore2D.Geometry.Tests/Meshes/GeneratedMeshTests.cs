using FemCore2D.Testing;
using FsCheck.Xunit;

namespace FemCore2D.Geometry.Tests;

[Properties(Arbitrary = [typeof(FieldArbitraries)], MaxTest = 30)]
public class GeneratedMeshTests
{
    [Property]
    public void EveryMeshKeepsTheInvariants(Mesh mesh) => MeshInvariants.Check(mesh);

    [Property]
    public void EulersFormulaHoldsForPartsAndHoles(Mesh mesh)
    {
        // V - E + F = parts - holes: all generated meshes are one part; closed chains of outer edges count the holes.
        int chains = 0;
        HashSet<int> open = [.. mesh.OuterEdges];
        while (open.Count > 0)
        {
            chains++;
            Stack<int> pending = new([open.First()]);
            while (pending.TryPop(out int edge))
            {
                if (!open.Remove(edge))
                {
                    continue;
                }

                (int from, int to) = mesh.EndsOf(edge);
                foreach (int next in mesh.EdgesAround(from).ToArray().Concat(mesh.EdgesAround(to).ToArray()))
                {
                    pending.Push(next);
                }
            }
        }

        Assert.Equal(1 - (chains - 1), mesh.VertexCount - mesh.EdgeCount + mesh.CellCount);
    }

    [Property]
    public void CellAreasAddUpToTheAreaWithinTheOuterEdges(Mesh mesh)
    {
        // Green's theorem along the outer edges, cell on the left, the arcs summed by many short chords.
        double twice = 0;
        Point2D origin = mesh.Vertices[0];
        foreach (int edge in mesh.OuterEdges)
        {
            int pieces = mesh.SweepRadiansOf(edge) == 0 ? 1 : 200;
            double sign = mesh.CellsOf(edge).Left >= 0 ? 1 : -1;
            for (int i = 0; i < pieces; i++)
            {
                Vector2D start = mesh.PointOnEdge(edge, i / (double)pieces) - origin;
                Vector2D end = mesh.PointOnEdge(edge, (i + 1) / (double)pieces) - origin;
                twice += sign * start.Cross(end);
            }
        }

        // A chord of a sweep s / 200 misses (s / 200)^2 / 12 of the area beyond its chord.
        MeshInvariants.Near(0.5 * twice, MeshInvariants.Area(mesh), mesh.HasArcs ? 3e-5 : 1e-11);
    }

    [Property]
    public void BoxHoldsAllPointsOfAllEdges(Mesh mesh)
    {
        (Point2D low, Point2D high) = mesh.Bounds;
        double slack = 1e-14 * (low.DistanceTo(high) + low.DistanceTo(Point2D.Origin));
        for (int edge = 0; edge < mesh.EdgeCount; edge++)
        {
            for (int i = 0; i <= 16; i++)
            {
                Point2D point = mesh.PointOnEdge(edge, i / 16.0);
                Assert.InRange(point.X, low.X - slack, high.X + slack);
                Assert.InRange(point.Y, low.Y - slack, high.Y + slack);
            }
        }
    }
}
