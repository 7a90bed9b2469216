using FemCore2D.Geometry;

namespace FemCore2D.Solvers;

/// <summary>The base of every failure of a solver; the message names the cause and the remedy.</summary>
public abstract class SolverException : FemCoreException
{
    /// <summary>Creates the exception with its message.</summary>
    protected SolverException(string message)
        : base(message)
    {
    }

    /// <summary>Creates the exception with its message and cause.</summary>
    protected SolverException(string message, Exception innerException)
        : base(message, innerException)
    {
    }
}
