using FemCore2D.Geometry;

namespace FemCore2D.Fields;

/// <summary>
/// A problem has no solution or more than one as it is described: a region without material, a material or source that
/// makes no sense, a potential fixed nowhere, nothing but conductors.
/// </summary>
public sealed class IllPosedProblemException : FemCoreException
{
    /// <summary>Creates the exception with its message.</summary>
    public IllPosedProblemException(string message)
        : base(message)
    {
    }

    /// <summary>Creates the exception with its message and cause.</summary>
    public IllPosedProblemException(string message, Exception innerException)
        : base(message, innerException)
    {
    }
}
