namespace FemCore2D.Fields;

/// <summary>What the solution of a problem took.</summary>
/// <param name="Unknowns">The number of unknowns that were solved for, after all conditions.</param>
/// <param name="MatrixEntries">The number of stored entries of their matrix.</param>
/// <param name="Solver">The solver that was used.</param>
/// <param name="Iterations">The iterations that it took, summed over all right-hand sides.</param>
/// <param name="RelativeResidual">The largest relative residual of all right-hand sides.</param>
/// <param name="AssemblyTime">The time for the matrix and the right-hand sides.</param>
/// <param name="SolverTime">The time for solving.</param>
public sealed record SolveReport(
    int Unknowns,
    int MatrixEntries,
    string Solver,
    int Iterations,
    double RelativeResidual,
    TimeSpan AssemblyTime,
    TimeSpan SolverTime)
{
    /// <inheritdoc/>
    public override string ToString() => string.Create(
        null,
        $"{Unknowns} unknowns, {MatrixEntries} entries; assembled in {AssemblyTime.TotalSeconds:0.00} s, "
        + $"solved by {Solver} in {SolverTime.TotalSeconds:0.00} s with {Iterations} iterations to {RelativeResidual:0.0e+0}");
}
