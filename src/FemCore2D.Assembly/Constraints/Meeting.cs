using System.Numerics;
using FemCore2D.Sparse;

namespace FemCore2D.Assembly;

/// <summary>An unknown that two conditions fix, directly or through pairs: they must agree there.</summary>
/// <param name="First">The condition that fixed it first.</param>
/// <param name="Second">The other condition.</param>
/// <param name="Unknown">The unknown, a target of the second.</param>
/// <param name="FirstFactor">What the first gives there: a multiple of its value, or the value of its function itself.</param>
/// <param name="SecondFactor">What the second gives there, likewise.</param>
/// <param name="FunctionScale">The largest magnitude of the functions of the two, zero if they have none.</param>
internal readonly record struct Meeting<T>(
    int First, int Second, int Unknown, T FirstFactor, T SecondFactor, double FunctionScale)
    where T : unmanaged, INumberBase<T>
{
    // Values that are meant to be equal may come out of different formulas.
    private const double Tolerance = 1e-10;

    public T FirstValue(Condition<T> first) => Value(first, FirstFactor);

    public T SecondValue(Condition<T> second) => Value(second, SecondFactor);

    /// <summary>Whether the values agree, to the rounding of the largest values of the two conditions.</summary>
    public bool Agrees(Condition<T> first, Condition<T> second)
    {
        double scale = Math.Max(FunctionScale, Math.Max(ScaleOf(first), ScaleOf(second)));
        return Scalar.Magnitude(FirstValue(first) - SecondValue(second)) <= Tolerance * scale;
    }

    private static T Value(Condition<T> condition, T factor) =>
        condition.Kind == ConditionKind.Fixed ? factor * condition.Value : factor;

    private static double ScaleOf(Condition<T> condition) =>
        condition.Kind == ConditionKind.Fixed ? Scalar.Magnitude(condition.Value) : 0;
}
