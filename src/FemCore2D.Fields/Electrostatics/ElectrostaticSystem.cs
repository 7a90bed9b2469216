using System.Collections.Immutable;
using System.Diagnostics;
using FemCore2D.Assembly;
using FemCore2D.Sparse;

namespace FemCore2D.Fields;

/// <summary>The assembled and constrained equations of an <see cref="ElectrostaticProblem"/>.</summary>
internal sealed class ElectrostaticSystem
{
    private readonly ElectrostaticSetup setup;
    private readonly NodeSpace space;
    private readonly SparseMatrix<double> matrix;

    /// <summary>The matrix without thin layers, whose quadratic form is the energy of the field.</summary>
    private readonly SparseMatrix<double> fieldMatrix;
    private readonly double[] charges;
    private readonly SparseMatrix<double> reduced;
    private readonly SymmetricSolver solver;
    private readonly TimeSpan assemblyTime;

    /// <exception cref="IllPosedProblemException">The problem has no unique solution, or nothing to solve.</exception>
    public ElectrostaticSystem(
        ElectrostaticSetup setup,
        int rightHandSides,
        SolveSettings settings,
        IProgress<SolveProgress>? progress,
        CancellationToken cancellationToken)
    {
        this.setup = setup;
        Stopwatch clock = Stopwatch.StartNew();
        progress?.Report(new SolveProgress(SolveStage.Assembly, 0, rightHandSides, 0, 1));
        Permittivity?[] permittivities = PermittivitiesOf(setup);
        space = new NodeSpace(setup.Mesh, setup.Degree);
        Constraints = ConstraintsOf(setup, space);
        RefuseFloatingPotential(permittivities);
        RefuseChargeOnConductors();

        Assembler assembler = new(space);
        matrix = assembler.CreateMatrix<double>();
        assembler.Add(
            matrix,
            new TensorStiffness<double, PermittivityCoefficient>(new(permittivities, setup.Coordinates)),
            cancellationToken: cancellationToken);
        charges = ChargesOf(assembler, cancellationToken);
        fieldMatrix = matrix;
        if (!setup.Layers.IsEmpty)
        {
            matrix = matrix.Copy();
            AddLayers(assembler);
        }

        reduced = Constraints.Reduce(matrix);
        assemblyTime = clock.Elapsed;
        solver = new SymmetricSolver(reduced, rightHandSides, settings, progress);
    }

    /// <summary>The conditions as they were given.</summary>
    public ResolvedConstraints<double> Constraints { get; }

    /// <summary>Solves with the given conditions and charges.</summary>
    public ElectrostaticSolution Solve(CancellationToken cancellationToken)
    {
        (double[] free, double[] all) = SolveFor(Constraints, charges, cancellationToken);
        double[] residual = Constraints.Residual(matrix, charges, all);
        var states = setup.Conductors.ToImmutableSortedDictionary(
            conductor => conductor.Name,
            conductor => new ConductorState(
                Constraints.ValueOf(conductor.Name, free),
                conductor.Floats ? conductor.Value : Constraints.Reaction(conductor.Name, residual)));
        double energy = 0;
        double[] product = fieldMatrix.Multiply(all);
        for (int i = 0; i < all.Length; i++)
        {
            energy += 0.5 * all[i] * product[i];
        }

        return new ElectrostaticSolution(setup, new NodeField<double>(space, all), energy, states, Report());
    }

    /// <summary>
    /// The charges of the driven conductors for one volt on each in turn, without space or surface charges: Maxwell's
    /// matrix.
    /// </summary>
    public (double[,] Matrix, SolveReport Report) SolveCapacitances(
        ImmutableArray<string> driven, CancellationToken cancellationToken)
    {
        ResolvedConstraints<double> grounded = Constraints;
        foreach (Conductor conductor in setup.Conductors)
        {
            grounded = grounded.WithValue(conductor.Name, 0);
        }

        double[,] maxwell = new double[driven.Length, driven.Length];
        double[] none = new double[space.UnknownCount];
        for (int column = 0; column < driven.Length; column++)
        {
            ResolvedConstraints<double> drive = grounded.WithValue(driven[column], 1);
            (_, double[] all) = SolveFor(drive, none, cancellationToken);
            double[] residual = drive.Residual(matrix, none, all);
            for (int row = 0; row < driven.Length; row++)
            {
                maxwell[row, column] = drive.Reaction(driven[row], residual);
            }
        }

        return (maxwell, Report());
    }

    private (double[] Free, double[] All) SolveFor(
        ResolvedConstraints<double> constraints, double[] rightHandSide, CancellationToken cancellationToken)
    {
        double[] free = solver.Solve(constraints.Reduce(matrix, rightHandSide), cancellationToken);
        return (free, constraints.Expand(free));
    }

    private SolveReport Report() => new(
        reduced.RowCount,
        reduced.Pattern.EntryCount,
        solver.Name,
        solver.Iterations,
        solver.RelativeResidual,
        assemblyTime,
        solver.Time);

    private static Permittivity?[] PermittivitiesOf(ElectrostaticSetup setup)
    {
        bool[] conducting = setup.ConductingRegions();
        var permittivities = new Permittivity?[conducting.Length];
        for (int region = 0; region < conducting.Length; region++)
        {
            string name = setup.Mesh.RegionNames[region];
            if (!conducting[region])
            {
                permittivities[region] = setup.Dielectrics.TryGetValue(name, out Permittivity? permittivity)
                    ? permittivity
                    : throw new IllPosedProblemException(
                        $"The region '{name}' is neither a dielectric nor a conductor. Give it a permittivity (vacuum "
                        + "and air have 1), or make it a conductor.");
            }
        }

        return permittivities.All(permittivity => permittivity is null)
            ? throw new IllPosedProblemException(
                "All regions are conductors, so there is no field to solve for. Leave a region for a dielectric.")
            : permittivities;
    }

    private static ResolvedConstraints<double> ConstraintsOf(ElectrostaticSetup setup, NodeSpace space)
    {
        ConstraintSet<double> constraints = new(space);
        foreach (Conductor conductor in setup.Conductors)
        {
            constraints = (conductor.Kind, conductor.Floats) switch
            {
                (NamedPart.Region, false) => constraints.FixRegion(conductor.Name, conductor.Value),
                (NamedPart.Region, true) => constraints.FloatRegion(conductor.Name, conductor.Value),
                (_, false) => constraints.FixBoundary(conductor.Name, conductor.Value),
                _ => constraints.FloatBoundary(conductor.Name, conductor.Value),
            };
        }

        foreach (PrescribedPotential potential in setup.Potentials)
        {
            constraints = constraints.FixBoundary(potential.Boundary, potential.Function);
        }

        foreach (PairedBoundaries pair in setup.Pairs)
        {
            constraints = constraints.Pair(pair.Boundary, pair.Partner, pair.Opposite ? -1 : 1);
        }

        return constraints.Resolve();
    }

    private void RefuseFloatingPotential(Permittivity?[] permittivities)
    {
        int unfixed = Constraints.FindUnfixed(
            cell => permittivities[setup.Mesh.CellRegions[cell]] is not null,
            setup.Layers.Select(layer => layer.Boundary));
        if (unfixed >= 0)
        {
            throw new IllPosedProblemException(
                $"No potential is fixed in the part of the section around {space.NodePlaces[unfixed]}, so the potential "
                + "there is known only up to a constant. Give a conductor or boundary of that part a potential.");
        }
    }

    private void AddLayers(Assembler assembler)
    {
        foreach (ThinLayer layer in setup.Layers)
        {
            LayerCoefficient capacitance = new(layer.CapacitancePerArea, setup.Coordinates);
            assembler.AddOnBoundary<double, BoundaryMass<double, LayerCoefficient>>(
                matrix, new(capacitance), layer.Boundary);
            LayerCoefficient charge = new(layer.CapacitancePerArea * layer.Potential, setup.Coordinates);
            assembler.AddOnBoundary<double, BoundaryFlux<double, LayerCoefficient>>(
                charges, new(charge), layer.Boundary);
        }
    }

    /// <exception cref="ConflictingConditionsException">A charged boundary runs along a conductor.</exception>
    private void RefuseChargeOnConductors()
    {
        bool[] conducting = setup.ConductingRegions();
        foreach (ChargeDensity charge in setup.SurfaceCharges)
        {
            foreach (int edge in setup.Mesh.BoundaryEdges(charge.Name))
            {
                (int left, int right) = setup.Mesh.CellsOf(edge);
                if (IsConductor(left) || IsConductor(right))
                {
                    throw new ConflictingConditionsException(
                        $"The charged boundary '{charge.Name}' runs along a conductor at "
                        + $"{setup.Mesh.PointOnEdge(edge, 0.5)}, which takes the charge that its potential demands. Make "
                        + "it a floating conductor with that total charge instead.");
                }
            }
        }

        bool IsConductor(int cell) => cell >= 0 && conducting[setup.Mesh.CellRegions[cell]];
    }

    private double[] ChargesOf(Assembler assembler, CancellationToken cancellationToken)
    {
        double[] vector = assembler.CreateVector<double>();
        foreach (ChargeDensity charge in setup.SpaceCharges)
        {
            ChargeCoefficient coefficient = new(charge, setup.Mesh.RegionIndex(charge.Name), setup.Coordinates);
            assembler.Add<double, Source<double, ChargeCoefficient>>(
                vector, new(coefficient), cancellationToken: cancellationToken);
        }

        foreach (ChargeDensity charge in setup.SurfaceCharges)
        {
            ChargeCoefficient coefficient = new(charge, -1, setup.Coordinates);
            assembler.AddOnBoundary<double, BoundaryFlux<double, ChargeCoefficient>>(
                vector, new(coefficient), charge.Name);
        }

        return vector;
    }
}
