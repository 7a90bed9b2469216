using FemCore2D.Assembly;
using FemCore2D.Geometry;

namespace FemCore2D.Fields;

/// <summary>
/// Electrostatics on a cross-section: dielectrics, charges and conductors, described by the names of the mesh.
/// Immutable; each call returns the problem with one thing more.
/// </summary>
/// <remarks>
/// <para>The potential obeys div(ε grad φ) = -ρ. On outer boundaries without any condition no field line leaves the
/// section, which is also the condition of a symmetry plane between equal halves.</para>
/// <para>A conductor is a region (its inside is left out of the energy) or a boundary, such as a sheet or the edge of
/// a hole.</para>
/// </remarks>
public sealed partial class ElectrostaticProblem
{
    private readonly ElectrostaticSetup setup;

    /// <summary>Starts a problem on a mesh.</summary>
    /// <param name="mesh">The mesh.</param>
    /// <param name="degree">The degree of the node elements: 1 to 5, at most 3 where the mesh has quadrilaterals.</param>
    /// <param name="coordinates">What the section stands for in space.</param>
    /// <exception cref="ArgumentOutOfRangeException">The degree is not available on the mesh.</exception>
    /// <exception cref="IllPosedProblemException">The section is axisymmetric and has a part left of the axis.</exception>
    public ElectrostaticProblem(Mesh mesh, int degree = 2, CoordinateSystem coordinates = CoordinateSystem.Plane)
    {
        ArgumentNullException.ThrowIfNull(mesh);
        int highest = mesh.QuadrilateralCount > 0 ? 3 : 5;
        if (degree < 1 || degree > highest)
        {
            throw new ArgumentOutOfRangeException(
                nameof(degree), degree, $"Node elements on this mesh have a degree from 1 to {highest}.");
        }

        if (coordinates == CoordinateSystem.Axisymmetric)
        {
            CheckAxis(mesh);
        }

        setup = new ElectrostaticSetup(mesh, degree, coordinates);
    }

    private ElectrostaticProblem(ElectrostaticSetup setup) => this.setup = setup;

    /// <summary>The mesh.</summary>
    public Mesh Mesh => setup.Mesh;

    /// <summary>The degree of the node elements.</summary>
    public int Degree => setup.Degree;

    /// <summary>What the section stands for in space.</summary>
    public CoordinateSystem Coordinates => setup.Coordinates;

    /// <summary>Fills a region with a dielectric that is the same in all places and directions.</summary>
    /// <param name="region">The region.</param>
    /// <param name="relativePermittivity">The relative permittivity, positive.</param>
    /// <exception cref="UnknownNameException">The mesh has no such region.</exception>
    /// <exception cref="ArgumentOutOfRangeException">The permittivity is not positive and finite.</exception>
    /// <exception cref="ConflictingConditionsException">The region has a dielectric already, or is a conductor.</exception>
    public ElectrostaticProblem WithDielectric(string region, double relativePermittivity) =>
        WithDielectric(region, Permittivity.Isotropic(relativePermittivity));

    /// <summary>Fills a region with a dielectric.</summary>
    /// <param name="region">The region.</param>
    /// <param name="permittivity">The relative permittivity.</param>
    /// <exception cref="UnknownNameException">The mesh has no such region.</exception>
    /// <exception cref="ConflictingConditionsException">The region has a dielectric already, or is a conductor.</exception>
    public ElectrostaticProblem WithDielectric(string region, Permittivity permittivity)
    {
        ArgumentNullException.ThrowIfNull(permittivity);
        _ = Mesh.RegionIndex(region);
        if (setup.Dielectrics.ContainsKey(region))
        {
            throw new ConflictingConditionsException(
                $"The region '{region}' has a dielectric already. Give it one only.");
        }

        RefuseConductor(region, "cannot be a dielectric as well");
        return new(setup with { Dielectrics = setup.Dielectrics.Add(region, permittivity) });
    }

    /// <summary>Puts a uniform charge into a region.</summary>
    /// <param name="region">The region.</param>
    /// <param name="density">The charge density, in C/m³.</param>
    /// <exception cref="UnknownNameException">The mesh has no such region.</exception>
    /// <exception cref="ArgumentOutOfRangeException">The density is not finite.</exception>
    /// <exception cref="ConflictingConditionsException">The region is a conductor, or has a charge already.</exception>
    public ElectrostaticProblem WithSpaceCharge(string region, double density) =>
        AddSpaceCharge(new ChargeDensity(region, null, Finite(density, nameof(density))));

    /// <summary>Puts a charge into a region.</summary>
    /// <param name="region">The region.</param>
    /// <param name="density">The charge density at a point, in C/m³; safe to call from many threads.</param>
    /// <exception cref="UnknownNameException">The mesh has no such region.</exception>
    /// <exception cref="ConflictingConditionsException">The region is a conductor, or has a charge already.</exception>
    public ElectrostaticProblem WithSpaceCharge(string region, Func<Point2D, double> density)
    {
        ArgumentNullException.ThrowIfNull(density);
        return AddSpaceCharge(new ChargeDensity(region, density, 0));
    }

    /// <summary>Puts a uniform charge on a boundary.</summary>
    /// <param name="boundary">The boundary, inside the section or around it.</param>
    /// <param name="density">The charge density, in C/m².</param>
    /// <exception cref="UnknownNameException">The mesh has no such boundary.</exception>
    /// <exception cref="ArgumentOutOfRangeException">The density is not finite.</exception>
    /// <exception cref="ConflictingConditionsException">The boundary is a conductor, or has a charge already.</exception>
    public ElectrostaticProblem WithSurfaceCharge(string boundary, double density) =>
        AddSurfaceCharge(new ChargeDensity(boundary, null, Finite(density, nameof(density))));

    /// <summary>Puts a charge on a boundary.</summary>
    /// <param name="boundary">The boundary, inside the section or around it.</param>
    /// <param name="density">The charge density at a point, in C/m²; safe to call from many threads.</param>
    /// <exception cref="UnknownNameException">The mesh has no such boundary.</exception>
    /// <exception cref="ConflictingConditionsException">The boundary is a conductor, or has a charge already.</exception>
    public ElectrostaticProblem WithSurfaceCharge(string boundary, Func<Point2D, double> density)
    {
        ArgumentNullException.ThrowIfNull(density);
        return AddSurfaceCharge(new ChargeDensity(boundary, density, 0));
    }

    /// <summary>Makes a region or a boundary a conductor at a given potential.</summary>
    /// <param name="name">The region or the boundary.</param>
    /// <param name="potential">The potential, in V.</param>
    /// <exception cref="UnknownNameException">The mesh has neither such a region nor such a boundary.</exception>
    /// <exception cref="ArgumentOutOfRangeException">The potential is not finite.</exception>
    /// <exception cref="ConflictingConditionsException">It has a condition or a material already.</exception>
    public ElectrostaticProblem WithConductor(string name, double potential = 0) =>
        AddConductor(new Conductor(name, PartOf(name), false, Finite(potential, nameof(potential))));

    /// <summary>Makes a region or a boundary a conductor that floats, with a given total charge.</summary>
    /// <param name="name">The region or the boundary.</param>
    /// <param name="charge">Its total charge: in C/m for a plane section, in C for an axisymmetric one.</param>
    /// <exception cref="UnknownNameException">The mesh has neither such a region nor such a boundary.</exception>
    /// <exception cref="ArgumentOutOfRangeException">The charge is not finite.</exception>
    /// <exception cref="ConflictingConditionsException">It has a condition or a material already.</exception>
    public ElectrostaticProblem WithFloatingConductor(string name, double charge = 0) =>
        AddConductor(new Conductor(name, PartOf(name), true, Finite(charge, nameof(charge))));

    /// <summary>Gives the potential along a boundary.</summary>
    /// <param name="boundary">The boundary.</param>
    /// <param name="potential">The potential at a point, in V.</param>
    /// <exception cref="UnknownNameException">The mesh has no such boundary.</exception>
    /// <exception cref="ConflictingConditionsException">The boundary has a condition already.</exception>
    public ElectrostaticProblem WithPotential(string boundary, Func<Point2D, double> potential)
    {
        ArgumentNullException.ThrowIfNull(potential);
        _ = Mesh.BoundaryEdges(boundary);
        RefuseConductor(boundary, "cannot have a potential that changes along it");
        RefuseCondition(boundary);
        return new(setup with { Potentials = setup.Potentials.Add(new PrescribedPotential(boundary, potential)) });
    }

    /// <summary>
    /// Covers a boundary with a dielectric layer too thin to mesh, behind which lies a conductor at a given potential: a
    /// Robin condition. Neither the layer's energy nor the charge of that conductor is counted.
    /// </summary>
    /// <param name="boundary">The boundary.</param>
    /// <param name="capacitancePerArea">The capacitance of the layer, its permittivity over its thickness, in F/m².</param>
    /// <param name="potential">The potential of the conductor behind it, in V.</param>
    /// <exception cref="UnknownNameException">The mesh has no such boundary.</exception>
    /// <exception cref="ArgumentOutOfRangeException">The capacitance is not positive and finite, or the potential is not finite.</exception>
    /// <exception cref="ConflictingConditionsException">The boundary has a condition already.</exception>
    public ElectrostaticProblem WithThinLayer(string boundary, double capacitancePerArea, double potential = 0)
    {
        _ = Mesh.BoundaryEdges(boundary);
        if (!(capacitancePerArea > 0))
        {
            throw new ArgumentOutOfRangeException(
                nameof(capacitancePerArea), capacitancePerArea, "A layer has a positive, finite capacitance per area.");
        }

        RefuseConductor(boundary, "cannot be covered by a layer");
        RefuseCondition(boundary);
        ThinLayer layer = new(
            boundary, Finite(capacitancePerArea, nameof(capacitancePerArea)), Finite(potential, nameof(potential)));
        return new(setup with { Layers = setup.Layers.Add(layer) });
    }

    /// <summary>
    /// Makes the section one cell of a periodic row: the potential on one boundary is that on its partner.
    /// </summary>
    /// <param name="boundary">The first boundary.</param>
    /// <param name="partner">The second boundary, with matching vertices (see <see cref="MeshOptions"/>).</param>
    /// <exception cref="UnknownNameException">The mesh has no such boundary.</exception>
    /// <exception cref="ConflictingConditionsException">A boundary has a condition already.</exception>
    public ElectrostaticProblem WithPeriodicity(string boundary, string partner) =>
        AddPair(new PairedBoundaries(boundary, partner, false));

    /// <summary>
    /// Makes the section half a cell of a periodic row: the potential on one boundary is the opposite of that on its
    /// partner.
    /// </summary>
    /// <param name="boundary">The first boundary.</param>
    /// <param name="partner">The second boundary, with matching vertices (see <see cref="MeshOptions"/>).</param>
    /// <exception cref="UnknownNameException">The mesh has no such boundary.</exception>
    /// <exception cref="ConflictingConditionsException">A boundary has a condition already.</exception>
    public ElectrostaticProblem WithAntiperiodicity(string boundary, string partner) =>
        AddPair(new PairedBoundaries(boundary, partner, true));

    private static double Finite(double value, string name) => double.IsFinite(value)
        ? value
        : throw new ArgumentOutOfRangeException(name, value, "The value must be a finite number.");

    private static void CheckAxis(Mesh mesh)
    {
        double largest = 0;
        foreach (Point2D vertex in mesh.Vertices)
        {
            largest = Math.Max(largest, Math.Abs(vertex.X));
        }

        foreach (Point2D vertex in mesh.Vertices)
        {
            if (vertex.X < -1e-9 * largest)
            {
                throw new IllPosedProblemException(
                    $"The section reaches to {vertex}, left of the axis x = 0 about which it revolves. "
                    + "Draw only the half with x >= 0, or choose plane coordinates.");
            }
        }
    }

    private ElectrostaticProblem AddConductor(Conductor conductor)
    {
        RefuseConductor(conductor.Name, "cannot be made one again");
        RefuseCondition(conductor.Name);
        if (conductor.Kind == NamedPart.Region && setup.Dielectrics.ContainsKey(conductor.Name))
        {
            throw new ConflictingConditionsException(
                $"The region '{conductor.Name}' is a dielectric already, so it cannot be a conductor. "
                + "Give it one of the two.");
        }

        if (setup.SpaceCharges.Concat(setup.SurfaceCharges).Any(charge => charge.Name == conductor.Name))
        {
            throw new ConflictingConditionsException(
                $"'{conductor.Name}' has a given charge density already, so it cannot be a conductor. "
                + "Make it a floating conductor with a total charge instead.");
        }

        return new(setup with { Conductors = setup.Conductors.Add(conductor) });
    }

    private ElectrostaticProblem AddSpaceCharge(ChargeDensity charge)
    {
        _ = Mesh.RegionIndex(charge.Name);
        RefuseConductor(charge.Name, "carries its charge on its surface");
        RefuseSecondCharge(charge, setup.SpaceCharges);
        return new(setup with { SpaceCharges = setup.SpaceCharges.Add(charge) });
    }

    private ElectrostaticProblem AddSurfaceCharge(ChargeDensity charge)
    {
        _ = Mesh.BoundaryEdges(charge.Name);
        RefuseConductor(charge.Name, "takes the charge that its potential demands");
        RefuseSecondCharge(charge, setup.SurfaceCharges);
        return new(setup with { SurfaceCharges = setup.SurfaceCharges.Add(charge) });
    }

    private ElectrostaticProblem AddPair(PairedBoundaries pair)
    {
        foreach (string boundary in (ReadOnlySpan<string>)[pair.Boundary, pair.Partner])
        {
            _ = Mesh.BoundaryEdges(boundary);
            RefuseConductor(boundary, "cannot be periodic");
            RefuseCondition(boundary);
        }

        return pair.Boundary == pair.Partner
            ? throw new ConflictingConditionsException(
                $"The boundary '{pair.Boundary}' is paired with itself. Name the boundary on the other side.")
            : new(setup with { Pairs = setup.Pairs.Add(pair) });
    }

    private NamedPart PartOf(string name)
    {
        ArgumentNullException.ThrowIfNull(name);
        if (Mesh.RegionNames.Contains(name))
        {
            return NamedPart.Region;
        }

        return Mesh.BoundaryNames.Contains(name)
            ? NamedPart.Boundary
            : throw new UnknownNameException("region or boundary", name, Mesh.RegionNames.AddRange(Mesh.BoundaryNames));
    }

    private void RefuseConductor(string name, string why)
    {
        if (setup.Conductors.Any(conductor => conductor.Name == name))
        {
            throw new ConflictingConditionsException($"'{name}' is a conductor already and {why}. Drop one of the two.");
        }
    }

    private void RefuseCondition(string boundary)
    {
        if (setup.Potentials.Any(condition => condition.Boundary == boundary))
        {
            throw new ConflictingConditionsException(
                $"The boundary '{boundary}' has a potential along it already. Give it one condition only.");
        }

        if (setup.Layers.Any(layer => layer.Boundary == boundary))
        {
            throw new ConflictingConditionsException(
                $"The boundary '{boundary}' is covered by a thin layer already. Give it one condition only.");
        }

        if (setup.Pairs.Any(pair => pair.Boundary == boundary || pair.Partner == boundary))
        {
            throw new ConflictingConditionsException(
                $"The boundary '{boundary}' is paired already. Give it one condition only.");
        }
    }

    private static void RefuseSecondCharge(ChargeDensity charge, IEnumerable<ChargeDensity> present)
    {
        if (present.Any(other => other.Name == charge.Name))
        {
            throw new ConflictingConditionsException(
                $"'{charge.Name}' has a charge density already. Give the sum of both at once.");
        }
    }
}
