using System.Collections.Immutable;

namespace FemCore2D.Geometry.Tests;

/// <summary>An arrangement drawn piece by piece; pieces must meet at vertices only, as in a real one.</summary>
internal sealed class Drawn
{
    private readonly List<Point2D> vertices = [];
    private readonly Dictionary<Point2D, int> numbers = [];
    private readonly List<ArrangedPiece> pieces = [];
    private readonly List<string> regions = [];
    private readonly List<ImmutableArray<string>> sets = [];
    private readonly List<string> pointNames = [];
    private readonly List<int> pointVertices = [];

    /// <summary>The exact areas of the regions, arcs included.</summary>
    public Dictionary<string, double> Areas { get; } = [];

    public int Vertex(double x, double y)
    {
        Point2D point = new(x, y);
        if (!numbers.TryGetValue(point, out int number))
        {
            number = vertices.Count;
            numbers.Add(point, number);
            vertices.Add(point);
        }

        return number;
    }

    public Drawn Line(double x1, double y1, double x2, double y2, string? left, string? right, params string[] boundaries) =>
        Piece(Vertex(x1, y1), Vertex(x2, y2), 0, left, right, boundaries);

    public Drawn Piece(int start, int end, double sweep, string? left, string? right, params string[] boundaries)
    {
        int set = -1;
        if (boundaries.Length > 0)
        {
            set = sets.FindIndex(known => known.SequenceEqual(boundaries));
            if (set < 0)
            {
                set = sets.Count;
                sets.Add([.. boundaries]);
            }
        }

        double chord = vertices[start].DistanceTo(vertices[end]);
        double radius = sweep == 0 ? 0 : chord / (2 * Math.Sin(sweep / 2));
        double area = 0.5 * ((vertices[start] - Point2D.Origin).Cross(vertices[end] - Point2D.Origin)
            + (radius * radius * (sweep - Math.Sin(sweep))));
        if (left is not null)
            Areas[left] = Areas.GetValueOrDefault(left) + area;
        if (right is not null)
            Areas[right] = Areas.GetValueOrDefault(right) - area;
        pieces.Add(new ArrangedPiece(start, end, sweep, Region(left), Region(right), set));
        return this;
    }

    /// <summary>A closed polygon, counterclockwise, with the inside on its left.</summary>
    public Drawn Polygon(string? inside, string? outside, params (double X, double Y)[] corners)
    {
        for (int i = 0; i < corners.Length; i++)
        {
            (double x, double y) = corners[(i + 1) % corners.Length];
            Line(corners[i].X, corners[i].Y, x, y, inside, outside);
        }

        return this;
    }

    /// <summary>A rectangle with the boundaries bottom, right, top and left.</summary>
    public Drawn Rectangle(double x1, double y1, double x2, double y2, string inside, string? outside = null) =>
        Line(x1, y1, x2, y1, inside, outside, "bottom")
            .Line(x2, y1, x2, y2, inside, outside, "right")
            .Line(x2, y2, x1, y2, inside, outside, "top")
            .Line(x1, y2, x1, y1, inside, outside, "left");

    /// <summary>A circle of two or more arcs, the first of which begins at an angle.</summary>
    public Drawn Circle(double x, double y, double radius, string? inside, string? outside, double startDegrees = 0, int arcs = 2, params string[] boundaries)
    {
        int[] ring = [.. Enumerable.Range(0, arcs).Select(i =>
        {
            double degrees = startDegrees + (360.0 * i / arcs);
            double radians = degrees * Math.PI / 180;
            bool alongX = degrees % 180 == 0;
            bool alongY = degrees % 180 == 90;
            return Vertex(
                x + (alongY ? 0 : radius * Math.Cos(radians)), y + (alongX ? 0 : radius * Math.Sin(radians)));
        })];
        for (int i = 0; i < arcs; i++)
        {
            Piece(ring[i], ring[(i + 1) % arcs], 2 * Math.PI / arcs, inside, outside, boundaries);
        }

        return this;
    }

    public Drawn Point(string name, double x, double y)
    {
        pointNames.Add(name);
        pointVertices.Add(Vertex(x, y));
        return this;
    }

    public Arrangement Done()
    {
        double extent = Math.Max(
            vertices.Max(p => p.X) - vertices.Min(p => p.X), vertices.Max(p => p.Y) - vertices.Min(p => p.Y));
        return new Arrangement
        {
            Vertices = [.. vertices],
            Pieces = [.. pieces],
            RegionNames = [.. regions],
            BoundarySets = [.. sets],
            PointNames = [.. pointNames],
            PointVertices = [.. pointVertices],
            Tolerance = 1e-9 * extent,
        };
    }

    private int Region(string? name)
    {
        if (name is null)
            return -1;
        int index = regions.IndexOf(name);
        if (index < 0)
        {
            index = regions.Count;
            regions.Add(name);
        }

        return index;
    }
}
