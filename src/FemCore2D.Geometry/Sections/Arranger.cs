using System.Collections.Immutable;

namespace FemCore2D.Geometry;

/// <summary>Computes the <see cref="Arrangement"/> of a cross-section.</summary>
/// <remarks>
/// All pieces are cut at each other; the winding numbers of every shape on both sides of every part tell which shapes
/// lie there, and the one painted last gives the region.
/// </remarks>
internal sealed class Arranger
{
    private readonly CrossSection section;
    private readonly List<PaintedShape> shapes = [];
    private readonly List<OutlinePiece> sources = [];
    private readonly List<int> owners = [];
    private readonly List<int> turns = [];

    /// <summary>For each source the sheet that it is part of, or null.</summary>
    private readonly List<string?> sheets = [];

    private readonly List<NamedPoint> points = [];
    private readonly ImmutableArray<string> regionNames;
    private readonly Dictionary<string, int> regionIndex = [];
    private readonly double tolerance;
    private readonly PieceCutter cutter;
    private readonly PieceWindings windings;
    private readonly BoundarySetTable sets = new();
    private readonly List<ArrangedPiece> arranged = [];
    private readonly List<int> origins = [];

    private Arranger(CrossSection section)
    {
        this.section = section;
        foreach (SectionItem item in section.Items)
        {
            Add(item);
        }

        regionNames = [.. section.Regions];
        for (int i = 0; i < regionNames.Length; i++)
        {
            regionIndex.Add(regionNames[i], i);
        }

        if (regionNames.Length == 0)
        {
            throw new InvalidSectionException("The cross-section has no region. Fill at least one outline.");
        }

        tolerance = OutlineChecks.ToleranceOf(section.Bounds);
        cutter = new PieceCutter(sources, [.. points.Select(p => p.Place)], tolerance);
        windings = new PieceWindings(cutter, [.. owners], [.. turns], shapes.Count);
    }

    public static Arrangement Arrange(CrossSection section) => new Arranger(section).Run();

    private void Add(SectionItem item)
    {
        switch (item)
        {
            case PaintedShape painted:
                foreach (Outline outline in painted.Shape.Outlines)
                {
                    // Outer outlines count as run counterclockwise and holes clockwise, however they were drawn.
                    bool counterclockwise = outline.SignedArea > 0;
                    int turn = counterclockwise == ReferenceEquals(outline, painted.Shape.Outer) ? 1 : -1;
                    AddPieces(outline.Pieces, shapes.Count, turn, null);
                }

                shapes.Add(painted);
                break;
            case SheetLine sheet:
                AddPieces(sheet.Pieces, -1, 0, sheet.Boundary);
                break;
            case NamedPoint point:
                points.Add(point);
                break;
        }
    }

    private void AddPieces(ImmutableArray<OutlinePiece> pieces, int owner, int turn, string? sheet)
    {
        foreach (OutlinePiece piece in OutlineChecks.Halved(pieces))
        {
            sources.Add(piece);
            owners.Add(owner);
            turns.Add(turn);
            sheets.Add(sheet);
        }
    }

    private Arrangement Run()
    {
        HashSet<int> drawnShapes = [];
        for (int piece = 0; piece < cutter.Pieces.Count; piece++)
        {
            drawnShapes.UnionWith(cutter.UsesOf(piece).Select(use => owners[use.Source]));
            AddPiece(piece);
        }

        SectionChecks.RegionsClose(cutter.Vertices, arranged, tolerance);
        SectionChecks.ShapesAreResolved(shapes, drawnShapes, tolerance);
        SectionChecks.RegionsAreSeen(shapes, regionNames, arranged, CoversOf);
        SectionChecks.BoundariesAreSeen(section.Boundaries, sets.Sets, arranged);
        CheckPoints();
        ArrangedLines lines = new(cutter, arranged, origins);
        return new Arrangement
        {
            Pieces = lines.Pieces,
            Vertices = lines.Vertices,
            RegionNames = regionNames,
            BoundarySets = [.. sets.Sets],
            PointNames = [.. points.Select(p => p.Name)],
            PointVertices = [.. cutter.ExtraVertices.Select(lines.VertexOf)],
            Tolerance = tolerance,
        };
    }

    private void AddPiece(int piece)
    {
        windings.CountAt(piece);
        int topLeft = -1;
        int topRight = -1;
        int cover = -1;
        foreach (int shape in windings.Touched)
        {
            bool isLeft = windings.Left(shape) != 0;
            bool isRight = windings.Right(shape) != 0;
            topLeft = isLeft ? Math.Max(topLeft, shape) : topLeft;
            topRight = isRight ? Math.Max(topRight, shape) : topRight;
            cover = isLeft && isRight ? Math.Max(cover, shape) : cover;
        }

        int left = RegionOf(topLeft);
        int right = RegionOf(topRight);
        bool isOutside = left < 0 && right < 0;
        sets.Begin();
        foreach (PieceUse use in cutter.UsesOf(piece))
        {
            if (sheets[use.Source] is string sheet)
            {
                if (isOutside)
                {
                    throw new InvalidSectionException(
                        $"The sheet '{sheet}' leaves the section at {windings.MiddleOf(piece)}. "
                        + "Fill a region there, or end the sheet inside.");
                }

                sets.Add(sheet);
                sets.Add(sources[use.Source].Boundary);
            }
            else if (owners[use.Source] >= cover)
            {
                sets.Add(sources[use.Source].Boundary);
            }
        }

        int names = isOutside ? -1 : sets.End();
        if (left != right || names >= 0)
        {
            CutPiece part = cutter.Pieces[piece];
            arranged.Add(new ArrangedPiece(part.Start, part.End, part.Sweep, left, right, names));
            origins.Add(cutter.UsesOf(piece)[0].Source);
        }
    }

    private int RegionOf(int shape) => shape >= 0 && shapes[shape].Region is string region ? regionIndex[region] : -1;

    private SortedSet<int> CoversOf(string region)
    {
        SortedSet<int> covers = [];
        for (int piece = 0; piece < cutter.Pieces.Count; piece++)
        {
            foreach (PieceUse use in cutter.UsesOf(piece))
            {
                if (owners[use.Source] >= 0 && shapes[owners[use.Source]].Region == region)
                {
                    windings.CountAt(piece);
                    bool isLeft = windings.Left(owners[use.Source]) != 0;
                    covers.Add(windings.Touched.Where(s => (isLeft ? windings.Left(s) : windings.Right(s)) != 0).Max());
                }
            }
        }

        return covers;
    }

    private void CheckPoints()
    {
        HashSet<int> onPieces = [.. arranged.SelectMany(p => new[] { p.Start, p.End })];
        for (int i = 0; i < points.Count; i++)
        {
            int vertex = cutter.ExtraVertices[i];
            if (onPieces.Contains(vertex))
            {
                continue;
            }

            windings.CountAt(cutter.Vertices[vertex]);
            int top = windings.Touched.Where(s => windings.Left(s) != 0).DefaultIfEmpty(-1).Max();
            if (RegionOf(top) < 0)
            {
                throw new InvalidSectionException(
                    $"The fixed point '{points[i].Name}' at {points[i].Place} lies outside the section. "
                    + "Move it into a region, or fill one there.");
            }
        }
    }
}
