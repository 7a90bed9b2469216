using System.Collections.Immutable;
using FemCore2D.Assembly;
using FemCore2D.Geometry;

namespace FemCore2D.Fields;

/// <summary>The solution of an <see cref="ElectrostaticProblem"/>. Immutable, and safe to read from many threads.</summary>
public sealed class ElectrostaticSolution
{
    private readonly ElectrostaticSetup setup;
    private readonly ImmutableSortedDictionary<string, ConductorState> conductors;
    private readonly Lazy<double> relativeError;

    internal ElectrostaticSolution(
        ElectrostaticSetup setup,
        NodeField<double> potential,
        double energy,
        ImmutableSortedDictionary<string, ConductorState> conductors,
        SolveReport report)
    {
        this.setup = setup;
        this.conductors = conductors;
        Potential = potential;
        Energy = energy;
        Report = report;
        relativeError = new Lazy<double>(() => FluxRecovery.RelativeError(setup, potential));
    }

    /// <summary>The potential, in V, as a field on the mesh.</summary>
    public NodeField<double> Potential { get; }

    /// <summary>The energy of the electric field: in J/m for a plane section, in J for an axisymmetric one.</summary>
    public double Energy { get; }

    /// <summary>What the solution took.</summary>
    public SolveReport Report { get; }

    /// <summary>The names of the conductors.</summary>
    public IEnumerable<string> Conductors => conductors.Keys;

    /// <summary>
    /// An estimate of the relative error of the field in the energy norm; that of the energy, and of a capacitance
    /// derived from it, is about its square.
    /// </summary>
    /// <remarks>
    /// The flux density is averaged at the nodes of each region and compared with the one computed (Zienkiewicz and
    /// Zhu 1987). An indication, not a bound: near the true error where degree 1 meets a smooth field, of its order of
    /// magnitude for higher degrees, and low near edges where the field is singular. Computed at first use.
    /// </remarks>
    public double EstimatedRelativeFieldError => relativeError.Value;

    /// <summary>The potential at a place, in V.</summary>
    /// <exception cref="ArgumentOutOfRangeException">The place lies outside the mesh.</exception>
    public double PotentialAt(Point2D place) =>
        Potential.TryValueAt(place, out double value) ? value : throw Outside(place);

    /// <summary>The electric field at a place, in V/m; between cells, that of one of them.</summary>
    /// <exception cref="ArgumentOutOfRangeException">The place lies outside the mesh.</exception>
    public Vector2D FieldAt(Point2D place) =>
        Potential.TryGradientAt(place, out FieldVector<double> gradient)
            ? new Vector2D(-gradient.X, -gradient.Y)
            : throw Outside(place);

    /// <summary>Samples potential and field along a straight line, ends included.</summary>
    /// <param name="start">The first point, in metres.</param>
    /// <param name="end">The last point.</param>
    /// <param name="count">The number of points, at least 2.</param>
    /// <returns>The samples; points outside the mesh, such as in holes, have NaN for values.</returns>
    /// <exception cref="ArgumentOutOfRangeException">Fewer than two points are asked for.</exception>
    public ImmutableArray<LineSample> AlongLine(Point2D start, Point2D end, int count)
    {
        ArgumentOutOfRangeException.ThrowIfLessThan(count, 2);
        double length = start.DistanceTo(end);
        var samples = ImmutableArray.CreateBuilder<LineSample>(count);
        for (int i = 0; i < count; i++)
        {
            double fraction = (double)i / (count - 1);
            Point2D place = start.Towards(end, fraction);
            bool inside = Potential.TryValueAt(place, out double potential)
                & Potential.TryGradientAt(place, out FieldVector<double> gradient);
            samples.Add(inside
                ? new LineSample(fraction * length, place, potential, new Vector2D(-gradient.X, -gradient.Y))
                : new LineSample(fraction * length, place, double.NaN, new Vector2D(double.NaN, double.NaN)));
        }

        return samples.MoveToImmutable();
    }

    /// <summary>
    /// The total charge of a conductor, from the reaction to its potential and so as accurate as the energy: in C/m for
    /// a plane section, in C for an axisymmetric one.
    /// </summary>
    /// <param name="conductor">The name of the conductor.</param>
    /// <exception cref="UnknownNameException">There is no such conductor.</exception>
    public double ChargeOf(string conductor) => StateOf(conductor).Charge;

    /// <summary>The potential of a conductor, in V: the given one, or the one that a floating conductor has taken.</summary>
    /// <param name="conductor">The name of the conductor.</param>
    /// <exception cref="UnknownNameException">There is no such conductor.</exception>
    public double PotentialOf(string conductor) => StateOf(conductor).Potential;

    /// <summary>
    /// The strongest field in a region: the largest of those at the nodes of each cell, taken from inside the cell.
    /// </summary>
    /// <remarks>
    /// At a sharp edge of a conductor the field has no bound, and what is found there grows as the mesh is refined.
    /// </remarks>
    /// <param name="region">The region.</param>
    /// <exception cref="UnknownNameException">The mesh has no such region.</exception>
    public FieldPeak LargestField(string region)
    {
        double largest = -1;
        (int Cell, Point2D Reference, FieldVector<double> Gradient) where = default;
        foreach (int cell in setup.Mesh.CellsIn(region))
        {
            foreach (Point2D node in Potential.Space.ElementOn(setup.Mesh.KindOf(cell)).NodePoints)
            {
                FieldVector<double> gradient = Potential.GradientIn(cell, node);
                double square = (gradient.X * gradient.X) + (gradient.Y * gradient.Y);
                if (square > largest)
                {
                    largest = square;
                    where = (cell, node, gradient);
                }
            }
        }

        return new FieldPeak(
            region,
            Math.Sqrt(Math.Max(largest, 0)),
            Potential.Space.Maps.PlaceOf(where.Cell, where.Reference),
            new Vector2D(-where.Gradient.X, -where.Gradient.Y));
    }

    /// <summary>The strongest field in each region that is not a conductor, in the order of the mesh's regions.</summary>
    public ImmutableArray<FieldPeak> LargestFields()
    {
        bool[] conducting = setup.ConductingRegions();
        return [.. setup.Mesh.RegionNames.Where((_, region) => !conducting[region]).Select(LargestField)];
    }

    private static ArgumentOutOfRangeException Outside(Point2D place) => new(
        nameof(place), place, $"The point {place} lies outside the mesh. Choose one in a region of the section.");

    private ConductorState StateOf(string conductor)
    {
        ArgumentNullException.ThrowIfNull(conductor);
        return conductors.TryGetValue(conductor, out ConductorState state)
            ? state
            : throw new UnknownNameException("conductor", conductor, conductors.Keys);
    }
}

/// <summary>Potential and charge of a conductor.</summary>
internal readonly record struct ConductorState(double Potential, double Charge);
