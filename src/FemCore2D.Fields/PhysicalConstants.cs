namespace FemCore2D.Fields;

/// <summary>Constants of nature in SI units.</summary>
/// <remarks>
/// Mohr, Newell, Taylor and Tiesinga (2025), CODATA recommended values of the fundamental physical constants: 2022.
/// Since the ampere was redefined in 2019, the two field constants carry a relative uncertainty of 1.6e-10.
/// </remarks>
public static class PhysicalConstants
{
    /// <summary>The speed of light in vacuum, in m/s (exact).</summary>
    public const double SpeedOfLight = 299_792_458;

    /// <summary>The magnetic constant, in H/m.</summary>
    public const double MagneticConstant = 1.25663706127e-6;

    /// <summary>The electric constant, in F/m.</summary>
    public const double ElectricConstant = 1 / (MagneticConstant * SpeedOfLight * SpeedOfLight);

    /// <summary>The wave impedance of vacuum, in ohm.</summary>
    public const double VacuumImpedance = MagneticConstant * SpeedOfLight;
}
