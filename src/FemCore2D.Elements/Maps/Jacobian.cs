using FemCore2D.Geometry;

namespace FemCore2D.Elements;

/// <summary>The derivative of the map from a reference cell to a real cell, at a point.</summary>
/// <param name="Xi">The change of place for a unit step along the first reference coordinate.</param>
/// <param name="Eta">The change of place for a unit step along the second reference coordinate.</param>
public readonly record struct Jacobian(Vector2D Xi, Vector2D Eta)
{
    /// <summary>The ratio of real to reference area; positive in a valid cell.</summary>
    public double Determinant => Xi.Cross(Eta);

    /// <summary>Turns a step in reference coordinates into the step in the plane.</summary>
    public Vector2D ToRealStep(Vector2D reference) => (reference.X * Xi) + (reference.Y * Eta);

    /// <summary>Turns a step in the plane into the step in reference coordinates.</summary>
    public Vector2D ToReferenceStep(Vector2D real)
    {
        double inverse = 1 / Determinant;
        return new Vector2D(inverse * real.Cross(Eta), inverse * Xi.Cross(real));
    }

    /// <summary>Turns a gradient in reference coordinates into the gradient in real coordinates.</summary>
    public Vector2D ToRealGradient(Vector2D reference)
    {
        double inverse = 1 / Determinant;
        return new Vector2D(
            inverse * ((Eta.Y * reference.X) - (Xi.Y * reference.Y)),
            inverse * ((Xi.X * reference.Y) - (Eta.X * reference.X)));
    }
}
