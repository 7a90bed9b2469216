using FemCore2D.Geometry;

namespace FemCore2D.Elements;

/// <summary>An element with one scalar shape function for each unknown.</summary>
public interface INodeElement : IElement
{
    /// <summary>Evaluates all shape functions at a point of the reference cell.</summary>
    /// <param name="point">The point, in coordinates of the reference cell.</param>
    /// <param name="values">Receives one value a shape function; at least <see cref="IElement.UnknownCount"/> long.</param>
    void Values(Point2D point, Span<double> values);

    /// <summary>Evaluates the gradients of all shape functions, in reference coordinates, at a point of the reference cell.</summary>
    /// <param name="point">The point, in coordinates of the reference cell.</param>
    /// <param name="gradients">Receives one gradient a shape function; at least <see cref="IElement.UnknownCount"/> long.</param>
    void Gradients(Point2D point, Span<Vector2D> gradients);
}
