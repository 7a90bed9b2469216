using FemCore2D.Sparse;

namespace FemCore2D.Solvers;

/// <summary>For every stored entry of a matrix the row of the panel that receives it.</summary>
internal sealed class EntryMap
{
    private readonly SparsePattern pattern;

    /// <summary>Fills the map.</summary>
    public EntryMap(SparsePattern pattern, FactorStructure structure, bool general)
    {
        this.pattern = pattern;
        ReadOnlySpan<int> rowStarts = pattern.RowStarts;
        ReadOnlySpan<int> columns = pattern.Columns;
        SupernodeTree tree = structure.Tree;
        int n = pattern.RowCount;
        Places = GC.AllocateUninitializedArray<int>(columns.Length);
        int[] transposedStarts = [];
        int[] rows = [];
        if (general)
            (transposedStarts, Sources, rows) = Transpose(pattern);
        SourceStarts = transposedStarts;
        SourcePlaces = new int[Sources.Length];
        int[] places = new int[n];
        for (int s = 0; s < tree.Count; s++)
        {
            int first = tree.Starts[s];
            int width = tree.Starts[s + 1] - first;
            ReadOnlySpan<int> below = structure.Below(s);
            for (int i = 0; i < width; i++)
                places[first + i] = i;
            for (int i = 0; i < below.Length; i++)
                places[below[i]] = width + i;
            for (int c = first; c < first + width; c++)
            {
                // Row c right of the diagonal; for symmetric matrices that is also column c below it.
                int v = tree.Order[c];
                for (int k = rowStarts[v]; k < rowStarts[v + 1]; k++)
                {
                    int other = structure.Positions[columns[k]];
                    Places[k] = other > c || (other == c && !general) ? places[other] : -1;
                }

                if (!general)
                    continue;
                for (int k = transposedStarts[v]; k < transposedStarts[v + 1]; k++)
                {
                    int other = structure.Positions[rows[k]];
                    SourcePlaces[k] = other >= c ? places[other] : -1;
                }
            }
        }
    }

    /// <summary>For each entry, row by row, the place of its column in the panel of its row; -1 if it lies left of the diagonal.</summary>
    public int[] Places { get; }

    /// <summary>For each column where its entries begin; for general matrices only.</summary>
    public int[] SourceStarts { get; }

    /// <summary>The entries column by column, as indices into the values.</summary>
    public int[] Sources { get; } = [];

    /// <summary>For each of these the place of its row in the panel of its column; -1 if it lies above the diagonal.</summary>
    public int[] SourcePlaces { get; }

    /// <summary>Where the entries of each row begin.</summary>
    public ReadOnlySpan<int> RowStarts => pattern.RowStarts;

    private static (int[] Starts, int[] Sources, int[] Rows) Transpose(SparsePattern pattern)
    {
        ReadOnlySpan<int> columns = pattern.Columns;
        int[] starts = new int[pattern.ColumnCount + 1];
        foreach (int column in columns)
            starts[column + 1]++;
        for (int j = 0; j < pattern.ColumnCount; j++)
            starts[j + 1] += starts[j];
        int[] next = starts.AsSpan(0, pattern.ColumnCount).ToArray();
        int[] sources = new int[columns.Length];
        int[] rows = new int[columns.Length];
        for (int i = 0; i < pattern.RowCount; i++)
        {
            for (int k = pattern.RowStarts[i]; k < pattern.RowStarts[i + 1]; k++)
            {
                int at = next[columns[k]]++;
                sources[at] = k;
                rows[at] = i;
            }
        }

        return (starts, sources, rows);
    }
}
