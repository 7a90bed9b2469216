namespace FemCore2D.Sparse;

/// <summary>The numbers that a Matrix Market file holds.</summary>
public enum MatrixMarketField
{
    /// <summary>Real numbers.</summary>
    Real,

    /// <summary>Whole numbers; the word in the file is integer.</summary>
    Whole,

    /// <summary>Complex numbers, as real and imaginary part.</summary>
    Complex,

    /// <summary>No numbers, only places; read as ones.</summary>
    Pattern,
}
