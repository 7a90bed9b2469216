using System.Collections.Immutable;

namespace FemCore2D.Geometry;

/// <summary>The boundary names of a mesh seen from its edges: one set of names for each edge that has any.</summary>
internal sealed class BoundaryMarks
{
    private BoundaryMarks(int[] setOfEdge, ImmutableArray<ImmutableArray<string>> sets)
    {
        SetOfEdge = setOfEdge;
        Sets = sets;
    }

    /// <summary>For each edge an index into <see cref="Sets"/>, or -1.</summary>
    public int[] SetOfEdge { get; }

    public ImmutableArray<ImmutableArray<string>> Sets { get; }

    public static BoundaryMarks Of(Mesh mesh)
    {
        int[] setOfEdge = new int[mesh.EdgeCount];
        Array.Fill(setOfEdge, -1);
        List<ImmutableArray<string>> sets = [];
        foreach (string name in mesh.BoundaryNames)
        {
            // An edge that was in a set before moves on to the set with one name more.
            Dictionary<int, int> grown = [];
            foreach (int edge in mesh.BoundaryEdges(name))
            {
                int old = setOfEdge[edge];
                if (!grown.TryGetValue(old, out int set))
                {
                    set = sets.Count;
                    sets.Add(old < 0 ? [name] : sets[old].Add(name));
                    grown.Add(old, set);
                }

                setOfEdge[edge] = set;
            }
        }

        return new BoundaryMarks(setOfEdge, [.. sets]);
    }
}
