using FemCore2D.Geometry;

namespace FemCore2D.Elements;

/// <content>The inverse maps.</content>
public sealed partial class CellMaps
{
    private const int MaximumIterations = 50;

    /// <summary>Finds the reference point that a map sends to a place in (or near) a real cell.</summary>
    /// <param name="cell">The cell.</param>
    /// <param name="place">The place, in metres.</param>
    /// <param name="reference">Receives the point, in coordinates of the reference cell.</param>
    /// <returns>Whether the iteration converged; the point may lie outside the reference cell.</returns>
    /// <remarks>Newton's method from the centre, with steps halved until they bring the image nearer to the place.</remarks>
    public bool TryInvert(int cell, Point2D place, out Point2D reference)
    {
        Vector2D target = place - FirstVertexOf(cell);
        if (IsAffine(cell))
        {
            reference = Point2D.Origin + JacobianAt(cell, Point2D.Origin).ToReferenceStep(target);
            return reference.IsFinite;
        }

        reference = ReferenceCell.Centre(Mesh.KindOf(cell));
        Vector2D error = target - OffsetOf(cell, reference);
        double lastStep = double.PositiveInfinity;
        for (int iteration = 0; iteration < MaximumIterations; iteration++)
        {
            Jacobian jacobian = JacobianAt(cell, reference);
            Vector2D step = jacobian.ToReferenceStep(error);
            if (!double.IsFinite(step.X) || !double.IsFinite(step.Y))
            {
                return false;
            }

            // Below this the steps are rounding: they no longer shrink.
            double length = step.Length;
            if (length <= 4e-16 || (length < 1e-9 && length >= 0.5 * lastStep))
            {
                return jacobian.Determinant > 0;
            }

            if (!TryStep(cell, target, step, length < 1e-6, ref reference, ref error))
            {
                return false;
            }

            lastStep = length;
        }

        return false;
    }

    private bool TryStep(
        int cell, Vector2D target, Vector2D step, bool isLate, ref Point2D reference, ref Vector2D error)
    {
        for (double fraction = 1; fraction > 1e-4; fraction /= 2)
        {
            Point2D trial = reference + (fraction * step);
            Vector2D trialError = target - OffsetOf(cell, trial);
            if (isLate || trialError.LengthSquared < error.LengthSquared)
            {
                reference = trial;
                error = trialError;
                return true;
            }
        }

        return false;
    }
}
