namespace FemCore2D.Solvers;

/// <summary>Why an iterative solver stopped.</summary>
public enum StopReason
{
    /// <summary>The residual, computed anew from the solution, meets the tolerance.</summary>
    Converged,

    /// <summary>The limit of iterations was reached.</summary>
    IterationLimit,

    /// <summary>A direction was found in which the matrix is not positive.</summary>
    NotPositiveDefinite,

    /// <summary>A residual was found on which the preconditioner is not positive.</summary>
    PreconditionerNotPositiveDefinite,

    /// <summary>A number overflowed or was not a number from the start.</summary>
    NotFinite,

    /// <summary>The right-hand side is not zero, but so small that its squares vanish in double precision.</summary>
    Underflow,

    /// <summary>The residual no longer falls: rounding, or a system without a solution, bounds it.</summary>
    Stagnation,
}
