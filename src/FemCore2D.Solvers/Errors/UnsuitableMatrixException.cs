namespace FemCore2D.Solvers;

/// <summary>A matrix is not of the class that a solver is made for, such as Hermitian.</summary>
public sealed class UnsuitableMatrixException : SolverException
{
    /// <summary>Creates the exception with its message.</summary>
    public UnsuitableMatrixException(string message)
        : base(message)
    {
    }

    /// <summary>Creates the exception with its message and cause.</summary>
    public UnsuitableMatrixException(string message, Exception innerException)
        : base(message, innerException)
    {
    }
}
