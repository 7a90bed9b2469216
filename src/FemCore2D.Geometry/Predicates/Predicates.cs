using System.Runtime.CompilerServices;

namespace FemCore2D.Geometry;

/// <summary>
/// The two questions that a triangulation asks of its points, answered with the exact sign.
/// </summary>
/// <remarks>
/// A rounded determinant is trusted when it exceeds its error bound; otherwise it is evaluated in expansion
/// arithmetic, in two steps of rising precision. J. R. Shewchuk, "Adaptive precision floating-point arithmetic and
/// fast robust geometric predicates", Discrete and Computational Geometry 18 (1997). Exact for coordinates whose
/// products neither overflow nor underflow (magnitudes from about 1e-70 to 1e70 are safe).
/// </remarks>
internal static class Predicates
{
    private const double HalfUlp = 1.1102230246251565e-16;
    private const double OrientationBound = (3 + (16 * HalfUlp)) * HalfUlp;
    private const double InCircleBound = (10 + (96 * HalfUlp)) * HalfUlp;
    private const double InCircleRoundedDifferencesBound = (4 + (48 * HalfUlp)) * HalfUlp;

    /// <summary>Positive when a, b, c turn counterclockwise, negative when clockwise, zero when they are in line.</summary>
    public static double Orientation(Point2D a, Point2D b, Point2D c) => Orientation(a.X, a.Y, b.X, b.Y, c.X, c.Y);

    /// <inheritdoc cref="Orientation(Point2D, Point2D, Point2D)"/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static double Orientation(double ax, double ay, double bx, double by, double cx, double cy)
    {
        double left = (ax - cx) * (by - cy);
        double right = (ay - cy) * (bx - cx);
        double determinant = left - right;
        double bound = OrientationBound * (Math.Abs(left) + Math.Abs(right));
        return Math.Abs(determinant) > bound || bound == 0
            ? determinant
            : ExactOrientation(ax, ay, bx, by, cx, cy);
    }

    /// <summary>
    /// Positive when d lies inside the circle through a, b and c (counterclockwise), negative outside, zero on it.
    /// </summary>
    public static double InCircle(Point2D a, Point2D b, Point2D c, Point2D d) =>
        InCircle(a.X, a.Y, b.X, b.Y, c.X, c.Y, d.X, d.Y);

    /// <inheritdoc cref="InCircle(Point2D, Point2D, Point2D, Point2D)"/>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static double InCircle(
        double ax, double ay, double bx, double by, double cx, double cy, double dx, double dy)
    {
        double adx = ax - dx;
        double ady = ay - dy;
        double bdx = bx - dx;
        double bdy = by - dy;
        double cdx = cx - dx;
        double cdy = cy - dy;

        double bc = bdx * cdy;
        double cb = cdx * bdy;
        double ca = cdx * ady;
        double ac = adx * cdy;
        double ab = adx * bdy;
        double ba = bdx * ady;
        double aLift = (adx * adx) + (ady * ady);
        double bLift = (bdx * bdx) + (bdy * bdy);
        double cLift = (cdx * cdx) + (cdy * cdy);

        double determinant = (aLift * (bc - cb)) + (bLift * (ca - ac)) + (cLift * (ab - ba));
        double permanent = (aLift * (Math.Abs(bc) + Math.Abs(cb)))
            + (bLift * (Math.Abs(ca) + Math.Abs(ac)))
            + (cLift * (Math.Abs(ab) + Math.Abs(ba)));
        return Math.Abs(determinant) > InCircleBound * permanent
            ? determinant
            : ExactInCircle(ax, ay, bx, by, cx, cy, dx, dy, permanent);
    }

    [MethodImpl(MethodImplOptions.NoInlining)]
    private static double ExactOrientation(double ax, double ay, double bx, double by, double cx, double cy)
    {
        Span<double> acx = stackalloc double[2];
        Span<double> acy = stackalloc double[2];
        Span<double> bcx = stackalloc double[2];
        Span<double> bcy = stackalloc double[2];
        acx = acx[..Expansion.Difference(ax, cx, acx)];
        acy = acy[..Expansion.Difference(ay, cy, acy)];
        bcx = bcx[..Expansion.Difference(bx, cx, bcx)];
        bcy = bcy[..Expansion.Difference(by, cy, bcy)];
        Span<double> determinant = stackalloc double[16];
        return Expansion.Estimate(determinant[..CrossProduct(acx, acy, bcx, bcy, determinant)]);
    }

    [MethodImpl(MethodImplOptions.NoInlining)]
    private static double ExactInCircle(
        double ax, double ay, double bx, double by, double cx, double cy, double dx, double dy, double permanent)
    {
        Span<double> adx = stackalloc double[2];
        Span<double> ady = stackalloc double[2];
        Span<double> bdx = stackalloc double[2];
        Span<double> bdy = stackalloc double[2];
        Span<double> cdx = stackalloc double[2];
        Span<double> cdy = stackalloc double[2];
        adx = adx[..Expansion.Difference(ax, dx, adx)];
        ady = ady[..Expansion.Difference(ay, dy, ady)];
        bdx = bdx[..Expansion.Difference(bx, dx, bdx)];
        bdy = bdy[..Expansion.Difference(by, dy, bdy)];
        cdx = cdx[..Expansion.Difference(cx, dx, cdx)];
        cdy = cdy[..Expansion.Difference(cy, dy, cdy)];

        // The differences, rounded, are mostly exact already, or good enough.
        double rounded = LiftedDeterminant(adx[^1..], ady[^1..], bdx[^1..], bdy[^1..], cdx[^1..], cdy[^1..]);
        bool differencesAreExact =
            adx.Length + ady.Length + bdx.Length + bdy.Length + cdx.Length + cdy.Length == 6;
        return differencesAreExact || Math.Abs(rounded) > InCircleRoundedDifferencesBound * permanent
            ? rounded
            : LiftedDeterminant(adx, ady, bdx, bdy, cdx, cdy);
    }

    private static double LiftedDeterminant(
        ReadOnlySpan<double> adx,
        ReadOnlySpan<double> ady,
        ReadOnlySpan<double> bdx,
        ReadOnlySpan<double> bdy,
        ReadOnlySpan<double> cdx,
        ReadOnlySpan<double> cdy)
    {
        Span<double> a = stackalloc double[512];
        Span<double> b = stackalloc double[512];
        Span<double> c = stackalloc double[512];
        a = a[..Lifted(adx, ady, bdx, bdy, cdx, cdy, a)];
        b = b[..Lifted(bdx, bdy, cdx, cdy, adx, ady, b)];
        c = c[..Lifted(cdx, cdy, adx, ady, bdx, bdy, c)];
        Span<double> ab = stackalloc double[a.Length + b.Length];
        ab = ab[..Expansion.Add(a, b, ab)];
        Span<double> abc = stackalloc double[ab.Length + c.Length];
        return Expansion.Estimate(abc[..Expansion.Add(ab, c, abc)]);
    }

    /// <summary>(ax² + ay²) (bx cy - by cx), at most 512 components.</summary>
    private static int Lifted(
        ReadOnlySpan<double> ax,
        ReadOnlySpan<double> ay,
        ReadOnlySpan<double> bx,
        ReadOnlySpan<double> by,
        ReadOnlySpan<double> cx,
        ReadOnlySpan<double> cy,
        Span<double> result)
    {
        Span<double> xx = stackalloc double[8];
        Span<double> yy = stackalloc double[8];
        Span<double> lift = stackalloc double[16];
        Span<double> cross = stackalloc double[16];
        Span<double> scratch = stackalloc double[512];
        xx = xx[..Expansion.Multiply(ax, ax, xx, scratch)];
        yy = yy[..Expansion.Multiply(ay, ay, yy, scratch)];
        lift = lift[..Expansion.Add(xx, yy, lift)];
        cross = cross[..CrossProduct(bx, by, cx, cy, cross)];
        return Expansion.Multiply(lift, cross, result, scratch);
    }

    /// <summary>ax by - ay bx, at most 16 components.</summary>
    private static int CrossProduct(
        ReadOnlySpan<double> ax,
        ReadOnlySpan<double> ay,
        ReadOnlySpan<double> bx,
        ReadOnlySpan<double> by,
        Span<double> result)
    {
        Span<double> left = stackalloc double[8];
        Span<double> right = stackalloc double[8];
        Span<double> scratch = stackalloc double[8];
        left = left[..Expansion.Multiply(ax, by, left, scratch)];
        right = right[..Expansion.Multiply(ay, bx, right, scratch)];
        foreach (ref double component in right)
        {
            component = -component;
        }

        return Expansion.Add(left, right, result);
    }
}
