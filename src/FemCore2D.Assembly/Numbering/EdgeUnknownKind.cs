namespace FemCore2D.Assembly;

/// <summary>What several unknowns on one edge are, and so how a cell that runs against the edge sees them.</summary>
public enum EdgeUnknownKind
{
    /// <summary>Values at points along the edge: a cell that runs against the edge lists them in reverse order.</summary>
    Points,

    /// <summary>
    /// Moments along the edge: every cell lists them in the same order, and a cell that runs against the edge changes
    /// the signs that its element names; see <see cref="Numbering.ReversedEdges"/>.
    /// </summary>
    Moments,
}
