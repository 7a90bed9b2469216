using System.Numerics;
using FemCore2D.Assembly;
using FemCore2D.Geometry;

namespace FemCore2D.Drawing;

/// <content>Vectors made from fields.</content>
public sealed partial class CellVector
{
    /// <summary>The gradient of a field, per metre.</summary>
    /// <param name="field">The field.</param>
    public static CellVector GradientOf(NodeField<double> field) =>
        From(field, gradient => new Vector2D(gradient.X, gradient.Y));

    /// <summary>The gradient of a complex field at an instant of its cycle: the real part of gradient times e^(j phase), per metre.</summary>
    /// <param name="field">The field, as a phasor.</param>
    /// <param name="phaseRadians">How far the cycle has come.</param>
    public static CellVector GradientAtPhase(NodeField<Complex> field, double phaseRadians = 0)
    {
        (double sine, double cosine) = Math.SinCos(phaseRadians);
        return From(field, gradient => new Vector2D(
            (gradient.X.Real * cosine) - (gradient.X.Imaginary * sine),
            (gradient.Y.Real * cosine) - (gradient.Y.Imaginary * sine)));
    }

    /// <summary>The multiple of a vector; by -1 the gradient of a potential becomes its field strength.</summary>
    /// <param name="vector">The vector.</param>
    /// <param name="factor">The factor.</param>
    public static CellVector operator *(double factor, CellVector vector)
    {
        ArgumentNullException.ThrowIfNull(vector);
        return new CellVector(vector.Mesh, vector.Degree, (cell, reference, values) =>
        {
            vector.Evaluator(cell, reference, values);
            foreach (ref Vector2D value in values)
                value = factor * value;
        });
    }

    /// <summary>The opposite vector.</summary>
    /// <param name="vector">The vector.</param>
    public static CellVector operator -(CellVector vector) => -1 * vector;

    private static CellVector From<T>(NodeField<T> field, Func<FieldVector<T>, Vector2D> part)
        where T : unmanaged, INumberBase<T>
    {
        ArgumentNullException.ThrowIfNull(field);
        Mesh mesh = field.Space.Mesh;

        // The gradient falls by a degree, but not on quadrilaterals and along arcs.
        bool isPlain = mesh.QuadrilateralCount == 0 && !mesh.HasArcs;
        return new CellVector(mesh, isPlain ? field.Space.Degree - 1 : field.Space.Degree, (cell, reference, values) =>
        {
            for (int i = 0; i < reference.Length; i++)
                values[i] = part(field.GradientIn(cell, reference[i]));
        });
    }
}
