namespace FemCore2D.Solvers;

/// <summary>Hands out places of a row of memory, the first hole that fits.</summary>
internal sealed class Arena
{
    private readonly SortedList<long, long> holes = [];

    /// <summary>The length of the memory that has been needed.</summary>
    public long Size { get; private set; }

    /// <summary>Finds a place of a size.</summary>
    public long Take(long size)
    {
        if (size == 0)
            return 0;
        foreach ((long start, long length) in holes)
        {
            if (length < size)
                continue;
            holes.Remove(start);
            if (length > size)
                holes.Add(start + size, length - size);
            return start;
        }

        // A hole at the end grows.
        long at = Size;
        if (holes.Count > 0)
        {
            long last = holes.Keys[^1];
            if (last + holes[last] == Size)
            {
                at = last;
                holes.Remove(last);
            }
        }

        Size = at + size;
        return at;
    }

    /// <summary>Gives a place back.</summary>
    public void Return(long start, long size)
    {
        if (size == 0)
            return;
        holes.Add(start, size);
        int i = holes.IndexOfKey(start);
        if (i + 1 < holes.Count && start + size == holes.Keys[i + 1])
        {
            holes[start] += holes.Values[i + 1];
            holes.RemoveAt(i + 1);
        }

        if (i > 0 && holes.Keys[i - 1] + holes.Values[i - 1] == start)
        {
            holes[holes.Keys[i - 1]] += holes[start];
            holes.RemoveAt(i);
        }
    }
}
