using FemCore2D.Geometry;

namespace FemCore2D.Elements;

/// <summary>Points and weights that integrate polynomials exactly over a reference cell. Immutable and shared.</summary>
public sealed class QuadratureRule
{
    private readonly Point2D[] points = [];
    private readonly double[] weights = [];

    /// <summary>The degree up to which polynomials are integrated exactly.</summary>
    public int Degree => throw new NotImplementedException();

    /// <summary>The points, in coordinates of the reference cell.</summary>
    public ReadOnlySpan<Point2D> Points => points;

    /// <summary>The weights; they sum to the area of the reference cell (1/2 for the triangle, 1 for the square).</summary>
    public ReadOnlySpan<double> Weights => weights;

    /// <summary>The rule of a cell that is exact for a degree from 0 to 20.</summary>
    public static QuadratureRule For(CellKind cell, int degree) => throw new NotImplementedException();
}
