#:project ../../src/FemCore2D/FemCore2D.csproj

// A term of one's own: heat that a creeping liquid carries along, in the oil-filled cable duct beside the generator of
// a tidal turbine (invented numbers). The term is a struct of a dozen lines; the loop over the cells is compiled for
// it, so that it runs at the speed of the built-in ones, as the comparison at the end shows.
using System.Diagnostics;
using FemCore2D.Assembly;
using FemCore2D.Geometry;
using FemCore2D.Sparse;

const double Length = 0.8;         // m
const double Height = 0.06;        // m
const double Conductivity = 0.13;  // W/(m K), transformer oil
const double HeatCapacity = 1.6e6; // J/(m3 K)
const double MeanVelocity = 4e-5;  // m/s
const double CableHeat = 25;       // W/m2, from the cables along the bottom
const double WallTransfer = 6;     // W/(m2 K), through the top to the sea
const double Sea = 9;              // degrees Celsius

Mesh duct = Duct(80, 6);
var space = new NodeSpace(duct, degree: 2);
var assembler = new Assembler(space);
SparseMatrix<double> matrix = assembler.CreateMatrix<double>();
assembler.Add(matrix, Term.Stiffness(Conductivity));
assembler.Add(matrix, new CarriedHeat(HeatCapacity, MeanVelocity, Height));
assembler.AddOnBoundary(matrix, Term.BoundaryMass(WallTransfer), "top");
double[] load = assembler.CreateVector<double>();
assembler.AddOnBoundary(load, Term.BoundaryFlux(CableHeat), "bottom");
assembler.AddOnBoundary(load, Term.BoundaryFlux(WallTransfer * Sea), "top");

ResolvedConstraints<double> constraints = new ConstraintSet<double>(space).FixBoundary("inlet", Sea).Resolve();
MathNet.Numerics.LinearAlgebra.Matrix<double> dense = constraints.Reduce(matrix).ToMathNetDense();
ReadOnlySpan<double> reducedLoad = constraints.Reduce(matrix, load);
double[] temperature = constraints.Expand(dense.Solve(reducedLoad.ToMathNetVector()).ToArray());
var field = new NodeField<double>(space, temperature);

Console.WriteLine($"Oil in the duct, {space.UnknownCount} unknowns of degree {space.Degree}");
foreach (double x in (double[])[0.1, 0.2, 0.4, 0.6, 0.79])
{
    field.TryValueAt(new Point2D(x, 0), out double bottom);
    field.TryValueAt(new Point2D(x, Height), out double top);
    Console.WriteLine($"  {x,5:0.00} m from the inlet: {bottom,6:0.00} C at the cables, {top,6:0.00} C under the wall");
}

// The same stiffness, built in and written here, and the carried heat, on a fine mesh.
var fine = new Assembler(new NodeSpace(Duct(1200, 200).CutQuadrilaterals().Mesh, degree: 1));
SparseMatrix<double> large = fine.CreateMatrix<double>();
double builtIn = Fastest(() => fine.Add(large, Term.Stiffness(Conductivity)));
double own = Fastest(() => fine.Add(large, new OwnStiffness(Conductivity)));
double plug = Fastest(() => fine.Add(large, new PlugFlow(HeatCapacity * MeanVelocity)));
double profile = Fastest(() => fine.Add(large, new CarriedHeat(HeatCapacity, MeanVelocity, Height)));
Console.WriteLine($"Refill of {fine.Space.Mesh.CellCount} triangles:");
Console.WriteLine($"  built-in stiffness        {builtIn,7:0.0} ms");
Console.WriteLine($"  the same, written here    {own,7:0.0} ms, {own / builtIn:0.00} times");
Console.WriteLine($"  heat carried by plug flow {plug,7:0.0} ms, {plug / builtIn:0.00} times");
Console.WriteLine($"  by a parabolic profile    {profile,7:0.0} ms, {profile / builtIn:0.00} times (quadrature in every cell)");

static Mesh Duct(int along, int across) => new QuadrilateralPatch(
    new OutlinePiece(new(0, 0), new(Length, 0), 0, "bottom"),
    new OutlinePiece(new(Length, 0), new(Length, Height), 0, "outlet"),
    new OutlinePiece(new(Length, Height), new(0, Height), 0, "top"),
    new OutlinePiece(new(0, Height), new(0, 0), 0, "inlet"),
    "oil").Divide(along, across);

static double Fastest(Action action)
{
    double best = double.PositiveInfinity;
    for (int round = 0; round < 12; round++)
    {
        long start = Stopwatch.GetTimestamp();
        action();
        best = Math.Min(best, Stopwatch.GetElapsedTime(start).TotalMilliseconds);
    }

    return best;
}

/// <summary>The integral of c v(y) T_x w: heat carried along x by laminar flow between two walls.</summary>
readonly struct CarriedHeat(double heatCapacity, double meanVelocity, double height) : ICellMatrixTerm<double>
{
    // One factor of the product is a slope, so that a lower degree of quadrature will do.
    static int ICellMatrixTerm<double>.SlopeFactors => 1;

    // The velocity is a parabola; a term that is the same all over a cell says 0 and is integrated once and for all.
    public int DegreeIn(int region) => 2;

    public Coupling<double> At(in CellPoint point)
    {
        double y = point.Place.Y / height;
        double velocity = 6 * meanVelocity * y * (1 - y);
        return Coupling.ValueWithGradient(heatCapacity * velocity, 0);
    }
}

/// <summary>The integral of c v T_x w with one velocity everywhere.</summary>
readonly struct PlugFlow(double carried) : ICellMatrixTerm<double>
{
    public int DegreeIn(int region) => 0;

    public Coupling<double> At(in CellPoint point) => Coupling.ValueWithGradient(carried, 0);
}

/// <summary>What Term.Stiffness does, as a user would write it.</summary>
readonly struct OwnStiffness(double conductivity) : ICellMatrixTerm<double>
{
    static int ICellMatrixTerm<double>.SlopeFactors => 2;

    public int DegreeIn(int region) => 0;

    public Coupling<double> At(in CellPoint point) => Coupling.Gradients(conductivity);
}
