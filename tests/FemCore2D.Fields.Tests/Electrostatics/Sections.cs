using FemCore2D.Geometry;

namespace FemCore2D.Fields.Tests.Electrostatics;

/// <summary>Small sections that several tests share.</summary>
internal static class Sections
{
    /// <summary>A unit square of 'air' with its sides named.</summary>
    public static Mesh Square(double size = 0.2) => Mesher.Generate(
        CrossSection.Empty.Fill(
            Outline.Rectangle(Point2D.Origin, 1, 1, "bottom", "right", "top", "left"), "air"),
        MeshOptions.Default.WithSize(size)).Mesh;

    /// <summary>A square with paired vertical sides.</summary>
    public static Mesh PairedSquare(double size = 0.2) => Mesher.Generate(
        CrossSection.Empty.Fill(
            Outline.Rectangle(Point2D.Origin, 1, 1, "bottom", "right", "top", "left"), "air"),
        MeshOptions.Default.WithSize(size).WithPair("left", "right")).Mesh;

    /// <summary>A trough (grounded box) with two round wires as regions and a third between them.</summary>
    public static Mesh ThreeWires(double size = 0.3) => Mesher.Generate(
        CrossSection.Empty
            .Fill(Outline.Rectangle(new Point2D(-2, -1), 4, 2, "box", "box", "box", "box"), "air")
            .Fill(Outline.Circle(new Point2D(-1.1, 0), 0.3), "west")
            .Fill(Outline.Circle(new Point2D(1.1, 0), 0.3), "east")
            .Fill(Outline.Circle(new Point2D(0, 0.2), 0.2), "middle"),
        MeshOptions.Default.WithSize(size)).Mesh;

    public static ElectrostaticProblem ThreeWiresProblem(Mesh mesh, int degree = 2) =>
        new ElectrostaticProblem(mesh, degree).WithDielectric("air", 1).WithConductor("box");
}
