using FemCore2D.Geometry;

namespace FemCore2D.Assembly;

/// <summary>Two conditions demand different things of the same place, or one is given twice.</summary>
public sealed class ConflictingConditionsException : FemCoreException
{
    /// <summary>Creates the exception with its message.</summary>
    public ConflictingConditionsException(string message)
        : base(message)
    {
    }

    /// <summary>Creates the exception with its message and cause.</summary>
    public ConflictingConditionsException(string message, Exception innerException)
        : base(message, innerException)
    {
    }
}
