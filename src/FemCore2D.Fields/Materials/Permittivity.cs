using FemCore2D.Assembly;
using FemCore2D.Geometry;

namespace FemCore2D.Fields;

/// <summary>
/// The relative permittivity of a dielectric: a number, a tensor, or a function of place. Immutable.
/// </summary>
public sealed class Permittivity
{
    private readonly Tensor2D<double> constant;
    private readonly Func<Point2D, Tensor2D<double>>? function;

    private Permittivity(Tensor2D<double> constant) => this.constant = constant;

    private Permittivity(Func<Point2D, Tensor2D<double>> function) => this.function = function;

    /// <summary>The permittivity of vacuum.</summary>
    public static Permittivity Vacuum { get; } = Isotropic(1);

    /// <summary>Whether it is the same everywhere in its region.</summary>
    public bool IsConstant => function is null;

    /// <summary>Whether it is that of vacuum.</summary>
    internal bool IsVacuum => IsConstant && constant == new Tensor2D<double>(1, 0, 0, 1);

    /// <summary>A dielectric that is the same in all directions.</summary>
    /// <param name="relative">The relative permittivity, positive.</param>
    /// <exception cref="ArgumentOutOfRangeException">The number is not positive and finite.</exception>
    public static Permittivity Isotropic(double relative)
    {
        if (!(relative > 0 && double.IsFinite(relative)))
        {
            throw new ArgumentOutOfRangeException(
                nameof(relative), relative, "A relative permittivity is a positive, finite number; vacuum has 1.");
        }

        return new Permittivity(new Tensor2D<double>(relative, 0, 0, relative));
    }

    /// <summary>A dielectric whose permittivity depends on direction.</summary>
    /// <param name="relative">The relative permittivity as a symmetric, positive definite tensor.</param>
    /// <exception cref="ArgumentException">The tensor is not symmetric and positive definite.</exception>
    public static Permittivity Anisotropic(Tensor2D<double> relative)
    {
        return IsPositiveDefinite(relative)
            ? new Permittivity(relative)
            : throw new ArgumentException(
                $"The relative permittivity {Describe(relative)} is not symmetric and positive definite. "
                + "Give finite principal values above zero.",
                nameof(relative));
    }

    /// <summary>A dielectric with two principal axes.</summary>
    /// <param name="first">The relative permittivity along the first principal axis.</param>
    /// <param name="second">The relative permittivity across it.</param>
    /// <param name="axisDegrees">The direction of the first principal axis, in degrees counterclockwise from the x axis.</param>
    /// <exception cref="ArgumentException">A number is not positive and finite.</exception>
    public static Permittivity Anisotropic(double first, double second, double axisDegrees = 0)
    {
        Vector2D axis = Vector2D.AtAngle(axisDegrees * (Math.PI / 180));
        double mixed = (first - second) * axis.X * axis.Y;
        return Anisotropic(new Tensor2D<double>(
            (first * axis.X * axis.X) + (second * axis.Y * axis.Y),
            mixed,
            mixed,
            (first * axis.Y * axis.Y) + (second * axis.X * axis.X)));
    }

    /// <summary>A dielectric that changes from place to place.</summary>
    /// <param name="relative">The relative permittivity at a point in metres; safe to call from many threads.</param>
    public static Permittivity OfPlace(Func<Point2D, double> relative)
    {
        ArgumentNullException.ThrowIfNull(relative);
        return new Permittivity(point =>
        {
            double value = relative(point);
            return new Tensor2D<double>(value, 0, 0, value);
        });
    }

    /// <summary>A dielectric that changes from place to place and with direction.</summary>
    /// <param name="relative">The relative permittivity at a point in metres; safe to call from many threads.</param>
    public static Permittivity OfPlace(Func<Point2D, Tensor2D<double>> relative)
    {
        ArgumentNullException.ThrowIfNull(relative);
        return new Permittivity(relative);
    }

    /// <summary>The relative permittivity at a point.</summary>
    /// <exception cref="IllPosedProblemException">A function of place gave a tensor that is not symmetric and positive definite.</exception>
    public Tensor2D<double> At(Point2D place)
    {
        if (function is null)
        {
            return constant;
        }

        Tensor2D<double> value = function(place);
        return IsPositiveDefinite(value)
            ? value
            : throw new IllPosedProblemException(
                $"The function for a relative permittivity gives {Describe(value)} at {place}, which is not symmetric and "
                + "positive definite. Give finite principal values above zero all over the region.");
    }

    private static bool IsPositiveDefinite(Tensor2D<double> relative)
    {
        double determinant = (relative.XX * relative.YY) - (relative.XY * relative.YX);
        bool symmetric = Math.Abs(relative.XY - relative.YX) <= 1e-12 * (Math.Abs(relative.XX) + Math.Abs(relative.YY));
        return symmetric && relative.XX > 0 && determinant > 0 && double.IsFinite(relative.XX + relative.YY);
    }

    private static string Describe(Tensor2D<double> relative) =>
        $"({relative.XX}, {relative.XY}; {relative.YX}, {relative.YY})";
}
