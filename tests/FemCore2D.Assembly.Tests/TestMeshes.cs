using FemCore2D.Geometry;

namespace FemCore2D.Assembly.Tests;

/// <summary>Structured meshes with known shapes.</summary>
internal static class TestMeshes
{
    /// <summary>
    /// The unit square in the regions <c>a</c> (left half) and <c>b</c>, of quadrilaterals or triangles, with the
    /// boundaries left, right, bottom, top and the inner line middle.
    /// </summary>
    public static Mesh Square(int divisions, bool triangles)
    {
        Mesh left = new QuadrilateralPatch(
            new OutlinePiece(new Point2D(0, 0), new Point2D(0.5, 0), 0, "bottom"),
            new OutlinePiece(new Point2D(0.5, 0), new Point2D(0.5, 1), 0, "middle"),
            new OutlinePiece(new Point2D(0.5, 1), new Point2D(0, 1), 0, "top"),
            new OutlinePiece(new Point2D(0, 1), new Point2D(0, 0), 0, "left"),
            "a").Divide(divisions, 2 * divisions);
        Mesh right = new QuadrilateralPatch(
            new OutlinePiece(new Point2D(0.5, 0), new Point2D(1, 0), 0, "bottom"),
            new OutlinePiece(new Point2D(1, 0), new Point2D(1, 1), 0, "right"),
            new OutlinePiece(new Point2D(1, 1), new Point2D(0.5, 1), 0, "top"),
            new OutlinePiece(new Point2D(0.5, 1), new Point2D(0.5, 0), 0, "middle"),
            "b").Divide(divisions, 2 * divisions);
        return Cut(Mesh.Join([left, right]), triangles);
    }

    /// <summary>A quadrilateral that is no parallelogram, with the boundary <c>rim</c> all around.</summary>
    public static Mesh Trapezium(int divisions, bool triangles) => Cut(
        new QuadrilateralPatch(
            new OutlinePiece(new Point2D(0, 0), new Point2D(1.3, 0.1), 0, "rim"),
            new OutlinePiece(new Point2D(1.3, 0.1), new Point2D(1, 1.1), 0, "rim"),
            new OutlinePiece(new Point2D(1, 1.1), new Point2D(-0.1, 0.7), 0, "rim"),
            new OutlinePiece(new Point2D(-0.1, 0.7), new Point2D(0, 0), 0, "rim"),
            "all").Divide(divisions, divisions),
        triangles);

    /// <summary>The ring between the radii 1 and 2 in the region <c>ring</c>, with the boundaries inner and outer.</summary>
    public static Mesh Ring(int across, int around, bool triangles) => Cut(
        Mesh.Join(
        [
            .. Enumerable.Range(0, 4).Select(quarter => QuadrilateralPatch
                .RingSector(Point2D.Origin, 1, 2, 0.5 * Math.PI * quarter, 0.5 * Math.PI, "ring", "inner", "outer")
                .Divide(across, around)),
        ]),
        triangles);

    /// <summary>The quarter of that ring in the first quadrant, with the boundaries inner, outer, start and end.</summary>
    public static Mesh RingQuarter(int across, int around, bool triangles) => Cut(
        QuadrilateralPatch
            .RingSector(Point2D.Origin, 1, 2, 0, 0.5 * Math.PI, "ring", "inner", "outer", "start", "end")
            .Divide(across, around),
        triangles);

    /// <summary>The unit disc with the boundary <c>rim</c>.</summary>
    public static Mesh Disc(int along, int layers, bool triangles)
    {
        static Point2D Corner(int quarter, double distance) =>
            Point2D.Origin + (distance * Vector2D.AtAngle(((0.5 * quarter) + 0.25) * Math.PI));

        Mesh core = QuadrilateralPatch
            .Straight(Corner(0, 0.5), Corner(1, 0.5), Corner(2, 0.5), Corner(3, 0.5), "core").Divide(along, along);
        IEnumerable<Mesh> shells = Enumerable.Range(0, 4).Select(quarter => new QuadrilateralPatch(
                new OutlinePiece(Corner(quarter, 0.5), Corner(quarter, 1)),
                new OutlinePiece(Corner(quarter, 1), Corner(quarter + 1, 1), 0.5 * Math.PI, "rim"),
                new OutlinePiece(Corner(quarter + 1, 1), Corner(quarter + 1, 0.5)),
                new OutlinePiece(Corner(quarter + 1, 0.5), Corner(quarter, 0.5)),
                "shell")
            .Divide(layers, along));
        return Cut(Mesh.Join([core, .. shells]), triangles);
    }

    private static Mesh Cut(Mesh mesh, bool triangles) => triangles ? mesh.CutQuadrilaterals().Mesh : mesh;
}
