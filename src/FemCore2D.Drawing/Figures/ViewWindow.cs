using FemCore2D.Geometry;

namespace FemCore2D.Drawing;

/// <summary>A rectangle of the plane that is seen in a panel, in metres.</summary>
public readonly record struct ViewWindow
{
    /// <summary>Creates the window between two coordinates each way.</summary>
    /// <param name="left">The smallest first coordinate.</param>
    /// <param name="bottom">The smallest second coordinate.</param>
    /// <param name="right">The largest first coordinate.</param>
    /// <param name="top">The largest second coordinate.</param>
    /// <exception cref="ArgumentOutOfRangeException">A coordinate is not finite, or the window has no width or height.</exception>
    public ViewWindow(double left, double bottom, double right, double top)
    {
        if (!double.IsFinite(left) || !double.IsFinite(right) || !(right > left) || !double.IsFinite(right - left))
            throw new ArgumentOutOfRangeException(
                nameof(right), right, $"The window must reach from its left side at {left} m to a finite place right of it.");
        if (!double.IsFinite(bottom) || !double.IsFinite(top) || !(top > bottom) || !double.IsFinite(top - bottom))
            throw new ArgumentOutOfRangeException(
                nameof(top), top, $"The window must reach from its bottom at {bottom} m to a finite place above it.");
        Left = left;
        Bottom = bottom;
        Right = right;
        Top = top;
    }

    /// <summary>The smallest first coordinate.</summary>
    public double Left { get; }

    /// <summary>The smallest second coordinate.</summary>
    public double Bottom { get; }

    /// <summary>The largest first coordinate.</summary>
    public double Right { get; }

    /// <summary>The largest second coordinate.</summary>
    public double Top { get; }

    /// <summary>The width.</summary>
    public double Width => Right - Left;

    /// <summary>The height.</summary>
    public double Height => Top - Bottom;

    /// <summary>The window of a given size around a point.</summary>
    /// <param name="centre">The point in the middle.</param>
    /// <param name="width">The width.</param>
    /// <param name="height">The height.</param>
    /// <exception cref="ArgumentOutOfRangeException">The point is not finite, or the window has no width or height.</exception>
    public static ViewWindow Around(Point2D centre, double width, double height) => new(
        centre.X - (width / 2), centre.Y - (height / 2), centre.X + (width / 2), centre.Y + (height / 2));

    /// <summary>The window widened on all sides by a fraction of its larger side.</summary>
    internal ViewWindow Widened(double fraction)
    {
        double by = fraction * Math.Max(Width, Height);
        return new ViewWindow(Left - by, Bottom - by, Right + by, Top + by);
    }

    /// <summary>Whether a cell may be seen: its box, with room for arcs, meets the window.</summary>
    internal bool Reaches(Mesh mesh, int cell)
    {
        double left = double.PositiveInfinity;
        double bottom = double.PositiveInfinity;
        double right = double.NegativeInfinity;
        double top = double.NegativeInfinity;
        foreach (int vertex in mesh.VerticesOf(cell))
        {
            Point2D point = mesh.Vertices[vertex];
            left = Math.Min(left, point.X);
            right = Math.Max(right, point.X);
            bottom = Math.Min(bottom, point.Y);
            top = Math.Max(top, point.Y);
        }

        double room = mesh.HasArcs ? (right - left) + (top - bottom) : 0;
        return left - room <= Right && right + room >= Left && bottom - room <= Top && top + room >= Bottom;
    }
}
