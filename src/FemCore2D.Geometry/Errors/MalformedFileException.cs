namespace FemCore2D.Geometry;

/// <summary>A file or text that is read does not follow its format.</summary>
public sealed class MalformedFileException : FemCoreException
{
    /// <summary>Creates the exception for a place in a file.</summary>
    /// <param name="message">What is wrong there and what was expected.</param>
    /// <param name="line">The line, counted from 1, or 0 where it is not known.</param>
    /// <param name="innerException">The cause, if another exception tells it.</param>
    public MalformedFileException(string message, long line, Exception? innerException = null)
        : base(line > 0 ? $"Line {line}: {message}" : message, innerException!) => Line = line;

    /// <summary>The line of the fault, counted from 1, or 0 where it is not known.</summary>
    public long Line { get; }
}
