using FsCheck;
using FsCheck.Fluent;
using FsCheck.Xunit;

namespace FemCore2D.Geometry.Tests;

public static class RandomPieces
{
    public static Arbitrary<OutlinePiece> Of() => Arb.From(
        from x in Coordinate
        from y in Coordinate
        from direction in Gen.Choose(0, 6283).Select(i => i * 1e-3)
        from length in Gen.Choose(1, 4000).Select(i => i * 1e-3)
        from size in Gen.Choose(0, 12)
        from part in Gen.Choose(-620, 620).Select(i => i * 1e-2)
        let start = new Point2D(x, y)
        select new OutlinePiece(start, start + (length * Vector2D.AtAngle(direction)), part * Math.Pow(10, -size)));

    private static Gen<double> Coordinate => Gen.Choose(-5000, 5000).Select(i => i * 1e-3);
}

public class OutlinePieceTests
{
    [Fact]
    public void A_quarter_arc_has_the_values_of_its_circle()
    {
        OutlinePiece arc = new(new Point2D(3, 1), new Point2D(1, 3), Math.PI / 2);
        Assert.Equal(2, arc.Radius, 1e-15);
        Assert.True(arc.Centre.DistanceTo(new Point2D(1, 1)) < 1e-15);
        Assert.Equal(Math.PI, arc.Length, 1e-15);
        Assert.True(arc.Midpoint.DistanceTo(new Point2D(1 + Math.Sqrt(2), 1 + Math.Sqrt(2))) < 1e-15);
        Assert.True((arc.TangentAt(0) - new Vector2D(0, 1)).Length < 1e-15);
        Assert.True((arc.TangentAt(1) - new Vector2D(-1, 0)).Length < 1e-15);
        Assert.Equal(Math.PI - 2, arc.SegmentArea, 1e-15);
        Assert.Equal(new OutlinePiece(arc.End, arc.Start, -Math.PI / 2), arc.Reversed());
    }

    [Fact]
    public void A_straight_piece_has_no_centre()
    {
        OutlinePiece line = new(Point2D.Origin, new Point2D(3, 4));
        Assert.True(line.IsStraight);
        Assert.Equal(5, line.Length);
        Assert.Equal(double.PositiveInfinity, line.Radius);
        Assert.Equal(new Vector2D(0.6, 0.8), line.TangentAt(0.3));
        Assert.Equal(new Point2D(1.5, 2), line.Midpoint);
        Assert.Throws<InvalidOperationException>(() => line.Centre);
    }

    [Property(Arbitrary = [typeof(RandomPieces)], MaxTest = 1000)]
    public void Two_parts_make_up_the_piece(OutlinePiece piece, byte share)
    {
        double fraction = (share + 1) / 257.0;
        Point2D at = piece.PointAt(fraction);
        OutlinePiece first = piece with { End = at, SweepRadians = fraction * piece.SweepRadians };
        OutlinePiece second = piece with { Start = at, SweepRadians = (1 - fraction) * piece.SweepRadians };
        double scale = 10 + piece.Length;
        Assert.Equal(piece.Length, first.Length + second.Length, 1e-14 * scale);
        Assert.Equal(
            piece.SegmentArea,
            first.SegmentArea + second.SegmentArea + (0.5 * (at - piece.Start).Cross(piece.End - piece.Start)),
            1e-14 * scale * scale);
        Assert.True(first.PointAt(0.5).DistanceTo(piece.PointAt(0.5 * fraction)) < 1e-14 * scale);
        Assert.True((second.TangentAt(0) - first.TangentAt(1)).Length < 1e-9);
    }

    [Property(Arbitrary = [typeof(RandomPieces)], MaxTest = 1000)]
    public void The_bounds_hold_the_piece_tightly(OutlinePiece piece)
    {
        Box2D box = piece.Bounds;
        Box2D sampled = Box2D.Empty;
        for (int i = 0; i <= 2000; i++)
        {
            Point2D p = piece.PointAt(i / 2000.0);
            sampled = sampled.Union(new Box2D(p, p));
        }

        double slack = 1e-14 * (10 + piece.Length);
        Assert.True(box.Widened(slack).Contains(sampled.Lower) && box.Widened(slack).Contains(sampled.Upper));
        Assert.True(box.Width - sampled.Width < 1e-6 * piece.Length && box.Height - sampled.Height < 1e-6 * piece.Length);
    }

    [Property(Arbitrary = [typeof(RandomPieces)], MaxTest = 1000)]
    public void The_one_equation_of_lines_and_circles_finds_points_again(OutlinePiece piece, byte share)
    {
        // Arcs above half a turn are never put into this form.
        OutlinePiece part = piece with { SweepRadians = Math.Clamp(piece.SweepRadians, -Math.PI, Math.PI) };
        PieceForm form = new(part.Start, part.End, part.SweepRadians);
        double fraction = (share + 1) / 257.0;
        Point2D at = part.PointAt(fraction);
        double scale = 10 + part.Length;
        Assert.Equal(0, form.DistanceTo(at), 1e-13 * scale);
        Assert.Equal(fraction, form.FractionOf(at), 1e-12 * scale / form.Length);
        Assert.True(form.Spans(at) || Math.Abs(part.SweepRadians) < 1e-10);
        Assert.Equal(0, form.DistanceTo(form.AtParameter(fraction).Point), 1e-13 * scale);

        Point2D left = at + (1e-3 * form.Length * part.TangentAt(fraction).LeftNormal);
        Assert.InRange(form.DistanceTo(left) / form.Length, 0.5e-3, 2e-3);
    }
}
