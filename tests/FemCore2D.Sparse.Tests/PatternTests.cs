using FsCheck.Xunit;

namespace FemCore2D.Sparse.Tests;

[Properties(Arbitrary = [typeof(Samples)])]
public class PatternTests
{
    [Property]
    public void PlacesAreStoredOnceAndAscend(Triplets t)
    {
        SparsePattern pattern = SparsePattern.FromPlaces(t.RowCount, t.ColumnCount, t.Rows, t.Columns);

        var expected = t.Rows.Zip(t.Columns).Distinct().Order().ToArray();
        var stored = Enumerable.Range(0, pattern.RowCount)
            .SelectMany(row => pattern.ColumnsOf(row).ToArray().Select(column => (row, column))).ToArray();
        Assert.Equal(expected, stored);
        Assert.True(pattern.HasSameEntriesAs(
            SparsePattern.FromCompressedRows(t.ColumnCount, pattern.RowStarts, pattern.Columns)));
    }

    [Property]
    public void PositionsAreFound(Triplets t)
    {
        SparsePattern pattern = t.Sparse<double>().Pattern;

        int next = 0;
        for (int row = 0; row < t.RowCount; row++)
        {
            for (int column = 0; column < t.ColumnCount; column++)
            {
                bool isStored = t.Rows.Zip(t.Columns).Contains((row, column));
                Assert.Equal(isStored ? next++ : -1, pattern.PositionOf(row, column));
                Assert.Equal(isStored, pattern.Contains(row, column));
            }
        }

        Assert.Equal(next, pattern.EntryCount);
    }

    [Property(MaxTest = 300)]
    public void SymmetryIsRecognized(Triplets t)
    {
        SparsePattern pattern = t.Sparse<double>().Pattern;
        Assert.Equal(
            t.RowCount == t.ColumnCount && pattern.HasSameEntriesAs(pattern.Transpose()), pattern.IsSymmetric());
        if (t.RowCount == t.ColumnCount)
        {
            Assert.True(pattern.Union(pattern.Transpose()).IsSymmetric());
        }
    }

    [Property]
    public void OneMissingMirrorIsNoticed(Triplets t)
    {
        int size = Math.Max(t.RowCount, t.ColumnCount);
        int[] rows = [.. t.Rows, .. t.Columns];
        int[] columns = [.. t.Columns, .. t.Rows];
        SparsePattern whole = SparsePattern.FromPlaces(size, size, rows, columns);
        Assert.True(whole.IsSymmetric());
        for (int i = 0; i < t.Rows.Length; i++)
        {
            (int row, int column) = (t.Rows[i], t.Columns[i]);
            if (row != column)
            {
                var kept = rows.Zip(columns).Where(place => place != (row, column)).ToArray();
                Assert.False(SparsePattern.FromPlaces(
                    size, size, kept.Select(p => p.First).ToArray(), kept.Select(p => p.Second).ToArray()).IsSymmetric());
            }
        }
    }

    [Fact]
    public void BrokenArraysAreRefused()
    {
        Assert.Throws<SizeLimitException>(() => SparsePattern.FromCompressedRows(int.MaxValue, [0], []));
        Assert.Throws<ArgumentOutOfRangeException>(() => SparsePattern.FromCompressedRows(-1, [0], []));
        Assert.Throws<ArgumentException>(() => SparsePattern.FromCompressedRows(2, [], []));
        Assert.Throws<ArgumentException>(() => SparsePattern.FromCompressedRows(2, [1, 1], [0]));
        Assert.Throws<ArgumentException>(() => SparsePattern.FromCompressedRows(2, [0, 2], [0]));
        Assert.Throws<ArgumentException>(() => SparsePattern.FromCompressedRows(2, [0, 2, 1, 2], [0, 1]));
        Assert.Throws<ArgumentException>(() => SparsePattern.FromCompressedRows(2, [0, 5, 2], [0, 1]));
        Assert.Throws<ArgumentException>(() => SparsePattern.FromCompressedRows(2, [0, 2], [1, 0]));
        Assert.Throws<ArgumentException>(() => SparsePattern.FromCompressedRows(2, [0, 2], [1, 1]));
        Assert.Throws<ArgumentException>(() => SparsePattern.FromCompressedRows(2, [0, 1], [2]));
        Assert.Throws<ArgumentException>(() => SparsePattern.FromCompressedRows(2, [0, 1], [-1]));
    }

    [Fact]
    public void BrokenPlacesAreRefused()
    {
        Assert.Throws<ArgumentException>(() => SparsePattern.FromPlaces(2, 2, [0], [0, 1]));
        Assert.Throws<ArgumentException>(() => SparsePattern.FromPlaces(2, 2, [2], [0]));
        Assert.Throws<ArgumentException>(() => SparsePattern.FromPlaces(2, 2, [0], [-1]));
        Assert.Throws<ArgumentOutOfRangeException>(() => SparsePattern.FromPlaces(-1, 2, [], []));
        Assert.Throws<SizeLimitException>(() => SparsePattern.FromPlaces(int.MaxValue, 2, [], []));
        Assert.Throws<SizeLimitException>(() => SparsePattern.Diagonal(int.MaxValue));
    }

    [Fact]
    public void BrokenSelectionsAreRefused()
    {
        SparsePattern pattern = SparsePattern.Diagonal(3);
        Assert.Throws<ArgumentException>(() => pattern.Select([0, 3], [0]));
        Assert.Throws<ArgumentException>(() => pattern.Select([0], [-1]));
        Assert.Throws<ArgumentException>(() => pattern.Select([0, 0], [0]));
        Assert.Throws<ArgumentException>(() => pattern.Union(SparsePattern.Diagonal(4)));
        Assert.Throws<ArgumentOutOfRangeException>(() => pattern.ColumnsOf(3));
        Assert.Throws<ArgumentOutOfRangeException>(() => pattern.PositionOf(0, 3));
    }

    [Property]
    public void RowBlocksCoverTheRowsInOrder(Triplets t)
    {
        SparsePattern pattern = Samples.Large<double>(7000, 100, 100 * t.RowCount * t.ColumnCount * t.RowCount, 1).Pattern;
        int[] cuts = pattern.RowBlocks;
        Assert.Equal(0, cuts[0]);
        Assert.Equal(pattern.RowCount, cuts[^1]);
        Assert.Equal(cuts.Order(), cuts);
    }

    [Fact]
    public void EmptyPatternsWork()
    {
        SparsePattern empty = SparsePattern.FromPlaces(0, 0, [], []);
        Assert.True(empty.IsSymmetric());
        Assert.Equal(0, empty.Transpose().EntryCount);
        Assert.Equal([0, 0], empty.RowBlocks);
        Assert.Empty(new SparseMatrix<double>(empty).Multiply(ReadOnlySpan<double>.Empty));
    }
}
