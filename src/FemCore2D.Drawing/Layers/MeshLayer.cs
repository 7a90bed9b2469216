using FemCore2D.Geometry;
using SkiaSharp;

namespace FemCore2D.Drawing;

/// <summary>The edges of the cells of a mesh, and its cells tinted by region if wanted.</summary>
public sealed record MeshLayer : Layer
{
    // A file of shapes with more edges than this holds them as a picture instead.
    private const int LargestShapeEdges = 60_000;

    private readonly float width = 0.35f;

    /// <summary>Creates the layer.</summary>
    /// <param name="mesh">The mesh.</param>
    public MeshLayer(Mesh mesh)
    {
        ArgumentNullException.ThrowIfNull(mesh);
        Mesh = mesh;
    }

    /// <summary>The mesh.</summary>
    public Mesh Mesh { get; }

    /// <summary>Whether the cells are tinted by their regions.</summary>
    public bool IsTinted { get; init; }

    /// <summary>The colour of the edges.</summary>
    public Colour Colour { get; init; } = new(58, 72, 86, 200);

    /// <summary>The width of the edges in points; 0 draws none. Very small cells get finer lines.</summary>
    /// <exception cref="ArgumentOutOfRangeException">The width is not from 0 to 100.</exception>
    public double Width
    {
        get => width;
        init => width = CheckedWidth(value, nameof(Width));
    }

    internal override Box2D Extent => Sight.BoundsOf(Mesh);

    internal override void Draw(Surface surface, PlotFrame frame)
    {
        if (IsTinted)
            RegionLayer.FillAreas(surface, frame, Mesh, RegionLayer.NoTints);
        if (width == 0)
            return;
        List<Polyline> lines = SeenEdges(frame, out double meanPoints);

        // Lines nearer than a few widths would flood the picture: they thin out with the size of the cells.
        double fineness = Math.Clamp(meanPoints / (7 * width), 0.12, 1);
        Colour colour = Colour.WithOpacity(Colour.Opacity / 255.0 * Math.Sqrt(fineness));
        float drawn = (float)(width * Math.Max(0.5, fineness));
        using SKPath path = frame.PathOf(lines);
        if (surface.IsVector && lines.Count > LargestShapeEdges)
            ImagePatch.Draw(surface, frame, patch => patch.Stroke(path, colour, drawn));
        else
            surface.Stroke(path, colour, drawn);
    }

    private List<Polyline> SeenEdges(PlotFrame frame, out double meanPoints)
    {
        var lines = new List<Polyline>();
        double sum = 0;
        bool[] isDone = new bool[Mesh.EdgeCount];
        for (int cell = 0; cell < Mesh.CellCount; cell++)
        {
            if (!Sight.Reaches(Mesh, cell, frame.View))
                continue;
            foreach (int edge in Mesh.EdgesOf(cell))
            {
                if (isDone[edge])
                    continue;
                isDone[edge] = true;
                Point2D[] points = PointsOf(edge, frame);
                sum += points[0].DistanceTo(points[^1]) * frame.PointsPerMetre;
                lines.Add(new Polyline(points, IsClosed: false));
            }
        }

        meanPoints = lines.Count == 0 ? 1 : sum / lines.Count;
        return lines;
    }

    private Point2D[] PointsOf(int edge, PlotFrame frame)
    {
        (int from, int to) = Mesh.EndsOf(edge);
        Point2D start = Mesh.Vertices[from];
        Point2D end = Mesh.Vertices[to];
        double sweep = Mesh.SweepRadiansOf(edge);
        if (sweep == 0)
            return [start, end];
        double pixels = start.DistanceTo(end) * frame.PointsPerMetre * frame.PixelsPerPoint;
        int parts = Math.Clamp((int)Math.Ceiling(Math.Sqrt(pixels * Math.Abs(sweep))), 1, 64);
        var points = new Point2D[parts + 1];
        for (int i = 0; i <= parts; i++)
            points[i] = Mesh.PointOnEdge(edge, (double)i / parts);
        return points;
    }
}
