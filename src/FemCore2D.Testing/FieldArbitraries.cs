using FemCore2D.Geometry;
using FsCheck;
using FsCheck.Fluent;

namespace FemCore2D.Testing;

/// <summary>
/// All generators by the type they make, for a property test that takes such types as arguments.
/// </summary>
/// <example>
/// With FsCheck.Xunit: <c>[Property(Arbitrary = [typeof(FieldArbitraries)])]</c> above
/// <c>bool AreaIsPositive(TriangleCorners triangle) => triangle.Area > 0;</c>.
/// </example>
public static class FieldArbitraries
{
    /// <summary>Triangles with angles of at least 10 degrees.</summary>
    public static Arbitrary<TriangleCorners> TriangleCorners() => CellGenerators.Triangles().ToArbitrary();

    /// <summary>Convex quadrilaterals.</summary>
    public static Arbitrary<QuadrilateralCorners> QuadrilateralCorners() => CellGenerators.Quadrilaterals().ToArbitrary();

    /// <summary>Points of the reference triangle.</summary>
    public static Arbitrary<TrianglePoint> TrianglePoints() => CellGenerators.PointsOfTriangle().ToArbitrary();

    /// <summary>Points of the reference square.</summary>
    public static Arbitrary<SquarePoint> SquarePoints() => CellGenerators.PointsOfSquare().ToArbitrary();

    /// <summary>Polynomials of degree 0 to 5.</summary>
    public static Arbitrary<Polynomial2D> Polynomials() => PolynomialGenerators.UpToDegree(5).ToArbitrary();

    /// <summary>Small cross-sections of every kind.</summary>
    public static Arbitrary<CrossSection> CrossSections() => SectionGenerators.All().ToArbitrary();

    /// <summary>Small meshes of every kind.</summary>
    public static Arbitrary<Mesh> Meshes() => MeshGenerators.All().ToArbitrary();
}
