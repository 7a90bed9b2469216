namespace FemCore2D.Geometry;

/// <summary>A static tree of boxes, halved along the longer side of each group, that finds the boxes which meet another.</summary>
internal sealed class BoxIndex
{
    private const int LeafSize = 8;

    private readonly Box2D[] boxes;
    private readonly int[] order;
    private readonly Box2D[] nodes;

    /// <summary>Builds the tree over boxes that are known by their index.</summary>
    public BoxIndex(Box2D[] boxes)
    {
        this.boxes = boxes;
        order = new int[boxes.Length];
        for (int i = 0; i < order.Length; i++)
        {
            order[i] = i;
        }

        int leaves = 1;
        while (leaves * LeafSize < boxes.Length)
        {
            leaves *= 2;
        }

        nodes = new Box2D[2 * leaves];
        Build(1, 0, boxes.Length, new double[boxes.Length]);
    }

    /// <summary>Puts the indices of all boxes that meet a box into a list, ascending.</summary>
    public void Query(Box2D box, List<int> hits)
    {
        hits.Clear();
        Collect(1, 0, order.Length, box, hits);
        hits.Sort();
    }

    // Nodes form a complete binary tree: the children of node k are 2k and 2k + 1, and each halves its range.
    private void Build(int node, int start, int count, double[] keys)
    {
        Box2D around = Box2D.Empty;
        Box2D centres = Box2D.Empty;
        for (int i = start; i < start + count; i++)
        {
            Box2D box = boxes[order[i]];
            around = around.Union(box);
            Point2D centre = box.Centre;
            centres = centres.Union(new Box2D(centre, centre));
        }

        nodes[node] = around;
        if (2 * node >= nodes.Length)
        {
            return;
        }

        bool alongX = centres.Width >= centres.Height;
        for (int i = start; i < start + count; i++)
        {
            Point2D centre = boxes[order[i]].Centre;
            keys[i] = alongX ? centre.X : centre.Y;
        }

        Array.Sort(keys, order, start, count);
        int half = count / 2;
        Build(2 * node, start, half, keys);
        Build((2 * node) + 1, start + half, count - half, keys);
    }

    private void Collect(int node, int start, int count, Box2D box, List<int> hits)
    {
        if (!nodes[node].Meets(box))
        {
            return;
        }

        if (2 * node >= nodes.Length)
        {
            for (int i = start; i < start + count; i++)
            {
                if (boxes[order[i]].Meets(box))
                {
                    hits.Add(order[i]);
                }
            }

            return;
        }

        int half = count / 2;
        Collect(2 * node, start, half, box, hits);
        Collect((2 * node) + 1, start + half, count - half, box, hits);
    }
}
