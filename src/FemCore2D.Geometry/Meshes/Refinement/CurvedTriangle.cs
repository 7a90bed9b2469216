namespace FemCore2D.Geometry;

/// <summary>A triangle with straight and circular sides, counterclockwise, and the lines that divide it.</summary>
/// <remarks>
/// Dividing lines are straight unless a side bends so much that they might leave the triangle; then they bend as they
/// do under the quadratic map of the triangle, which moves a point of barycentric coordinates l by
/// <c>4 l_i l_j</c> times the rise of each side from i to j.
/// </remarks>
internal readonly record struct CurvedTriangle(OutlinePiece AB, OutlinePiece BC, OutlinePiece CA)
{
    /// <summary>A side that rises by no more than this share of the triangle's height over it bends but little.</summary>
    /// <remarks>Halving another side halves the height; the tangent at the side's ends then stays within half the angle.</remarks>
    private const double LittleRise = 1.0 / 16;

    public bool IsStronglyBent =>
        (AB.SweepRadians != 0 || BC.SweepRadians != 0 || CA.SweepRadians != 0)
        && Math.Max(RiseTimesChord(AB), Math.Max(RiseTimesChord(BC), RiseTimesChord(CA)))
            > LittleRise * Math.Abs(AB.Chord.Cross(CA.Chord));

    /// <summary>The sweep of the line from A to the middle of the side from B to C.</summary>
    public double MedianSweep => IsStronglyBent
        ? OutlinePiece.Bent(
            AB.Start, BC.PointAt(0.5), (0.5 * (AB.RiseVector + CA.RiseVector)) - (0.25 * BC.RiseVector)).SweepRadians
        : 0;

    /// <summary>The sweep of the line from the middle of AB to the middle of CA, which runs along BC.</summary>
    public double MiddleLineSweep => IsStronglyBent
        ? OutlinePiece.Bent(AB.PointAt(0.5), CA.PointAt(0.5), 0.25 * BC.RiseVector).SweepRadians
        : 0;

    /// <summary>The same triangle begun at B.</summary>
    public CurvedTriangle Turned => new(BC, CA, AB);

    private static double RiseTimesChord(in OutlinePiece side) => Math.Abs(side.Rise) * side.Chord.Length;
}
