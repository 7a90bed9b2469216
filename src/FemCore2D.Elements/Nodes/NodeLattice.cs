using FemCore2D.Geometry;

namespace FemCore2D.Elements;

/// <summary>The equally spaced nodes of a Lagrange element, in the order of its unknowns.</summary>
internal sealed class NodeLattice
{
    private readonly (byte Xi, byte Eta)[] steps;
    private readonly Point2D[] points;

    private NodeLattice(CellKind cell, int degree)
    {
        steps = [.. List(cell, degree)];
        points = [.. steps.Select(step => new Point2D((double)step.Xi / degree, (double)step.Eta / degree))];
    }

    /// <summary>For each node, how many steps of 1/degree it lies from the origin along each reference coordinate.</summary>
    public ReadOnlySpan<(byte Xi, byte Eta)> Steps => steps;

    public ReadOnlySpan<Point2D> Points => points;

    /// <summary>The lattices of the degrees from 1 on.</summary>
    public static NodeLattice[] UpTo(CellKind cell, int degree) =>
        [.. Enumerable.Range(1, degree).Select(p => new NodeLattice(cell, p))];

    private static IEnumerable<(byte Xi, byte Eta)> List(CellKind cell, int degree)
    {
        (int X, int Y)[] corners = cell == CellKind.Triangle
            ? [(0, 0), (1, 0), (0, 1)]
            : [(0, 0), (1, 0), (1, 1), (0, 1)];
        foreach ((int x, int y) in corners)
        {
            yield return ((byte)(degree * x), (byte)(degree * y));
        }

        for (int edge = 0; edge < corners.Length; edge++)
        {
            (int X, int Y) from = corners[edge];
            (int X, int Y) to = corners[(edge + 1) % corners.Length];
            for (int k = 1; k < degree; k++)
            {
                yield return (
                    (byte)(((degree - k) * from.X) + (k * to.X)),
                    (byte)(((degree - k) * from.Y) + (k * to.Y)));
            }
        }

        for (int eta = 1; eta < degree; eta++)
        {
            int end = cell == CellKind.Triangle ? degree - eta : degree;
            for (int xi = 1; xi < end; xi++)
            {
                yield return ((byte)xi, (byte)eta);
            }
        }
    }
}
