namespace FemCore2D.Solvers;

/// <summary>The numbers of positive and negative eigenvalues of a symmetric or Hermitian matrix.</summary>
/// <param name="Positive">The number of positive ones.</param>
/// <param name="Negative">The number of negative ones.</param>
/// <remarks>Equal to the signs of the block diagonal of a factorization, by Sylvester's law of inertia.</remarks>
public readonly record struct Inertia(int Positive, int Negative);
