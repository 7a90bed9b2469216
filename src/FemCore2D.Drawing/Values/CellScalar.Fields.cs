using System.Numerics;
using FemCore2D.Assembly;

namespace FemCore2D.Drawing;

/// <content>Scalars made from fields.</content>
public sealed partial class CellScalar
{
    /// <summary>The values of a field.</summary>
    /// <param name="field">The field.</param>
    public static CellScalar Of(NodeField<double> field) => From(field, value => value);

    /// <summary>The values of a complex field at an instant of its cycle: the real part of field times e^(j phase).</summary>
    /// <param name="field">The field, as a phasor.</param>
    /// <param name="phaseRadians">How far the cycle has come.</param>
    public static CellScalar AtPhase(NodeField<Complex> field, double phaseRadians = 0)
    {
        (double sine, double cosine) = Math.SinCos(phaseRadians);
        return From(field, value => (value.Real * cosine) - (value.Imaginary * sine));
    }

    /// <summary>The absolute value of a complex field.</summary>
    /// <param name="field">The field, as a phasor.</param>
    public static CellScalar MagnitudeOf(NodeField<Complex> field) => From(field, Complex.Abs);

    /// <summary>The phase of a complex field, from -180 to 180 degrees; for a cyclic colour scale with that range.</summary>
    /// <param name="field">The field, as a phasor.</param>
    public static CellScalar PhaseDegreesOf(NodeField<Complex> field) => From(field, value => value.Phase * 180 / Math.PI);

    private static CellScalar From<T>(NodeField<T> field, Func<T, double> part)
        where T : unmanaged, INumberBase<T>
    {
        ArgumentNullException.ThrowIfNull(field);
        return new CellScalar(field.Space.Mesh, field.Space.Degree, (cell, reference, values) =>
        {
            for (int i = 0; i < reference.Length; i++)
                values[i] = part(field.ValueIn(cell, reference[i]));
        })
        {
            IsContinuous = true,
        };
    }
}
