using FemCore2D.Geometry;
using FemCore2D.Sparse;

namespace FemCore2D.Assembly;

/// <summary>
/// Finds the columns of every row, chunk by chunk: the cells of a chunk are first listed by row, then each row
/// collects the unknowns of its cells. Linear in the number of local matrix entries.
/// </summary>
internal sealed class PatternBuilder
{
    private readonly Numbering numbering;
    private readonly RowChunks chunks;
    private readonly ParallelOptions options;
    private readonly int widest;

    public PatternBuilder(Numbering numbering, RowChunks chunks, ParallelOptions options)
    {
        this.numbering = numbering;
        this.chunks = chunks;
        this.options = options;
        widest = Math.Max(
            numbering.CellUnknownCount(CellKind.Triangle), numbering.CellUnknownCount(CellKind.Quadrilateral));
        LongestRowBound = 1 + (MostCellsAtARow() * Math.Max(0, widest - 1));
    }

    /// <summary>No row has more entries than this.</summary>
    public int LongestRowBound { get; }

    /// <summary>Builds the pattern and enters the places of all local matrices into the plan.</summary>
    public SparsePattern Build(RefillPlan plan)
    {
        int[] rowStarts = new int[chunks.RowCount + 1];
        int[][] columnsOf = new int[chunks.Count][];
        Parallel.For(
            0,
            chunks.Count,
            options,
            () => new Scratch(chunks, widest),
            (chunk, _, scratch) =>
            {
                columnsOf[chunk] = BuildChunk(chunk, scratch, rowStarts, plan);
                return scratch;
            },
            _ => { });

        long total = 0;
        int[] chunkStarts = new int[chunks.Count];
        for (int chunk = 0; chunk < chunks.Count; chunk++)
        {
            chunkStarts[chunk] = (int)total;
            total += columnsOf[chunk].Length;
            if (total > Array.MaxLength)
            {
                throw new SizeLimitException(
                    $"The matrix of {chunks.RowCount} unknowns would have more than {Array.MaxLength} entries. "
                    + "Use a coarser mesh or a lower degree.");
            }
        }

        for (int row = 0; row < chunks.RowCount; row++)
        {
            rowStarts[row + 1] += rowStarts[row];
        }

        int[] columns = new int[total];
        Parallel.For(0, chunks.Count, options, chunk => columnsOf[chunk].CopyTo(columns, chunkStarts[chunk]));
        return new SparsePattern(chunks.RowCount, rowStarts, columns);
    }

    private int MostCellsAtARow()
    {
        // Unknowns on vertices have the most cells around them; without any, at most two cells share an edge.
        if (numbering.PerVertex == 0)
        {
            return 2;
        }

        Mesh mesh = numbering.Mesh;
        int[] around = new int[mesh.VertexCount];
        foreach (int vertex in mesh.Triangles)
        {
            around[vertex]++;
        }

        foreach (int vertex in mesh.Quadrilaterals)
        {
            around[vertex]++;
        }

        return around.Length == 0 ? 0 : around.Max();
    }

    private int[] BuildChunk(int chunk, Scratch scratch, int[] rowLengths, RefillPlan plan)
    {
        (int first, int rowCount) = chunks.RowsOf(chunk);
        ReadOnlySpan<int> cells = chunks.CellsOf(chunk);
        scratch.Collect(numbering, cells, first, rowCount);
        scratch.ColumnCount = 0;
        for (int row = 0; row < rowCount; row++)
        {
            rowLengths[first + row + 1] = scratch.BuildRow(row, cells, plan);
        }

        return scratch.TakeColumns();
    }

    /// <summary>What one worker needs; kept from chunk to chunk.</summary>
    private sealed class Scratch(RowChunks chunks, int widest)
    {
        // For each unknown the place of its column in the row at hand, or -1.
        private readonly int[] placeOf = Filled(chunks.RowCount);
        private readonly int[] starts = new int[chunks.LongestChunk + 1];
        private int[] unknowns = [];
        private int[] counts = [];
        private int[] visits = [];
        private int[] columns = new int[1024];

        public int ColumnCount { get; set; }

        /// <summary>Lists for each row of the chunk which cell touches it with which of its unknowns.</summary>
        public void Collect(Numbering numbering, ReadOnlySpan<int> cells, int first, int rowCount)
        {
            if (counts.Length < cells.Length)
            {
                unknowns = new int[cells.Length * widest];
                counts = new int[cells.Length];
            }

            Span<int> next = starts.AsSpan(0, rowCount + 1);
            next.Clear();
            for (int index = 0; index < cells.Length; index++)
            {
                Span<int> own = unknowns.AsSpan(index * widest, widest);
                counts[index] = numbering.CellUnknowns(cells[index], own);
                foreach (int unknown in own[..counts[index]])
                {
                    int row = unknown - first;
                    if ((uint)row < (uint)rowCount)
                    {
                        next[row]++;
                    }
                }
            }

            int total = 0;
            for (int row = 0; row <= rowCount; row++)
            {
                total += next[row];
                next[row] = total;
            }

            if (visits.Length < total)
            {
                visits = new int[total];
            }

            // Filled from behind, so that the starts end up where they belong and the cells ascend.
            for (int index = cells.Length - 1; index >= 0; index--)
            {
                ReadOnlySpan<int> own = unknowns.AsSpan(index * widest, counts[index]);
                for (int k = 0; k < own.Length; k++)
                {
                    int row = own[k] - first;
                    if ((uint)row < (uint)rowCount)
                    {
                        visits[--next[row]] = (index * widest) + k;
                    }
                }
            }
        }

        /// <summary>Finds the columns of a row and enters their places into the plan.</summary>
        /// <returns>The number of columns.</returns>
        public int BuildRow(int row, ReadOnlySpan<int> cells, RefillPlan plan)
        {
            ReadOnlySpan<int> touching = visits.AsSpan(starts[row], starts[row + 1] - starts[row]);
            int needed = ColumnCount + (touching.Length * widest);
            if (columns.Length < needed)
            {
                Array.Resize(ref columns, Math.Max(needed, 2 * columns.Length));
            }

            Span<int> found = columns.AsSpan(ColumnCount);
            int count = 0;
            foreach (int visit in touching)
            {
                int index = visit / widest;
                foreach (int unknown in unknowns.AsSpan(index * widest, counts[index]))
                {
                    if (placeOf[unknown] < 0)
                    {
                        placeOf[unknown] = 0;
                        found[count++] = unknown;
                    }
                }
            }

            found = found[..count];
            Sort(found);
            for (int place = 0; place < count; place++)
            {
                placeOf[found[place]] = place;
            }

            foreach (int visit in touching)
            {
                int index = visit / widest;
                ReadOnlySpan<int> own = unknowns.AsSpan(index * widest, counts[index]);
                int at = plan.PlacesOf(cells[index]) + ((visit - (index * widest)) * own.Length);
                foreach (int unknown in own)
                {
                    plan.SetPlace(at++, placeOf[unknown]);
                }
            }

            foreach (int column in found)
            {
                placeOf[column] = -1;
            }

            ColumnCount += count;
            return count;
        }

        public int[] TakeColumns() => columns.AsSpan(0, ColumnCount).ToArray();

        private static int[] Filled(int length)
        {
            int[] array = new int[length];
            Array.Fill(array, -1);
            return array;
        }

        private static void Sort(Span<int> numbers)
        {
            if (numbers.Length > 32)
            {
                numbers.Sort();
                return;
            }

            for (int i = 1; i < numbers.Length; i++)
            {
                int number = numbers[i];
                int j = i - 1;
                while (j >= 0 && numbers[j] > number)
                {
                    numbers[j + 1] = numbers[j];
                    j--;
                }

                numbers[j + 1] = number;
            }
        }
    }
}
