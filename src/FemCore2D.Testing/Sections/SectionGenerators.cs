using FemCore2D.Geometry;
using FsCheck;
using FsCheck.Fluent;

namespace FemCore2D.Testing;

/// <summary>Generators of small cross-sections, all of which have at least one region.</summary>
public static class SectionGenerators
{
    /// <summary>Cross-sections of all the kinds of this class.</summary>
    public static Gen<CrossSection> All() => Gen.OneOf(NestedCircles(), Cables(), TouchingCircles(), Overlaps());

    /// <summary>
    /// Circles within circles, seldom of one centre, in the regions <c>layer 0</c> (outermost), <c>layer 1</c>, ...
    /// with the boundaries <c>circle 0</c>, <c>circle 1</c>, ...; the innermost may be a hole.
    /// </summary>
    public static Gen<CrossSection> NestedCircles() =>
        from size in Sizes
        from centre in Centres(size)
        from count in Gen.Choose(1, 4)
        from shrinks in NumberGenerators.Between(0.3, 0.8).ArrayOf(count)
        from shifts in NumberGenerators.Between(0, 0.7).ArrayOf(count)
        from turns in NumberGenerators.Between(-Math.PI, Math.PI).ArrayOf(count)
        from isHollow in Gen.Elements(true, false)
        select Nested(centre, size, shrinks, shifts, turns, isHollow && count > 1);

    /// <summary>
    /// Two to six cores around the centre of a sheath, in the regions <c>sheath</c>, <c>core 0</c>, ... with the
    /// boundaries <c>rim</c>, <c>surface 0</c>, ...; cores are round, square or six-sided and stand apart.
    /// </summary>
    public static Gen<CrossSection> Cables() =>
        from size in Sizes
        from centre in Centres(size)
        from count in Gen.Choose(2, 6)
        from share in NumberGenerators.Between(0.4, 0.8)
        from turn in NumberGenerators.Between(-Math.PI, Math.PI)
        from corners in Gen.Elements(0, 0, 4, 6).ArrayOf(count)
        select Cable(centre, size, share, turn, corners);

    /// <summary>Two circles that touch from outside, and a third around them that touches both, in two or three regions.</summary>
    public static Gen<CrossSection> TouchingCircles() =>
        from size in Sizes
        from centre in Centres(size)
        from ratio in NumberGenerators.Between(0.3, 0.7)
        from turn in NumberGenerators.Between(-Math.PI, Math.PI)
        from hasFrame in Gen.Elements(true, false)
        select Touching(centre, size, ratio, turn, hasFrame);

    /// <summary>
    /// Up to four circles, rings, rectangles and triangles on a lattice of places and sizes, painted over each other
    /// in the regions <c>shape 0</c>, ... with the boundaries <c>line 0</c>, ...: they overlap, touch and coincide.
    /// </summary>
    /// <remarks>None is painted over completely.</remarks>
    public static Gen<CrossSection> Overlaps() =>
        (from kinds in Gen.NonEmptyListOf(Gen.Choose(0, 3))
         let count = Math.Min(4, kinds.Count)
         from places in Gen.Choose(-2, 2).ArrayOf(2 * count)
         from sizes in Gen.Choose(1, 3).ArrayOf(2 * count)
         select Enumerable.Range(0, count).Aggregate(CrossSection.Empty, (section, i) => section.Fill(
             OnLattice(
                 kinds[i], new Point2D(places[2 * i], places[(2 * i) + 1]), sizes[2 * i], sizes[(2 * i) + 1], $"line {i}"),
             $"shape {i}"))).Where(IsWhollySeen);

    private static Gen<double> Sizes => NumberGenerators.MagnitudeBetween(1e-3, 10);

    private static Gen<Point2D> Centres(double size) =>
        from x in NumberGenerators.Between(-3, 3)
        from y in NumberGenerators.Between(-3, 3)
        select new Point2D(x * size, y * size);

    private static CrossSection Nested(
        Point2D centre, double size, double[] shrinks, double[] shifts, double[] turns, bool isHollow)
    {
        CrossSection section = CrossSection.Empty;
        double radius = size;
        for (int i = 0; i < shrinks.Length; i++)
        {
            Outline circle = Outline.Circle(centre, radius, $"circle {i}");
            section = isHollow && i == shrinks.Length - 1 ? section.Hole(circle) : section.Fill(circle, $"layer {i}");
            double next = shrinks[i] * radius;
            centre += shifts[i] * (radius - next) * Vector2D.AtAngle(turns[i]);
            radius = next;
        }

        return section;
    }

    private static CrossSection Cable(Point2D centre, double size, double share, double turn, int[] corners)
    {
        CrossSection section = CrossSection.Empty.Fill(Outline.Circle(centre, size, "rim"), "sheath");
        double step = 2 * Math.PI / corners.Length;
        double distance = 0.6 * size;
        double radius = share * Math.Min(distance * Math.Sin(0.5 * step), size - distance);
        for (int i = 0; i < corners.Length; i++)
        {
            Point2D middle = centre + (distance * Vector2D.AtAngle(turn + (i * step)));
            Outline core = corners[i] == 0
                ? Outline.Circle(middle, radius)
                : Regular(middle, radius, corners[i], turn);
            section = section.Fill(core.Named($"surface {i}"), $"core {i}");
        }

        return section;
    }

    private static CrossSection Touching(Point2D centre, double size, double ratio, double turn, bool hasFrame)
    {
        double first = ratio * size;
        double second = size - first;
        Vector2D axis = Vector2D.AtAngle(turn);
        CrossSection section = hasFrame
            ? CrossSection.Empty.Fill(Outline.Circle(centre, size, "frame"), "gap")
            : CrossSection.Empty;
        return section
            .Fill(Outline.Circle(centre - (second * axis), first, "first line"), "first")
            .Fill(Outline.Circle(centre + (first * axis), second, "second line"), "second");
    }

    private static bool IsWhollySeen(CrossSection section)
    {
        try
        {
            return section.AreaOf(section.Regions[0]) > 0;
        }
        catch (InvalidSectionException)
        {
            return false;
        }
    }

    private static Shape OnLattice(int kind, Point2D place, double width, double height, string line) => kind switch
    {
        0 => Shape.Inside(Outline.Circle(place, width, line)),
        1 => Outline.Circle(place, width + 1, line).Without(Outline.Circle(place, width, line)),
        2 => Shape.Inside(Outline.Rectangle(place, width, height).Named(line)),
        _ => Shape.Inside(Outline.Polygon(
            place, place + new Vector2D(width, 0), place + new Vector2D(0, height)).Named(line)),
    };

    private static Outline Regular(Point2D centre, double radius, int corners, double turn) => Outline.Polygon(
        [.. Enumerable.Range(0, corners).Select(i => centre + (radius * Vector2D.AtAngle(turn + (2 * Math.PI * i / corners))))]);
}
