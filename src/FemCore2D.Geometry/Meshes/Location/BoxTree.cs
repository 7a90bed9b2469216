namespace FemCore2D.Geometry;

/// <summary>
/// A tree of boxes over numbered items in the plane: immutable after its construction, so that many threads can
/// search it at once.
/// </summary>
/// <remarks>
/// The items are sorted along the space-filling curve of Morton (1966), packed four to a leaf, and four nodes to a
/// node above (Roussopoulos and Leifker 1985). All nodes lie in one array, level after level.
/// </remarks>
internal sealed class BoxTree
{
    private const int Fanout = 4;
    private const int StackSize = 64;

    private readonly int[] items;
    private readonly Box2D[] nodes;
    private readonly int[] levelStarts;

    public BoxTree(ReadOnlySpan<Box2D> boxes)
    {
        items = new int[boxes.Length];
        Box2D all = Box2D.Empty;
        for (int i = 0; i < boxes.Length; i++)
        {
            items[i] = i;
            all = all.Union(boxes[i]);
        }

        Bounds = all;
        Sort(boxes);
        levelStarts = Levels(boxes.Length);
        nodes = new Box2D[levelStarts[^1]];
        Array.Fill(nodes, Box2D.Empty);
        for (int i = 0; i < items.Length; i++)
        {
            ref Box2D leaf = ref nodes[i / Fanout];
            leaf = leaf.Union(boxes[items[i]]);
        }

        for (int level = 1; level < levelStarts.Length - 1; level++)
        {
            for (int below = levelStarts[level - 1]; below < levelStarts[level]; below++)
            {
                ref Box2D node = ref nodes[levelStarts[level] + ((below - levelStarts[level - 1]) / Fanout)];
                node = node.Union(nodes[below]);
            }
        }
    }

    /// <summary>What to do with the items that a search meets.</summary>
    public interface IVisitor
    {
        /// <summary>Looks at an item whose leaf the search meets; its own box may miss the target.</summary>
        void Visit(int item);
    }

    /// <summary>What to do with the items near a point.</summary>
    public interface INearVisitor : IVisitor
    {
        /// <summary>The square of the distance beyond which nothing is of interest any more.</summary>
        double ReachSquared { get; }
    }

    /// <summary>The box around everything.</summary>
    public Box2D Bounds { get; }

    /// <summary>Visits all items whose leaf contains a point.</summary>
    public void VisitAt<TVisitor>(Point2D point, ref TVisitor visitor)
        where TVisitor : struct, IVisitor, allows ref struct =>
        VisitIn(new Box2D(point, point), ref visitor);

    /// <summary>Visits all items whose leaf meets a box.</summary>
    public void VisitIn<TVisitor>(in Box2D target, ref TVisitor visitor)
        where TVisitor : struct, IVisitor, allows ref struct
    {
        if (!Bounds.Meets(target))
        {
            return;
        }

        Span<(int Level, int Index)> stack = stackalloc (int, int)[StackSize];
        int depth = 0;
        stack[depth++] = (levelStarts.Length - 2, 0);
        while (depth > 0)
        {
            (int level, int index) = stack[--depth];
            int first = Fanout * index;
            if (level == 0)
            {
                for (int i = first; i < Math.Min(first + Fanout, items.Length); i++)
                {
                    visitor.Visit(items[i]);
                }

                continue;
            }

            int start = levelStarts[level - 1];
            int last = Math.Min(first + Fanout, levelStarts[level] - start);
            for (int child = first; child < last; child++)
            {
                if (nodes[start + child].Meets(target))
                {
                    stack[depth++] = (level - 1, child);
                }
            }
        }
    }

    /// <summary>Visits items by growing distance of their leaves, as far as the visitor reaches.</summary>
    public void VisitNear<TVisitor>(Point2D point, ref TVisitor visitor)
        where TVisitor : struct, INearVisitor, allows ref struct
    {
        if (items.Length == 0)
        {
            return;
        }

        Span<(int Level, int Index, double Distance)> stack = stackalloc (int, int, double)[StackSize];
        int depth = 0;
        stack[depth++] = (levelStarts.Length - 2, 0, Bounds.DistanceSquaredTo(point));
        while (depth > 0)
        {
            (int level, int index, double distance) = stack[--depth];
            if (distance > visitor.ReachSquared)
            {
                continue;
            }

            int first = Fanout * index;
            if (level == 0)
            {
                for (int i = first; i < Math.Min(first + Fanout, items.Length); i++)
                {
                    visitor.Visit(items[i]);
                }

                continue;
            }

            int start = levelStarts[level - 1];
            int last = Math.Min(first + Fanout, levelStarts[level] - start);
            int bottom = depth;
            for (int child = first; child < last; child++)
            {
                // The nearest child goes on top of the stack.
                double childDistance = nodes[start + child].DistanceSquaredTo(point);
                int place = depth++;
                for (; place > bottom && stack[place - 1].Distance < childDistance; place--)
                {
                    stack[place] = stack[place - 1];
                }

                stack[place] = (level - 1, child, childDistance);
            }
        }
    }

    private static int[] Levels(int count)
    {
        List<int> starts = [0];
        int nodes = count;
        do
        {
            nodes = (nodes + Fanout - 1) / Fanout;
            starts.Add(starts[^1] + nodes);
        }
        while (nodes > 1);
        return [.. starts];
    }

    private void Sort(ReadOnlySpan<Box2D> boxes)
    {
        double width = Math.Max(Bounds.Width, Bounds.Height);
        double scale = width > 0 ? (uint.MaxValue - 1.0) / width : 0;
        var keys = new ulong[boxes.Length];
        for (int i = 0; i < boxes.Length; i++)
        {
            Vector2D offset = boxes[i].Centre - Bounds.Lower;
            keys[i] = Spread((uint)(scale * offset.X)) | (Spread((uint)(scale * offset.Y)) << 1);
        }

        Array.Sort(keys, items);
    }

    /// <summary>Puts a zero between any two bits.</summary>
    private static ulong Spread(uint value)
    {
        ulong bits = value;
        bits = (bits | (bits << 16)) & 0x0000FFFF0000FFFF;
        bits = (bits | (bits << 8)) & 0x00FF00FF00FF00FF;
        bits = (bits | (bits << 4)) & 0x0F0F0F0F0F0F0F0F;
        bits = (bits | (bits << 2)) & 0x3333333333333333;
        return (bits | (bits << 1)) & 0x5555555555555555;
    }
}
