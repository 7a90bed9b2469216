using FsCheck;
using FsCheck.Fluent;

namespace FemCore2D.Geometry.Tests;

/// <summary>A shape given by a few numbers, so that a failing case can be read and shrunk.</summary>
public sealed record ShapeSpec(int Kind, double X, double Y, double A, double B, double C, int Region)
{
    /// <summary>The shape, inside a square of side 16 or so.</summary>
    public Shape ToShape()
    {
        Point2D p = new(X, Y);
        return Kind switch
        {
            0 => Shape.Inside(Outline.Rectangle(p, A, B)),
            1 => Shape.Inside(Outline.Circle(p, A)),
            2 => Shape.Ring(p, A, A + B),
            3 => Shape.Inside(Outline.Sector(p, A, C, 0.5 + (0.25 * B))),
            4 => Shape.Inside(Outline.Polygon(p, p + new Vector2D(A, 0), p + new Vector2D(C, B))),
            5 => Shape.Inside(Outline.RoundedRectangle(p, A, B, 0.5 * Math.Min(A, B))),
            6 => Shape.Inside(Outline.RoundedRectangle(p, A, B, 0.25 * Math.Min(A, B))),
            7 => Shape.Inside(Outline.RingSector(p, A, A + B, C, 3)),
            8 => Shape.Inside(Outline.Rectangle(p, A, B)).Rotated(p, Math.PI / 4),
            _ => Shape.Inside(Outline.Circle(p, A)).Rotated(p, C),
        };
    }

    public override string ToString() =>
        string.Create(null, $"new({Kind}, {X:R}, {Y:R}, {A:R}, {B:R}, {C:R}, {Region})");
}

/// <summary>Random shapes on a coarse lattice, so that touching, overlapping and coincident pieces are the rule.</summary>
public static class LatticeShapes
{
    public static Arbitrary<ShapeSpec[]> Shapes() => ShapeLists.Of(
        Gen.Choose(-6, 6).Select(i => (double)i), Gen.Choose(1, 5).Select(i => (double)i));
}

/// <summary>Random shapes in general position.</summary>
public static class GeneralShapes
{
    public static Arbitrary<ShapeSpec[]> Shapes() => ShapeLists.Of(
        Gen.Choose(-600000, 600000).Select(i => i * 1.0173e-5), Gen.Choose(100000, 500000).Select(i => i * 1.0391e-5));
}

internal static class ShapeLists
{
    private static readonly double[] Angles = [0, 1, 2, 3, 4];

    public static Arbitrary<ShapeSpec[]> Of(Gen<double> place, Gen<double> size)
    {
        Gen<ShapeSpec> shape =
            from kind in Gen.Choose(0, 9)
            from x in place
            from y in place
            from a in size
            from b in size
            from c in Gen.Elements(Angles)
            from region in Gen.Choose(0, 3)
            select new ShapeSpec(kind, x, y, a, b, c, region);
        return Arb.From(Gen.Choose(1, 8).SelectMany(n => shape.ArrayOf(n)), Smaller);
    }

    public static CrossSection Paint(IEnumerable<ShapeSpec> shapes, Func<Shape, Shape>? map = null)
    {
        map ??= s => s;
        // The base keeps every region in sight and every shape inside the section.
        CrossSection section = CrossSection.Empty;
        for (int region = 0; region < 4; region++)
        {
            section = section.Fill(map(Shape.Inside(Outline.Rectangle(new Point2D(-40 + (2 * region), -40), 1, 1))), Name(region));
        }

        section = section.Fill(map(Shape.Inside(Outline.Rectangle(new Point2D(-20, -20), 40, 40))), "base");
        foreach (ShapeSpec shape in shapes)
        {
            Shape mapped = map(shape.ToShape());
            section = shape.Region == 3 ? section.Hole(mapped) : section.Fill(mapped, Name(shape.Region));
        }

        return section;
    }

    public static string Name(int region) => $"region {region}";

    private static IEnumerable<ShapeSpec[]> Smaller(ShapeSpec[] shapes)
    {
        for (int i = 0; i < shapes.Length && shapes.Length > 1; i++)
        {
            yield return [.. shapes[..i], .. shapes[(i + 1)..]];
        }
    }
}
