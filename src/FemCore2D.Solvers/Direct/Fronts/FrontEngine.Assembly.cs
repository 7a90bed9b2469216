namespace FemCore2D.Solvers;

/// <content>What goes into a front: zeros, entries of the matrix, and the updates of the children.</content>
internal sealed unsafe partial class FrontEngine
{
    private void Clear(int s, double* panel, double* update, int fromColumn, int toColumn, int fromUpdate, int toUpdate)
    {
        long ld = plan.Strides[s];
        long ldu = plan.UpdateStrides[s];
        for (int side = 0; side < plan.Sides; side++)
        {
            double* p = panel + side * sideSize;
            new Span<double>(p + fromColumn * ld, checked((int)((toColumn - fromColumn) * ld))).Clear();
            double* u = update + side * plan.UpdateSize(s);
            for (int j = fromUpdate; j < toUpdate; j++)
            {
                int start = j * doubles / 8 * 8;
                new Span<double>(u + j * ldu + start, (int)ldu - start).Clear();
            }
        }
    }

    private void Scatter(int s, double* panel, int from, int to)
    {
        int first = structure.Tree.Starts[s];
        int ld = plan.Strides[s];
        double* target = kind == FactorKind.General ? panel + sideSize : panel;
        bool conjugate = doubles == 2 && kind is FactorKind.Cholesky or FactorKind.Hermitian;
        ReadOnlySpan<int> rowStarts = map.RowStarts;
        int[] targets = map.Places;
        for (int c = from; c < to; c++)
        {
            double* column = target + (long)c * ld;
            int v = structure.Tree.Order[first + c];
            for (int k = rowStarts[v]; k < rowStarts[v + 1]; k++)
            {
                int place = targets[k];
                if (place < 0)
                    continue;
                if (doubles == 1)
                {
                    column[place] += values[k];
                    continue;
                }

                column[2 * place] += values[2 * (long)k];
                column[2 * place + 1] += conjugate ? -values[2 * (long)k + 1] : values[2 * (long)k + 1];
            }

            if (kind == FactorKind.General)
                ScatterColumn(panel + (long)c * ld, v);
        }
    }

    private void ScatterColumn(double* column, int v)
    {
        for (int k = map.SourceStarts[v]; k < map.SourceStarts[v + 1]; k++)
        {
            int place = map.SourcePlaces[k];
            if (place < 0)
                continue;
            double* source = values + (long)doubles * map.Sources[k];
            for (int i = 0; i < doubles; i++)
                column[doubles * place + i] += source[i];
        }
    }

    private void FindRuns(int child, int[] runEnds)
    {
        ReadOnlySpan<int> places = structure.ParentPlaces.AsSpan(
            (int)structure.RowStarts[child], structure.BelowCount(child));
        int end = places.Length;
        for (int i = places.Length - 1; i >= 0; i--)
        {
            runEnds[i] = end;
            if (i > 0 && places[i - 1] != places[i] - 1)
                end = i;
        }
    }

    private void AddChild(int s, double* panel, double* update, int child, double* childUpdate, int[] runEnds, int from, int to)
    {
        int count = structure.BelowCount(child);
        if (count == 0)
            return;
        int width = structure.Width(s);
        fixed (int* rows = &structure.ParentPlaces[structure.RowStarts[child]])
        fixed (int* ends = runEnds)
        {
            for (int side = 0; side < plan.Sides; side++)
            {
                arithmetic.AddUpdate(
                    panel + side * sideSize, plan.Strides[s], width,
                    update + side * plan.UpdateSize(s), plan.UpdateStrides[s],
                    rows, ends, count,
                    childUpdate + side * plan.UpdateSize(child), plan.UpdateStrides[child], from, to);
            }
        }
    }
}
