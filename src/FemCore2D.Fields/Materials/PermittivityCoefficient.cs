using FemCore2D.Assembly;
using FemCore2D.Geometry;

namespace FemCore2D.Fields;

/// <summary>
/// The absolute permittivity of every region in F/m, zero in conductors; in axisymmetric sections times the
/// circumference at each point.
/// </summary>
internal readonly struct PermittivityCoefficient(Permittivity?[] regions, CoordinateSystem coordinates)
    : ICoefficient<Tensor2D<double>>
{
    /// <summary>Enough for a material that changes smoothly within a cell.</summary>
    private const int DegreeOfPlace = 3;

    public int DegreeIn(int region)
    {
        Permittivity? permittivity = regions[region];
        if (permittivity is null)
        {
            return 0;
        }

        int axial = coordinates == CoordinateSystem.Axisymmetric ? 1 : 0;
        return axial + (permittivity.IsConstant ? 0 : DegreeOfPlace);
    }

    public Tensor2D<double> At(in CellPoint point)
    {
        Permittivity? permittivity = regions[point.Region];
        if (permittivity is null)
        {
            return default;
        }

        double factor = PhysicalConstants.ElectricConstant * Measure.At(point.Place, coordinates);
        Tensor2D<double> relative = permittivity.At(point.Place);
        return new Tensor2D<double>(
            factor * relative.XX, factor * relative.XY, factor * relative.YX, factor * relative.YY);
    }
}

/// <summary>A charge density; in axisymmetric sections times the circumference at each point.</summary>
internal readonly struct ChargeCoefficient(
    ChargeDensity charge, int targetRegion, CoordinateSystem coordinates) : ICoefficient<double>
{
    private const int DegreeOfPlace = 3;

    public int DegreeIn(int region)
    {
        int axial = coordinates == CoordinateSystem.Axisymmetric ? 1 : 0;
        return axial + (charge.Function is null ? 0 : DegreeOfPlace);
    }

    public double At(in CellPoint point)
    {
        if (targetRegion >= 0 && point.Region != targetRegion)
        {
            return 0;
        }

        double density = charge.Function is null ? charge.Value : charge.Function(point.Place);
        return double.IsFinite(density)
            ? density * Measure.At(point.Place, coordinates)
            : throw new IllPosedProblemException(
                $"The charge density of '{charge.Name}' at {point.Place} is {density}. "
                + "Give a function with finite values all over it.");
    }
}

/// <summary>A constant; in axisymmetric sections times the circumference at each point.</summary>
internal readonly struct LayerCoefficient(double value, CoordinateSystem coordinates) : ICoefficient<double>
{
    public int DegreeIn(int region) => coordinates == CoordinateSystem.Axisymmetric ? 1 : 0;

    public double At(in CellPoint point) => value * Measure.At(point.Place, coordinates);
}

/// <summary>What a point of a section stands for in the third dimension.</summary>
internal static class Measure
{
    /// <summary>One metre of length in a plane section, the circumference in an axisymmetric one.</summary>
    public static double At(Point2D place, CoordinateSystem coordinates) =>
        coordinates == CoordinateSystem.Plane ? 1 : 2 * Math.PI * place.X;
}
