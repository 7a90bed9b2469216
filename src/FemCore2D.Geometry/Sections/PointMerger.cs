using System.Runtime.InteropServices;

namespace FemCore2D.Geometry;

/// <summary>Numbers points, and gives points closer than a tolerance the number and place of the first of them.</summary>
internal sealed class PointMerger(double tolerance)
{
    private readonly Dictionary<(long, long), int> newestInSquare = [];
    private readonly List<int> olderInSquare = [];
    private readonly List<Point2D> points = [];

    public IReadOnlyList<Point2D> Points => points;

    /// <summary>The number of the point that stands for <paramref name="point"/>.</summary>
    public int Add(Point2D point)
    {
        // Squares as wide as the tolerance: whatever is close enough lies in one of nine.
        (long column, long row) = ((long)Math.Floor(point.X / tolerance), (long)Math.Floor(point.Y / tolerance));
        int nearest = -1;
        double least = tolerance;
        for (long i = column - 1; i <= column + 1; i++)
        {
            for (long j = row - 1; j <= row + 1; j++)
            {
                int candidate = newestInSquare.GetValueOrDefault((i, j), -1);
                for (; candidate >= 0; candidate = olderInSquare[candidate])
                {
                    double distance = points[candidate].DistanceTo(point);
                    if (distance < least || (distance == least && candidate < nearest))
                    {
                        (nearest, least) = (candidate, distance);
                    }
                }
            }
        }

        if (nearest >= 0)
        {
            return nearest;
        }

        ref int newest = ref CollectionsMarshal.GetValueRefOrAddDefault(newestInSquare, (column, row), out bool exists);
        olderInSquare.Add(exists ? newest : -1);
        newest = points.Count;
        points.Add(point);
        return newest;
    }
}
