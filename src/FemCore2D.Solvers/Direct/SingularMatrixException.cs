namespace FemCore2D.Solvers;

/// <summary>A matrix is singular to the precision of the machine: there is no solution, or no single one.</summary>
public sealed class SingularMatrixException : SolverException
{
    /// <summary>Creates the exception for an unknown.</summary>
    /// <param name="message">What was found there, and the remedy.</param>
    /// <param name="unknown">The unknown, from 0, at which it showed.</param>
    public SingularMatrixException(string message, int unknown)
        : base(message) => Unknown = unknown;

    /// <summary>The unknown, from 0, at which it showed.</summary>
    public int Unknown { get; }
}
