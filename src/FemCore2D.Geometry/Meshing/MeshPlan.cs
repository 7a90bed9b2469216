using System.Collections.Immutable;
using System.Globalization;

namespace FemCore2D.Geometry;

/// <summary>The options of a mesh resolved for the pieces and regions of one arrangement.</summary>
internal sealed class MeshPlan
{
    /// <summary>What a cell takes while it is made, with its share of vertices and edges; measured, and rounded up.</summary>
    private const int BytesPerCell = 250;

    private const double DefaultCellsAcross = 30;
    private const double FinestOverTolerance = 16;

    public MeshPlan(Arrangement arrangement, MeshOptions options)
    {
        Arrangement = arrangement;
        Options = options;
        CellLimit = (int)Math.Min(
            options.CellLimit, GC.GetGCMemoryInfo().TotalAvailableMemoryBytes / BytesPerCell);
        (Low, High) = BoxOf(arrangement);
        Extent = Math.Max(High.X - Low.X, High.Y - Low.Y);
        Curves = [.. arrangement.Pieces.Select(piece =>
            new PieceCurve(arrangement.Vertices[piece.Start], arrangement.Vertices[piece.End], piece.SweepRadians))];
        RegionCaps = ResolveRegions();
        Divisions = ResolveDivisions();
        Rings = new PieceRings(this);
        PieceSizes = ResolvePieces();
    }

    public Arrangement Arrangement { get; }

    public MeshOptions Options { get; }

    /// <summary>The limit of the options, or what the memory holds when that is less.</summary>
    public int CellLimit { get; }

    public Point2D Low { get; }

    public Point2D High { get; }

    /// <summary>The larger side of the box around the section.</summary>
    public double Extent { get; }

    public ImmutableArray<PieceCurve> Curves { get; }

    /// <summary>The largest wanted edge length of each region.</summary>
    public double[] RegionCaps { get; }

    /// <summary>The wanted edge length on each piece, before that of its surroundings.</summary>
    public double[] PieceSizes { get; }

    /// <summary>The number of edges that each piece must have, 0 where it is free.</summary>
    public int[] Divisions { get; }

    /// <summary>Which pieces are divided alike.</summary>
    public PieceRings Rings { get; }

    public double CapOf(int region) => region < 0 ? double.PositiveInfinity : RegionCaps[region];

    /// <summary>The pieces that carry a boundary name.</summary>
    public int[] PiecesOf(string boundary)
    {
        int[] pieces = [.. Enumerable.Range(0, Arrangement.Pieces.Length).Where(piece => Names(piece).Contains(boundary))];
        return pieces.Length > 0
            ? pieces
            : throw new UnknownNameException("boundary", boundary, Arrangement.BoundarySets.SelectMany(set => set).Distinct());
    }

    /// <summary>The piece in words, for messages.</summary>
    public string Describe(int piece)
    {
        string name = Names(piece) is [string first, ..] ? $"boundary '{first}', " : string.Empty;
        return $"the {name}piece from {Curves[piece].Start} to {Curves[piece].End}";
    }

    public SizeField MakeSizeField()
    {
        List<SizeSource> sources = [];
        for (int piece = 0; piece < Curves.Length; piece++)
        {
            sources.Add(new SizeSource(Curves[piece], PieceSizes[piece]));
        }

        foreach ((string point, double size) in Options.PointSizes)
        {
            int index = Arrangement.PointNames.IndexOf(point);
            if (index < 0)
                throw new UnknownNameException("point", point, Arrangement.PointNames);
            sources.Add(new SizeSource(Arrangement.Vertices[Arrangement.PointVertices[index]], size));
        }

        return new SizeField(sources, Options.Growth, RegionCaps.Max(), Low, High);
    }

    /// <summary>
    /// Refuses sizes that need more cells than the limit, judged by areas and lengths alone, before any work.
    /// </summary>
    public void RefuseHopelessSizes()
    {
        foreach ((string name, double size) in Options.BoundarySizes.Concat(Options.PointSizes))
        {
            if (size < FinestOverTolerance * Arrangement.Tolerance)
            {
                throw new MeshingException(string.Create(CultureInfo.InvariantCulture,
                    $"A size of {size:G4} m is asked for at '{name}', but points of this section count as one within {Arrangement.Tolerance:G3} m. Ask for {FinestOverTolerance * Arrangement.Tolerance:G3} m or more there."));
            }
        }

        double[] areas = new double[RegionCaps.Length];
        for (int piece = 0; piece < Curves.Length; piece++)
        {
            PieceCurve curve = Curves[piece];
            Vector2D start = curve.Start - Low;
            Vector2D end = curve.End - Low;
            double chord = curve.Start.DistanceTo(curve.End);
            double radius = curve.Sweep == 0 ? 0 : chord / (2 * Math.Sin(curve.Sweep / 2));
            double area = 0.5 * (start.Cross(end) + (radius * radius * (curve.Sweep - Math.Sin(curve.Sweep))));
            ArrangedPiece arranged = Arrangement.Pieces[piece];
            if (arranged.LeftRegion >= 0)
                areas[arranged.LeftRegion] += area;
            if (arranged.RightRegion >= 0)
                areas[arranged.RightRegion] -= area;

            if (Divisions[piece] > CellLimit)
            {
                throw new MeshingException(
                    $"A division into {Divisions[piece]} edges of {Describe(piece)} is more than the limit of {CellLimit} cells. Ask for fewer edges or raise the limit of cells.");
            }

            double edges = curve.Length / PieceSizes[piece];
            if (Divisions[piece] == 0 && edges > CellLimit)
            {
                throw new MeshingException(string.Create(CultureInfo.InvariantCulture,
                    $"An edge length of {PieceSizes[piece]:G4} m on {Describe(piece)} needs about {edges:G3} edges, more than the limit of {CellLimit} cells. Ask for larger sizes there or raise the limit of cells."));
            }
        }

        for (int region = 0; region < areas.Length; region++)
        {
            double cells = areas[region] / CellEstimate.AreaOfCell(RegionCaps[region]);
            if (cells > CellLimit)
                throw CellEstimate.TooMany(this, region, RegionCaps[region], cells);
        }
    }

    private ImmutableArray<string> Names(int piece)
    {
        int set = Arrangement.Pieces[piece].Boundaries;
        return set < 0 ? [] : Arrangement.BoundarySets[set];
    }

    private double[] ResolveRegions()
    {
        double[] caps = new double[Arrangement.RegionNames.Length];
        Array.Fill(caps, Options.Size ?? (Extent / DefaultCellsAcross));
        foreach ((string region, double size) in Options.RegionSizes)
        {
            int index = Arrangement.RegionNames.IndexOf(region);
            if (index < 0)
                throw new UnknownNameException("region", region, Arrangement.RegionNames);
            caps[index] = size;
        }

        return caps;
    }

    private int[] ResolveDivisions()
    {
        int[] divisions = new int[Curves.Length];
        foreach ((string boundary, int count) in Options.Divisions)
        {
            foreach (int piece in PiecesOf(boundary))
            {
                if (divisions[piece] != 0 && divisions[piece] != count)
                    throw new MeshingException($"Two divisions, {divisions[piece]} and {count}, are asked for on {Describe(piece)}. Keep one of them.");
                divisions[piece] = count;
            }
        }

        return divisions;
    }

    private double[] ResolvePieces()
    {
        double[] sizes = new double[Curves.Length];
        double arc = Options.LargestArcDegrees * Math.PI / 180;
        for (int piece = 0; piece < sizes.Length; piece++)
        {
            ArrangedPiece arranged = Arrangement.Pieces[piece];
            double size = Math.Min(CapOf(arranged.LeftRegion), CapOf(arranged.RightRegion));
            foreach (string name in Names(piece))
            {
                size = Math.Min(size, Options.BoundarySizes.GetValueOrDefault(name, double.PositiveInfinity));
            }

            double length = Curves[piece].Length;
            sizes[piece] = Divisions[piece] > 0
                ? length / Divisions[piece]
                : Math.Min(size, Math.Min(length, Curves[piece].Radius * arc));
        }

        foreach (string boundary in Options.BoundarySizes.Keys)
        {
            PiecesOf(boundary);
        }

        // Pieces that are divided alike have the size of the finest of them.
        for (int piece = 0; piece < sizes.Length; piece++)
        {
            double finest = Rings.Of(piece).Min(member => sizes[member]);
            foreach (int member in Rings.Of(piece))
            {
                sizes[member] = finest;
            }
        }

        return sizes;
    }

    private static (Point2D Low, Point2D High) BoxOf(Arrangement arrangement)
    {
        double left = double.PositiveInfinity, right = double.NegativeInfinity;
        double bottom = double.PositiveInfinity, top = double.NegativeInfinity;
        foreach (Point2D vertex in arrangement.Vertices)
        {
            Include(vertex);
        }

        foreach (ArrangedPiece piece in arrangement.Pieces.Where(piece => piece.SweepRadians != 0))
        {
            // Arcs reach beyond their ends, but little beyond a few points between.
            PieceCurve curve = new(arrangement.Vertices[piece.Start], arrangement.Vertices[piece.End], piece.SweepRadians);
            for (int i = 1; i < 16; i++)
            {
                Include(curve.PointAt(i / 16.0));
            }
        }

        return (new(left, bottom), new(right, top));

        void Include(Point2D point)
        {
            left = Math.Min(left, point.X);
            right = Math.Max(right, point.X);
            bottom = Math.Min(bottom, point.Y);
            top = Math.Max(top, point.Y);
        }
    }
}
