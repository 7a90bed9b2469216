using FemCore2D.Geometry;

namespace FemCore2D.Drawing;

/// <summary>A scalar that can be drawn: in each cell of a mesh it has a value at each point.</summary>
public sealed partial class CellScalar
{
    /// <summary>Describes a scalar by the rule that gives its values.</summary>
    /// <param name="mesh">The mesh.</param>
    /// <param name="degree">
    /// The polynomial degree within a straight cell, which tells how finely cells are divided for drawing: 0 for one
    /// value a cell, 1 for a linear course; use 2 or more for anything else.
    /// </param>
    /// <param name="evaluator">The values at points of a cell.</param>
    /// <exception cref="ArgumentOutOfRangeException">The degree is negative.</exception>
    public CellScalar(Mesh mesh, int degree, CellEvaluator<double> evaluator)
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

    internal CellEvaluator<double> Evaluator { get; }

    /// <summary>Whether cells that meet are known to agree there.</summary>
    internal bool IsContinuous { get; init; }

    /// <summary>A scalar given by its values at the vertices, linear (in quadrilaterals bilinear) between them.</summary>
    /// <param name="mesh">The mesh.</param>
    /// <param name="values">One value a vertex; copied.</param>
    /// <exception cref="ArgumentException">There is not one value a vertex.</exception>
    public static CellScalar AtVertices(Mesh mesh, ReadOnlySpan<double> values)
    {
        ArgumentNullException.ThrowIfNull(mesh);
        if (values.Length != mesh.VertexCount)
            throw new ArgumentException(
                $"{values.Length} values are given for {mesh.VertexCount} vertices; give one a vertex.", nameof(values));
        double[] copy = values.ToArray();
        return new CellScalar(mesh, 1, (cell, reference, results) =>
        {
            ReadOnlySpan<int> corners = mesh.VerticesOf(cell);
            double v0 = copy[corners[0]];
            double v1 = copy[corners[1]];
            double v2 = copy[corners[2]];
            if (corners.Length == 3)
            {
                for (int i = 0; i < reference.Length; i++)
                    results[i] = v0 + ((v1 - v0) * reference[i].X) + ((v2 - v0) * reference[i].Y);
                return;
            }

            double v3 = copy[corners[3]];
            for (int i = 0; i < reference.Length; i++)
            {
                (double x, double y) = reference[i];
                results[i] = ((1 - y) * ((v0 * (1 - x)) + (v1 * x))) + (y * ((v3 * (1 - x)) + (v2 * x)));
            }
        })
        {
            IsContinuous = true,
        };
    }

    /// <summary>A scalar with one value a cell, such as an error indicator.</summary>
    /// <param name="mesh">The mesh.</param>
    /// <param name="values">One value a cell; copied.</param>
    /// <exception cref="ArgumentException">There is not one value a cell.</exception>
    public static CellScalar PerCell(Mesh mesh, ReadOnlySpan<double> values)
    {
        ArgumentNullException.ThrowIfNull(mesh);
        if (values.Length != mesh.CellCount)
            throw new ArgumentException(
                $"{values.Length} values are given for {mesh.CellCount} cells; give one a cell.", nameof(values));
        double[] copy = values.ToArray();
        return new CellScalar(mesh, 0, (cell, _, results) => results.Fill(copy[cell]));
    }

    /// <summary>A scalar that depends on the place alone.</summary>
    /// <param name="mesh">The mesh on which it is drawn.</param>
    /// <param name="value">The value at a place, in metres.</param>
    public static CellScalar OfPlace(Mesh mesh, Func<Point2D, double> value)
    {
        ArgumentNullException.ThrowIfNull(mesh);
        ArgumentNullException.ThrowIfNull(value);
        return new CellScalar(mesh, 3, (cell, reference, results) =>
        {
            var shape = new CellShape(mesh, cell);
            for (int i = 0; i < reference.Length; i++)
                results[i] = value(shape.PlaceOf(reference[i]));
        })
        {
            IsContinuous = true,
        };
    }

    /// <summary>Another scalar, computed from the values of this one.</summary>
    /// <param name="function">The function of a value.</param>
    public CellScalar Select(Func<double, double> function)
    {
        ArgumentNullException.ThrowIfNull(function);
        return new CellScalar(Mesh, Degree == 0 ? 0 : Math.Max(2, Degree), (cell, reference, results) =>
        {
            Evaluator(cell, reference, results);
            foreach (ref double value in results)
                value = function(value);
        })
        {
            IsContinuous = IsContinuous,
        };
    }
}
