namespace FemCore2D.Solvers;

/// <summary>The memory of one thread of a factorization.</summary>
internal sealed unsafe class FrontPlace
{
    private readonly AlignedDoubles scratch = new(FrontArithmetic.ScratchSize);
    private readonly AlignedDoubles? secondPanel;

    /// <summary>Allocates what the fronts of any subtree need.</summary>
    public FrontPlace(FrontPlan plan, FactorKind kind)
    {
        Workspace = new AlignedDoubles(plan.WorkspaceSize + FrontEngine.Slack);
        RunEnds = new int[plan.LargestFront];
        if (kind is FactorKind.Symmetric or FactorKind.Hermitian)
            secondPanel = new AlignedDoubles(plan.LargestPanel + FrontEngine.Slack);
    }

    /// <summary>The updates of a subtree.</summary>
    public AlignedDoubles Workspace { get; }

    /// <summary>The packed pieces of a product.</summary>
    public double* Scratch => scratch.Pointer;

    /// <summary>The panel times D.</summary>
    public double* SecondPanel => secondPanel is null ? null : secondPanel.Pointer;

    /// <summary>Room for the runs of a child.</summary>
    public int[] RunEnds { get; }
}
