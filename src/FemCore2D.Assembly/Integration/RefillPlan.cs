using FemCore2D.Geometry;
using FemCore2D.Sparse;

namespace FemCore2D.Assembly;

/// <summary>
/// What is worked out once for a numbering and used by every refill: the pattern of its matrices, the chunks of rows,
/// and for each entry of each local matrix its place within its row.
/// </summary>
internal sealed class RefillPlan
{
    // One of the two: bytes suffice unless some row is longer than 256 entries.
    private readonly byte[]? narrow;
    private readonly int[]? wide;
    private readonly int triangleCount;
    private readonly int triangleUnknowns;
    private readonly int quadrilateralUnknowns;

    public RefillPlan(Numbering numbering, ParallelOptions options)
    {
        Numbering = numbering;
        Mesh mesh = numbering.Mesh;
        triangleCount = mesh.TriangleCount;
        triangleUnknowns = numbering.CellUnknownCount(CellKind.Triangle);
        quadrilateralUnknowns = numbering.CellUnknownCount(CellKind.Quadrilateral);
        long entries = ((long)triangleCount * triangleUnknowns * triangleUnknowns)
            + ((long)mesh.QuadrilateralCount * quadrilateralUnknowns * quadrilateralUnknowns);
        if (entries > Array.MaxLength)
        {
            throw new SizeLimitException(
                $"The {mesh.CellCount} cells have {entries} local matrix entries; at most {Array.MaxLength} can be "
                + "assembled into one matrix. Use a coarser mesh or a lower degree.");
        }

        Chunks = new RowChunks(numbering, options);
        var builder = new PatternBuilder(numbering, Chunks, options);
        if (builder.LongestRowBound <= byte.MaxValue + 1)
        {
            narrow = new byte[entries];
        }
        else
        {
            wide = new int[entries];
        }

        Pattern = builder.Build(this);
    }

    public Numbering Numbering { get; }

    public RowChunks Chunks { get; }

    public SparsePattern Pattern { get; }

    /// <summary>Where the places of a cell begin; they run row by row through its local matrix.</summary>
    public int PlacesOf(int cell) => cell < triangleCount
        ? cell * triangleUnknowns * triangleUnknowns
        : (triangleCount * triangleUnknowns * triangleUnknowns)
            + ((cell - triangleCount) * quadrilateralUnknowns * quadrilateralUnknowns);

    public ReadOnlySpan<byte> NarrowPlaces => narrow;

    public ReadOnlySpan<int> WidePlaces => wide;

    public bool IsNarrow => narrow is not null;

    public void SetPlace(int at, int place)
    {
        if (narrow is not null)
        {
            narrow[at] = (byte)place;
        }
        else
        {
            wide![at] = place;
        }
    }
}
