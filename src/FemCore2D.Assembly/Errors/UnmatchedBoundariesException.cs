using FemCore2D.Geometry;

namespace FemCore2D.Assembly;

/// <summary>Two boundaries that are to be paired do not carry the same vertices under a translation or rotation.</summary>
public sealed class UnmatchedBoundariesException : FemCoreException
{
    /// <summary>Creates the exception with its message.</summary>
    public UnmatchedBoundariesException(string message)
        : base(message)
    {
    }

    /// <summary>Creates the exception with its message and cause.</summary>
    public UnmatchedBoundariesException(string message, Exception innerException)
        : base(message, innerException)
    {
    }
}
