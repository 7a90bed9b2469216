using FemCore2D.Geometry;

namespace FemCore2D.Drawing;

/// <summary>A line of points; closed when its last point joins its first.</summary>
internal readonly record struct Polyline(Point2D[] Points, bool IsClosed);

/// <summary>Joins directed segments into lines: each end carries a key, and equal keys are the same point.</summary>
internal sealed class SegmentChainer
{
    private readonly List<(int From, int To)> segments = [];
    private readonly Dictionary<int, Point2D> places = [];

    public void Add(int from, Point2D start, int to, Point2D end)
    {
        segments.Add((from, to));
        places[from] = start;
        places[to] = end;
    }

    /// <summary>Joins all segments, open lines first.</summary>
    public List<Polyline> Join()
    {
        int[] next = new int[segments.Count];
        var firstFrom = new Dictionary<int, int>(segments.Count);
        var balance = new Dictionary<int, int>(segments.Count);
        for (int i = segments.Count - 1; i >= 0; i--)
        {
            (int from, int to) = segments[i];
            next[i] = firstFrom.GetValueOrDefault(from, -1);
            firstFrom[from] = i;
            balance[from] = balance.GetValueOrDefault(from) + 1;
            balance[to] = balance.GetValueOrDefault(to) - 1;
        }

        var lines = new List<Polyline>();
        foreach ((int from, _) in segments)
        {
            // More lines leave than arrive: here an open line begins.
            while (balance[from] > 0)
            {
                int end = Follow(from, firstFrom, next, lines);
                balance[from]--;
                balance[end]++;
            }
        }

        foreach ((int from, _) in segments)
        {
            while (firstFrom[from] >= 0)
                Follow(from, firstFrom, next, lines);
        }

        return lines;
    }

    private int Follow(int start, Dictionary<int, int> firstFrom, int[] next, List<Polyline> lines)
    {
        var points = new List<Point2D> { places[start] };
        int key = start;
        while (firstFrom.TryGetValue(key, out int segment) && segment >= 0)
        {
            firstFrom[key] = next[segment];
            key = segments[segment].To;
            points.Add(places[key]);
        }

        bool isClosed = key == start && points.Count > 2;
        if (isClosed)
            points.RemoveAt(points.Count - 1);
        lines.Add(new Polyline([.. points], isClosed));
        return key;
    }
}
