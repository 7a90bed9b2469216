namespace FemCore2D.Geometry;

/// <summary>A section cannot be meshed as asked: the sizes need more cells than the limit allows, or paired boundaries do not match.</summary>
public sealed class MeshingException : FemCoreException
{
    /// <summary>Creates the exception with its message.</summary>
    public MeshingException(string message)
        : base(message)
    {
    }

    /// <summary>Creates the exception with its message and cause.</summary>
    public MeshingException(string message, Exception innerException)
        : base(message, innerException)
    {
    }
}
