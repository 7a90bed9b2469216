namespace FemCore2D.Sparse;

/// <summary>How a Matrix Market file lays out the entries of a matrix.</summary>
public enum MatrixMarketLayout
{
    /// <summary>Row, column and value of each stored entry.</summary>
    Coordinate,

    /// <summary>The values of all entries, column after column.</summary>
    Array,
}
