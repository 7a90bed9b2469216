using FemCore2D.Geometry;
using SkiaSharp;

namespace FemCore2D.Drawing;

/// <summary>Reads a vector at the points of a regular grid on the page.</summary>
internal static class GridSampler
{
    /// <summary>The vectors at all grid points that lie in a cell, row by row.</summary>
    /// <param name="vector">The vector.</param>
    /// <param name="frame">Where the plane lies on the page.</param>
    /// <param name="spacing">The distance of the grid points, in points of the page.</param>
    public static List<(SKPoint Place, Vector2D Value)> Sample(CellVector vector, PlotFrame frame, double spacing)
    {
        Mesh mesh = vector.Mesh;
        SKRect seen = SeenPart(mesh, frame);
        int columns = Math.Max(1, (int)Math.Floor(seen.Width / spacing));
        int rows = Math.Max(1, (int)Math.Floor(seen.Height / spacing));
        double left = seen.MidX - ((columns - 1) * spacing / 2);
        double top = seen.MidY - ((rows - 1) * spacing / 2);
        var found = new Vector2D?[columns * rows];
        CellPattern straight = CellPattern.Make(CellKind.Triangle, [1, 1, 1]);
        var bent = new CellPattern?[2];
        Span<Point2D> reference = stackalloc Point2D[1];
        Span<Vector2D> value = stackalloc Vector2D[1];
        for (int cell = 0; cell < mesh.CellCount; cell++)
        {
            if (!Sight.Reaches(mesh, cell, frame.View))
                continue;
            var shape = new CellShape(mesh, cell);
            CellPattern pattern = shape.IsFlat ? straight : DividedPattern(mesh.KindOf(cell), bent);
            for (int i = 0; i < pattern.Facets.Length; i += 3)
            {
                Point2D ra = pattern.Reference[pattern.Facets[i]];
                Point2D rb = pattern.Reference[pattern.Facets[i + 1]];
                Point2D rc = pattern.Reference[pattern.Facets[i + 2]];
                SKPoint a = frame.ToPage(shape.PlaceOf(ra));
                SKPoint b = frame.ToPage(shape.PlaceOf(rb));
                SKPoint c = frame.ToPage(shape.PlaceOf(rc));
                int firstColumn = First(Math.Min(a.X, Math.Min(b.X, c.X)), left, spacing);
                int lastColumn = Last(Math.Max(a.X, Math.Max(b.X, c.X)), left, spacing, columns);
                int firstRow = First(Math.Min(a.Y, Math.Min(b.Y, c.Y)), top, spacing);
                int lastRow = Last(Math.Max(a.Y, Math.Max(b.Y, c.Y)), top, spacing, rows);
                for (int row = firstRow; row <= lastRow; row++)
                {
                    for (int column = firstColumn; column <= lastColumn; column++)
                    {
                        double x = left + (column * spacing);
                        double y = top + (row * spacing);
                        if (found[(row * columns) + column] is not null || !Lies(x, y, a, b, c, out double u, out double v))
                            continue;
                        reference[0] = ra + (u * (rb - ra)) + (v * (rc - ra));
                        vector.Evaluator(cell, reference, value);
                        found[(row * columns) + column] = value[0];
                    }
                }
            }
        }

        var result = new List<(SKPoint, Vector2D)>();
        for (int i = 0; i < found.Length; i++)
        {
            var place = new SKPoint((float)(left + (i % columns * spacing)), (float)(top + (i / columns * spacing)));
            if (found[i] is { } there && double.IsFinite(there.LengthSquared))
                result.Add((place, there));
        }

        return result;
    }

    /// <summary>The part of the page that the mesh can cover; a grid centred on it keeps whole arrows inside a rectangle.</summary>
    private static SKRect SeenPart(Mesh mesh, PlotFrame frame)
    {
        Box2D bounds = Sight.BoundsOf(mesh);
        SKPoint low = frame.ToPage(bounds.Lower);
        SKPoint high = frame.ToPage(bounds.Upper);
        var part = SKRect.Intersect(new SKRect(low.X, high.Y, high.X, low.Y), frame.Area);
        return part.IsEmpty ? frame.Area : part;
    }

    /// <summary>A pattern fine enough that its facets follow a bent cell well.</summary>
    private static CellPattern DividedPattern(CellKind kind, CellPattern?[] known) =>
        known[(int)kind] ??= CellPattern.Make(kind, kind == CellKind.Triangle ? [8, 8, 8] : [8, 8, 8, 8]);

    private static int First(float low, double start, double spacing) =>
        Math.Max(0, (int)Math.Ceiling(((low - start) / spacing) - 1e-9));

    private static int Last(float high, double start, double spacing, int count) =>
        Math.Min(count - 1, (int)Math.Floor(((high - start) / spacing) + 1e-9));

    private static bool Lies(double x, double y, SKPoint a, SKPoint b, SKPoint c, out double u, out double v)
    {
        double bx = b.X - a.X;
        double by = b.Y - a.Y;
        double cx = c.X - a.X;
        double cy = c.Y - a.Y;
        double area = (bx * cy) - (by * cx);
        u = (((x - a.X) * cy) - ((y - a.Y) * cx)) / area;
        v = ((bx * (y - a.Y)) - (by * (x - a.X))) / area;
        return u >= -1e-6 && v >= -1e-6 && u + v <= 1 + 1e-6;
    }
}
