using FemCore2D.Geometry;
using FsCheck;
using FsCheck.Fluent;

namespace FemCore2D.Testing;

/// <summary>Generators of small meshes with a few to a few hundred cells, regions and named boundaries.</summary>
public static class MeshGenerators
{
    /// <summary>Meshes of all the kinds of this class, as they are or refined in whole or in part.</summary>
    public static Gen<Mesh> All() =>
        from mesh in Gen.OneOf(
            Grids(), RingSectors(), Rings(), Fans(), Discs(), OfSections(SectionGenerators.NestedCircles()))
        from rounds in Gen.Choose(0, 2)
        from refined in Refined(mesh, rounds)
        select refined;

    /// <summary>Meshes without arcs, as they are or refined in whole or in part.</summary>
    public static Gen<Mesh> Straight() =>
        from mesh in Grids()
        from rounds in Gen.Choose(0, 2)
        from refined in Refined(mesh, rounds)
        select refined;

    /// <summary>
    /// Rectangular grids with shaken inner vertices, of triangles, quadrilaterals or both, in up to three regions;
    /// the sides are the boundaries <c>bottom</c>, <c>right</c>, <c>top</c> and <c>left</c>.
    /// </summary>
    public static Gen<Mesh> Grids() =>
        from columns in Gen.Choose(1, 5)
        from rows in Gen.Choose(1, 5)
        from size in NumberGenerators.MagnitudeBetween(1e-3, 10)
        from place in CellGenerators.Placements(size)
        from shakes in NumberGenerators.Between(-0.2, 0.2).ArrayOf(2 * (columns + 1) * (rows + 1))
        from cuts in Gen.Choose(0, 2).ArrayOf(columns * rows)
        from regions in Gen.Choose(0, 2).ArrayOf(columns * rows)
        select new ShakenGrid(columns, rows, size, place, shakes, cuts, regions).ToMesh();

    /// <summary>Sectors of rings, of curved quadrilaterals or of triangles, in the region <c>ring</c>.</summary>
    public static Gen<Mesh> RingSectors() =>
        from inner in NumberGenerators.MagnitudeBetween(0.1, 2)
        from centre in Centres(inner)
        from thickness in NumberGenerators.Between(0.3, 2)
        from start in NumberGenerators.Between(-Math.PI, Math.PI)
        from sweep in NumberGenerators.Between(0.2, Math.PI)
        from across in Gen.Choose(1, 4)
        from around in Gen.Choose(4, 8)
        from growth in NumberGenerators.MagnitudeBetween(0.5, 2)
        from isCut in Gen.Elements(true, false)
        let mesh = QuadrilateralPatch
            .RingSector(centre, inner, inner + thickness, start, sweep, "ring", "inner", "outer", "start", "end")
            .Divide(across, Math.Max(around, LeastAround(sweep, inner, thickness / across / 2)), Grading.Growing(growth))
        select isCut ? mesh.CutQuadrilaterals().Mesh : mesh;

    /// <summary>Whole rings around a disc of triangles, in the regions <c>ring</c> and <c>core</c>.</summary>
    public static Gen<Mesh> Rings() =>
        from inner in NumberGenerators.MagnitudeBetween(0.5, 2)
        from centre in Centres(inner)
        from thickness in NumberGenerators.Between(0.2, 2)
        from across in Gen.Choose(1, 3)
        from wish in Gen.Choose(3, 6)
        let halfAround = Math.Max(wish, LeastAround(Math.PI, inner, thickness / across))
        let halves = new[] { 0, Math.PI }.Select(start => QuadrilateralPatch
            .RingSector(centre, inner, inner + thickness, start, Math.PI, "ring", "middle", "outer")
            .Divide(across, halfAround))
        select Mesh.Join([Fan(centre, inner, 2 * halfAround, "core", "middle"), .. halves]);

    /// <summary>Discs of triangles around their centre, in the region <c>core</c> with the boundary <c>rim</c>.</summary>
    public static Gen<Mesh> Fans() =>
        from radius in NumberGenerators.MagnitudeBetween(1e-3, 10)
        from centre in Centres(radius)
        from count in Gen.Choose(4, 12)
        select Fan(centre, radius, count, "core", "rim");

    /// <summary>
    /// Discs of quadrilaterals, a square within four patches, in the regions <c>core</c> and <c>shell</c> with the
    /// boundary <c>rim</c>.
    /// </summary>
    public static Gen<Mesh> Discs() =>
        from radius in NumberGenerators.MagnitudeBetween(1e-3, 10)
        from centre in Centres(radius)
        from wish in Gen.Choose(1, 3)
        from layers in Gen.Choose(1, 3)
        from share in NumberGenerators.Between(0.3, 0.6)
        let along = Math.Max(wish, LeastAround(0.5 * Math.PI, 1, (1 - share) / layers))
        select Disc(centre, radius, along, layers, share);

    /// <summary>The meshes that the mesher makes of cross-sections without being told a size: as coarse as it will.</summary>
    /// <param name="sections">The cross-sections.</param>
    public static Gen<Mesh> OfSections(Gen<CrossSection> sections)
    {
        ArgumentNullException.ThrowIfNull(sections);
        return sections.Select(section => Mesher.Generate(section).Mesh);
    }

    private static Gen<Point2D> Centres(double radius) =>
        from x in NumberGenerators.Between(-5, 5)
        from y in NumberGenerators.Between(-5, 5)
        select new Point2D(x * radius, y * radius);

    /// <summary>The number of edges around an arc that lets each rise over its chord by a quarter of a layer.</summary>
    private static int LeastAround(double sweep, double radius, double layer) =>
        (int)Math.Ceiling(sweep / Math.Sqrt(2 * layer / radius));

    private static Gen<Mesh> Refined(Mesh mesh, int rounds) => rounds == 0 || mesh.CellCount > 150
        ? Gen.Constant(mesh)
        : from marks in Gen.Choose(0, mesh.CellCount - 1).ArrayOf(3)
          from isWhole in Gen.Elements(true, false)
          from refined in Refined(isWhole ? mesh.RefineAll().Mesh : mesh.RefineCells(marks).Mesh, rounds - 1)
          select refined;

    private static Mesh Fan(Point2D centre, double radius, int count, string region, string rim)
    {
        double step = 2 * Math.PI / count;
        (int Start, int End)[] edges = [.. Enumerable.Range(0, count).Select(i => (i + 1, ((i + 1) % count) + 1))];
        return new MeshDefinition
        {
            Vertices =
            [
                centre,
                .. Enumerable.Range(0, count).Select(i => centre + (radius * Vector2D.AtAngle(i * step))),
            ],
            Triangles = [.. edges.SelectMany(edge => new[] { 0, edge.Start, edge.End })],
            RegionNames = [region],
            Boundaries = new Dictionary<string, IReadOnlyList<(int Start, int End)>> { [rim] = edges },
            Arcs = [.. edges.Select(edge => (edge.Start, edge.End, step))],
        }.ToMesh();
    }

    private static Mesh Disc(Point2D centre, double radius, int along, int layers, double share)
    {
        Point2D Corner(int quarter, double distance) =>
            centre + (distance * Vector2D.AtAngle(((0.5 * quarter) + 0.25) * Math.PI));

        double half = share * radius;
        Mesh core = QuadrilateralPatch
            .Straight(Corner(0, half), Corner(1, half), Corner(2, half), Corner(3, half), "core")
            .Divide(along, along);
        IEnumerable<Mesh> shells = Enumerable.Range(0, 4).Select(quarter => new QuadrilateralPatch(
                new OutlinePiece(Corner(quarter, half), Corner(quarter, radius)),
                new OutlinePiece(Corner(quarter, radius), Corner(quarter + 1, radius), 0.5 * Math.PI, "rim"),
                new OutlinePiece(Corner(quarter + 1, radius), Corner(quarter + 1, half)),
                new OutlinePiece(Corner(quarter + 1, half), Corner(quarter, half)),
                "shell")
            .Divide(layers, along));
        return Mesh.Join([core, .. shells]);
    }
}
