using System.Collections.Immutable;
using FemCore2D.Geometry;

namespace FemCore2D.Fields;

/// <summary>All that an <see cref="ElectrostaticProblem"/> has been told. Immutable.</summary>
internal sealed record ElectrostaticSetup(Mesh Mesh, int Degree, CoordinateSystem Coordinates)
{
    public ImmutableSortedDictionary<string, Permittivity> Dielectrics { get; init; } =
        ImmutableSortedDictionary<string, Permittivity>.Empty;

    public ImmutableArray<Conductor> Conductors { get; init; } = [];

    public ImmutableArray<ChargeDensity> SpaceCharges { get; init; } = [];

    public ImmutableArray<ChargeDensity> SurfaceCharges { get; init; } = [];

    public ImmutableArray<PrescribedPotential> Potentials { get; init; } = [];

    public ImmutableArray<PairedBoundaries> Pairs { get; init; } = [];

    public ImmutableArray<ThinLayer> Layers { get; init; } = [];

    /// <summary>For each region of the mesh, whether it is a conductor.</summary>
    public bool[] ConductingRegions()
    {
        bool[] conducting = new bool[Mesh.RegionNames.Length];
        foreach (Conductor conductor in Conductors)
        {
            if (conductor.Kind == NamedPart.Region)
            {
                conducting[Mesh.RegionIndex(conductor.Name)] = true;
            }
        }

        return conducting;
    }
}

/// <summary>What a name of a mesh stands for.</summary>
internal enum NamedPart
{
    /// <summary>A region, with its closure.</summary>
    Region,

    /// <summary>A boundary.</summary>
    Boundary,
}

/// <summary>A conductor, at a given potential or floating with a given charge.</summary>
internal readonly record struct Conductor(string Name, NamedPart Kind, bool Floats, double Value);

/// <summary>A charge density in a region or on a boundary, as a constant or a function of place.</summary>
internal readonly record struct ChargeDensity(string Name, Func<Point2D, double>? Function, double Value);

/// <summary>A potential that is given along a boundary as a function of place.</summary>
internal readonly record struct PrescribedPotential(string Boundary, Func<Point2D, double> Function);

/// <summary>Two boundaries with the same potentials, or with opposite ones.</summary>
internal readonly record struct PairedBoundaries(string Boundary, string Partner, bool Opposite);

/// <summary>A layer too thin to mesh, with a conductor behind it: a Robin condition.</summary>
internal readonly record struct ThinLayer(string Boundary, double CapacitancePerArea, double Potential);
