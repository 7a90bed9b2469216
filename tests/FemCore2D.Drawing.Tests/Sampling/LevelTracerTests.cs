using FemCore2D.Geometry;

namespace FemCore2D.Drawing.Tests;

public sealed class LevelTracerTests
{
    private static readonly Mesh Disc = TestMeshes.Rings(24, [0.3, 0.5, 0.7, 1], ["core", "core", "rim", "rim"]);

    [Fact]
    public void A_level_line_of_the_distance_is_one_closed_circle()
    {
        FacetMesh facets = Facets(CellScalar.OfPlace(Disc, Distance));
        Polyline line = Assert.Single(LevelTracer.Lines(facets, 0.6));
        Assert.True(line.IsClosed);
        Assert.All(line.Points, point => Assert.Equal(0.6, Distance(point), 2e-4));
    }

    [Fact]
    public void The_area_above_a_level_is_that_of_the_ring_outside_the_circle()
    {
        FacetMesh facets = Facets(CellScalar.OfPlace(Disc, Distance));
        Assert.Equal(Math.PI * (1 - 0.36), AreaOf(LevelTracer.OutlinesAbove(facets, 0.6)), 1e-3);
        Assert.Equal(Math.PI, AreaOf(LevelTracer.OutlinesAbove(facets, double.NegativeInfinity)), 1e-3);
        Assert.Empty(LevelTracer.OutlinesAbove(facets, 2));
    }

    [Fact]
    public void The_whole_mesh_is_one_outline_without_inner_edges()
    {
        FacetMesh facets = Facets(CellScalar.OfPlace(Disc, Distance));
        Polyline rim = Assert.Single(LevelTracer.OutlinesAbove(facets, double.NegativeInfinity));
        Assert.All(rim.Points, point => Assert.Equal(1, Distance(point), 1e-12));
    }

    [Fact]
    public void A_graded_mesh_is_divided_without_gaps()
    {
        // A facet edge with one side only must lie on the rim: anywhere else it would be a crack.
        Mesh graded = TestMeshes.Rings(16, [0.02, 0.05, 0.2, 1], ["core", "core", "rim", "rim"], ofQuadrilaterals: true);
        FacetMesh facets = Facets(CellScalar.OfPlace(graded, Distance), pixels: 900);
        for (int edge = 0; edge < facets.EdgeCount; edge++)
        {
            if (facets.IsContinuous(edge))
                continue;
            (int start, int end) = facets.NodesOfSide(Math.Max(facets.EdgeSides[2 * edge], facets.EdgeSides[(2 * edge) + 1]));
            Assert.Equal(1, Distance(facets.Sites[facets.NodeSites[start]]), 1e-9);
            Assert.Equal(1, Distance(facets.Sites[facets.NodeSites[end]]), 1e-9);
        }
    }

    [Fact]
    public void A_jump_between_regions_is_kept_and_bounds_the_area()
    {
        var jump = new CellScalar(Disc, 2, (cell, _, values) => values.Fill(Disc.CellRegions[cell] == 0 ? 1 : 3));
        FacetMesh facets = Facets(jump, averages: true);
        Assert.Equal(Math.PI * (1 - 0.25), AreaOf(LevelTracer.OutlinesAbove(facets, 2)), 1e-3);
        Assert.Empty(LevelTracer.Lines(facets, 2));
    }

    [Fact]
    public void Cells_without_a_value_are_holes()
    {
        var holed = new CellScalar(Disc, 1, (cell, _, values) => values.Fill(Disc.CellRegions[cell] == 0 ? double.NaN : 3));
        FacetMesh facets = Facets(holed);
        Assert.Equal(3, facets.Minimum);
        Assert.Equal(Math.PI * (1 - 0.25), AreaOf(LevelTracer.OutlinesAbove(facets, double.NegativeInfinity)), 1e-3);
    }

    [Fact]
    public void A_plateau_at_a_level_is_not_crossed_by_its_rounding()
    {
        var noise = new Random(5);
        double[] values = new double[Disc.VertexCount];
        for (int i = 0; i < values.Length; i++)
        {
            double distance = Distance(Disc.Vertices[i]);
            values[i] = distance > 0.6 ? 1e-12 * (noise.NextDouble() - 0.5) : 1 - distance;
        }

        FacetMesh facets = Facets(CellScalar.AtVertices(Disc, values));
        Assert.Empty(LevelTracer.Lines(facets, 0));
    }

    [Fact]
    public void A_phase_is_unrolled_so_that_no_line_runs_along_its_seam()
    {
        var phase = CellScalar.OfPlace(
            TestMeshes.Rectangle(8, 8, 1, 1), p => Math.Atan2(p.Y - 0.5, p.X + 0.5) * 360 / Math.PI);
        FacetMesh plain = Facets(phase);
        FacetMesh unrolled = PeriodicFacets.Unroll(Facets(phase.Select(value => value - (180 * Math.Round(value / 180)))), -90, 180);
        double Widest(FacetMesh mesh) => Enumerable.Range(0, mesh.FacetCount).Max(facet =>
        {
            double[] corners = [.. Enumerable.Range(3 * facet, 3).Select(i => mesh.Values[mesh.Facets[i]])];
            return corners.Max() - corners.Min();
        });
        Assert.Equal(Widest(plain), Widest(unrolled), 1e-9);
    }

    private static double Distance(Point2D point) => point.DistanceTo(Point2D.Origin);

    private static FacetMesh Facets(CellScalar scalar, double pixels = 300, bool averages = false) => FacetMeshBuilder.Build(
        scalar, pixels, new Box2D(new Point2D(-2, -2), new Point2D(2, 2)), averages);

    private static double AreaOf(List<Polyline> outlines)
    {
        double sum = 0;
        foreach (Polyline line in outlines)
        {
            Assert.True(line.IsClosed);
            for (int i = 0; i < line.Points.Length; i++)
            {
                Point2D a = line.Points[i];
                Point2D b = line.Points[(i + 1) % line.Points.Length];
                sum += ((a.X * b.Y) - (a.Y * b.X)) / 2;
            }
        }

        return sum;
    }
}
