namespace FemCore2D.Solvers;

/// <summary>Which class of matrices a direct factorization is made for.</summary>
public enum FactorizationKind
{
    /// <summary>Symmetric or Hermitian positive definite: L L^H. The fastest.</summary>
    Cholesky,

    /// <summary>Symmetric or Hermitian indefinite, or complex symmetric: L D L^T or L D L^H, with blocks of one or two in D.</summary>
    Symmetric,

    /// <summary>Any square matrix: P L U on the pattern of A + A^T.</summary>
    General,
}
