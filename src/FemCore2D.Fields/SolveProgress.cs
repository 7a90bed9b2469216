namespace FemCore2D.Fields;

/// <summary>The stage of a solution.</summary>
public enum SolveStage
{
    /// <summary>The matrix and right-hand sides are being computed.</summary>
    Assembly,

    /// <summary>The system is being solved.</summary>
    Solver,
}

/// <summary>How far a solution has come.</summary>
/// <param name="Stage">The stage.</param>
/// <param name="RightHandSide">The right-hand side that is being solved for, counted from 0.</param>
/// <param name="RightHandSides">The number of right-hand sides.</param>
/// <param name="Iterations">The iterations done for this right-hand side.</param>
/// <param name="RelativeResidual">The relative residual reached, 1 at the start.</param>
public readonly record struct SolveProgress(
    SolveStage Stage, int RightHandSide, int RightHandSides, int Iterations, double RelativeResidual);
