namespace FemCore2D.Solvers;

/// <summary>A matrix that must be positive definite is not.</summary>
public sealed class NotPositiveDefiniteException : SolverException
{
    /// <summary>Creates the exception for an unknown.</summary>
    /// <param name="message">What was found there, and the remedy.</param>
    /// <param name="unknown">The unknown, from 0, at which it showed.</param>
    public NotPositiveDefiniteException(string message, int unknown)
        : base(message) => Unknown = unknown;

    /// <summary>The unknown, from 0, at which it showed.</summary>
    public int Unknown { get; }
}
