namespace FemCore2D.Fields;

/// <summary>
/// What a lossless transmission line is to a circuit, from its capacitance with its dielectrics and with vacuum in
/// their place.
/// </summary>
/// <remarks>
/// The transverse field of a line without magnetic materials has the inductance of the vacuum line, so both
/// capacitances say all (Ramo, Whinnery and Van Duzer 1994, ch. 5 and 8); with several dielectrics this is the
/// quasi-static limit.
/// </remarks>
public sealed class LineParameters
{
    /// <summary>Derives a line from its two capacitances, such as those between the wires of a pair.</summary>
    /// <param name="capacitancePerMetre">The capacitance, in F/m.</param>
    /// <param name="vacuumCapacitancePerMetre">The capacitance with vacuum in place of all dielectrics, in F/m.</param>
    /// <exception cref="ArgumentOutOfRangeException">A capacitance is not positive and finite.</exception>
    public LineParameters(double capacitancePerMetre, double vacuumCapacitancePerMetre)
    {
        CapacitancePerMetre = Positive(capacitancePerMetre, nameof(capacitancePerMetre));
        VacuumCapacitancePerMetre = Positive(vacuumCapacitancePerMetre, nameof(vacuumCapacitancePerMetre));
    }

    /// <summary>The capacitance, in F/m.</summary>
    public double CapacitancePerMetre { get; }

    /// <summary>The capacitance with vacuum in place of all dielectrics, in F/m.</summary>
    public double VacuumCapacitancePerMetre { get; }

    /// <summary>The external inductance, in H/m.</summary>
    public double InductancePerMetre =>
        PhysicalConstants.MagneticConstant * PhysicalConstants.ElectricConstant / VacuumCapacitancePerMetre;

    /// <summary>The relative permittivity of a uniform filling with the same capacitance.</summary>
    public double EffectivePermittivity => CapacitancePerMetre / VacuumCapacitancePerMetre;

    /// <summary>The velocity of a wave, in m/s.</summary>
    public double Velocity => PhysicalConstants.SpeedOfLight / Math.Sqrt(EffectivePermittivity);

    /// <summary>The characteristic impedance, in ohm.</summary>
    public double CharacteristicImpedance => 1 / (Velocity * CapacitancePerMetre);

    /// <inheritdoc/>
    public override string ToString() => string.Create(
        null,
        $"Z0 {CharacteristicImpedance:G6} ohm, velocity {Velocity:G6} m/s, C {1e12 * CapacitancePerMetre:G6} pF/m, L {1e9 * InductancePerMetre:G6} nH/m");

    private static double Positive(double capacitance, string name) => capacitance > 0 && double.IsFinite(capacitance)
        ? capacitance
        : throw new ArgumentOutOfRangeException(name, capacitance, "A capacitance is a positive, finite number.");
}
