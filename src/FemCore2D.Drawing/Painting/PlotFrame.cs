using FemCore2D.Geometry;
using SkiaSharp;

namespace FemCore2D.Drawing;

/// <summary>Where a window of the plane lies on the page, and what has been prepared for it.</summary>
internal sealed class PlotFrame
{
    private readonly Dictionary<(CellScalar Scalar, bool Averages), FacetMesh> facets = [];
    private readonly Dictionary<(CellScalar Scalar, ValueRange Period), FacetMesh> periodicFacets = [];
    private readonly Dictionary<Mesh, RegionBorders> borders = [];

    /// <summary>Places a window.</summary>
    /// <param name="view">The window.</param>
    /// <param name="area">Where it lies on the page, in points, with the window's own ratio of sides.</param>
    /// <param name="pixelsPerPoint">The fineness of the picture.</param>
    public PlotFrame(Box2D view, SKRect area, double pixelsPerPoint)
    {
        View = view;
        Area = area;
        PixelsPerPoint = pixelsPerPoint;
        PointsPerMetre = area.Width / view.Width;
    }

    public Box2D View { get; }

    public SKRect Area { get; }

    public double PixelsPerPoint { get; }

    public double PointsPerMetre { get; }

    /// <summary>Boxes on the page that texts already take.</summary>
    public List<SKRect> Taken { get; } = [];

    /// <summary>Where the names of regions stand, by layer; null for those that fit nowhere.</summary>
    public Dictionary<RegionLayer, List<(int Region, SKPoint? Place)>> NamePlaces { get; } = [];

    public SKPoint ToPage(Point2D place) => new(
        (float)(Area.Left + ((place.X - View.Lower.X) * PointsPerMetre)),
        (float)(Area.Bottom - ((place.Y - View.Lower.Y) * PointsPerMetre)));

    public Point2D ToPlane(SKPoint point) => new(
        View.Lower.X + ((point.X - Area.Left) / PointsPerMetre),
        View.Lower.Y + ((Area.Bottom - point.Y) / PointsPerMetre));

    public FacetMesh FacetsOf(CellScalar scalar, bool averages)
    {
        if (!facets.TryGetValue((scalar, averages), out FacetMesh? mesh))
        {
            mesh = FacetMeshBuilder.Build(scalar, PointsPerMetre * PixelsPerPoint, View, averages);
            facets.Add((scalar, averages), mesh);
        }

        return mesh;
    }

    /// <summary>Facets of a scalar whose values recur with a period: unrolled, and not averaged, as 359 and 1 degrees have no useful mean.</summary>
    public FacetMesh PeriodicFacetsOf(CellScalar scalar, ValueRange period)
    {
        if (!periodicFacets.TryGetValue((scalar, period), out FacetMesh? mesh))
        {
            mesh = PeriodicFacets.Unroll(FacetsOf(scalar, averages: false), period.Low, period.High - period.Low);
            periodicFacets.Add((scalar, period), mesh);
        }

        return mesh;
    }

    public RegionBorders BordersOf(Mesh mesh)
    {
        if (!borders.TryGetValue(mesh, out RegionBorders? found))
        {
            found = new RegionBorders(mesh);
            borders.Add(mesh, found);
        }

        return found;
    }

    public bool IsFree(SKRect box) => !Taken.Exists(other => other.IntersectsWith(box));

    /// <summary>Draws lines as one path; points that fall together on the page are left out.</summary>
    public SKPath PathOf(IEnumerable<Polyline> lines)
    {
        using var builder = new SKPathBuilder();
        float nearest = (float)(0.35 / PixelsPerPoint);
        foreach (Polyline line in lines)
        {
            SKPoint last = ToPage(line.Points[0]);
            builder.MoveTo(last);
            for (int i = 1; i < line.Points.Length; i++)
            {
                SKPoint point = ToPage(line.Points[i]);
                bool isEnd = i == line.Points.Length - 1;
                if (!isEnd && Math.Abs(point.X - last.X) < nearest && Math.Abs(point.Y - last.Y) < nearest)
                    continue;
                builder.LineTo(point);
                last = point;
            }

            if (line.IsClosed)
                builder.Close();
        }

        return builder.Detach();
    }
}
