namespace FemCore2D.Solvers;

/// <summary>What the pivoting inside the fronts has done.</summary>
internal sealed class PivotRecord
{
    /// <summary>Allocates the record; a Cholesky factorization has none.</summary>
    public PivotRecord(int columns, int doubles, FactorKind kind)
    {
        Order = kind == FactorKind.Cholesky ? [] : new int[columns];
        if (kind is FactorKind.Symmetric or FactorKind.Hermitian)
            OffDiagonals = new double[columns * doubles];
    }

    /// <summary>For each column of the factor which column (or row) of its supernode was taken there, from its first one.</summary>
    public int[] Order { get; }

    /// <summary>The entry of D below its diagonal in each column; not zero in the first column of a block of two.</summary>
    public double[] OffDiagonals { get; } = [];
}
