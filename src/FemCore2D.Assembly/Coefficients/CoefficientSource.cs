using FemCore2D.Geometry;

namespace FemCore2D.Assembly;

/// <summary>Where the values of a <see cref="Coefficient{TValue}"/> come from when they are not all the same.</summary>
internal abstract class CoefficientSource<TValue>
    where TValue : struct
{
    public abstract int DegreeIn(int region);

    public abstract TValue At(in CellPoint point);
}

/// <summary>One coefficient for each region.</summary>
internal sealed class RegionSource<TValue>(Coefficient<TValue>[] regions) : CoefficientSource<TValue>
    where TValue : struct
{
    public override int DegreeIn(int region) => regions[region].DegreeIn(region);

    public override TValue At(in CellPoint point) => regions[point.Region].At(point);
}

/// <summary>A function of place.</summary>
internal sealed class PlaceSource<TValue>(Func<Point2D, TValue> function, int degree) : CoefficientSource<TValue>
    where TValue : struct
{
    public override int DegreeIn(int region) => degree;

    public override TValue At(in CellPoint point) => function(point.Place);
}

/// <summary>A function of the value of a field.</summary>
internal sealed class FieldSource<TValue>(NodeField<double> field, Func<double, TValue> law, int degree)
    : CoefficientSource<TValue>
    where TValue : struct
{
    public override int DegreeIn(int region) => degree;

    public override TValue At(in CellPoint point) => law(field.ValueIn(point.Cell, point.Reference));
}

/// <summary>A function of the gradient of a field.</summary>
internal sealed class GradientSource<TValue>(
    NodeField<double> field, Func<FieldVector<double>, TValue> law, int degree) : CoefficientSource<TValue>
    where TValue : struct
{
    public override int DegreeIn(int region) => degree;

    public override TValue At(in CellPoint point) => law(field.GradientIn(point.Cell, point.Reference));
}
