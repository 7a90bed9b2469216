namespace FemCore2D.Geometry;

/// <summary>For each of many things a list of numbers, all lists in one array.</summary>
internal sealed class IncidenceTable
{
    private readonly int[] starts;
    private readonly int[] numbers;

    private IncidenceTable(int[] starts, int[] numbers)
    {
        this.starts = starts;
        this.numbers = numbers;
    }

    public ReadOnlySpan<int> this[int thing] => numbers.AsSpan(starts[thing]..starts[thing + 1]);

    /// <summary>Lists, for each thing, the groups in which it occurs, ascending.</summary>
    /// <param name="count">The number of things.</param>
    /// <param name="things">The things of all groups, group after group.</param>
    /// <param name="parts">The sizes of the groups, as runs of so many groups of one size.</param>
    public static IncidenceTable Invert(
        int count, ReadOnlySpan<int> things, params ReadOnlySpan<(int Groups, int Size)> parts)
    {
        var starts = new int[count + 2];
        foreach (int thing in things)
        {
            starts[thing + 2]++;
        }

        for (int i = 2; i < starts.Length; i++)
        {
            starts[i] += starts[i - 1];
        }

        var numbers = new int[things.Length];
        int place = 0;
        int group = 0;
        foreach ((int groups, int size) in parts)
        {
            for (int last = group + groups; group < last; group++)
            {
                for (int i = 0; i < size; i++)
                {
                    numbers[starts[things[place++] + 1]++] = group;
                }
            }
        }

        return new IncidenceTable(starts, numbers);
    }
}
