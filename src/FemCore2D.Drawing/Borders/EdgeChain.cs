namespace FemCore2D.Drawing;

/// <summary>An edge of a mesh walked from one of its vertices to the other.</summary>
internal readonly record struct EdgeStep(int Edge, int From, int To);

/// <summary>Edges that follow each other.</summary>
internal readonly record struct EdgeChain(List<EdgeStep> Steps, bool IsClosed)
{
    /// <summary>Joins directed edges, end to start, into as few chains as their order allows.</summary>
    public static List<EdgeChain> Join(List<EdgeStep> steps)
    {
        var from = new Dictionary<int, List<int>>();
        for (int i = 0; i < steps.Count; i++)
        {
            if (!from.TryGetValue(steps[i].From, out List<int>? list))
                from.Add(steps[i].From, list = []);
            list.Add(i);
        }

        bool[] isDone = new bool[steps.Count];
        var chains = new List<EdgeChain>();
        for (int start = 0; start < steps.Count; start++)
        {
            if (isDone[start])
                continue;
            var chain = new List<EdgeStep>();
            int current = start;
            while (current >= 0)
            {
                isDone[current] = true;
                chain.Add(steps[current]);
                int end = steps[current].To;
                current = -1;
                if (end == chain[0].From || !from.TryGetValue(end, out List<int>? candidates))
                    continue;
                foreach (int candidate in candidates)
                {
                    if (!isDone[candidate])
                    {
                        current = candidate;
                        break;
                    }
                }
            }

            chains.Add(new EdgeChain(chain, chain[^1].To == chain[0].From));
        }

        return chains;
    }
}
