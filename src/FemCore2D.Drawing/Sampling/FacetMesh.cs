using FemCore2D.Geometry;

namespace FemCore2D.Drawing;

/// <summary>
/// A scalar on flat facets, fine enough to be drawn: places shared by all facets that meet there, and values shared
/// where the scalar is continuous.
/// </summary>
internal sealed class FacetMesh
{
    /// <summary>The places at which facets meet.</summary>
    public required Point2D[] Sites { get; init; }

    /// <summary>The place of each value.</summary>
    public required int[] NodeSites { get; init; }

    /// <summary>The values.</summary>
    public required double[] Values { get; init; }

    /// <summary>Three values a facet, counterclockwise.</summary>
    public required int[] Facets { get; init; }

    /// <summary>The edge of each of the three sides of each facet.</summary>
    public required int[] SideEdges { get; init; }

    /// <summary>For each edge the side with the edge on its forward way and the one on its backward way, -1 for none.</summary>
    public required int[] EdgeSides { get; init; }

    /// <summary>The smallest value, NaN when there is none.</summary>
    public required double Minimum { get; init; }

    /// <summary>The largest value, NaN when there is none.</summary>
    public required double Maximum { get; init; }

    public int EdgeCount => EdgeSides.Length / 2;

    public int FacetCount => Facets.Length / 3;

    /// <summary>The value at the start and at the end of a side of a facet.</summary>
    public (int Start, int End) NodesOfSide(int side)
    {
        int first = side - (side % 3);
        return (Facets[side], Facets[side + 1 == first + 3 ? first : side + 1]);
    }

    /// <summary>Whether the value is the same on both sides of an edge, all along.</summary>
    public bool IsContinuous(int edge)
    {
        int left = EdgeSides[2 * edge];
        int right = EdgeSides[(2 * edge) + 1];
        if (left < 0 || right < 0)
            return false;
        (int a, int b) = NodesOfSide(left);
        (int c, int d) = NodesOfSide(right);
        return a == d && b == c;
    }
}
