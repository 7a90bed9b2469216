using FemCore2D.Sparse;

namespace FemCore2D.Solvers.Tests;

public class ChunkedOrderTests
{
    [Theory]
    [InlineData(16, 128)]
    [InlineData(40, 400)]
    [InlineData(9, 1000)]
    public void ChunksDoNotTouchOneAnother(int n, int unknownsPerChunk)
    {
        SparsePattern pattern = Matrices.Laplacian<double>(n).Pattern;
        ChunkedOrder order = ChunkedOrder.Create(pattern, unknownsPerChunk);
        Assert.Equal(Math.Max(1, n * n / unknownsPerChunk), order.ChunkCount);
        Assert.Equal(Enumerable.Range(0, n * n), order.Order.Order());
        Assert.All(order.Order, unknown => Assert.Equal(unknown, order.Order[order.Rank[unknown]]));
        int[] chunkOf = new int[n * n];
        Array.Fill(chunkOf, -1);
        for (int chunk = 0; chunk < order.ChunkCount; chunk++)
        {
            for (int place = order.ChunkStarts[chunk]; place < order.ChunkStarts[chunk + 1]; place++)
            {
                chunkOf[order.Order[place]] = chunk;
            }
        }

        for (int row = 0; row < n * n; row++)
        {
            foreach (int column in pattern.ColumnsOf(row))
            {
                Assert.True(chunkOf[row] == chunkOf[column] || chunkOf[row] < 0 || chunkOf[column] < 0);
            }
        }

        Assert.True(chunkOf.Count(c => c < 0) <= (order.ChunkCount - 1) * n);
    }

    [Fact]
    public void AnOrderWithoutLocalityMakesOneChunk()
    {
        SparseMatrix<double> matrix = Matrices.Laplacian<double>(40);
        int[] order = Enumerable.Range(0, 1600).ToArray();
        new Random(1).Shuffle(order);
        Assert.Equal(1, ChunkedOrder.Create(matrix.Permute(order).Pattern, 400).ChunkCount);
        Assert.Equal(4, ChunkedOrder.Create(matrix.Pattern, 400).ChunkCount);
    }
}
