using System.Collections.Immutable;
using System.Globalization;
using System.Text;

namespace FemCore2D.Geometry;

/// <summary>What a mesh is like: counts, angles, sizes, and the places where the section forced small angles.</summary>
public sealed class MeshReport
{
    /// <summary>The number of vertices.</summary>
    public required int Vertices { get; init; }

    /// <summary>The number of edges.</summary>
    public required int Edges { get; init; }

    /// <summary>The number of cells.</summary>
    public required int Cells { get; init; }

    /// <summary>The number of vertices on pieces of the section, inner lines included.</summary>
    public required int BoundaryVertices { get; init; }

    /// <summary>The number of cells that the sizes need, by the estimate made before meshing.</summary>
    public required double EstimatedCells { get; init; }

    /// <summary>The number of cells in each region, in the order of the mesh's region names.</summary>
    public required ImmutableArray<(string Region, int Cells)> CellsByRegion { get; init; }

    /// <summary>The area of the straight cells of each region, in square metres.</summary>
    public required ImmutableArray<(string Region, double Area)> AreaByRegion { get; init; }

    /// <summary>The smallest angle asked for, in degrees.</summary>
    public required double WantedDegrees { get; init; }

    /// <summary>The smallest angle of all cells, in degrees.</summary>
    public required double SmallestDegrees { get; init; }

    /// <summary>The corner of a cell at which the smallest angle lies.</summary>
    public required Point2D SmallestAt { get; init; }

    /// <summary>The number of cells by their smallest angle, in twelve classes of 5 degrees from 0 to 60.</summary>
    public required ImmutableArray<int> AngleHistogram { get; init; }

    /// <summary>
    /// The number of cells by the ratio of their size (the edge of the equilateral triangle of the same area) to the
    /// wanted one, in classes that begin at <see cref="SizeClasses"/>.
    /// </summary>
    public required ImmutableArray<int> SizeHistogram { get; init; }

    /// <summary>The lower ends of the classes of <see cref="SizeHistogram"/>; the first begins at 0.</summary>
    public static ImmutableArray<double> SizeClasses { get; } = [0, 0.125, 0.25, 0.5, 0.7, 0.85, 1, 1.2, 1.5, 2];

    /// <summary>The shortest edge, in metres.</summary>
    public required double ShortestEdge { get; init; }

    /// <summary>The longest edge, in metres.</summary>
    public required double LongestEdge { get; init; }

    /// <summary>The places where cells have smaller angles than asked for, the smallest angle first.</summary>
    public required ImmutableArray<ForcedAngle> ForcedAngles { get; init; }

    /// <summary>The report as plain text.</summary>
    public override string ToString()
    {
        StringBuilder text = new();
        text.Append(CultureInfo.InvariantCulture, $"{Cells} cells, {Vertices} vertices ({BoundaryVertices} on lines), {Edges} edges; the sizes needed about {EstimatedCells:F0} cells\n");
        foreach (((string region, int cells), (_, double area)) in CellsByRegion.Zip(AreaByRegion))
        {
            text.Append(CultureInfo.InvariantCulture, $"  region '{region}': {cells} cells, {area:G6} m²\n");
        }

        text.Append(CultureInfo.InvariantCulture, $"edges from {ShortestEdge:G4} m to {LongestEdge:G4} m\n");
        text.Append(CultureInfo.InvariantCulture, $"smallest angle {SmallestDegrees:F2}° at {SmallestAt}; asked for {WantedDegrees:G4}°\n");
        text.Append("cells by smallest angle:\n");
        for (int i = 0; i < AngleHistogram.Length; i++)
        {
            AppendBar(text, string.Create(CultureInfo.InvariantCulture, $"{5 * i,3}° to {(5 * i) + 5,2}°"), AngleHistogram[i]);
        }

        text.Append("cells by size over wanted size:\n");
        for (int i = 0; i < SizeHistogram.Length; i++)
        {
            string to = i + 1 < SizeClasses.Length ? string.Create(CultureInfo.InvariantCulture, $"to {SizeClasses[i + 1],-5}") : "and more";
            AppendBar(text, string.Create(CultureInfo.InvariantCulture, $"{SizeClasses[i],5} {to}"), SizeHistogram[i]);
        }

        const int MostPlaces = 20;
        foreach (ForcedAngle forced in ForcedAngles.Take(MostPlaces))
        {
            string cause = forced.InputDegrees is { } degrees
                ? string.Create(CultureInfo.InvariantCulture, $"pieces meet at {degrees:F2}°")
                : "a narrow place or a fixed division";
            text.Append(CultureInfo.InvariantCulture, $"forced at {forced.Place}: {cause}; {forced.Cells} cells with angles down to {forced.SmallestDegrees:F2}°\n");
        }

        if (ForcedAngles.Length > MostPlaces)
            text.Append(CultureInfo.InvariantCulture, $"and at {ForcedAngles.Length - MostPlaces} more places\n");
        return text.ToString();
    }

    private void AppendBar(StringBuilder text, string label, int count)
    {
        if (count == 0)
            return;
        int length = (int)Math.Ceiling(40.0 * count / Math.Max(1, Cells));
        text.Append(CultureInfo.InvariantCulture, $"  {label,-14} {count,9}  {new string('#', length)}\n");
    }
}
