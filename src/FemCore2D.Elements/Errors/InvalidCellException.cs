using FemCore2D.Geometry;

namespace FemCore2D.Elements;

/// <summary>The map of a cell folds over or collapses: its Jacobian is not positive somewhere in the cell.</summary>
public sealed class InvalidCellException : FemCoreException
{
    /// <summary>Creates the exception for a cell and a place in it.</summary>
    /// <param name="message">What is wrong and how it can be mended.</param>
    /// <param name="cell">The cell.</param>
    /// <param name="place">The place at which the Jacobian is not positive.</param>
    public InvalidCellException(string message, int cell, Point2D place)
        : base(message)
    {
        Cell = cell;
        Place = place;
    }

    /// <summary>The number of the cell in its mesh.</summary>
    public int Cell { get; }

    /// <summary>The place at which the Jacobian is not positive.</summary>
    public Point2D Place { get; }
}
