using FemCore2D.Geometry;

namespace FemCore2D.Drawing.Tests;

public sealed class RegionSmoothingTests
{
    private static readonly Box2D Everything = new(new Point2D(-9, -9), new Point2D(9, 9));

    public static TheoryData<Mesh> Meshes =>
    [
        TestMeshes.Rectangle(6, 4, 1.5, 1),
        TestMeshes.Quadrilaterals(5, 4, 1.5, 1),
        TestMeshes.Rings(20, [0.4, 0.7, 1], ["core", "ring", "ring"]),
    ];

    [Theory]
    [MemberData(nameof(Meshes))]
    public void A_continuous_scalar_stays_as_it_is(Mesh mesh)
    {
        var wave = CellScalar.OfPlace(mesh, p => Math.Sin(3 * p.X) * p.Y);
        CellScalar evened = RegionSmoothing.Of(wave, Everything);
        Point2D[] points = [new(0.2, 0.3), new(0.5, 0.1), new(0, 0)];
        double[] before = new double[3];
        double[] after = new double[3];
        for (int cell = 0; cell < mesh.CellCount; cell++)
        {
            wave.Evaluator(cell, points, before);
            evened.Evaluator(cell, points, after);
            Assert.All(before.Zip(after), pair => Assert.Equal(pair.First, pair.Second, 1e-7));
        }
    }

    [Theory]
    [MemberData(nameof(Meshes))]
    public void Jumps_vanish_within_a_region_at_corners_and_middles_and_stay_between_regions(Mesh mesh)
    {
        // A jump of the cell's number within each region and one of 1000 between them.
        var steps = new CellScalar(mesh, 2, (cell, _, values) => values.Fill((1000 * mesh.CellRegions[cell]) + (cell % 7)));
        CellScalar evened = RegionSmoothing.Of(steps, Everything);
        for (int edge = 0; edge < mesh.EdgeCount; edge++)
        {
            (int left, int right) = mesh.CellsOf(edge);
            if (left < 0 || right < 0)
                continue;
            double difference = Math.Abs(AtMiddle(mesh, evened, left, edge) - AtMiddle(mesh, evened, right, edge));
            if (mesh.CellRegions[left] == mesh.CellRegions[right])
                Assert.Equal(0, difference, 1e-5);
            else
                Assert.InRange(difference, 990, 1010);
        }
    }

    private static double AtMiddle(Mesh mesh, CellScalar scalar, int cell, int edge)
    {
        int local = mesh.EdgesOf(cell).IndexOf(edge);
        Point2D[] triangle = [new(0.5, 0), new(0.5, 0.5), new(0, 0.5)];
        Point2D[] square = [new(0.5, 0), new(1, 0.5), new(0.5, 1), new(0, 0.5)];
        double[] value = new double[1];
        scalar.Evaluator(cell, [(mesh.KindOf(cell) == CellKind.Triangle ? triangle : square)[local]], value);
        return value[0];
    }
}
