using System.Collections.Immutable;

namespace FemCore2D.Geometry;

/// <summary>
/// Completes a mesh from its cells: numbers the edges, finds the neighbours of each, and hands the marks of the
/// marked edges over to them. The order of vertices and cells is kept. Linear in the number of cells.
/// </summary>
/// <remarks>It takes the arrays over, so its caller must not change them afterwards.</remarks>
internal sealed class MeshBuilder
{
    public required Point2D[] Vertices { get; init; }

    /// <summary>Three vertices a triangle, counterclockwise.</summary>
    public int[] Triangles { get; init; } = [];

    /// <summary>Four vertices a quadrilateral, counterclockwise.</summary>
    public int[] Quadrilaterals { get; init; } = [];

    /// <summary>An index into <see cref="RegionNames"/> for each triangle, then for each quadrilateral.</summary>
    public required int[] CellRegions { get; init; }

    public required ImmutableArray<string> RegionNames { get; init; }

    /// <summary>The edges that lie on arcs or carry names; others need not be given.</summary>
    public IReadOnlyList<MarkedEdge> MarkedEdges { get; init; } = [];

    /// <summary>The sets of boundary names that marked edges refer to.</summary>
    public ImmutableArray<ImmutableArray<string>> BoundarySets { get; init; } = [];

    /// <summary>Boundary names that come first in the mesh, in this order, even without any edge.</summary>
    public ImmutableArray<string> BoundaryNames { get; init; } = [];

    public ImmutableArray<string> PointNames { get; init; } = [];

    public int[] PointVertices { get; init; } = [];

    /// <summary>The local edge at which each triangle is bisected next, or empty for the longest edge of each.</summary>
    public byte[] BisectionEdges { get; init; } = [];

    /// <summary>Numbers the edges by their lower vertex and assembles the mesh.</summary>
    /// <exception cref="InvalidMeshException">
    /// Two cells lie on the same side of one edge, or a marked edge is no side of a cell.
    /// </exception>
    public Mesh Build()
    {
        EdgeNumbering numbering = EdgeNumbering.Of(Vertices, Triangles, Quadrilaterals);
        (double[] sweeps, ImmutableArray<string> names, int[][] boundaryEdges) = HandOverMarks(numbering);
        return new Mesh(new MeshArrays
        {
            Vertices = Vertices,
            Triangles = Triangles,
            Quadrilaterals = Quadrilaterals,
            CellRegions = CellRegions,
            CellEdges = numbering.SideEdges,
            EdgeVertices = numbering.EdgeVertices,
            EdgeCells = numbering.EdgeCells,
            FirstEdges = numbering.FirstEdges,
            EdgeSweeps = sweeps,
            RegionNames = RegionNames,
            BoundaryNames = names,
            BoundaryEdges = boundaryEdges,
            PointNames = PointNames,
            PointVertices = PointVertices,
            BisectionEdges = BisectionEdges,
        });
    }

    private (double[] Sweeps, ImmutableArray<string> Names, int[][] BoundaryEdges) HandOverMarks(
        EdgeNumbering numbering)
    {
        ImmutableArray<string> names = [.. BoundaryNames.Concat(BoundarySets.SelectMany(set => set)).Distinct()];
        int[][] namesOfSet = [.. BoundarySets.Select(set => set.Select(name => names.IndexOf(name)).ToArray())];
        List<int>[] edges = [.. names.Select(_ => new List<int>())];
        double[] sweeps = [];
        foreach (MarkedEdge mark in MarkedEdges)
        {
            int edge = Find(numbering, mark);
            if (mark.SweepRadians != 0)
            {
                if (sweeps.Length == 0)
                {
                    sweeps = new double[numbering.EdgeVertices.Length / 2];
                }

                sweeps[edge] = mark.Start < mark.End ? mark.SweepRadians : -mark.SweepRadians;
            }

            if (mark.Boundaries >= 0)
            {
                foreach (int name in namesOfSet[mark.Boundaries])
                {
                    edges[name].Add(edge);
                }
            }
        }

        return (sweeps, names, [.. edges.Select(list => list.Order().Distinct().ToArray())]);
    }

    private static int Find(EdgeNumbering numbering, in MarkedEdge mark)
    {
        (int lower, int higher) = mark.Start < mark.End ? (mark.Start, mark.End) : (mark.End, mark.Start);
        for (int edge = numbering.FirstEdges[lower]; edge < numbering.FirstEdges[lower + 1]; edge++)
        {
            if (numbering.EdgeVertices[(2 * edge) + 1] == higher)
            {
                return edge;
            }
        }

        throw new InvalidMeshException(
            $"The marked edge from vertex {mark.Start} to vertex {mark.End} is no side of any cell. " +
            "Mark only pairs of vertices that a cell joins.");
    }
}
