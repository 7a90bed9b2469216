using System.Collections.Immutable;

namespace FemCore2D.Geometry;

/// <summary>
/// A cross-section, painted from shapes: each is filled with the name of a region, later ones over earlier ones.
/// Immutable; every call returns a further section.
/// </summary>
/// <remarks>
/// <para>A region may be filled several times and consist of parts that do not touch. Shapes may overlap, touch and
/// share pieces. A hole takes away what was painted under it.</para>
/// <para>The boundary names of outlines become named lines where nothing was painted over them later, also where both
/// sides are of the same region. Where lines coincide, all their names hold. Sheets and fixed points lie on top of
/// everything, whenever they are added.</para>
/// <para>Within one section a name stands for a region, a boundary or a point, never for two of these.</para>
/// <para>Lengths below 1e-9 of the diagonal of the section count as nothing.</para>
/// </remarks>
/// <example>
/// <code>
/// CrossSection coaxial = CrossSection.Empty
///     .Fill(Outline.Circle(Point2D.Origin, 3.5e-3, "outer"), "air")
///     .Hole(Outline.Circle(Point2D.Origin, 1.52e-3, "inner"));
/// </code>
/// </example>
public sealed class CrossSection
{
    private const string RegionKind = "region";
    private const string BoundaryKind = "boundary";
    private const string PointKind = "point";

    private readonly ImmutableDictionary<string, string> kinds;
    private readonly Lazy<Arrangement> arrangement;

    private CrossSection(
        ImmutableList<SectionItem> items,
        ImmutableDictionary<string, string> kinds,
        ImmutableList<string> regions,
        ImmutableList<string> boundaries,
        ImmutableList<string> points,
        Box2D bounds)
    {
        Items = items;
        Regions = regions;
        Boundaries = boundaries;
        Points = points;
        Bounds = bounds;
        this.kinds = kinds;
        arrangement = new Lazy<Arrangement>(() => Arranger.Arrange(this));
    }

    /// <summary>The section with nothing in it, from which every section starts.</summary>
    public static CrossSection Empty { get; } = new(
        [], ImmutableDictionary.Create<string, string>(StringComparer.Ordinal), [], [], [], Box2D.Empty);

    /// <summary>The names of the regions, in the order in which they were first filled.</summary>
    public IReadOnlyList<string> Regions { get; }

    /// <summary>The names of the boundaries, in the order in which they were first drawn.</summary>
    public IReadOnlyList<string> Boundaries { get; }

    /// <summary>The names of the fixed points, in the order in which they were added.</summary>
    public IReadOnlyList<string> Points { get; }

    /// <summary>The smallest box around all that was filled; empty when nothing was.</summary>
    public Box2D Bounds { get; }

    internal ImmutableList<SectionItem> Items { get; }

    /// <summary>Paints the inside of an outline.</summary>
    /// <param name="outline">The outline; the boundary names of its pieces become boundaries of the section.</param>
    /// <param name="region">The region that it becomes part of.</param>
    /// <exception cref="InvalidSectionException">A name already stands for something of another kind.</exception>
    public CrossSection Fill(Outline outline, string region)
    {
        ArgumentNullException.ThrowIfNull(outline);
        return Fill(Shape.Inside(outline), region);
    }

    /// <summary>Paints a shape; what was painted in its holes before stays.</summary>
    /// <param name="shape">The shape; the boundary names of its pieces become boundaries of the section.</param>
    /// <param name="region">The region that it becomes part of.</param>
    /// <exception cref="InvalidSectionException">A name already stands for something of another kind.</exception>
    public CrossSection Fill(Shape shape, string region)
    {
        ArgumentNullException.ThrowIfNull(shape);
        ArgumentException.ThrowIfNullOrWhiteSpace(region);
        return Paint(shape, region);
    }

    /// <summary>Cuts the inside of an outline out of what was painted before.</summary>
    /// <param name="outline">The outline; the boundary names of its pieces become boundaries of the section.</param>
    /// <exception cref="InvalidSectionException">A name already stands for something of another kind.</exception>
    public CrossSection Hole(Outline outline)
    {
        ArgumentNullException.ThrowIfNull(outline);
        return Hole(Shape.Inside(outline));
    }

    /// <summary>Cuts a shape out of what was painted before.</summary>
    /// <param name="shape">The shape; the boundary names of its pieces become boundaries of the section.</param>
    /// <exception cref="InvalidSectionException">A name already stands for something of another kind.</exception>
    public CrossSection Hole(Shape shape)
    {
        ArgumentNullException.ThrowIfNull(shape);
        return Paint(shape, null);
    }

    /// <summary>Adds a straight sheet, a line of no thickness that the cells do not cross.</summary>
    /// <param name="start">One end, in metres.</param>
    /// <param name="end">The other end.</param>
    /// <param name="boundary">The boundary that the sheet is.</param>
    /// <exception cref="InvalidSectionException">The sheet has no length or is not finite, or the name already stands for something of another kind.</exception>
    public CrossSection Sheet(Point2D start, Point2D end, string boundary) =>
        Sheet(Outline.StartAt(start).StraightTo(end), boundary);

    /// <summary>Adds a sheet, a chain of lines and arcs of no thickness that the cells do not cross.</summary>
    /// <param name="path">The chain, open or closed; it may cross itself. Names of its pieces hold besides the sheet's.</param>
    /// <param name="boundary">The boundary that the sheet is.</param>
    /// <exception cref="InvalidSectionException">The path has no pieces, or the name already stands for something of another kind.</exception>
    public CrossSection Sheet(OutlinePath path, string boundary)
    {
        ArgumentNullException.ThrowIfNull(path);
        return Sheet(path.Pieces, path.Start, boundary);
    }

    /// <summary>Adds a closed sheet, a line of no thickness that the cells do not cross.</summary>
    /// <param name="outline">The line. Names of its pieces hold besides the sheet's.</param>
    /// <param name="boundary">The boundary that the sheet is.</param>
    /// <exception cref="InvalidSectionException">The name already stands for something of another kind.</exception>
    public CrossSection Sheet(Outline outline, string boundary)
    {
        ArgumentNullException.ThrowIfNull(outline);
        return Sheet(outline.Pieces, outline.Pieces[0].Start, boundary);
    }

    /// <summary>Adds a point that becomes a vertex of every mesh.</summary>
    /// <param name="place">The point, in metres.</param>
    /// <param name="name">Its name.</param>
    /// <exception cref="InvalidSectionException">The point is not finite, or the name is already taken.</exception>
    public CrossSection FixedPoint(Point2D place, string name)
    {
        ArgumentException.ThrowIfNullOrWhiteSpace(name);
        if (!place.IsFinite)
        {
            throw new InvalidSectionException(
                $"The fixed point '{name}' at {place} is not finite. Check the values that it is computed from.");
        }

        if (kinds.GetValueOrDefault(name) == PointKind)
        {
            throw new InvalidSectionException(
                $"There are two fixed points '{name}', the second at {place}. Give each its own name.");
        }

        return With(new NamedPoint(place, name), Bounds, [(name, PointKind)]);
    }

    /// <summary>The region that was painted last at a point, or <see langword="null"/> outside and in holes.</summary>
    /// <param name="point">The point, in metres; on lines rounding decides.</param>
    public string? RegionAt(Point2D point)
    {
        for (int i = Items.Count - 1; i >= 0; i--)
        {
            if (Items[i] is PaintedShape painted && painted.Shape.Contains(point))
            {
                return painted.Region;
            }
        }

        return null;
    }

    /// <summary>The exact area of a region where it can be seen, arcs included, in square metres.</summary>
    /// <param name="region">The name of the region.</param>
    /// <exception cref="UnknownNameException">No region has that name.</exception>
    /// <exception cref="InvalidSectionException">The section cannot be meshed; the message tells why.</exception>
    public double AreaOf(string region)
    {
        Require(RegionKind, region, Regions);
        return arrangement.Value.AreaOf(region);
    }

    /// <summary>The length of a boundary where it can be seen, along its arcs, in metres.</summary>
    /// <param name="boundary">The name of the boundary.</param>
    /// <exception cref="UnknownNameException">No boundary has that name.</exception>
    /// <exception cref="InvalidSectionException">The section cannot be meshed; the message tells why.</exception>
    public double LengthOf(string boundary)
    {
        Require(BoundaryKind, boundary, Boundaries);
        return arrangement.Value.LengthOf(boundary);
    }

    /// <inheritdoc/>
    public override string ToString() => Bounds.IsEmpty
        ? "empty cross-section"
        : $"cross-section of {Regions.Count} regions between {Bounds.Lower} and {Bounds.Upper}";

    /// <summary>The arrangement of all pieces, computed once.</summary>
    /// <exception cref="InvalidSectionException">
    /// Nothing is filled; a region or boundary is painted over completely; a sheet or fixed point lies outside; or a
    /// shape is too small for the size of the section.
    /// </exception>
    internal Arrangement Arrange() => arrangement.Value;

    private static void Require(string kind, string name, IReadOnlyList<string> names)
    {
        ArgumentNullException.ThrowIfNull(name);
        if (!names.Contains(name))
        {
            throw new UnknownNameException(kind, name, names);
        }
    }

    private CrossSection Paint(Shape shape, string? region)
    {
        List<(string, string)> names = region is null ? [] : [(region, RegionKind)];
        names.AddRange(BoundaryNames(shape.Outlines.SelectMany(o => o.Pieces)));
        return With(new PaintedShape(shape, region), region is null ? Bounds : Bounds.Union(shape.Bounds), names);
    }

    private CrossSection Sheet(ImmutableArray<OutlinePiece> pieces, Point2D start, string boundary)
    {
        ArgumentException.ThrowIfNullOrWhiteSpace(boundary);
        if (pieces.IsEmpty)
        {
            throw new InvalidSectionException($"The sheet '{boundary}' at {start} has no pieces. Add at least one to its path.");
        }

        return With(new SheetLine(pieces, boundary), Bounds, [(boundary, BoundaryKind), .. BoundaryNames(pieces)]);
    }

    private static IEnumerable<(string Name, string Kind)> BoundaryNames(IEnumerable<OutlinePiece> pieces) =>
        pieces.Where(p => p.Boundary is not null).Select(p => (p.Boundary!, BoundaryKind)).Distinct();

    private CrossSection With(SectionItem item, Box2D bounds, IEnumerable<(string Name, string Kind)> names)
    {
        ImmutableDictionary<string, string> allKinds = kinds;
        ImmutableList<string>[] lists =
        [
            (ImmutableList<string>)Regions, (ImmutableList<string>)Boundaries, (ImmutableList<string>)Points,
        ];
        foreach ((string name, string kind) in names)
        {
            if (!allKinds.TryGetValue(name, out string? taken))
            {
                allKinds = allKinds.Add(name, kind);
                int list = kind == RegionKind ? 0 : kind == BoundaryKind ? 1 : 2;
                lists[list] = lists[list].Add(name);
            }
            else if (taken != kind)
            {
                throw new InvalidSectionException(
                    $"The name '{name}' is given to a {kind} but already stands for a {taken} of the section. "
                    + "Give each its own name.");
            }
        }

        return new CrossSection(Items.Add(item), allKinds, lists[0], lists[1], lists[2], bounds);
    }
}
