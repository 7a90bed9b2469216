namespace FemCore2D.Geometry;

/// <summary>
/// Rings of pieces that must be divided alike because their boundaries are paired. All pieces of a ring have one
/// direction of division, which for some of them is against their own.
/// </summary>
internal sealed class PieceRings
{
    private readonly MeshPlan plan;
    private readonly int[] next;
    private readonly bool[] isReversed;

    public PieceRings(MeshPlan plan)
    {
        this.plan = plan;
        next = [.. Enumerable.Range(0, plan.Curves.Length)];
        isReversed = new bool[next.Length];
        foreach ((string first, string second) in plan.Options.Pairs)
        {
            foreach (MatchedPieces match in BoundaryMatcher.Match(plan, first, second))
            {
                Unite(match);
            }
        }
    }

    /// <summary>The piece's direction of division is against its own direction.</summary>
    public bool IsReversed(int piece) => isReversed[piece];

    /// <summary>The next piece of the ring; the piece itself when it has no other.</summary>
    public int Next(int piece) => next[piece];

    /// <summary>All pieces of the ring, the given one first.</summary>
    public IEnumerable<int> Of(int piece)
    {
        int member = piece;
        do
        {
            yield return member;
            member = next[member];
        }
        while (member != piece);
    }

    /// <summary>The piece's curve in its direction of division.</summary>
    public PieceCurve Directed(int piece)
    {
        PieceCurve curve = plan.Curves[piece];
        return isReversed[piece] ? new PieceCurve(curve.End, curve.Start, -curve.Sweep) : curve;
    }

    private void Unite(MatchedPieces match)
    {
        bool opposed = match.IsReversed != (isReversed[match.First] != isReversed[match.Second]);
        if (match.First == match.Second || Of(match.First).Contains(match.Second))
        {
            if (!opposed && match.First != match.Second)
                return;
            throw new MeshingException(
                $"The paired boundaries contradict each other: {plan.Describe(match.First)} would have to match itself. Pair each boundary once.");
        }

        if (plan.Divisions[match.First] != plan.Divisions[match.Second])
        {
            throw new MeshingException(
                $"Paired boundaries are divided differently: {plan.Describe(match.First)} and {plan.Describe(match.Second)}. Give both boundaries the same division.");
        }

        if (opposed)
        {
            foreach (int member in Of(match.Second).ToArray())
            {
                isReversed[member] = !isReversed[member];
            }
        }

        (next[match.First], next[match.Second]) = (next[match.Second], next[match.First]);
    }
}
