using System.Collections.Immutable;
using System.Runtime.InteropServices;
using FemCore2D.Geometry;

namespace FemCore2D.Assembly;

/// <content>The unknowns of an edge, a region and a boundary.</content>
public sealed partial class Numbering
{
    /// <summary>The number of unknowns on an edge and its ends.</summary>
    public int EdgeUnknownCount => (2 * PerVertex) + PerEdge;

    /// <summary>
    /// Lists the unknowns on an edge and its ends: those of the lower vertex, those of the higher vertex, then those
    /// between in the edge's direction.
    /// </summary>
    /// <param name="edge">The edge.</param>
    /// <param name="unknowns">Receives the unknowns; at least <see cref="EdgeUnknownCount"/> long.</param>
    /// <returns>The number of unknowns.</returns>
    public int UnknownsOfEdge(int edge, Span<int> unknowns)
    {
        (int from, int to) = Mesh.EndsOf(edge);
        int count = 0;
        for (int k = 0; k < PerVertex; k++)
        {
            unknowns[k] = FirstOfVertex(from) + k;
            unknowns[PerVertex + k] = FirstOfVertex(to) + k;
            count += 2;
        }

        return PerEdge > 0 ? AddEdge(edge, true, unknowns, count) : count;
    }

    /// <summary>The unknowns on a named boundary, ascending.</summary>
    /// <exception cref="UnknownNameException">No boundary has that name.</exception>
    public ImmutableArray<int> UnknownsOfBoundary(string boundary)
    {
        ReadOnlySpan<int> edges = Mesh.BoundaryEdges(boundary);
        int[] found = new int[edges.Length * EdgeUnknownCount];
        int count = 0;
        foreach (int edge in edges)
        {
            count += UnknownsOfEdge(edge, found.AsSpan(count));
        }

        return SortedWithoutRepeats(found.AsSpan(0, count));
    }

    /// <summary>
    /// The unknowns on the closure of a named region: in the interiors, on the edges and on the vertices of its
    /// cells, those on its border included; ascending.
    /// </summary>
    /// <exception cref="UnknownNameException">No region has that name.</exception>
    public ImmutableArray<int> UnknownsOfRegion(string region)
    {
        int index = Mesh.RegionIndex(region);
        ReadOnlySpan<int> regions = Mesh.CellRegions;
        bool[] marks = new bool[Count];
        Span<int> unknowns = stackalloc int[Math.Max(
            CellUnknownCount(CellKind.Triangle), CellUnknownCount(CellKind.Quadrilateral))];
        int count = 0;
        for (int cell = 0; cell < regions.Length; cell++)
        {
            if (regions[cell] == index)
            {
                foreach (int unknown in unknowns[..CellUnknowns(cell, unknowns)])
                {
                    count += marks[unknown] ? 0 : 1;
                    marks[unknown] = true;
                }
            }
        }

        int[] found = new int[count];
        for (int unknown = 0, k = 0; k < count; unknown++)
        {
            if (marks[unknown])
            {
                found[k++] = unknown;
            }
        }

        return ImmutableCollectionsMarshal.AsImmutableArray(found);
    }

    /// <summary>The unknowns of a named fixed point, ascending.</summary>
    /// <exception cref="UnknownNameException">No point has that name.</exception>
    public ImmutableArray<int> UnknownsOfPoint(string point)
    {
        int vertex = Mesh.VertexAt(point);
        return [.. Enumerable.Range(PerVertex == 0 ? 0 : FirstOfVertex(vertex), PerVertex)];
    }

    private static ImmutableArray<int> SortedWithoutRepeats(Span<int> unknowns)
    {
        unknowns.Sort();
        int kept = 0;
        foreach (int unknown in unknowns)
        {
            if (kept == 0 || unknowns[kept - 1] != unknown)
            {
                unknowns[kept++] = unknown;
            }
        }

        return [.. unknowns[..kept]];
    }
}
