using System.Collections.Immutable;

namespace FemCore2D.Geometry;

/// <summary>The arrays of a <see cref="Mesh"/>, complete and consistent; made by <see cref="MeshBuilder"/>.</summary>
internal sealed class MeshArrays
{
    public required Point2D[] Vertices { get; init; }

    public required int[] Triangles { get; init; }

    public required int[] Quadrilaterals { get; init; }

    public required int[] CellRegions { get; init; }

    /// <summary>Three a triangle, then four a quadrilateral.</summary>
    public required int[] CellEdges { get; init; }

    /// <summary>Two an edge, the lower number first; ascending in the lower number.</summary>
    public required int[] EdgeVertices { get; init; }

    /// <summary>Two an edge: left and right of its direction, -1 for none.</summary>
    public required int[] EdgeCells { get; init; }

    /// <summary>The first edge whose lower vertex is the given one, and the number of edges at the end.</summary>
    public required int[] FirstEdges { get; init; }

    /// <summary>One an edge, or empty when all edges are straight.</summary>
    public required double[] EdgeSweeps { get; init; }

    public required ImmutableArray<string> RegionNames { get; init; }

    public required ImmutableArray<string> BoundaryNames { get; init; }

    /// <summary>For each boundary name its edges, ascending.</summary>
    public required int[][] BoundaryEdges { get; init; }

    public required ImmutableArray<string> PointNames { get; init; }

    public required int[] PointVertices { get; init; }

    /// <summary>
    /// The local edge at which each triangle is bisected next, or empty while no triangle has been bisected.
    /// </summary>
    public required byte[] BisectionEdges { get; init; }
}
