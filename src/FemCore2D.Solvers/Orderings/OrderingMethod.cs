namespace FemCore2D.Solvers;

/// <summary>How the order in which unknowns are eliminated is found.</summary>
public enum OrderingMethod
{
    /// <summary>Chosen from the size of the matrix and from what is known about it.</summary>
    Automatic,

    /// <summary>The order of the matrix.</summary>
    Natural,

    /// <summary>Approximate minimum degree: always the unknown next that has nearly the fewest neighbours left.</summary>
    MinimumDegree,

    /// <summary>Nested dissection of the graph of the matrix by multilevel bisection.</summary>
    NestedDissection,

    /// <summary>Nested dissection by the points that the unknowns belong to.</summary>
    CoordinateDissection,
}
