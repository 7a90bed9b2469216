using System.Collections.Immutable;
using System.Runtime.InteropServices;

namespace FemCore2D.Geometry;

/// <summary>That nothing which was drawn into a section is lost without a word.</summary>
internal static class SectionChecks
{
    /// <summary>Throws where a shape is too small to be told from a point.</summary>
    public static void ShapesAreResolved(List<PaintedShape> shapes, HashSet<int> drawnShapes, double tolerance)
    {
        for (int shape = 0; shape < shapes.Count; shape++)
        {
            if (!drawnShapes.Contains(shape))
            {
                throw new InvalidSectionException(
                    $"The {shapes[shape].Shape} is too small for the section: "
                    + $"lengths below {tolerance:G3} m count as nothing in it. Leave it out, or divide the section.");
            }
        }
    }

    /// <summary>Throws where a region was painted over, naming what covers it.</summary>
    /// <param name="shapes">The shapes in the order of painting.</param>
    /// <param name="regionNames">The names of all regions.</param>
    /// <param name="pieces">The visible pieces.</param>
    /// <param name="coversOf">Finds the shapes that show along the inside of the shapes of a region.</param>
    public static void RegionsAreSeen(
        List<PaintedShape> shapes,
        ImmutableArray<string> regionNames,
        List<ArrangedPiece> pieces,
        Func<string, IEnumerable<int>> coversOf)
    {
        bool[] isSeen = new bool[regionNames.Length + 1];
        foreach (ArrangedPiece piece in pieces)
        {
            isSeen[piece.LeftRegion + 1] = true;
            isSeen[piece.RightRegion + 1] = true;
        }

        int hidden = Array.IndexOf(isSeen, false, 1);
        if (hidden < 0)
        {
            return;
        }

        string name = regionNames[hidden - 1];
        int first = shapes.FindIndex(s => s.Region == name);
        IEnumerable<string> covers = coversOf(name)
            .Select(s => shapes[s].Region is string region ? $"'{region}'" : "a hole")
            .Distinct();
        throw new InvalidSectionException(
            $"The region '{name}' at {shapes[first].Shape.Outer.Pieces[0].Start} is painted over completely by {string.Join(", ", covers)}. Fill it after them, or leave it out.");
    }

    /// <summary>Throws where a boundary has no piece left in or around the section.</summary>
    public static void BoundariesAreSeen(
        IReadOnlyList<string> boundaries, IReadOnlyList<ImmutableArray<string>> sets, List<ArrangedPiece> pieces)
    {
        HashSet<string> seen = new(
            pieces.Where(p => p.Boundaries >= 0).Select(p => p.Boundaries).Distinct().SelectMany(i => sets[i]),
            StringComparer.Ordinal);
        foreach (string name in boundaries)
        {
            if (!seen.Contains(name))
            {
                throw new InvalidSectionException(
                    $"The boundary '{name}' is painted over completely, or lies outside the section. "
                    + "Draw its outline after what covers it, or draw it as a sheet.");
            }
        }
    }

    /// <summary>Throws where the boundary of a region does not close, which lines at just about the tolerance can cause.</summary>
    public static void RegionsClose(IReadOnlyList<Point2D> vertices, List<ArrangedPiece> pieces, double tolerance)
    {
        // A region's boundary, kept on its left, must leave each vertex as often as it arrives there.
        Dictionary<(int Vertex, int Region), int> excess = [];
        foreach (ArrangedPiece piece in pieces)
        {
            if (piece.LeftRegion != piece.RightRegion)
            {
                Count(piece.Start, piece.LeftRegion, 1);
                Count(piece.End, piece.LeftRegion, -1);
                Count(piece.End, piece.RightRegion, 1);
                Count(piece.Start, piece.RightRegion, -1);
            }
        }

        foreach (((int vertex, _), int count) in excess)
        {
            if (count != 0)
            {
                throw new InvalidSectionException(
                    $"At {vertices[vertex]} lines pass each other at just about {tolerance:G3} m, the length below which they count as one. Draw them coincident, or farther apart.");
            }
        }

        void Count(int vertex, int region, int change) =>
            CollectionsMarshal.GetValueRefOrAddDefault(excess, (vertex, region), out _) += change;
    }
}
