namespace FemCore2D.Solvers;

/// <summary>
/// The tree of a nested dissection. Each inner node is a separator between the vertices of its two subtrees, each leaf
/// a part that is not cut further. Nodes are numbered so that a subtree is a range that begins with its root.
/// </summary>
internal sealed class SeparatorTree
{
    private readonly List<int> parents = [];
    private readonly List<int> depths = [];
    private readonly List<int> rights = [];
    private readonly List<int> ends = [];

    /// <summary>The number of nodes.</summary>
    public int Count => parents.Count;

    /// <summary>The greatest depth of a node; that of the root is 0.</summary>
    public int Height { get; private set; }

    /// <summary>The node above, or -1.</summary>
    public int Parent(int node) => parents[node];

    /// <summary>The distance from the root.</summary>
    public int Depth(int node) => depths[node];

    /// <summary>The second child; the first one is the node's number plus one.</summary>
    public int Right(int node) => rights[node];

    /// <summary>One past the last node of the subtree.</summary>
    public int End(int node) => ends[node];

    /// <summary>Whether a node has no children.</summary>
    public bool IsLeaf(int node) => ends[node] == node + 1;

    /// <summary>Whether the first node is the second, or above it.</summary>
    public bool Contains(int upper, int lower) => lower >= upper && lower < ends[upper];

    /// <summary>The lowest node above both or equal to one.</summary>
    public int Meet(int a, int b)
    {
        while (!Contains(a, b))
            a = parents[a];
        return a;
    }

    /// <summary>Adds the next node in order.</summary>
    public int Open(int parent)
    {
        int node = parents.Count;
        parents.Add(parent);
        int depth = parent < 0 ? 0 : depths[parent] + 1;
        depths.Add(depth);
        Height = Math.Max(Height, depth);
        rights.Add(-1);
        ends.Add(-1);
        return node;
    }

    /// <summary>Tells that the next node added is the second child.</summary>
    public void TurnRight(int node) => rights[node] = parents.Count;

    /// <summary>Tells that the subtree is complete.</summary>
    public void Close(int node) => ends[node] = parents.Count;

    /// <summary>The tree of one cut.</summary>
    public static SeparatorTree OfOneCut()
    {
        SeparatorTree tree = new();
        int root = tree.Open(-1);
        tree.Close(tree.Open(root));
        tree.TurnRight(root);
        tree.Close(tree.Open(root));
        tree.Close(root);
        return tree;
    }
}
