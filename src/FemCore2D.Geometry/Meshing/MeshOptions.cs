using System.Collections.Immutable;
using System.Runtime.CompilerServices;

namespace FemCore2D.Geometry;

/// <summary>
/// What a mesh shall be like: sizes, grading, angles, divisions. Immutable; every method returns changed options.
/// </summary>
/// <remarks>
/// The wanted edge length at a place is the smallest that any rule asks for there: the size of the region or, where
/// it has none, the global size; the sizes of boundaries and points, which grow with the distance from them; and the
/// size of short pieces and tight arcs, which grows likewise.
/// </remarks>
public sealed class MeshOptions
{
    private MeshOptions()
    {
    }

    private MeshOptions(MeshOptions other)
    {
        Size = other.Size;
        RegionSizes = other.RegionSizes;
        BoundarySizes = other.BoundarySizes;
        PointSizes = other.PointSizes;
        Growth = other.Growth;
        SmallestAngleDegrees = other.SmallestAngleDegrees;
        LargestArcDegrees = other.LargestArcDegrees;
        Divisions = other.Divisions;
        Pairs = other.Pairs;
        CellLimit = other.CellLimit;
    }

    /// <summary>A thirtieth of the section's extent everywhere, finer at small features; angles of 30 degrees and more.</summary>
    public static MeshOptions Default { get; } = new();

    /// <summary>The wanted edge length where nothing finer is asked for, in metres; null for a thirtieth of the section's extent.</summary>
    public double? Size { get; private init; }

    /// <summary>The wanted edge length in regions, in metres.</summary>
    public ImmutableSortedDictionary<string, double> RegionSizes { get; private init; } =
        ImmutableSortedDictionary.Create<string, double>(StringComparer.Ordinal);

    /// <summary>The wanted edge length on named boundaries, in metres.</summary>
    public ImmutableSortedDictionary<string, double> BoundarySizes { get; private init; } =
        ImmutableSortedDictionary.Create<string, double>(StringComparer.Ordinal);

    /// <summary>The wanted edge length at named points, in metres.</summary>
    public ImmutableSortedDictionary<string, double> PointSizes { get; private init; } =
        ImmutableSortedDictionary.Create<string, double>(StringComparer.Ordinal);

    /// <summary>The largest ratio of the sizes of neighbouring cells, 1.3 by default.</summary>
    public double Growth { get; private init; } = 1.3;

    /// <summary>The angle that no cell shall fall below, in degrees, 30 by default; smaller angles between pieces are kept and reported.</summary>
    public double SmallestAngleDegrees { get; private init; } = 30;

    /// <summary>The largest angle that one edge on an arc may sweep, in degrees, 30 by default.</summary>
    public double LargestArcDegrees { get; private init; } = 30;

    /// <summary>Named boundaries of which each piece is divided into so many equal edges, and no more.</summary>
    public ImmutableSortedDictionary<string, int> Divisions { get; private init; } =
        ImmutableSortedDictionary.Create<string, int>(StringComparer.Ordinal);

    /// <summary>Named boundaries that get matching vertices.</summary>
    public ImmutableArray<(string First, string Second)> Pairs { get; private init; } = [];

    /// <summary>The number of cells that must not be exceeded, 20 million by default.</summary>
    public int CellLimit { get; private init; } = 20_000_000;

    /// <summary>Sets the wanted edge length where nothing finer is asked for.</summary>
    /// <param name="size">The edge length in metres.</param>
    /// <exception cref="ArgumentOutOfRangeException">The size is not a positive finite number.</exception>
    public MeshOptions WithSize(double size) => new(this) { Size = Positive(size) };

    /// <summary>Sets the wanted edge length in a region, finer or coarser than the global one.</summary>
    /// <param name="region">The name of the region.</param>
    /// <param name="size">The edge length in metres.</param>
    /// <exception cref="ArgumentOutOfRangeException">The size is not a positive finite number.</exception>
    public MeshOptions WithRegionSize(string region, double size) =>
        new(this) { RegionSizes = RegionSizes.SetItem(Named(region), Positive(size)) };

    /// <summary>Sets the wanted edge length on a named boundary; cells grow with the distance from it.</summary>
    /// <param name="boundary">The name of the boundary.</param>
    /// <param name="size">The edge length in metres.</param>
    /// <exception cref="ArgumentOutOfRangeException">The size is not a positive finite number.</exception>
    public MeshOptions WithBoundarySize(string boundary, double size) =>
        new(this) { BoundarySizes = BoundarySizes.SetItem(Named(boundary), Positive(size)) };

    /// <summary>Sets the wanted edge length at a named point; cells grow with the distance from it.</summary>
    /// <param name="point">The name of the point.</param>
    /// <param name="size">The edge length in metres.</param>
    /// <exception cref="ArgumentOutOfRangeException">The size is not a positive finite number.</exception>
    public MeshOptions WithPointSize(string point, double size) =>
        new(this) { PointSizes = PointSizes.SetItem(Named(point), Positive(size)) };

    /// <summary>Sets the largest ratio of the sizes of neighbouring cells.</summary>
    /// <param name="growth">The ratio, above 1.</param>
    /// <exception cref="ArgumentOutOfRangeException">The ratio is not a finite number above 1.</exception>
    public MeshOptions WithGrowth(double growth) =>
        double.IsFinite(growth) && growth > 1
            ? new(this) { Growth = growth }
            : throw new ArgumentOutOfRangeException(
                nameof(growth), growth, "The ratio of neighbouring sizes must be above 1, such as 1.3.");

    /// <summary>Sets the angle that no cell shall fall below.</summary>
    /// <param name="degrees">The angle in degrees, from 0 to 33, above which no refinement is known to end.</param>
    /// <exception cref="ArgumentOutOfRangeException">The angle is not within 0 and 33 degrees.</exception>
    public MeshOptions WithSmallestAngleDegrees(double degrees) =>
        degrees is >= 0 and <= 33
            ? new(this) { SmallestAngleDegrees = degrees }
            : throw new ArgumentOutOfRangeException(
                nameof(degrees), degrees, "The smallest angle must lie within 0 and 33 degrees, such as 30.");

    /// <summary>Sets the largest angle that one edge on an arc may sweep.</summary>
    /// <param name="degrees">The angle in degrees, above 0 and at most 60.</param>
    /// <exception cref="ArgumentOutOfRangeException">The angle is not above 0 and at most 60 degrees.</exception>
    public MeshOptions WithLargestArcDegrees(double degrees) =>
        degrees is > 0 and <= 60
            ? new(this) { LargestArcDegrees = degrees }
            : throw new ArgumentOutOfRangeException(
                nameof(degrees), degrees, "The largest arc of an edge must be above 0 and at most 60 degrees, such as 30.");

    /// <summary>
    /// Divides every piece of a named boundary into a number of equal edges and keeps these undivided, so that a
    /// structured patch can join them.
    /// </summary>
    /// <param name="boundary">The name of the boundary.</param>
    /// <param name="count">The number of edges of each piece.</param>
    /// <exception cref="ArgumentOutOfRangeException">The count is not positive.</exception>
    public MeshOptions WithDivision(string boundary, int count)
    {
        ArgumentOutOfRangeException.ThrowIfLessThan(count, 1);
        return new(this) { Divisions = Divisions.SetItem(Named(boundary), count) };
    }

    /// <summary>
    /// Gives two named boundaries, one of which is the other moved (shifted, turned, or both), matching vertices, so
    /// that values on the one can be tied to values on the other.
    /// </summary>
    /// <param name="first">The name of a boundary.</param>
    /// <param name="second">The name of the other.</param>
    /// <exception cref="ArgumentException">A name is empty, both are the same, or the two are paired already.</exception>
    public MeshOptions WithPair(string first, string second)
    {
        Named(first);
        Named(second);
        return first == second
            ? throw new ArgumentException($"The boundary '{first}' cannot be paired with itself; name two boundaries.", nameof(second))
            : Pairs.Contains((first, second)) || Pairs.Contains((second, first))
                ? throw new ArgumentException($"The boundaries '{first}' and '{second}' are paired already.", nameof(second))
                : new(this) { Pairs = Pairs.Add((first, second)) };
    }

    /// <summary>
    /// Sets the number of cells that must not be exceeded. Where the machine's memory holds fewer, that number counts.
    /// </summary>
    /// <param name="cells">The number of cells, at least 1.</param>
    /// <exception cref="ArgumentOutOfRangeException">The number is not within 1 and 200 million.</exception>
    public MeshOptions WithCellLimit(int cells)
    {
        ArgumentOutOfRangeException.ThrowIfLessThan(cells, 1);
        ArgumentOutOfRangeException.ThrowIfGreaterThan(cells, 200_000_000);
        return new(this) { CellLimit = cells };
    }

    private static double Positive(double size, [CallerArgumentExpression(nameof(size))] string? name = null) =>
        double.IsFinite(size) && size > 0
            ? size
            : throw new ArgumentOutOfRangeException(name, size, "A size must be a positive finite length in metres.");

    private static string Named(string name, [CallerArgumentExpression(nameof(name))] string? parameter = null)
    {
        ArgumentException.ThrowIfNullOrEmpty(name, parameter);
        return name;
    }
}
