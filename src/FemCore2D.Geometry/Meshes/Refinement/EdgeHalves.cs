namespace FemCore2D.Geometry;

/// <summary>Hands the arcs and names of edges over to their halves.</summary>
internal static class EdgeHalves
{
    /// <summary>The marks of the edges after some of them have been halved.</summary>
    /// <param name="mesh">The mesh with the whole edges.</param>
    /// <param name="boundaries">The names of its edges.</param>
    /// <param name="middles">For each edge the vertex in its middle, or -1 for an edge that stays whole.</param>
    public static List<MarkedEdge> Marks(Mesh mesh, BoundaryMarks boundaries, ReadOnlySpan<int> middles)
    {
        List<MarkedEdge> marks = [];
        for (int edge = 0; edge < mesh.EdgeCount; edge++)
        {
            double sweep = mesh.SweepRadiansOf(edge);
            int set = boundaries.SetOfEdge[edge];
            if (sweep == 0 && set < 0)
            {
                continue;
            }

            (int from, int to) = mesh.EndsOf(edge);
            int middle = middles[edge];
            if (middle < 0)
            {
                marks.Add(new MarkedEdge(from, to, sweep, set));
            }
            else
            {
                marks.Add(new MarkedEdge(from, middle, 0.5 * sweep, set));
                marks.Add(new MarkedEdge(middle, to, 0.5 * sweep, set));
            }
        }

        return marks;
    }
}
