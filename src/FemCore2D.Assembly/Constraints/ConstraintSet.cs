using System.Collections.Immutable;
using System.Numerics;
using FemCore2D.Geometry;

namespace FemCore2D.Assembly;

/// <summary>
/// The conditions that unknowns must meet, by the names of the mesh: fixed values, floating equal values with a given
/// total, paired boundaries. Immutable; each call returns the set with one condition more.
/// </summary>
/// <remarks>
/// All conditions are rows <c>u = C v + g</c>: each unknown is a multiple of one free unknown, or a given number. They
/// are composed and checked by <see cref="Resolve"/>. A symmetry plane needs no condition where the field is even in
/// it, and a value of zero where it is odd.
/// </remarks>
/// <typeparam name="T">The number type: <see cref="double"/> or <see cref="Complex"/>.</typeparam>
public sealed class ConstraintSet<T>
    where T : unmanaged, INumberBase<T>
{
    private readonly ImmutableList<Condition<T>> conditions;

    /// <summary>Creates a set without any condition.</summary>
    /// <param name="space">The space whose unknowns are constrained.</param>
    public ConstraintSet(NodeSpace space)
    {
        ArgumentNullException.ThrowIfNull(space);
        Space = space;
        conditions = [];
    }

    private ConstraintSet(NodeSpace space, ImmutableList<Condition<T>> conditions)
    {
        Space = space;
        this.conditions = conditions;
    }

    /// <summary>The space.</summary>
    public NodeSpace Space { get; }

    /// <summary>Fixes one value all along a boundary.</summary>
    /// <exception cref="UnknownNameException">The mesh has no such boundary.</exception>
    /// <exception cref="ArgumentOutOfRangeException">The value is not finite.</exception>
    /// <exception cref="ConflictingConditionsException">The boundary has a condition already.</exception>
    public ConstraintSet<T> FixBoundary(string boundary, T value)
    {
        _ = Space.Mesh.BoundaryEdges(boundary);
        return With(new(boundary, ConditionTarget.Boundary, ConditionKind.Fixed) { Value = Finite(value) });
    }

    /// <summary>Fixes the values along a boundary by a function of place, at the nodes.</summary>
    /// <exception cref="UnknownNameException">The mesh has no such boundary.</exception>
    /// <exception cref="ConflictingConditionsException">The boundary has a condition already.</exception>
    public ConstraintSet<T> FixBoundary(string boundary, Func<Point2D, T> value)
    {
        ArgumentNullException.ThrowIfNull(value);
        _ = Space.Mesh.BoundaryEdges(boundary);
        return With(new(boundary, ConditionTarget.Boundary, ConditionKind.FixedByPlace) { Function = value });
    }

    /// <summary>Fixes one value in a region and on its border.</summary>
    /// <exception cref="UnknownNameException">The mesh has no such region.</exception>
    /// <exception cref="ArgumentOutOfRangeException">The value is not finite.</exception>
    /// <exception cref="ConflictingConditionsException">The region has a condition already.</exception>
    public ConstraintSet<T> FixRegion(string region, T value)
    {
        _ = Space.Mesh.RegionIndex(region);
        return With(new(region, ConditionTarget.Region, ConditionKind.Fixed) { Value = Finite(value) });
    }

    /// <summary>Fixes the value at a named point.</summary>
    /// <exception cref="UnknownNameException">The mesh has no such point.</exception>
    /// <exception cref="ArgumentOutOfRangeException">The value is not finite.</exception>
    /// <exception cref="ConflictingConditionsException">The point has a condition already.</exception>
    public ConstraintSet<T> FixPoint(string point, T value)
    {
        _ = Space.Mesh.VertexAt(point);
        return With(new(point, ConditionTarget.Point, ConditionKind.Fixed) { Value = Finite(value) });
    }

    /// <summary>Lets a boundary float: one value all along it, with a given total of its reaction.</summary>
    /// <param name="boundary">The boundary.</param>
    /// <param name="total">The total, such as the charge of a floating conductor.</param>
    /// <exception cref="UnknownNameException">The mesh has no such boundary.</exception>
    /// <exception cref="ArgumentOutOfRangeException">The total is not finite.</exception>
    /// <exception cref="ConflictingConditionsException">The boundary has a condition already.</exception>
    public ConstraintSet<T> FloatBoundary(string boundary, T total)
    {
        _ = Space.Mesh.BoundaryEdges(boundary);
        return With(new(boundary, ConditionTarget.Boundary, ConditionKind.Floating) { Value = Finite(total) });
    }

    /// <summary>Lets a region float: one value in it and on its border, with a given total of its reaction.</summary>
    /// <param name="region">The region.</param>
    /// <param name="total">The total, such as the charge of a floating conductor.</param>
    /// <exception cref="UnknownNameException">The mesh has no such region.</exception>
    /// <exception cref="ArgumentOutOfRangeException">The total is not finite.</exception>
    /// <exception cref="ConflictingConditionsException">The region has a condition already.</exception>
    public ConstraintSet<T> FloatRegion(string region, T total)
    {
        _ = Space.Mesh.RegionIndex(region);
        return With(new(region, ConditionTarget.Region, ConditionKind.Floating) { Value = Finite(total) });
    }

    /// <summary>
    /// Makes the values on one boundary those on another times a factor: 1 for periodic, -1 for antiperiodic, a
    /// complex phase for a wave that runs across.
    /// </summary>
    /// <param name="boundary">The boundary whose values are taken.</param>
    /// <param name="partner">The boundary whose values follow; a rigid motion carries the first onto it.</param>
    /// <param name="factor">The factor, not zero.</param>
    /// <exception cref="UnknownNameException">The mesh has no such boundary.</exception>
    /// <exception cref="ArgumentOutOfRangeException">The factor is zero or not finite.</exception>
    /// <exception cref="ConflictingConditionsException">The two boundaries are paired already, or are the same.</exception>
    public ConstraintSet<T> Pair(string boundary, string partner, T factor)
    {
        _ = Space.Mesh.BoundaryEdges(boundary);
        _ = Space.Mesh.BoundaryEdges(partner);
        if (T.IsZero(Finite(factor)))
        {
            throw new ArgumentOutOfRangeException(
                nameof(factor), "A pair needs a factor other than zero. Fix the partner's value at zero instead.");
        }

        if (boundary == partner)
        {
            throw new ConflictingConditionsException(
                $"The boundary '{boundary}' is paired with itself. Name the boundary on the other side.");
        }

        return With(new(boundary, ConditionTarget.Boundary, ConditionKind.Paired) { Value = factor, Partner = partner });
    }

    /// <summary>Composes the conditions and finds the free unknowns.</summary>
    /// <exception cref="ConflictingConditionsException">Two conditions contradict each other; the message names both and the place.</exception>
    /// <exception cref="UnmatchedBoundariesException">Paired boundaries do not match.</exception>
    public ResolvedConstraints<T> Resolve() => new ConstraintResolver<T>(Space, conditions).Resolve();

    private static T Finite(T value) => T.IsFinite(value)
        ? value
        : throw new ArgumentOutOfRangeException(nameof(value), value, "The value of a condition must be finite.");

    private ConstraintSet<T> With(Condition<T> condition)
    {
        foreach (Condition<T> other in conditions)
        {
            bool bothPairs = condition.Kind == ConditionKind.Paired && other.Kind == ConditionKind.Paired;
            bool samePair = bothPairs
                && ((other.Name == condition.Name && other.Partner == condition.Partner)
                    || (other.Name == condition.Partner && other.Partner == condition.Name));
            bool neitherPair = condition.Kind != ConditionKind.Paired && other.Kind != ConditionKind.Paired;
            if (samePair || (neitherPair && other.Name == condition.Name && other.Target == condition.Target))
            {
                throw new ConflictingConditionsException(
                    $"There is {other} already, so there cannot be {condition} as well. Drop one of the two.");
            }
        }

        return new ConstraintSet<T>(Space, conditions.Add(condition));
    }
}
