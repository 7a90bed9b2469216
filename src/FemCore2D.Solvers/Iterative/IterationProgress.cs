namespace FemCore2D.Solvers;

/// <summary>How far an iterative solver has come.</summary>
/// <param name="Iteration">The number of iterations done.</param>
/// <param name="RelativeResidual">The residual relative to the right-hand side, in the Euclidean norm.</param>
public readonly record struct IterationProgress(int Iteration, double RelativeResidual);
