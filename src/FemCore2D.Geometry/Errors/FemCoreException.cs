namespace FemCore2D.Geometry;

/// <summary>
/// The base of every failure that the library reports about what it was asked to do.
/// The message names the object, the place and the remedy.
/// </summary>
public abstract class FemCoreException : Exception
{
    /// <summary>Creates the exception with its message.</summary>
    protected FemCoreException(string message)
        : base(message)
    {
    }

    /// <summary>Creates the exception with its message and cause.</summary>
    protected FemCoreException(string message, Exception innerException)
        : base(message, innerException)
    {
    }
}
