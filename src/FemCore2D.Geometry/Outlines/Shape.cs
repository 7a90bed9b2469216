using System.Collections.Immutable;

namespace FemCore2D.Geometry;

/// <summary>The area inside an outline, less holes; immutable.</summary>
public sealed class Shape
{
    internal Shape(Outline outer, ImmutableArray<Outline> holes)
    {
        Outer = outer;
        Holes = holes;
        foreach (Outline hole in holes)
        {
            ArgumentNullException.ThrowIfNull(hole, nameof(holes));
        }

        CheckHoles();
    }

    /// <summary>The outline around the shape.</summary>
    public Outline Outer { get; }

    /// <summary>The outlines of what is cut out of it.</summary>
    public ImmutableArray<Outline> Holes { get; }

    /// <summary>The smallest box around the shape.</summary>
    public Box2D Bounds => Outer.Bounds;

    /// <summary>The exact area, arcs included, in square metres.</summary>
    public double Area => Outer.Area - Holes.Sum(h => h.Area);

    /// <summary>The length around the outside and all holes, in metres.</summary>
    public double Perimeter => Outer.Perimeter + Holes.Sum(h => h.Perimeter);

    internal IEnumerable<Outline> Outlines => Holes.Prepend(Outer);

    /// <summary>The shape inside an outline, without holes.</summary>
    /// <param name="outer">The outline.</param>
    public static Shape Inside(Outline outer)
    {
        ArgumentNullException.ThrowIfNull(outer);
        return new Shape(outer, []);
    }

    /// <summary>The ring between two circles around one centre.</summary>
    /// <param name="centre">The centre, in metres.</param>
    /// <param name="innerRadius">The radius of the inner circle, positive.</param>
    /// <param name="outerRadius">The radius of the outer circle, larger than the inner one.</param>
    /// <param name="innerBoundary">The boundary along the inner circle, if any.</param>
    /// <param name="outerBoundary">The boundary along the outer circle, if any.</param>
    /// <exception cref="ArgumentOutOfRangeException">A radius is not in its range.</exception>
    /// <exception cref="InvalidSectionException">The centre is not finite, or the ring too thin to be resolved.</exception>
    public static Shape Ring(
        Point2D centre, double innerRadius, double outerRadius, string? innerBoundary = null, string? outerBoundary = null)
    {
        Outline.Positive(innerRadius, nameof(innerRadius), "ring", centre);
        Outline.Positive(outerRadius - innerRadius, nameof(outerRadius), "ring", centre);
        return Outline.Circle(centre, outerRadius, outerBoundary).Without(Outline.Circle(centre, innerRadius, innerBoundary));
    }

    /// <summary>Whether a point lies inside; for points on an outline rounding decides.</summary>
    /// <param name="point">The point, in metres.</param>
    public bool Contains(Point2D point)
    {
        if (!Outer.Contains(point))
        {
            return false;
        }

        foreach (Outline hole in Holes)
        {
            if (hole.Contains(point))
            {
                return false;
            }
        }

        return true;
    }

    /// <summary>The shape moved by a vector.</summary>
    /// <param name="step">The vector, in metres.</param>
    /// <exception cref="InvalidSectionException">The result is not finite, or too far away to be resolved.</exception>
    public Shape Moved(Vector2D step) => Each(o => o.Moved(step));

    /// <summary>The shape turned about a point.</summary>
    /// <param name="centre">The point that stays.</param>
    /// <param name="radians">The angle, counterclockwise.</param>
    /// <exception cref="InvalidSectionException">The result is not finite.</exception>
    public Shape Rotated(Point2D centre, double radians) => Each(o => o.Rotated(centre, radians));

    /// <summary>The shape scaled about a point.</summary>
    /// <param name="centre">The point that stays.</param>
    /// <param name="factor">The factor, positive.</param>
    /// <exception cref="ArgumentOutOfRangeException">The factor is not positive.</exception>
    /// <exception cref="InvalidSectionException">The result is not finite.</exception>
    public Shape Scaled(Point2D centre, double factor) => Each(o => o.Scaled(centre, factor));

    /// <summary>The shape mirrored in a line.</summary>
    /// <param name="onLine">A point of the line.</param>
    /// <param name="along">The direction of the line.</param>
    /// <exception cref="ArgumentException">The direction has no length.</exception>
    /// <exception cref="InvalidSectionException">The result is not finite.</exception>
    public Shape Mirrored(Point2D onLine, Vector2D along) => Each(o => o.Mirrored(onLine, along));

    /// <inheritdoc/>
    public override string ToString() => Holes.IsEmpty ? Outer.ToString() : $"{Outer} with {Holes.Length} holes";

    private Shape Each(Func<Outline, Outline> map) => new(map(Outer), [.. Holes.Select(map)]);

    private void CheckHoles()
    {
        if (Holes.IsEmpty)
        {
            return;
        }

        double tolerance = OutlineChecks.ToleranceOf(Outer.Bounds);
        List<PieceForm> forms = [];
        List<Box2D> boxes = [];
        List<int> owners = [];
        foreach ((Outline outline, int owner) in Outlines.Select((o, i) => (o, i)))
        {
            foreach (OutlinePiece piece in OutlineChecks.Halved(outline.Pieces))
            {
                forms.Add(new PieceForm(piece.Start, piece.End, piece.SweepRadians));
                boxes.Add(piece.Bounds.Widened(tolerance));
                owners.Add(owner);
            }
        }

        BoxIndex tree = new([.. boxes]);
        List<int> hits = [];
        Span<Point2D> contacts = stackalloc Point2D[2];
        for (int i = 0; i < forms.Count; i++)
        {
            tree.Query(boxes[i], hits);
            foreach (int j in hits)
            {
                if (owners[j] > owners[i]
                    && OutlineChecks.FindContact(forms[i], forms[j], false, false, tolerance, contacts) is Point2D place)
                {
                    throw new InvalidSectionException(
                        $"A hole of the shape meets its outer outline or another hole at {place}. "
                        + "Draw that part into the outer outline, or paint the shapes one over the other.");
                }
            }
        }

        for (int i = 0; i < Holes.Length; i++)
        {
            Point2D place = Holes[i].Pieces[0].Start;
            if (!Outer.Contains(place))
            {
                throw new InvalidSectionException(
                    $"The hole at {place} lies outside its shape. Leave it out, or move it inside.");
            }

            for (int j = 0; j < Holes.Length; j++)
            {
                if (i != j && Holes[j].Bounds.Contains(place) && Holes[j].Contains(place))
                {
                    throw new InvalidSectionException($"The hole at {place} lies inside another hole. Leave it out.");
                }
            }
        }
    }
}
