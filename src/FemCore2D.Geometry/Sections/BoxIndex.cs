namespace FemCore2D.Geometry;

/// <summary>Finds which of many boxes meet another.</summary>
internal sealed class BoxIndex(Box2D[] boxes)
{
    private readonly BoxTree tree = new(boxes);

    /// <summary>Puts the numbers of all boxes that meet a box into a list.</summary>
    public void Query(Box2D box, List<int> hits)
    {
        hits.Clear();
        if (boxes.Length > 0)
        {
            Collector collector = new(boxes, box, hits);
            tree.VisitIn(box, ref collector);
        }
    }

    private readonly struct Collector(Box2D[] boxes, Box2D target, List<int> hits) : BoxTree.IVisitor
    {
        public void Visit(int item)
        {
            if (boxes[item].Meets(target))
            {
                hits.Add(item);
            }
        }
    }
}
