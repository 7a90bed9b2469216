#:project ../../src/FemCore2D/FemCore2D.csproj
#:package Spectre.Console

// The export umbilical of an invented tidal site: three power cores, a signal pair and a steel tube in a wire armour.
// Reads the section from umbilical.geojson, computes the capacitances between all conductors and the stress in the
// insulation when phase L1 is at its peak, and draws what it finds. Run it with: dotnet run docs/examples/umbilical.cs

using System.Diagnostics;
using System.Globalization;
using FemCore2D.Drawing;
using FemCore2D.Fields;
using FemCore2D.Geometry;
using Spectre.Console;

const double RatedVoltage = 20e3; // between phases, r.m.s.
double peak = RatedVoltage * Math.Sqrt(2.0 / 3);

CultureInfo.CurrentCulture = CultureInfo.InvariantCulture;
string folder = (string)AppContext.GetData("EntryPointFileDirectoryPath")!;
string output = Directory.CreateDirectory(Path.Combine("output", "umbilical")).FullName;
Stopwatch clock = Stopwatch.StartNew();

try
{
    Report(AnsiConsole.Progress().Start(Compute));
    return 0;
}
catch (Exception fault) when (fault is FemCoreException or IOException)
{
    AnsiConsole.WriteLine($"umbilical: {fault.Message}");
    return 1;
}

Results Compute(ProgressContext context)
{
    ProgressTask meshing = context.AddTask("Section and mesh");
    ProgressTask driving = context.AddTask("Capacitance matrix");
    ProgressTask stressing = context.AddTask("Field at the peak of L1");
    ProgressTask drawing = context.AddTask("Pictures", maxValue: 4);

    CrossSection section = SectionGeoJson.ReadFile(Path.Combine(folder, "umbilical.geojson"));
    MeshOptions options = MeshOptions.Default
        .WithSize(2e-3)
        .WithRegionSize("insulation L1", 0.6e-3)
        .WithRegionSize("insulation L2", 0.6e-3)
        .WithRegionSize("insulation L3", 0.6e-3)
        .WithRegionSize("pair insulation", 0.3e-3);
    MeshingResult made = Mesher.Generate(section, options, new Build(meshing));
    meshing.Value = meshing.MaxValue;

    ElectrostaticProblem insulators = new ElectrostaticProblem(made.Mesh, degree: 2)
        .WithDielectric("insulation L1", 2.3)
        .WithDielectric("insulation L2", 2.3)
        .WithDielectric("insulation L3", 2.3)
        .WithDielectric("core jacket", 2.5)
        .WithDielectric("filler", 2.2)
        .WithDielectric("filler rod", 2.2)
        .WithDielectric("inner sheath", 2.5)
        .WithDielectric("armour bedding", 2.7)
        .WithDielectric("sheath", 2.5)
        .WithDielectric("tube jacket", 2.5)
        .WithDielectric("pair jacket", 2.5)
        .WithDielectric("pair insulation", 2.25)
        .WithConductor("tube")
        .WithConductor("tube filling") // inside the tube there is no field
        .WithConductor("armour")
        .WithConductor("sea");

    // For the matrix every metal part is a conductor of its own; armour and sea are ground.
    string[] conductors =
        ["conductor L1", "conductor L2", "conductor L3", "screen L1", "screen L2", "screen L3", "wire a", "wire b"];
    ElectrostaticProblem all = conductors.Aggregate(insulators, (problem, name) => problem.WithConductor(name));
    CapacitanceMatrix capacitances = all.SolveCapacitances(conductors, progress: new Follow(driving));

    // In service the screens are bonded to the armour, and the pair hangs free.
    ElectrostaticSolution service = insulators
        .WithConductor("screen L1").WithConductor("screen L2").WithConductor("screen L3")
        .WithConductor("conductor L1", peak)
        .WithConductor("conductor L2", -peak / 2)
        .WithConductor("conductor L3", -peak / 2)
        .WithFloatingConductor("wire a").WithFloatingConductor("wire b")
        .Solve(progress: new Follow(stressing));

    Results results = new(made, capacitances, service);
    Draw(results, drawing);
    return results;
}

void Draw(Results results, ProgressTask drawing)
{
    Mesh mesh = results.Meshing.Mesh;
    Save(new Figure(new RegionLayer(mesh)) { Title = "Export umbilical, Skerry Sound (invented)" }, "section");
    Save(new Figure(new MeshLayer(mesh) { IsTinted = true }) { Title = "Mesh" }, "mesh");

    CellScalar potential = CellScalar.Of(results.Service.Potential);
    Figure potentials = new(
        new BandLayer(potential) { Label = "Potential", Unit = "V", Colours = ColourScale.EbbFlood },
        new LevelLineLayer(potential),
        new OutlineLayer(mesh))
    { Title = "Potential at the peak of L1" };
    Save(potentials, "potential");

    CellVector field = -CellVector.GradientOf(results.Service.Potential);
    FieldPeak peakStress = results.LargestStress;
    Figure stress = new(
        new BandLayer(field.Magnitude()) { Label = "Field strength", Unit = "V/m" },
        new ArrowLayer(field) { Colour = Colour.White },
        new OutlineLayer(mesh),
        new PointLayer(new LabelledPoint(peakStress.Place, "largest stress")))
    { Title = "Field strength at the peak of L1" };
    Save(stress, "stress");

    void Save(Figure figure, string name)
    {
        figure.SavePng(Path.Combine(output, name + ".png"), 1400);
        figure.SaveSvg(Path.Combine(output, name + ".svg"));
        figure.SavePdf(Path.Combine(output, name + ".pdf"));
        drawing.Increment(1);
    }
}

void Report(Results results)
{
    MeshReport mesh = results.Meshing.Report;
    AnsiConsole.WriteLine($"Mesh: {mesh.Cells} triangles, smallest angle {mesh.SmallestDegrees:0.0}°");
    AnsiConsole.WriteLine($"Capacitances: {results.Capacitances.Report}");
    AnsiConsole.WriteLine($"Field: {results.Service.Report}");
    AnsiConsole.WriteLine();

    AnsiConsole.WriteLine("Capacitors between conductors, to ground on the diagonal, in pF/m (blank: below 1e-4):");
    Table table = new Table().AddColumn("");
    foreach (string name in results.Capacitances.Conductors)
    {
        table.AddColumn(new TableColumn(Short(name)).RightAligned().NoWrap());
    }

    foreach (string row in results.Capacitances.Conductors)
    {
        table.AddRow([Short(row), .. results.Capacitances.Conductors.Select(
            column => InPicofarads(results.Capacitances.Mutual(row, column)))]);
    }

    AnsiConsole.Write(table);
    AnsiConsole.WriteLine("L1 to L3: phase conductors; SL1 to SL3: their screens; a, b: the signal pair.");

    // Screened cores are coaxial, so their capacitance is known.
    double core = results.Capacitances.Mutual("conductor L1", "screen L1");
    double exact = 2 * Math.PI * 2.3 * PhysicalConstants.ElectricConstant / Math.Log(12.7 / 7.2);
    FieldPeak stress = results.LargestStress;
    double exactStress = peak / (7.2e-3 * Math.Log(12.7 / 7.2));
    AnsiConsole.WriteLine($"Core L1 to its screen: {1e12 * core:0.000} pF/m (coaxial formula {1e12 * exact:0.000} pF/m)");
    AnsiConsole.WriteLine(
        $"Largest stress in the insulation: {stress.Magnitude / 1e6:0.000} kV/mm in {stress.Region} at "
        + $"({1e3 * stress.Place.X:0.00}, {1e3 * stress.Place.Y:0.00}) mm (coaxial formula {exactStress / 1e6:0.000} kV/mm)");
    AnsiConsole.WriteLine(
        $"Charging current of a core at 50 Hz: {2 * Math.PI * 50 * core * RatedVoltage / Math.Sqrt(3) * 1e6:0.00} mA/km");
    AnsiConsole.WriteLine($"Signal pair: {1e12 * results.PairCapacitance:0.000} pF/m from wire to wire");
    AnsiConsole.WriteLine($"Estimated relative error of the field: {results.Service.EstimatedRelativeFieldError:0.0e+0}");
    AnsiConsole.WriteLine();
    AnsiConsole.WriteLine($"Pictures are in {Path.GetRelativePath(Environment.CurrentDirectory, output)}; {clock.Elapsed.TotalSeconds:0.0} s in all.");
    AnsiConsole.WriteLine("An engineering estimate: decisions on insulation defer to local codes and licensed practice.");
}

static string Short(string conductor) => conductor
    .Replace("conductor ", "", StringComparison.Ordinal)
    .Replace("screen ", "S", StringComparison.Ordinal)
    .Replace("wire ", "", StringComparison.Ordinal);

static string InPicofarads(double farads) => Math.Abs(farads) < 1e-16 ? "" : (1e12 * farads).ToString("0.00");

internal sealed record Results(MeshingResult Meshing, CapacitanceMatrix Capacitances, ElectrostaticSolution Service)
{
    public FieldPeak LargestStress { get; } = Service.LargestFields()
        .Where(peak => peak.Region.StartsWith("insulation", StringComparison.Ordinal))
        .MaxBy(peak => peak.Magnitude);

    /// <summary>From one wire to the other: directly, and in series over everything around the pair.</summary>
    public double PairCapacitance
    {
        get
        {
            double direct = Capacitances.Mutual("wire a", "wire b");
            double a = Capacitances.Maxwell("wire a", "wire a") - direct;
            double b = Capacitances.Maxwell("wire b", "wire b") - direct;
            return direct + (a * b / (a + b));
        }
    }
}

// Turns the cells made so far into a bar.
internal sealed class Build(ProgressTask task) : IProgress<MeshingProgress>
{
    public void Report(MeshingProgress value)
    {
        double done = value.EstimatedCells > 0 ? Math.Min(value.Cells / value.EstimatedCells, 1) : 0;
        task.Value = Math.Max(task.Value, 0.9 * done * task.MaxValue);
    }
}

// Turns the fall of the residual into a bar: each right-hand side counts the same.
internal sealed class Follow(ProgressTask task) : IProgress<SolveProgress>
{
    public void Report(SolveProgress value)
    {
        double digits = value.RelativeResidual > 0 ? Math.Clamp(-Math.Log10(value.RelativeResidual) / 11, 0, 1) : 1;
        double done = value.Stage == SolveStage.Solver ? (value.RightHandSide + digits) / value.RightHandSides : 0;
        task.Value = Math.Max(task.Value, done * task.MaxValue);
    }
}
