using FemCore2D.Geometry;

namespace FemCore2D.Drawing;

/// <summary>A figure cannot be drawn as described: nothing to draw, no extent, or no room left for its panels.</summary>
public sealed class InvalidFigureException : FemCoreException
{
    /// <summary>Creates the exception with its message.</summary>
    public InvalidFigureException(string message)
        : base(message)
    {
    }

    /// <summary>Creates the exception with its message and cause.</summary>
    public InvalidFigureException(string message, Exception innerException)
        : base(message, innerException)
    {
    }
}
