using FemCore2D.Geometry;

namespace FemCore2D.Assembly;

/// <summary>Makes coefficients of the usual kinds. For a kind of one's own, implement <see cref="ICoefficient{TValue}"/>.</summary>
public static class Coefficient
{
    /// <summary>A value that is the same everywhere.</summary>
    public static Coefficient<TValue> Constant<TValue>(TValue value)
        where TValue : struct => new(value);

    /// <summary>One value for each region.</summary>
    /// <param name="mesh">The mesh that names the regions.</param>
    /// <param name="values">A value for each region by its name.</param>
    /// <exception cref="UnknownNameException">A name is not that of a region.</exception>
    /// <exception cref="ArgumentException">A region has no value.</exception>
    public static Coefficient<TValue> PerRegion<TValue>(Mesh mesh, IReadOnlyDictionary<string, TValue> values)
        where TValue : struct
    {
        ArgumentNullException.ThrowIfNull(values);
        return PerRegion(mesh, values.ToDictionary(pair => pair.Key, pair => Constant(pair.Value)));
    }

    /// <summary>One coefficient, of whatever kind, for each region.</summary>
    /// <param name="mesh">The mesh that names the regions.</param>
    /// <param name="coefficients">A coefficient for each region by its name.</param>
    /// <exception cref="UnknownNameException">A name is not that of a region.</exception>
    /// <exception cref="ArgumentException">A region has no coefficient.</exception>
    public static Coefficient<TValue> PerRegion<TValue>(
        Mesh mesh, IReadOnlyDictionary<string, Coefficient<TValue>> coefficients)
        where TValue : struct
    {
        ArgumentNullException.ThrowIfNull(mesh);
        ArgumentNullException.ThrowIfNull(coefficients);
        foreach (string name in coefficients.Keys)
        {
            _ = mesh.RegionIndex(name);
        }

        var regions = new Coefficient<TValue>[mesh.RegionNames.Length];
        for (int region = 0; region < regions.Length; region++)
        {
            string name = mesh.RegionNames[region];
            regions[region] = coefficients.TryGetValue(name, out Coefficient<TValue> coefficient)
                ? coefficient
                : throw new ArgumentException(
                    $"The region '{name}' has no coefficient. Give one to every region of the mesh.",
                    nameof(coefficients));
        }

        return new Coefficient<TValue>(new RegionSource<TValue>(regions));
    }

    /// <summary>A function of place.</summary>
    /// <param name="function">The function, of a point in metres.</param>
    /// <param name="degree">The degree of the polynomials that describe it well within a cell, at least 1.</param>
    /// <exception cref="ArgumentOutOfRangeException">The degree is below 1.</exception>
    public static Coefficient<TValue> OfPlace<TValue>(Func<Point2D, TValue> function, int degree = 3)
        where TValue : struct
    {
        ArgumentNullException.ThrowIfNull(function);
        ArgumentOutOfRangeException.ThrowIfLessThan(degree, 1);
        return new Coefficient<TValue>(new PlaceSource<TValue>(function, degree));
    }

    /// <summary>A function of the value of a field on the same mesh, such as a conductivity that depends on temperature.</summary>
    /// <param name="field">The field.</param>
    /// <param name="law">The value of the coefficient for a value of the field.</param>
    /// <param name="degree">The degree of the polynomials that describe the coefficient well within a cell; by default that of the field.</param>
    /// <exception cref="ArgumentOutOfRangeException">The degree is below 1.</exception>
    public static Coefficient<TValue> OfField<TValue>(
        NodeField<double> field, Func<double, TValue> law, int? degree = null)
        where TValue : struct
    {
        ArgumentNullException.ThrowIfNull(field);
        ArgumentNullException.ThrowIfNull(law);
        int chosen = degree ?? field.Space.Degree;
        ArgumentOutOfRangeException.ThrowIfLessThan(chosen, 1, nameof(degree));
        return new Coefficient<TValue>(new FieldSource<TValue>(field, law, chosen));
    }

    /// <summary>A function of the gradient of a field on the same mesh, such as a permeability that saturates.</summary>
    /// <param name="field">The field.</param>
    /// <param name="law">The value of the coefficient for a gradient of the field.</param>
    /// <param name="degree">The degree of the polynomials that describe the coefficient well within a cell; by default that of the field.</param>
    /// <exception cref="ArgumentOutOfRangeException">The degree is below 1.</exception>
    public static Coefficient<TValue> OfGradient<TValue>(
        NodeField<double> field, Func<FieldVector<double>, TValue> law, int? degree = null)
        where TValue : struct
    {
        ArgumentNullException.ThrowIfNull(field);
        ArgumentNullException.ThrowIfNull(law);
        int chosen = degree ?? field.Space.Degree;
        ArgumentOutOfRangeException.ThrowIfLessThan(chosen, 1, nameof(degree));
        return new Coefficient<TValue>(new GradientSource<TValue>(field, law, chosen));
    }
}
