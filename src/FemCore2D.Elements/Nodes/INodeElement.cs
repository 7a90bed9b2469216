using FemCore2D.Geometry;

namespace FemCore2D.Elements;

/// <summary>An element with one scalar shape function for each unknown, whose unknowns are values at nodes.</summary>
/// <remarks>
/// The shape functions that do not belong to an edge or its ends vanish along it, so that the values on an edge
/// depend on the edge's own unknowns alone: sharing these makes a field continuous. A struct that implements this
/// interface lets generic loops run without calls through the interface.
/// </remarks>
public interface INodeElement : IElement
{
    /// <summary>The nodes, as points of the reference cell, in the order of the unknowns.</summary>
    ReadOnlySpan<Point2D> NodePoints { get; }

    /// <summary>Evaluates all shape functions at a point of the reference cell.</summary>
    /// <param name="point">The point, in coordinates of the reference cell.</param>
    /// <param name="values">Receives one value a shape function; at least <see cref="IElement.UnknownCount"/> long.</param>
    /// <exception cref="ArgumentOutOfRangeException">The span is too short.</exception>
    void Values(Point2D point, Span<double> values);

    /// <summary>Evaluates the gradients of all shape functions, in reference coordinates, at a point of the reference cell.</summary>
    /// <param name="point">The point, in coordinates of the reference cell.</param>
    /// <param name="gradients">Receives one gradient a shape function; at least <see cref="IElement.UnknownCount"/> long.</param>
    /// <exception cref="ArgumentOutOfRangeException">The span is too short.</exception>
    void Gradients(Point2D point, Span<Vector2D> gradients);
}
