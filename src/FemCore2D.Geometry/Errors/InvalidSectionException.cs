namespace FemCore2D.Geometry;

/// <summary>An outline or a cross-section is not one: open, self-crossing, of no extent, not finite, without any region, or with a name used twice.</summary>
public sealed class InvalidSectionException : FemCoreException
{
    /// <summary>Creates the exception with its message.</summary>
    public InvalidSectionException(string message)
        : base(message)
    {
    }

    /// <summary>Creates the exception with its message and cause.</summary>
    public InvalidSectionException(string message, Exception innerException)
        : base(message, innerException)
    {
    }
}
