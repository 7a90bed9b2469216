namespace FemCore2D.Geometry;

/// <summary>Numbers that wait in the order of their arrival, in a ring that grows.</summary>
internal sealed class IntQueue
{
    private int[] items = new int[1024];
    private int head;
    private int count;

    public void Enqueue(int item)
    {
        if (count == items.Length)
        {
            int[] grown = new int[2 * count];
            items.AsSpan(head).CopyTo(grown);
            items.AsSpan(0, head).CopyTo(grown.AsSpan(items.Length - head));
            items = grown;
            head = 0;
        }

        items[(head + count++) & (items.Length - 1)] = item;
    }

    public bool TryDequeue(out int item)
    {
        if (count == 0)
        {
            item = -1;
            return false;
        }

        item = items[head];
        head = (head + 1) & (items.Length - 1);
        count--;
        return true;
    }
}
