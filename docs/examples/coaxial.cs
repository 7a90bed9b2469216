#:project ../../src/FemCore2D/FemCore2D.csproj

// A coaxial line from its drawing to its impedance. Run it with: dotnet run docs/examples/coaxial.cs

using FemCore2D.Drawing;
using FemCore2D.Fields;
using FemCore2D.Geometry;

CrossSection section = CrossSection.Empty
    .Fill(Outline.Circle(Point2D.Origin, 3.5e-3, "shell"), "air")
    .Fill(Outline.Circle(Point2D.Origin, 2.2e-3), "sleeve")
    .Hole(Outline.Circle(Point2D.Origin, 1.52e-3, "wire"));
MeshingResult meshed = Mesher.Generate(section, MeshOptions.Default.WithSize(0.3e-3));
Console.WriteLine(meshed.Report);

ElectrostaticProblem problem = new ElectrostaticProblem(meshed.Mesh, degree: 3)
    .WithDielectric("air", 1)
    .WithDielectric("sleeve", 2.1)
    .WithConductor("shell")
    .WithConductor("wire", potential: 100);

LineParameters line = problem.SolveLine("wire");
ElectrostaticSolution field = problem.Solve();
Console.WriteLine(line);
Console.WriteLine($"largest field in the sleeve: {field.LargestField("sleeve").Magnitude / 1e3:0.0} kV/m");

CellScalar potential = CellScalar.Of(field.Potential);
new Figure(new BandLayer(potential) { Label = "Potential", Unit = "V" }, new LevelLineLayer(potential))
    .SavePng(Path.Combine(Directory.CreateDirectory("output").FullName, "coaxial.png"));
