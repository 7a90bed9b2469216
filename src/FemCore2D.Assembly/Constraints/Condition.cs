using System.Numerics;
using FemCore2D.Geometry;

namespace FemCore2D.Assembly;

/// <summary>What a condition is laid upon.</summary>
internal enum ConditionTarget
{
    /// <summary>A named boundary.</summary>
    Boundary,

    /// <summary>A named region with its border.</summary>
    Region,

    /// <summary>A named point.</summary>
    Point,
}

/// <summary>What a condition demands.</summary>
internal enum ConditionKind
{
    /// <summary>The same given value all over the target.</summary>
    Fixed,

    /// <summary>A given function of place.</summary>
    FixedByPlace,

    /// <summary>The same value, not known before, with a given total.</summary>
    Floating,

    /// <summary>The value of another boundary times a factor.</summary>
    Paired,
}

/// <summary>A condition of a <see cref="ConstraintSet{T}"/>.</summary>
internal sealed record Condition<T>(string Name, ConditionTarget Target, ConditionKind Kind)
    where T : unmanaged, INumberBase<T>
{
    /// <summary>The value, the total or the factor.</summary>
    public T Value { get; init; }

    public Func<Point2D, T>? Function { get; init; }

    /// <summary>The second boundary of a pair.</summary>
    public string? Partner { get; init; }

    public override string ToString() => Kind switch
    {
        ConditionKind.Fixed => $"the value {Value} of '{Name}'",
        ConditionKind.FixedByPlace => $"the values along '{Name}'",
        ConditionKind.Floating => $"the floating '{Name}'",
        _ => $"the pair of '{Name}' and '{Partner}'",
    };
}
