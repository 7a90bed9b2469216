using System.Collections.Immutable;

namespace FemCore2D.Geometry;

/// <summary>
/// Completes a mesh from its cells: numbers the edges, finds the neighbours of each, and hands the marks of the
/// marked edges over to them. The order of vertices and cells is kept.
/// </summary>
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

    public ImmutableArray<string> PointNames { get; init; } = [];

    public int[] PointVertices { get; init; } = [];

    /// <summary>Numbers the edges in the order in which the cells first meet them and assembles the mesh.</summary>
    public Mesh Build()
    {
        int triangleCount = Triangles.Length / 3;
        int sideCount = Triangles.Length + Quadrilaterals.Length;
        int[] sideEdges = new int[sideCount];
        int[] firstEdgeAt = new int[Vertices.Length];
        Array.Fill(firstEdgeAt, -1);

        // Edges are kept in a chain at their lower vertex; an inner edge is met twice, so sides bound their number.
        int[] nextEdge = new int[sideCount];
        int[] edgeVertices = new int[2 * sideCount];
        int[] edgeCells = new int[2 * sideCount];
        int edgeCount = 0;

        for (int side = 0, cell = 0; side < sideCount; cell++)
        {
            ReadOnlySpan<int> corners = cell < triangleCount
                ? Triangles.AsSpan(3 * cell, 3)
                : Quadrilaterals.AsSpan(4 * (cell - triangleCount), 4);
            for (int i = 0; i < corners.Length; i++, side++)
            {
                int start = corners[i];
                int end = corners[i + 1 < corners.Length ? i + 1 : 0];
                int lower = Math.Min(start, end);
                int higher = Math.Max(start, end);
                int edge = firstEdgeAt[lower];
                while (edge >= 0 && edgeVertices[(2 * edge) + 1] != higher)
                {
                    edge = nextEdge[edge];
                }

                if (edge < 0)
                {
                    edge = edgeCount++;
                    nextEdge[edge] = firstEdgeAt[lower];
                    firstEdgeAt[lower] = edge;
                    edgeVertices[2 * edge] = lower;
                    edgeVertices[(2 * edge) + 1] = higher;
                    edgeCells[2 * edge] = -1;
                    edgeCells[(2 * edge) + 1] = -1;
                }

                int place = (2 * edge) + (start == lower ? 0 : 1);
                if (edgeCells[place] >= 0)
                {
                    throw new InvalidOperationException(
                        $"Cells {edgeCells[place]} and {cell} lie on the same side of the edge from {lower} to {higher}.");
                }

                edgeCells[place] = cell;
                sideEdges[side] = edge;
            }
        }

        Array.Resize(ref edgeVertices, 2 * edgeCount);
        Array.Resize(ref edgeCells, 2 * edgeCount);
        (double[] sweeps, ImmutableArray<string> names, int[][] boundaryEdges) =
            HandOverMarks(edgeVertices, firstEdgeAt, nextEdge);

        return new Mesh(new MeshArrays
        {
            Vertices = Vertices,
            Triangles = Triangles,
            Quadrilaterals = Quadrilaterals,
            CellRegions = CellRegions,
            CellEdges = sideEdges,
            EdgeVertices = edgeVertices,
            EdgeCells = edgeCells,
            EdgeSweeps = sweeps,
            RegionNames = RegionNames,
            BoundaryNames = names,
            BoundaryEdges = boundaryEdges,
            PointNames = PointNames,
            PointVertices = PointVertices,
        });
    }

    private (double[] Sweeps, ImmutableArray<string> Names, int[][] BoundaryEdges) HandOverMarks(
        int[] edgeVertices, int[] firstEdgeAt, int[] nextEdge)
    {
        ImmutableArray<string> names = [.. BoundarySets.SelectMany(set => set).Distinct()];
        List<int>[] edges = [.. names.Select(_ => new List<int>())];
        double[] sweeps = MarkedEdges.Any(mark => mark.SweepRadians != 0) ? new double[edgeVertices.Length / 2] : [];

        foreach (MarkedEdge mark in MarkedEdges)
        {
            int lower = Math.Min(mark.Start, mark.End);
            int higher = Math.Max(mark.Start, mark.End);
            int edge = firstEdgeAt[lower];
            while (edge >= 0 && edgeVertices[(2 * edge) + 1] != higher)
            {
                edge = nextEdge[edge];
            }

            if (edge < 0)
            {
                throw new InvalidOperationException(
                    $"The marked edge from {mark.Start} to {mark.End} is no side of a cell.");
            }

            if (mark.SweepRadians != 0)
            {
                sweeps[edge] = mark.Start == lower ? mark.SweepRadians : -mark.SweepRadians;
            }

            if (mark.Boundaries >= 0)
            {
                foreach (string name in BoundarySets[mark.Boundaries])
                {
                    edges[names.IndexOf(name)].Add(edge);
                }
            }
        }

        return (sweeps, names, [.. edges.Select(list => list.Order().Distinct().ToArray())]);
    }
}
