namespace FemCore2D.Solvers;

/// <content>The elimination of a front's own columns, block by block.</content>
internal sealed unsafe partial class FrontEngine
{
    /// <summary>Brings some rows of a block of columns up to date with the columns left of it.</summary>
    private void UpdateBlock(double* p, double* q, nint ld, int b, int n, int fromRow, int toRow, double* scratch)
    {
        if (b == 0)
            return;
        bool conjugate = kind is FactorKind.Cholesky or FactorKind.Hermitian;
        arithmetic.Product(
            p + fromRow, ld, q + b * doubles, ld, b, p + fromRow + b * ld, ld, toRow - fromRow, n,
            false, 0, conjugate, scratch);
        if (kind == FactorKind.General)
        {
            arithmetic.Product(
                q + fromRow, ld, p + b * doubles, ld, b, q + fromRow + b * ld, ld, toRow - fromRow, n,
                false, 0, false, scratch);
        }
    }

    private bool FactorizeBlock(int s, double* p, double* q, nint ld, int b, int n)
    {
        int rows = EndOfCorner(b + n) - b * doubles;
        int first = structure.Tree.Starts[s] + b;
        double* corner = p + b * doubles + b * ld;
        if (kind == FactorKind.Cholesky)
        {
            int failed = arithmetic.Cholesky(corner, ld, n, rows);
            if (failed < 0)
                failed = FindNegligible(corner, ld, n, first);
            if (failed >= 0)
                Fail(first + failed);
            return failed < 0;
        }

        double* second = q + b * doubles + b * ld;
        Span<int> order = Pivots.Order.AsSpan(first, n);
        int perturbed = int.MaxValue;
        int raised = kind == FactorKind.General
            ? arithmetic.GeneralCorner(corner, second, ld, n, rows, LeastPivot, order, ref perturbed)
            : arithmetic.SymmetricCorner(
                corner, second, ld, n, rows, kind == FactorKind.Hermitian, LeastPivot, order,
                Pivots.OffDiagonals.AsSpan(first * doubles, n * doubles), ref perturbed);
        if (raised > 0)
        {
            Interlocked.Add(ref raisedPivots, raised);
            Lower(ref firstRaised, first + perturbed);
        }

        MoveRows(p, ld, b, order);
        int end = EndOfCorner(b + n);
        MoveColumns((kind == FactorKind.General ? q : p) + end + b * ld, ld, (int)ld - end, order);
        foreach (ref int place in order)
            place += b;
        return true;
    }

    /// <summary>Finds a pivot that is nothing but the rounding of the entries it came from, or -1.</summary>
    private int FindNegligible(double* corner, nint ld, int n, int first)
    {
        for (int k = 0; k < n; k++)
        {
            double root = corner[k * doubles + k * ld];
            if (root * root <= LeastPivot * Diagonals[structure.Tree.Order[first + k]])
                return k;
        }

        return -1;
    }

    /// <summary>Puts the rows of a block left of its corner into the order of the pivots.</summary>
    private void MoveRows(double* p, nint ld, int b, ReadOnlySpan<int> order)
    {
        if (b == 0 || IsAscending(order))
            return;
        double* copy = stackalloc double[2 * FrontArithmetic.BlockWidth];
        for (int j = 0; j < b; j++)
        {
            double* column = p + b * doubles + j * ld;
            new ReadOnlySpan<double>(column, order.Length * doubles)
                .CopyTo(new Span<double>(copy, order.Length * doubles));
            for (int k = 0; k < order.Length; k++)
            {
                for (int i = 0; i < doubles; i++)
                    column[k * doubles + i] = copy[order[k] * doubles + i];
            }
        }
    }

    /// <summary>Puts the columns of a block below its corner into the order of the pivots.</summary>
    private static void MoveColumns(double* p, nint ld, int rows, ReadOnlySpan<int> order)
    {
        if (rows == 0 || IsAscending(order))
            return;
        Span<int> held = stackalloc int[FrontArithmetic.BlockWidth];
        for (int k = 0; k < order.Length; k++)
            held[k] = k;
        for (int k = 0; k < order.Length; k++)
        {
            int from = held[k..order.Length].IndexOf(order[k]) + k;
            if (from == k)
                continue;
            (held[k], held[from]) = (held[from], held[k]);
            double* a = p + k * ld;
            double* c = p + from * ld;
            for (int i = 0; i < rows; i++)
                (a[i], c[i]) = (c[i], a[i]);
        }
    }

    private static bool IsAscending(ReadOnlySpan<int> order)
    {
        for (int k = 0; k < order.Length; k++)
        {
            if (order[k] != k)
                return false;
        }

        return true;
    }

    /// <summary>Solves some rows below the corner of a block.</summary>
    private void SolveBlock(int s, double* p, double* q, nint ld, int b, int n, int fromRow, int toRow)
    {
        int rows = toRow - fromRow;
        if (rows <= 0)
            return;
        double* lower = p + b * doubles + b * ld;
        double* x = p + fromRow + b * ld;
        switch (kind)
        {
            case FactorKind.Cholesky:
                arithmetic.SolveRows(x, ld, rows, lower, ld, n, unit: false, conjugate: true);
                break;
            case FactorKind.General:
                arithmetic.SolveRows(x, ld, rows, q + b * doubles + b * ld, ld, n, unit: false, conjugate: false);
                arithmetic.SolveRows(q + fromRow + b * ld, ld, rows, lower, ld, n, unit: true, conjugate: false);
                break;
            default:
                bool hermitian = kind == FactorKind.Hermitian;
                int first = (structure.Tree.Starts[s] + b) * doubles;
                arithmetic.SolveRows(x, ld, rows, lower, ld, n, unit: true, conjugate: hermitian);
                arithmetic.DivideRows(
                    x, q + fromRow + b * ld, ld, n, rows, lower,
                    Pivots.OffDiagonals.AsSpan(first, n * doubles), hermitian);
                break;
        }
    }

    /// <summary>Subtracts the product of the rows below from a tile of the update.</summary>
    private void UpdateTile(int s, double* p, double* q, double* update, int row, int column, double* scratch)
    {
        int width = structure.Width(s);
        int below = structure.BelowCount(s);
        nint ld = plan.Strides[s];
        nint ldu = plan.UpdateStrides[s];
        int rows = Math.Min(FrontArithmetic.TileRows, (int)ldu - row);
        int columns = Math.Min(arithmetic.TileColumns, below - column);
        int offset = column - row / doubles;
        bool conjugate = kind is FactorKind.Cholesky or FactorKind.Hermitian;
        double* target = update + row + column * ldu;
        arithmetic.Product(
            p + width * doubles + row, ld, q + (width + column) * doubles, ld, width, target, ldu,
            rows, columns, true, offset, conjugate, scratch);
        if (kind == FactorKind.General)
        {
            arithmetic.Product(
                q + width * doubles + row, ld, p + (width + column) * doubles, ld, width,
                target + plan.UpdateSize(s), ldu, rows, columns, true, offset, false, scratch);
        }
    }
}
