using System.Globalization;

namespace FemCore2D.Geometry;

/// <summary>Two pieces of which the second is the first moved.</summary>
/// <param name="First">A piece of the first boundary.</param>
/// <param name="Second">The piece of the second boundary.</param>
/// <param name="IsReversed">Whether the start of the first comes to lie on the end of the second.</param>
internal readonly record struct MatchedPieces(int First, int Second, bool IsReversed);

/// <summary>Finds the shift or turn that carries one boundary onto another, piece by piece.</summary>
internal static class BoundaryMatcher
{
    /// <exception cref="MeshingException">No motion carries the first boundary onto the second.</exception>
    public static List<MatchedPieces> Match(MeshPlan plan, string first, string second)
    {
        int[] one = plan.PiecesOf(first);
        int[] other = plan.PiecesOf(second);
        List<MatchedPieces>? best = null;
        double bestScore = double.PositiveInfinity;
        if (one.Length == other.Length)
        {
            Point2D pivot = CentreOf(plan, one);
            Point2D target = CentreOf(plan, other);
            double tolerance = Math.Max(16 * plan.Arrangement.Tolerance, 1e-12 * plan.Extent);
            foreach (double angle in CandidateAngles(plan, one, other, pivot, target, tolerance))
            {
                if (TryMatch(plan, one, other, pivot, target, angle, tolerance) is not { } matches)
                    continue;

                // Seen from a periodic section the pieces of a pair face each other's backs; of several such
                // motions the smallest turn is meant.
                double score = Math.Abs(angle) + (10.0 * matches.Count(match => !AreFacingAway(plan, match)));
                if (score < bestScore)
                {
                    best = matches;
                    bestScore = score;
                }
            }
        }

        return best ?? throw new MeshingException(string.Create(CultureInfo.InvariantCulture,
            $"The boundaries '{first}' ({one.Length} pieces, {LengthOf(plan, one):G6} m, around {CentreOf(plan, one)}) and '{second}' ({other.Length} pieces, {LengthOf(plan, other):G6} m, around {CentreOf(plan, other)}) cannot be paired: no shift or turn carries the one onto the other piece by piece. Make them equal in shape and cut at the same places."));
    }

    private static IEnumerable<double> CandidateAngles(
        MeshPlan plan, int[] one, int[] other, Point2D pivot, Point2D target, double tolerance)
    {
        yield return 0;
        Point2D far = EndsOf(plan, one).MaxBy(point => (point - pivot).LengthSquared);
        Vector2D arm = far - pivot;
        foreach (Point2D point in EndsOf(plan, other))
        {
            Vector2D image = point - target;
            if (Math.Abs(image.Length - arm.Length) <= tolerance)
                yield return Math.Atan2(arm.Cross(image), arm.Dot(image));
        }
    }

    private static List<MatchedPieces>? TryMatch(
        MeshPlan plan, int[] one, int[] other, Point2D pivot, Point2D target, double angle, double tolerance)
    {
        (double sine, double cosine) = Math.SinCos(angle);
        List<MatchedPieces> matches = [];
        HashSet<int> free = [.. other];
        foreach (int piece in one)
        {
            PieceCurve curve = plan.Curves[piece];
            Point2D start = Moved(curve.Start);
            Point2D end = Moved(curve.End);
            MatchedPieces? match = null;
            foreach (int candidate in other)
            {
                PieceCurve image = plan.Curves[candidate];
                if (!free.Contains(candidate))
                    continue;
                if (AreNear(start, image.Start) && AreNear(end, image.End) && HaveEqualSweeps(curve.Sweep, image.Sweep))
                    match = new MatchedPieces(piece, candidate, IsReversed: false);
                else if (AreNear(start, image.End) && AreNear(end, image.Start) && HaveEqualSweeps(curve.Sweep, -image.Sweep))
                    match = new MatchedPieces(piece, candidate, IsReversed: true);
                if (match is not null)
                    break;
            }

            if (match is null)
                return null;
            matches.Add(match.Value);
            free.Remove(match.Value.Second);
        }

        return matches;

        Point2D Moved(Point2D point)
        {
            Vector2D arm = point - pivot;
            return target + new Vector2D((cosine * arm.X) - (sine * arm.Y), (sine * arm.X) + (cosine * arm.Y));
        }

        bool AreNear(Point2D a, Point2D b) => a.DistanceTo(b) <= tolerance;

        bool HaveEqualSweeps(double a, double b) => Math.Abs(a - b) <= 1e-9;
    }

    private static bool AreFacingAway(MeshPlan plan, MatchedPieces match)
    {
        ArrangedPiece one = plan.Arrangement.Pieces[match.First];
        ArrangedPiece other = plan.Arrangement.Pieces[match.Second];
        bool insideOnLeft = one.LeftRegion >= 0 && one.RightRegion < 0;
        bool insideOnRight = one.RightRegion >= 0 && one.LeftRegion < 0;
        bool otherOnLeft = other.LeftRegion >= 0 && other.RightRegion < 0;
        bool otherOnRight = other.RightRegion >= 0 && other.LeftRegion < 0;
        if (match.IsReversed)
            (otherOnLeft, otherOnRight) = (otherOnRight, otherOnLeft);
        return insideOnLeft == otherOnRight && insideOnRight == otherOnLeft;
    }

    private static IEnumerable<Point2D> EndsOf(MeshPlan plan, int[] pieces) =>
        pieces.SelectMany(piece => new[] { plan.Curves[piece].Start, plan.Curves[piece].End });

    private static double LengthOf(MeshPlan plan, int[] pieces) => pieces.Sum(piece => plan.Curves[piece].Length);

    private static Point2D CentreOf(MeshPlan plan, int[] pieces)
    {
        // Ends weighted by the lengths of their pieces move with the boundary.
        double total = LengthOf(plan, pieces);
        Vector2D sum = Vector2D.Zero;
        foreach (int piece in pieces)
        {
            PieceCurve curve = plan.Curves[piece];
            sum += curve.Length / total * (curve.Start.Towards(curve.End, 0.5) - Point2D.Origin);
        }

        return Point2D.Origin + sum;
    }
}
