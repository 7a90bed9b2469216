using FemCore2D.Geometry;

namespace FemCore2D.Drawing;

/// <summary>A vector that can be drawn: in each cell of a mesh it has a value at each point.</summary>
public sealed partial class CellVector
{
    /// <summary>Describes a vector by the rule that gives its values.</summary>
    /// <param name="mesh">The mesh.</param>
    /// <param name="degree">The polynomial degree within a straight cell; 2 or more for anything that is no polynomial.</param>
    /// <param name="evaluator">The values at points of a cell.</param>
    /// <exception cref="ArgumentOutOfRangeException">The degree is negative.</exception>
    public CellVector(Mesh mesh, int degree, CellEvaluator<Vector2D> evaluator)
    {
        ArgumentNullException.ThrowIfNull(mesh);
        ArgumentNullException.ThrowIfNull(evaluator);
        ArgumentOutOfRangeException.ThrowIfNegative(degree);
        Mesh = mesh;
        Degree = degree;
        Evaluator = evaluator;
    }

    /// <summary>The mesh.</summary>
    public Mesh Mesh { get; }

    /// <summary>The polynomial degree within a straight cell.</summary>
    public int Degree { get; }

    internal CellEvaluator<Vector2D> Evaluator { get; }

    /// <summary>A vector that depends on the place alone.</summary>
    /// <param name="mesh">The mesh on which it is drawn.</param>
    /// <param name="value">The value at a place, in metres.</param>
    public static CellVector OfPlace(Mesh mesh, Func<Point2D, Vector2D> value)
    {
        ArgumentNullException.ThrowIfNull(mesh);
        ArgumentNullException.ThrowIfNull(value);
        return new CellVector(mesh, 3, (cell, reference, results) =>
        {
            var shape = new CellShape(mesh, cell);
            for (int i = 0; i < reference.Length; i++)
                results[i] = value(shape.PlaceOf(reference[i]));
        });
    }

    /// <summary>The length of the vector.</summary>
    public CellScalar Magnitude() => Select(vector => vector.Length);

    /// <summary>The part of the vector along a direction.</summary>
    /// <param name="direction">The direction; it need not have unit length.</param>
    /// <exception cref="ArgumentException">The direction has no length.</exception>
    public CellScalar Along(Vector2D direction)
    {
        Vector2D unit = direction / direction.Length;
        if (!double.IsFinite(unit.X) || !double.IsFinite(unit.Y))
            throw new ArgumentException("A direction has a finite length above zero.", nameof(direction));
        return Select(unit.Dot);
    }

    /// <summary>A scalar computed from the vector, such as an energy density.</summary>
    /// <param name="function">The function of a vector.</param>
    public CellScalar Select(Func<Vector2D, double> function)
    {
        ArgumentNullException.ThrowIfNull(function);
        return new CellScalar(Mesh, Degree == 0 ? 0 : Math.Max(2, Degree), (cell, reference, results) =>
        {
            const int block = 64;
            Span<Vector2D> vectors = stackalloc Vector2D[block];
            for (int start = 0; start < reference.Length; start += block)
            {
                int count = Math.Min(block, reference.Length - start);
                Evaluator(cell, reference.Slice(start, count), vectors[..count]);
                for (int i = 0; i < count; i++)
                    results[start + i] = function(vectors[i]);
            }
        });
    }
}
