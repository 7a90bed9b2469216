using FemCore2D.Geometry;

namespace FemCore2D.Drawing;

/// <summary>Gives the values of a quantity at points of one cell.</summary>
/// <typeparam name="TValue">A number or a vector.</typeparam>
/// <param name="cell">The cell.</param>
/// <param name="reference">Points of the reference cell: the triangle (0,0), (1,0), (0,1) or the unit square.</param>
/// <param name="values">Receives one value a point; NaN where there is none.</param>
/// <remarks>Called from one thread at a time for one picture; several pictures may call it at once.</remarks>
public delegate void CellEvaluator<TValue>(int cell, ReadOnlySpan<Point2D> reference, Span<TValue> values);
