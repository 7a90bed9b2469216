namespace FemCore2D.Solvers;

/// <summary>
/// Orders the vertices of a graph so that each next one has nearly the fewest neighbours left, with the elimination
/// kept as a quotient graph of variables and elements. The object is the workspace, used again for the next graph.
/// </summary>
/// <remarks>
/// P. R. Amestoy, T. A. Davis and I. S. Duff (1996), <em>An approximate minimum degree ordering algorithm</em>: bounds
/// of the degrees, mass elimination, indistinguishable variables and aggressive absorption. Vertices of a halo, which
/// are eliminated elsewhere and later, count in degrees but are never chosen (F. Pellegrini, J. Roman and P. Amestoy
/// 2000).
/// </remarks>
internal sealed partial class MinimumDegree
{
    private const int DeadElement = 0;

    // For a variable its elements and then its variables; for an element its variables.
    private int[] lists = [];
    private int[] start = [];
    private int[] length = [];
    private int[] elementCount = [];

    // The vertices that a variable stands for; negative while in the element being formed; 0 when it is gone.
    private int[] size = [];
    private int[] degree = [];
    private int[] mark = [];
    private int[] head = [];
    private int[] next = [];
    private int[] previous = [];
    private int[] bucketHead = [];
    private int[] bucketNext = [];
    private int[] mergedNext = [];
    private int[] mergedLast = [];
    private int free;
    private int flag;
    private int largest;
    private int lowestDegree;
    private int interior;

    /// <summary>Orders the first vertices of a graph; the rest is its halo.</summary>
    /// <param name="count">The number of vertices, the halo included.</param>
    /// <param name="interiorCount">How many of them are to be ordered.</param>
    /// <param name="starts">For each vertex where its neighbours begin.</param>
    /// <param name="neighbors">The neighbours; each edge is stored from both ends.</param>
    /// <param name="weights">How many unknowns each vertex stands for, or empty where it is one.</param>
    /// <param name="order">Receives the vertices in their order.</param>
    /// <param name="cancellationToken">Stops the work.</param>
    public void Order(
        int count,
        int interiorCount,
        ReadOnlySpan<int> starts,
        ReadOnlySpan<int> neighbors,
        ReadOnlySpan<int> weights,
        Span<int> order,
        CancellationToken cancellationToken = default)
    {
        interior = interiorCount;
        int total = Prepare(count, starts, neighbors, weights);
        int goal = SetDenseAside(order[..interiorCount], ref total);
        int placed = 0;
        int eliminated = 0;
        int pivots = 0;
        while (eliminated < goal)
        {
            if ((++pivots & 1023) == 0)
                cancellationToken.ThrowIfCancellationRequested();
            while (head[lowestDegree] < 0)
                lowestDegree++;
            int pivot = head[lowestDegree];
            Unlink(pivot);
            int pivotSize = size[pivot];
            eliminated += pivotSize;
            size[pivot] = -pivotSize;
            Emit(pivot, order, ref placed);
            int elementSize = FormElement(pivot);
            MeasureElements(pivot);
            int gone = UpdateVariables(pivot, order, ref placed);
            eliminated += gone;
            elementSize -= gone;
            largest = Math.Max(largest, degree[pivot]);
            flag += largest + 1;
            MergeIndistinguishable(pivot);
            Finish(pivot, elementSize, total - eliminated);
            if (flag > int.MaxValue / 2)
                ResetMarks(count);
        }
    }

    private void Link(int variable)
    {
        int d = degree[variable];
        int first = head[d];
        next[variable] = first;
        previous[variable] = -1;
        if (first >= 0)
            previous[first] = variable;
        head[d] = variable;
    }

    private void Unlink(int variable)
    {
        int after = next[variable];
        int before = previous[variable];
        if (after >= 0)
            previous[after] = before;
        if (before >= 0)
            next[before] = after;
        else
            head[degree[variable]] = after;
    }

    private void Emit(int variable, Span<int> order, ref int placed)
    {
        for (int i = variable; i >= 0; i = mergedNext[i])
            order[placed++] = i;
    }

    /// <summary>Collects the neighbours of the pivot into its element, and returns how many unknowns they stand for.</summary>
    private int FormElement(int pivot)
    {
        int sum = 0;
        int elements = elementCount[pivot];
        int from = start[pivot];
        int end = from + length[pivot];
        int first;
        int last;
        if (elements == 0)
        {
            // The list of the pivot only shrinks, so its own place will do.
            first = last = from;
            for (int p = from; p < end; p++)
                Take(lists[p], ref last, ref sum);
        }
        else
        {
            int bound = length[pivot] - elements;
            for (int p = from; p < from + elements; p++)
                bound += length[lists[p]];
            if (free + bound > lists.Length)
                Array.Resize(ref lists, Math.Max(free + bound, lists.Length + lists.Length / 2));
            first = last = free;
            for (int p = from; p < from + elements; p++)
            {
                int e = lists[p];
                for (int q = start[e]; q < start[e] + length[e]; q++)
                    Take(lists[q], ref last, ref sum);
                mark[e] = DeadElement;
            }

            for (int p = from + elements; p < end; p++)
                Take(lists[p], ref last, ref sum);
            free = last;
        }

        start[pivot] = first;
        length[pivot] = last - first;
        degree[pivot] = sum;
        return sum;
    }

    private void Take(int variable, ref int last, ref int sum)
    {
        int s = size[variable];
        if (s <= 0)
            return;
        sum += s;
        size[variable] = -s;
        lists[last++] = variable;
        if (variable < interior)
            Unlink(variable);
    }

    /// <summary>Finds for each element that touches the new one how much of it lies outside.</summary>
    private void MeasureElements(int pivot)
    {
        for (int p = start[pivot]; p < start[pivot] + length[pivot]; p++)
        {
            int i = lists[p];
            int s = -size[i];
            for (int q = start[i]; q < start[i] + elementCount[i]; q++)
            {
                int e = lists[q];
                int m = mark[e];
                if (m >= flag)
                    mark[e] = m - s;
                else if (m != DeadElement)
                    mark[e] = degree[e] + flag - s;
            }
        }
    }

    /// <summary>Bounds the degrees of the variables of the new element, and eliminates those it contains wholly.</summary>
    private int UpdateVariables(int pivot, Span<int> order, ref int placed)
    {
        int gone = 0;
        for (int p = start[pivot]; p < start[pivot] + length[pivot]; p++)
        {
            int i = lists[p];
            int first = start[i];
            int to = first;
            int bound = 0;
            uint hash = 0;
            for (int q = first; q < first + elementCount[i]; q++)
            {
                int e = lists[q];
                if (mark[e] == DeadElement)
                    continue;
                int outside = mark[e] - flag;
                if (outside <= 0)
                {
                    mark[e] = DeadElement;
                    continue;
                }

                bound += outside;
                lists[to++] = e;
                hash += (uint)e;
            }

            int firstVariable = to;
            for (int q = first + elementCount[i]; q < first + length[i]; q++)
            {
                int v = lists[q];
                int s = size[v];
                if (s <= 0)
                    continue;
                bound += s;
                lists[to++] = v;
                hash += (uint)v;
            }

            if (to == first && i < interior)
            {
                gone += -size[i];
                size[i] = 0;
                Emit(i, order, ref placed);
                continue;
            }

            degree[i] = Math.Min(degree[i], bound);
            elementCount[i] = firstVariable - first + 1;
            lists[to] = lists[firstVariable];
            lists[firstVariable] = lists[first];
            lists[first] = pivot;
            length[i] = to - first + 1;
            uint bucket = hash % (uint)interior;
            bucketNext[i] = bucketHead[bucket];
            bucketHead[bucket] = i;
            previous[i] = (int)bucket;
        }

        return gone;
    }

    /// <summary>Joins variables with the same neighbours: they can follow one another without new fill.</summary>
    private void MergeIndistinguishable(int pivot)
    {
        for (int p = start[pivot]; p < start[pivot] + length[pivot]; p++)
        {
            int member = lists[p];
            if (size[member] == 0)
                continue;
            int bucket = previous[member];
            int i = bucketHead[bucket];
            bucketHead[bucket] = -1;
            for (; i >= 0 && bucketNext[i] >= 0; i = bucketNext[i], flag++)
            {
                for (int q = start[i] + 1; q < start[i] + length[i]; q++)
                    mark[lists[q]] = flag;
                int before = i;
                for (int j = bucketNext[i]; j >= 0; j = bucketNext[j])
                {
                    if (!SameLists(i, j))
                    {
                        before = j;
                        continue;
                    }

                    size[i] += size[j];
                    size[j] = 0;
                    mergedNext[mergedLast[i]] = j;
                    mergedLast[i] = mergedLast[j];
                    bucketNext[before] = bucketNext[j];
                }
            }
        }
    }

    private bool SameLists(int i, int j)
    {
        if (length[i] != length[j] || elementCount[i] != elementCount[j] || i < interior != j < interior)
            return false;
        for (int q = start[j] + 1; q < start[j] + length[j]; q++)
        {
            if (mark[lists[q]] != flag)
                return false;
        }

        return true;
    }

    private void Finish(int pivot, int elementSize, int left)
    {
        int first = start[pivot];
        int to = first;
        for (int p = first; p < first + length[pivot]; p++)
        {
            int i = lists[p];
            int s = -size[i];
            if (s <= 0)
                continue;
            size[i] = s;
            lists[to++] = i;
            if (i >= interior)
                continue;
            int d = Math.Min(degree[i] + elementSize - s, left - s);
            degree[i] = Math.Max(d, 0);
            lowestDegree = Math.Min(lowestDegree, degree[i]);
            Link(i);
        }

        length[pivot] = to - first;
        degree[pivot] = elementSize;
        elementCount[pivot] = 0;
        mark[pivot] = to == first ? DeadElement : 1;
    }

    private void ResetMarks(int count)
    {
        flag = 2;
        for (int i = 0; i < count; i++)
            mark[i] = mark[i] == DeadElement ? DeadElement : 1;
    }
}
