using System.Collections.Immutable;
using FemCore2D.Assembly;
using FemCore2D.Geometry;
using FemCore2D.Solvers;

namespace FemCore2D.Fields;

/// <content>Solving for a field, for capacitances, and for the parameters of a line.</content>
public sealed partial class ElectrostaticProblem
{
    /// <summary>Solves for the field of the given potentials and charges.</summary>
    /// <param name="settings">How to solve; the defaults if left out.</param>
    /// <param name="progress">Is told how far the work has come.</param>
    /// <param name="cancellationToken">Stops the work.</param>
    /// <exception cref="IllPosedProblemException">A region has no material, no potential is fixed, or all is conductor.</exception>
    /// <exception cref="ConflictingConditionsException">Conditions contradict each other where they meet.</exception>
    /// <exception cref="UnmatchedBoundariesException">Paired boundaries do not match.</exception>
    /// <exception cref="NotConvergedException">The iterations did not reach the tolerance.</exception>
    /// <exception cref="OperationCanceledException">The work was stopped.</exception>
    public ElectrostaticSolution Solve(
        SolveSettings? settings = null,
        IProgress<SolveProgress>? progress = null,
        CancellationToken cancellationToken = default) =>
        new ElectrostaticSystem(setup, 1, settings ?? new(), progress, cancellationToken).Solve(cancellationToken);

    /// <summary>
    /// Solves for the capacitances between conductors. One volt is put on each in turn; the others, all conductors not
    /// named and all prescribed potentials are ground; floating conductors that are not named float without charge.
    /// Space and surface charges do not count.
    /// </summary>
    /// <param name="conductors">The conductors, each with a given potential, whose value does not matter here.</param>
    /// <param name="settings">How to solve; the defaults if left out.</param>
    /// <param name="progress">Is told how far the work has come.</param>
    /// <param name="cancellationToken">Stops the work.</param>
    /// <exception cref="UnknownNameException">A name is not that of a conductor with a given potential.</exception>
    /// <exception cref="ArgumentException">No conductor is named, or one is named twice.</exception>
    /// <exception cref="IllPosedProblemException">A region has no material, no potential is fixed, or all is conductor.</exception>
    /// <exception cref="ConflictingConditionsException">Conditions contradict each other where they meet.</exception>
    /// <exception cref="UnmatchedBoundariesException">Paired boundaries do not match.</exception>
    /// <exception cref="NotConvergedException">The iterations did not reach the tolerance.</exception>
    /// <exception cref="OperationCanceledException">The work was stopped.</exception>
    public CapacitanceMatrix SolveCapacitances(
        IEnumerable<string> conductors,
        SolveSettings? settings = null,
        IProgress<SolveProgress>? progress = null,
        CancellationToken cancellationToken = default)
    {
        ArgumentNullException.ThrowIfNull(conductors);
        ImmutableArray<string> driven = [.. conductors];
        RefuseUnsuitable(driven);
        ElectrostaticSetup grounded = setup with
        {
            SpaceCharges = [],
            SurfaceCharges = [],
            Potentials = [.. setup.Potentials.Select(potential => potential with { Function = _ => 0 })],
            Layers = [.. setup.Layers.Select(layer => layer with { Potential = 0 })],
            Conductors = [.. setup.Conductors.Select(conductor => conductor with { Value = 0 })],
        };
        ElectrostaticSystem system = new(grounded, driven.Length, settings ?? new(), progress, cancellationToken);
        (double[,] maxwell, SolveReport report) = system.SolveCapacitances(driven, cancellationToken);
        return new CapacitanceMatrix(driven, maxwell, Coordinates, report);
    }

    /// <summary>
    /// Solves for the parameters of the line that a conductor forms with ground: its capacitance with the dielectrics
    /// and with vacuum in their place. All other conductors are ground; floating ones float without charge.
    /// </summary>
    /// <param name="conductor">The conductor that carries the signal.</param>
    /// <param name="settings">How to solve; the defaults if left out.</param>
    /// <param name="progress">Is told how far the work has come.</param>
    /// <param name="cancellationToken">Stops the work.</param>
    /// <exception cref="InvalidOperationException">The section is axisymmetric, so it is no line.</exception>
    /// <exception cref="UnknownNameException">The name is not that of a conductor with a given potential.</exception>
    /// <exception cref="IllPosedProblemException">A region has no material, no potential is fixed, or all is conductor.</exception>
    /// <exception cref="ConflictingConditionsException">Conditions contradict each other where they meet.</exception>
    /// <exception cref="UnmatchedBoundariesException">Paired boundaries do not match.</exception>
    /// <exception cref="NotConvergedException">The iterations did not reach the tolerance.</exception>
    /// <exception cref="OperationCanceledException">The work was stopped.</exception>
    public LineParameters SolveLine(
        string conductor,
        SolveSettings? settings = null,
        IProgress<SolveProgress>? progress = null,
        CancellationToken cancellationToken = default)
    {
        ArgumentNullException.ThrowIfNull(conductor);
        if (Coordinates != CoordinateSystem.Plane)
        {
            throw new InvalidOperationException("An axisymmetric section is a body, not a line. Use plane coordinates.");
        }

        double capacitance = CapacitanceOf(this);
        bool isVacuum = setup.Dielectrics.Values.All(permittivity => permittivity.IsVacuum);
        ElectrostaticProblem empty = new(setup with
        {
            Dielectrics = setup.Dielectrics.ToImmutableSortedDictionary(pair => pair.Key, _ => Permittivity.Vacuum),
        });
        return new LineParameters(capacitance, isVacuum ? capacitance : CapacitanceOf(empty));

        double CapacitanceOf(ElectrostaticProblem problem) => problem
            .SolveCapacitances([conductor], settings, progress, cancellationToken)
            .Maxwell(conductor, conductor);
    }

    private void RefuseUnsuitable(ImmutableArray<string> driven)
    {
        if (driven.IsEmpty)
        {
            throw new ArgumentException("Name at least one conductor.", nameof(driven));
        }

        foreach (string name in driven)
        {
            if (!setup.Conductors.Any(conductor => conductor.Name == name && !conductor.Floats))
            {
                throw new UnknownNameException(
                    "conductor with a given potential",
                    name,
                    setup.Conductors.Where(conductor => !conductor.Floats).Select(conductor => conductor.Name));
            }
        }

        string? twice = driven.GroupBy(name => name).FirstOrDefault(group => group.Count() > 1)?.Key;
        if (twice is not null)
        {
            throw new ArgumentException($"The conductor '{twice}' is named twice. Name each once.", nameof(driven));
        }
    }
}
