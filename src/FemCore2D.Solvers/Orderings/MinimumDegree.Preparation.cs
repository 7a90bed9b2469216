namespace FemCore2D.Solvers;

/// <content>The state before the first pivot.</content>
internal sealed partial class MinimumDegree
{
    private int Prepare(int count, ReadOnlySpan<int> starts, ReadOnlySpan<int> neighbors, ReadOnlySpan<int> weights)
    {
        int entries = starts[count] - starts[0];
        if (start.Length < count)
        {
            int room = Math.Max(count, start.Length * 3 / 2);
            start = new int[room];
            length = new int[room];
            elementCount = new int[room];
            size = new int[room];
            degree = new int[room];
            mark = new int[room];
            next = new int[room];
            previous = new int[room];
            bucketHead = new int[room];
            bucketNext = new int[room];
            mergedNext = new int[room];
            mergedLast = new int[room];
        }

        if (lists.Length < entries + count)
            lists = new int[Math.Max(2 * entries + count, lists.Length * 3 / 2)];
        neighbors.Slice(starts[0], entries).CopyTo(lists);
        free = entries;
        int total = 0;
        for (int i = 0; i < count; i++)
        {
            size[i] = weights.IsEmpty ? 1 : weights[i];
            total += size[i];
        }

        if (head.Length < total + 1)
            head = new int[Math.Max(total + 1, head.Length * 3 / 2)];
        head.AsSpan(0, total + 1).Fill(-1);
        bucketHead.AsSpan(0, count).Fill(-1);
        lowestDegree = 0;
        largest = 0;
        flag = 2;
        for (int i = 0; i < count; i++)
        {
            start[i] = starts[i] - starts[0];
            length[i] = starts[i + 1] - starts[i];
            elementCount[i] = 0;
            degree[i] = total;
            mark[i] = 1;
            mergedNext[i] = -1;
            mergedLast[i] = i;
        }

        return total;
    }

    /// <summary>Takes vertices with very many neighbours out, to be ordered last; they would only slow the rest down.</summary>
    private int SetDenseAside(Span<int> order, ref int total)
    {
        double limit = Math.Max(16.0, 10.0 * Math.Sqrt(interior));
        int goal = 0;
        int end = order.Length;
        for (int i = 0; i < interior; i++)
        {
            if (length[i] > limit)
            {
                total -= size[i];
                size[i] = 0;
                order[--end] = i;
            }
        }

        for (int i = 0; i < interior; i++)
        {
            if (size[i] == 0)
                continue;
            goal += size[i];
            int sum = 0;
            for (int p = start[i]; p < start[i] + length[i]; p++)
                sum += size[lists[p]];
            degree[i] = sum;
            Link(i);
        }

        return goal;
    }
}
