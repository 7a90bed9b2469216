using FemCore2D.Geometry;

namespace FemCore2D.Elements.Tests;

/// <summary>Checks and integrals that several tests of maps share.</summary>
internal static class MapChecks
{
    public static double Area(CellMaps maps)
    {
        double area = 0;
        for (int cell = 0; cell < maps.Mesh.CellCount; cell++)
        {
            area += AreaOf(maps, cell);
        }

        return area;
    }

    /// <summary>The area of a cell; the determinant is a polynomial, so the rule is exact.</summary>
    public static double AreaOf(CellMaps maps, int cell)
    {
        QuadratureRule rule = QuadratureRule.For(maps.Mesh.KindOf(cell), 6);
        double area = 0;
        for (int q = 0; q < rule.Count; q++)
        {
            area += rule.Weights[q] * maps.JacobianAt(cell, rule.Points[q]).Determinant;
        }

        return area;
    }

    public static void JacobianAgreesWithDifferences(CellMaps maps, int cell, Point2D at, double tolerance)
    {
        // Exact for the cubic maps of the library, up to rounding.
        const double H = 1e-2;
        Jacobian jacobian = maps.JacobianAt(cell, at);
        Assert.True((jacobian.Xi - Difference(new Vector2D(H, 0))).Length <= tolerance);
        Assert.True((jacobian.Eta - Difference(new Vector2D(0, H))).Length <= tolerance);

        Vector2D Difference(Vector2D step) =>
            ((8 * (maps.PlaceOf(cell, at + step) - maps.PlaceOf(cell, at - step)))
                - (maps.PlaceOf(cell, at + (2 * step)) - maps.PlaceOf(cell, at - (2 * step)))) / (12 * H);
    }

    /// <summary>The rate at which an error falls when the cell size is halved each time.</summary>
    public static double LastRate(params double[] errors) => Math.Log2(errors[^2] / errors[^1]);
}
