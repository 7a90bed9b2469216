namespace FemCore2D.Sparse;

/// <summary>Which entries a Matrix Market file leaves out because others tell them.</summary>
public enum MatrixMarketSymmetry
{
    /// <summary>None.</summary>
    General,

    /// <summary>Those above the diagonal, which equal the mirrored ones.</summary>
    Symmetric,

    /// <summary>Those on the diagonal, which are zero, and above it, which are the negative of the mirrored ones.</summary>
    SkewSymmetric,

    /// <summary>Those above the diagonal, which are the conjugate of the mirrored ones.</summary>
    Hermitian,
}
