using FemCore2D.Geometry;
using SkiaSharp;

namespace FemCore2D.Drawing;

/// <summary>The lines between the regions of a mesh and around it, joined into chains of edges.</summary>
internal sealed class RegionBorders
{
    private readonly Mesh mesh;
    private readonly Lazy<List<EdgeChain>> lines;

    public RegionBorders(Mesh mesh)
    {
        this.mesh = mesh;
        lines = new Lazy<List<EdgeChain>>(() => EdgeChain.Join(BorderSteps(region: null)));
    }

    /// <summary>All borders, each once.</summary>
    public SKPath Lines(PlotFrame frame) => PathOf(lines.Value, frame);

    /// <summary>The area of a region, to be filled.</summary>
    public SKPath Area(int region, PlotFrame frame) => PathOf(EdgeChain.Join(BorderSteps(region)), frame);

    /// <summary>Draws a path along the directed edges of chains, arcs as arcs.</summary>
    private SKPath PathOf(List<EdgeChain> chains, PlotFrame frame)
    {
        using var builder = new SKPathBuilder { FillType = SKPathFillType.Winding };
        foreach (EdgeChain chain in chains)
        {
            builder.MoveTo(frame.ToPage(mesh.Vertices[chain.Steps[0].From]));
            foreach (EdgeStep step in chain.Steps)
            {
                SKPoint end = frame.ToPage(mesh.Vertices[step.To]);
                double sweep = mesh.SweepRadiansOf(step.Edge);
                if (mesh.EndsOf(step.Edge).From != step.From)
                    sweep = -sweep;
                if (Math.Abs(sweep) < 1e-6)
                {
                    builder.LineTo(end);
                    continue;
                }

                double chord = mesh.Vertices[step.From].DistanceTo(mesh.Vertices[step.To]);
                float radius = (float)(chord / (2 * Math.Sin(Math.Abs(sweep) / 2)) * frame.PointsPerMetre);
                builder.ArcTo(
                    radius,
                    radius,
                    0,
                    SKPathArcSize.Small,
                    sweep > 0 ? SKPathDirection.CounterClockwise : SKPathDirection.Clockwise,
                    end.X,
                    end.Y);
            }

            if (chain.IsClosed)
                builder.Close();
        }

        return builder.Detach();
    }

    private List<EdgeStep> BorderSteps(int? region)
    {
        var steps = new List<EdgeStep>();
        for (int edge = 0; edge < mesh.EdgeCount; edge++)
        {
            (int left, int right) = mesh.CellsOf(edge);
            int leftRegion = left < 0 ? -1 : mesh.CellRegions[left];
            int rightRegion = right < 0 ? -1 : mesh.CellRegions[right];
            if (leftRegion == rightRegion)
                continue;
            (int from, int to) = mesh.EndsOf(edge);
            if (region is null || leftRegion == region)
                steps.Add(new EdgeStep(edge, from, to));
            else if (rightRegion == region)
                steps.Add(new EdgeStep(edge, to, from));
        }

        return region is null ? Oriented(steps) : steps;
    }

    /// <summary>Turns edges so that those of one line follow each other; lines end where three or more meet.</summary>
    private static List<EdgeStep> Oriented(List<EdgeStep> steps)
    {
        ILookup<int, int> atVertex = steps
            .SelectMany((step, i) => new[] { (step.From, i), (step.To, i) })
            .ToLookup(pair => pair.Item1, pair => pair.i);
        var degree = atVertex.ToDictionary(group => group.Key, group => group.Count());
        bool[] isDone = new bool[steps.Count];
        var result = new List<EdgeStep>(steps.Count);
        foreach (int vertex in degree.Keys.Where(vertex => degree[vertex] != 2).Concat(degree.Keys.Where(v => degree[v] == 2)))
        {
            foreach (int start in atVertex[vertex])
            {
                int here = vertex;
                int current = start;
                while (current >= 0 && !isDone[current])
                {
                    isDone[current] = true;
                    EdgeStep step = steps[current];
                    EdgeStep turned = step.From == here ? step : new EdgeStep(step.Edge, step.To, step.From);
                    result.Add(turned);
                    here = turned.To;
                    current = degree[here] == 2 ? atVertex[here].FirstOrDefault(i => !isDone[i], -1) : -1;
                }
            }
        }

        return result;
    }
}
