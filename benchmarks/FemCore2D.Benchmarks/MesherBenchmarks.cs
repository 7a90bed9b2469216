using BenchmarkDotNet.Attributes;
using FemCore2D.Geometry;
using NetTopologySuite.Geometries;
using NetTopologySuite.Triangulate;

namespace FemCore2D.Benchmarks;

/// <summary>
/// A million triangles refined for quality, from section to finished mesh and report, beside a plain Delaunay
/// triangulation of the same vertices by NetTopologySuite. Divide the triangles by the times for the ratio of speeds.
/// </summary>
[MemoryDiagnoser]
[HideColumns("Error")]
[MinIterationCount(3)]
[MaxIterationCount(8)]
[WarmupCount(1)]
public class MesherBenchmarks
{
    private readonly CrossSection section = MesherSections.Wires();
    private readonly MeshOptions uniform = MeshOptions.Default.WithSize(MesherSections.SizeFor(1_000_000));
    private Coordinate[] points = [];

    [GlobalSetup]
    public void Setup()
    {
        Mesh mesh = Mesher.Generate(section, uniform).Mesh;
        points = [.. mesh.Vertices.ToArray().Select(point => new Coordinate(point.X, point.Y))];
        Console.WriteLine($"// {mesh.CellCount} triangles, {mesh.VertexCount} vertices");
        Mesh graded = Mesher.Generate(section, MesherSections.Graded(1_000_000)).Mesh;
        Console.WriteLine($"// graded: {graded.CellCount} triangles, {graded.VertexCount} vertices");
    }

    [Benchmark(Baseline = true)]
    public int PlainDelaunayOfNetTopologySuite()
    {
        DelaunayTriangulationBuilder builder = new();
        builder.SetSites(points);
        return builder.GetSubdivision().GetTriangleCoordinates(false).Count;
    }

    [Benchmark]
    public int QualityMeshOfOneSize() => Mesher.Generate(section, uniform).Mesh.CellCount;

    [Benchmark]
    public int QualityMeshOfGradedSizes() => Mesher.Generate(section, MesherSections.Graded(1_000_000)).Mesh.CellCount;
}

/// <summary>Time and memory of meshes of ten thousand to four million triangles, for the exponent of their growth.</summary>
[MemoryDiagnoser]
[MinIterationCount(3)]
[MaxIterationCount(8)]
[WarmupCount(1)]
public class MesherGrowth
{
    private readonly CrossSection section = MesherSections.Wires();

    [Params(10_000, 40_000, 200_000, 1_000_000, 4_000_000)]
    public int Triangles { get; set; }

    [Benchmark]
    public int QualityMesh() =>
        Mesher.Generate(section, MeshOptions.Default.WithSize(MesherSections.SizeFor(Triangles))).Mesh.CellCount;
}

/// <summary>What is meshed: a screened pair of wires and a drain.</summary>
internal static class MesherSections
{
    private const double Radius = 5e-3;

    public static CrossSection Wires() => CrossSection.Empty
        .Fill(Outline.Circle(Point2D.Origin, Radius, "screen"), "filler")
        .Fill(Outline.Circle(new(-1.8e-3, 0), 1.6e-3), "insulation")
        .Fill(Outline.Circle(new(1.8e-3, 0), 1.6e-3), "insulation")
        .Fill(Outline.Circle(new(-1.8e-3, 0), 0.7e-3, "wires"), "copper")
        .Fill(Outline.Circle(new(1.8e-3, 0), 0.7e-3, "wires"), "copper")
        .Hole(Outline.Circle(new(0, 2.6e-3), 0.5e-3, "drain"));

    /// <summary>The edge length that divides the section into about so many triangles.</summary>
    public static double SizeFor(int triangles) => Radius * Math.Sqrt(Math.PI * 4 / (Math.Sqrt(3) * 1.1 * triangles));

    /// <summary>Fine at the wires and the drain, ten times as coarse at the screen.</summary>
    public static MeshOptions Graded(int triangles) => MeshOptions.Default
        .WithSize(2 * SizeFor(triangles)).WithRegionSize("copper", SizeFor(triangles))
        .WithBoundarySize("wires", 0.2 * SizeFor(triangles)).WithBoundarySize("drain", 0.1 * SizeFor(triangles))
        .WithGrowth(1.1);
}
