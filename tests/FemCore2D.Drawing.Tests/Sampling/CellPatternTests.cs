using FemCore2D.Geometry;

namespace FemCore2D.Drawing.Tests;

public sealed class CellPatternTests
{
    private static readonly int[] Counts = [1, 2, 4, 8];

    [Fact]
    public void Facets_fill_the_triangle_without_overlap_whatever_the_division_of_its_edges()
    {
        foreach (int a in Counts)
        {
            foreach (int b in Counts)
            {
                foreach (int c in Counts)
                    Check(CellKind.Triangle, [a, b, c], 0.5);
            }
        }
    }

    [Fact]
    public void Facets_fill_the_quadrilateral_without_overlap_whatever_the_division_of_its_edges()
    {
        foreach (int code in Enumerable.Range(0, 256))
            Check(CellKind.Quadrilateral, [Counts[code & 3], Counts[(code >> 2) & 3], Counts[(code >> 4) & 3], Counts[code >> 6]], 1);
    }

    private static void Check(CellKind kind, int[] steps, double area)
    {
        var pattern = CellPattern.Make(kind, steps);
        double sum = 0;
        for (int i = 0; i < pattern.Facets.Length; i += 3)
        {
            Point2D a = pattern.Reference[pattern.Facets[i]];
            double twice = (pattern.Reference[pattern.Facets[i + 1]] - a).Cross(pattern.Reference[pattern.Facets[i + 2]] - a);
            Assert.True(twice > 1e-9, $"{kind} {string.Join(',', steps)}: facet {i / 3} has area {twice / 2}");
            sum += twice / 2;
        }

        Assert.Equal(area, sum, 1e-12);
        for (int edge = 0; edge < steps.Length; edge++)
            Assert.Equal(steps[edge], pattern.Places.Count(place => place.Edge == edge));
    }
}
