using FsCheck;
using FsCheck.Fluent;

namespace FemCore2D.Geometry.Tests;

/// <summary>What stands in one field of a random drawing.</summary>
public sealed record FieldSpec(int Kind, int Seed);

/// <summary>Random drawings: a rectangle of fields, in each of which something else stands.</summary>
public static class RandomArrangements
{
    public const int Kinds = 9;

    public static Arbitrary<FieldSpec[]> Fields()
    {
        Gen<FieldSpec> field =
            from kind in Gen.Choose(0, Kinds - 1)
            from seed in Gen.Choose(0, 1_000_000)
            select new FieldSpec(kind, seed);
        return Arb.From(
            Gen.Choose(1, 6).SelectMany(n => field.ArrayOf(n)),
            fields => Enumerable.Range(0, fields.Length).Select(i => fields.Where((_, k) => k != i).ToArray()).Where(rest => rest.Length > 0));
    }

    internal static Arrangement Draw(FieldSpec[] fields)
    {
        Drawn drawn = new Drawn().Rectangle(0, 0, 2 * fields.Length, 2, "base");
        for (int i = 0; i < fields.Length; i++)
        {
            DrawField(drawn, fields[i].Kind, new Random(fields[i].Seed), (2 * i) + 1, 1);
        }

        return drawn.Done();
    }

    private static void DrawField(Drawn drawn, int kind, Random random, double x, double y)
    {
        // A multiple of a power of two, so that points of contact come out alike.
        double size = random.Next(10, 29) / 32.0;
        double turn = 360 * random.NextDouble();
        switch (kind)
        {
            case 0:
                Star(drawn, random, x, y, 0.9, "star", "base");
                break;
            case 1:
                drawn.Circle(x, y, size, "disc", "base", turn, random.Next(2, 6));
                Star(drawn, random, x, y, 0.8 * size, null, "disc");
                break;
            case 2:
                drawn.Circle(x, y, size, "ring", "base", turn).Circle(x, y, size * (0.99 - (0.5 * random.NextDouble())), "base", "ring", 2 * turn, 3);
                break;
            case 3:
                drawn.Circle(x, y, size, "ring", "base", turn).Circle(x, y, size * 0.98, null, "ring", 2 * turn);
                break;
            case 4:
                // From inside, in a vertex of both.
                drawn.Circle(x, y, size, "disc", "base", 0).Circle(x + (size / 2), y, size / 2, random.Next(2) == 0 ? null : "core", "disc", 0);
                break;
            case 5:
                // From outside, with centres and radii that give the same point exactly.
                drawn.Circle(x - 0.25, y, 0.25, "disc", "base", 0).Circle(x + 0.375, y, 0.375, "disc", "base", 180);
                break;
            case 6:
                Fan(drawn, random, x, y);
                break;
            case 7:
                drawn.Point($"p{x}", x + (0.3 * random.NextDouble()), y + (0.3 * random.NextDouble()));
                break;
            default:
                Lens(drawn, random, x, y, size);
                break;
        }
    }

    /// <summary>A polygon around a centre, with corners of any angle.</summary>
    private static void Star(Drawn drawn, Random random, double x, double y, double radius, string? inside, string outside)
    {
        int corners = random.Next(3, 12);
        double start = random.NextDouble();
        drawn.Polygon(inside, outside, [.. Enumerable.Range(0, corners).Select(i =>
        {
            double angle = 2 * Math.PI * (start + ((i + (0.6 * random.NextDouble())) / corners));
            double distance = radius * (0.2 + (0.8 * random.NextDouble()));
            return (x + (distance * Math.Cos(angle)), y + (distance * Math.Sin(angle)));
        })]);
    }

    /// <summary>Sheets that start at one point and end in the region.</summary>
    private static void Fan(Drawn drawn, Random random, double x, double y)
    {
        int sheets = random.Next(1, 8);
        int corner = drawn.Vertex(x, y);
        for (int i = 0; i < sheets; i++)
        {
            double angle = 2 * Math.PI * (i + (0.9 * random.NextDouble())) / sheets;
            double length = 0.1 + (0.8 * random.NextDouble());
            int end = drawn.Vertex(x + (length * Math.Cos(angle)), y + (length * Math.Sin(angle)));
            drawn.Piece(corner, end, random.Next(2) * (random.NextDouble() - 0.5) / sheets, "base", "base", $"fan{x}");
        }
    }

    /// <summary>Two arcs over one chord, and the chord.</summary>
    private static void Lens(Drawn drawn, Random random, double x, double y, double size)
    {
        int left = drawn.Vertex(x - size, y);
        int right = drawn.Vertex(x + size, y + (0.05 * random.NextDouble()));
        double upper = 0.1 + (2.2 * random.NextDouble());
        double lower = 0.1 + (2.2 * random.NextDouble());
        drawn.Piece(left, right, lower, "upper", "base").Piece(right, left, upper, "upper", "base");
        drawn.Piece(left, right, 0, "upper", "upper", "chord");
    }
}
