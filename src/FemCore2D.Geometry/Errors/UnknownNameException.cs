namespace FemCore2D.Geometry;

/// <summary>A region, boundary, point or conductor was asked for by a name that does not exist.</summary>
public sealed class UnknownNameException : FemCoreException
{
    /// <summary>Creates the exception for a name and the names that do exist.</summary>
    /// <param name="kind">What the name was taken for, such as <c>region</c>.</param>
    /// <param name="name">The name asked for.</param>
    /// <param name="known">The names that exist.</param>
    public UnknownNameException(string kind, string name, IEnumerable<string> known)
        : base(Describe(kind, name, known)) => Name = name;

    /// <summary>The name asked for.</summary>
    public string Name { get; }

    private static string Describe(string kind, string name, IEnumerable<string> known)
    {
        string list = string.Join(", ", known.Select(k => $"'{k}'"));
        return list.Length == 0
            ? $"There is no {kind} '{name}': none has been named. Name it in the cross-section."
            : $"There is no {kind} '{name}'. Known: {list}. Use one of these, or name it in the cross-section.";
    }
}
