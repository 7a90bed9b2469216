using FemCore2D.Geometry;

namespace FemCore2D.Assembly;

/// <summary>The degrees of quadrature of one term on one space: region by region, on straight and on other cells.</summary>
internal sealed class Degrees
{
    private readonly int[] coefficients;
    private readonly int shapes;
    private readonly int bendTriangle;
    private readonly int bendQuadrilateral;

    /// <summary>Works out the degrees.</summary>
    /// <param name="space">The space.</param>
    /// <param name="shapes">The degree of the products of shape functions in the term.</param>
    /// <param name="coefficients">The degree of the term's coefficients in each region.</param>
    /// <param name="extra">What the caller adds.</param>
    public Degrees(NodeSpace space, int shapes, int[] coefficients, int extra)
    {
        ArgumentOutOfRangeException.ThrowIfNegative(extra, "extraDegree");
        this.coefficients = coefficients;
        this.shapes = Math.Max(0, shapes) + extra;
        bool bent = space.Maps.Degree > 1 && space.Mesh.HasArcs;

        // The determinant of the map of a curved triangle has twice the degree of its derivatives, that of a
        // quadrilateral one more in each direction.
        bendTriangle = bent ? 2 * (space.Maps.Degree - 1) : 0;
        bendQuadrilateral = bent ? (2 * space.Maps.Degree) - 1 : 1;
        Highest = 0;
        for (int region = 0; region < coefficients.Length; region++)
        {
            ArgumentOutOfRangeException.ThrowIfNegative(coefficients[region], "term");
            foreach (CellTables tables in space.PresentTables)
            {
                Highest = Math.Max(Highest, On(tables.Element.Cell, region, false));
            }
        }

        if (Highest > CellTables.HighestDegree)
        {
            throw new ArgumentOutOfRangeException(
                nameof(extra),
                $"The term needs quadrature of degree {Highest} on this space, but rules end at "
                + $"{CellTables.HighestDegree}. Lower the degree of its coefficient, the extra degree or the degree of the space.");
        }
    }

    /// <summary>The highest degree of all regions and cells.</summary>
    public int Highest { get; }

    /// <summary>Whether the coefficients do not change within a cell of a region; straight cells are then integrated exactly.</summary>
    public bool IsConstantIn(int region) => coefficients[region] == 0;

    /// <summary>The degree for a cell.</summary>
    public int On(CellKind kind, int region, bool affine)
    {
        int bend = affine ? 0 : kind == CellKind.Triangle ? bendTriangle : bendQuadrilateral;
        return shapes + coefficients[region] + bend;
    }
}
