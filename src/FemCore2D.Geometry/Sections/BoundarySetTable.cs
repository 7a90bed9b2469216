using System.Collections.Immutable;

namespace FemCore2D.Geometry;

/// <summary>Numbers sets of boundary names, equal sets alike.</summary>
internal sealed class BoundarySetTable
{
    private readonly Dictionary<string, int> indexOfKey = new(StringComparer.Ordinal);
    private readonly List<ImmutableArray<string>> sets = [];
    private readonly SortedSet<string> current = new(StringComparer.Ordinal);

    public IReadOnlyList<ImmutableArray<string>> Sets => sets;

    /// <summary>Begins a set with no name in it.</summary>
    public void Begin() => current.Clear();

    /// <summary>Adds a name to the set begun, or nothing where there is none.</summary>
    public void Add(string? name)
    {
        if (name is not null)
        {
            current.Add(name);
        }
    }

    /// <summary>The number of the set begun, or -1 when it is empty.</summary>
    public int End()
    {
        if (current.Count == 0)
        {
            return -1;
        }

        // The length before each name keeps different sets apart whatever characters the names have.
        string key = string.Concat(current.Select(name => $"{name.Length}:{name}"));
        if (!indexOfKey.TryGetValue(key, out int index))
        {
            index = sets.Count;
            indexOfKey.Add(key, index);
            sets.Add([.. current]);
        }

        return index;
    }
}
