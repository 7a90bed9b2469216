namespace FemCore2D.Solvers;

/// <summary>Which product of triangles a factorization is.</summary>
internal enum FactorKind
{
    /// <summary>L L^H of a positive definite matrix.</summary>
    Cholesky,

    /// <summary>L D L^T of a symmetric matrix, real or complex.</summary>
    Symmetric,

    /// <summary>L D L^H of a Hermitian matrix.</summary>
    Hermitian,

    /// <summary>P L U of any square matrix.</summary>
    General,
}
