using System.Numerics;
using FemCore2D.Elements;
using FemCore2D.Geometry;
using FemCore2D.Sparse;

namespace FemCore2D.Assembly;

/// <summary>A function of a <see cref="NodeSpace"/>: its values at the nodes. Immutable.</summary>
/// <typeparam name="T">The number type: <see cref="double"/> or <see cref="Complex"/>.</typeparam>
public sealed partial class NodeField<T>
    where T : unmanaged, INumberBase<T>
{
    private const int MostShapes = 32;

    private readonly T[] coefficients;

    /// <summary>Creates a field from its values at the nodes, which are copied.</summary>
    /// <param name="space">The space.</param>
    /// <param name="coefficients">A value for each unknown of the space.</param>
    /// <exception cref="ArgumentException">There is not one value for each unknown.</exception>
    public NodeField(NodeSpace space, ReadOnlySpan<T> coefficients)
    {
        ArgumentNullException.ThrowIfNull(space);
        if (coefficients.Length != space.UnknownCount)
        {
            throw new ArgumentException(
                $"The space has {space.UnknownCount} unknowns, but {coefficients.Length} values were given.",
                nameof(coefficients));
        }

        Space = space;
        this.coefficients = coefficients.ToArray();
    }

    /// <summary>The space.</summary>
    public NodeSpace Space { get; }

    /// <summary>The value at each node, in the order of the unknowns.</summary>
    public ReadOnlySpan<T> Coefficients => coefficients;

    /// <summary>The value at a point of a cell.</summary>
    /// <param name="cell">The cell.</param>
    /// <param name="reference">The point in coordinates of the reference cell.</param>
    public T ValueIn(int cell, Point2D reference)
    {
        Span<int> unknowns = stackalloc int[MostShapes];
        Span<double> shapes = stackalloc double[MostShapes];
        int count = Space.Numbering.CellUnknowns(cell, unknowns);
        Space.TablesOn(Space.Mesh.KindOf(cell)).Element.Values(reference, shapes);
        T sum = T.Zero;
        for (int i = 0; i < count; i++)
        {
            sum += Scalar.Scale(coefficients[unknowns[i]], shapes[i]);
        }

        return sum;
    }

    /// <summary>The gradient at a point of a cell, per metre.</summary>
    /// <param name="cell">The cell.</param>
    /// <param name="reference">The point in coordinates of the reference cell.</param>
    public FieldVector<T> GradientIn(int cell, Point2D reference)
    {
        Span<int> unknowns = stackalloc int[MostShapes];
        Span<Vector2D> gradients = stackalloc Vector2D[MostShapes];
        int count = Space.Numbering.CellUnknowns(cell, unknowns);
        Space.TablesOn(Space.Mesh.KindOf(cell)).Element.Gradients(reference, gradients);
        Jacobian map = CellGeometry.Of(Space.Maps, cell).JacobianAt(reference);
        T x = T.Zero;
        T y = T.Zero;
        for (int i = 0; i < count; i++)
        {
            Vector2D gradient = map.ToRealGradient(gradients[i]);
            x += Scalar.Scale(coefficients[unknowns[i]], gradient.X);
            y += Scalar.Scale(coefficients[unknowns[i]], gradient.Y);
        }

        return new FieldVector<T>(x, y);
    }

    /// <summary>The value at a place.</summary>
    /// <param name="place">The place, in metres.</param>
    /// <param name="value">The value there; zero outside the mesh.</param>
    /// <returns>Whether the mesh contains the place.</returns>
    public bool TryValueAt(Point2D place, out T value)
    {
        bool found = TryLocate(place, out int cell, out Point2D reference);
        value = found ? ValueIn(cell, reference) : T.Zero;
        return found;
    }

    /// <summary>The gradient at a place, per metre; between cells, that of one of them.</summary>
    /// <param name="place">The place, in metres.</param>
    /// <param name="gradient">The gradient there; zero outside the mesh.</param>
    /// <returns>Whether the mesh contains the place.</returns>
    public bool TryGradientAt(Point2D place, out FieldVector<T> gradient)
    {
        bool found = TryLocate(place, out int cell, out Point2D reference);
        gradient = found ? GradientIn(cell, reference) : default;
        return found;
    }

    private bool TryLocate(Point2D place, out int cell, out Point2D reference)
    {
        reference = default;
        cell = Space.Locator.CellAt(place);
        return cell >= 0 && Space.Maps.TryInvert(cell, place, out reference);
    }
}

/// <summary>Makes fields.</summary>
public static class NodeField
{
    /// <summary>The field that has the values of a function at the nodes.</summary>
    /// <param name="space">The space.</param>
    /// <param name="function">The function, of a point in metres.</param>
    /// <typeparam name="T">The number type: <see cref="double"/> or <see cref="Complex"/>.</typeparam>
    public static NodeField<T> Interpolate<T>(NodeSpace space, Func<Point2D, T> function)
        where T : unmanaged, INumberBase<T>
    {
        ArgumentNullException.ThrowIfNull(space);
        ArgumentNullException.ThrowIfNull(function);
        ReadOnlySpan<Point2D> places = space.NodePlaces;
        var values = new T[places.Length];
        for (int i = 0; i < values.Length; i++)
        {
            values[i] = function(places[i]);
        }

        return new NodeField<T>(space, values);
    }
}
