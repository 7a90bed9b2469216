using System.Numerics;
using System.Text;
using FemCore2D.Geometry;
using FsCheck;
using FsCheck.Fluent;
using FsCheck.Xunit;

namespace FemCore2D.Sparse.Tests;

/// <summary>Valid texts with random damage: they are read or refused with a typed exception, at little cost in memory.</summary>
public class MatrixMarketFuzzTests
{
    private const long AllowedBytes = 64 << 20;

    private static readonly string[] seeds =
    [
        "%%MatrixMarket matrix coordinate real general\n% words\n5 4 3\n1 1 1.0\n5 4 -2.5e-3\n2 3 7\n",
        "%%MatrixMarket matrix coordinate complex hermitian\n3 3 2\n1 1 1.0 0\n3 1 1 -2.5e-3\n",
        "%%MatrixMarket matrix coordinate integer skew-symmetric\r\n3 3 2\r\n2 1 5\r\n3 1 -6\r\n",
        "%%MatrixMarket matrix coordinate pattern symmetric\n3 3 2\n2 1\n3 3\n",
        "%%MatrixMarket matrix array real symmetric\n2 2\n1\n2\n3\n",
    ];

    private static readonly string[] pieces =
    [
        "2147483647", "9223372036854775807", "99999999999999999999", "-1", "0", "1e308", "1e309", "NaN", "\n", "\0", "%",
        " ", "\t", "\r", "2000000000 2000000000 0", "1000000 1000000 2000000000", "array", "coordinate", "complex",
        "pattern", "hermitian", "general", "é", "1.5", "0x10", "∞", "1_000",
    ];

    [Property(MaxTest = 3000, Arbitrary = [typeof(MatrixMarketFuzzTests)])]
    public void OnlyTypedExceptionsEscape(DamagedText text)
    {
        byte[] bytes = Encoding.UTF8.GetBytes(text.Text);
        Try<double>(new MemoryStream(bytes));
        Try<Complex>(new Unseekable(bytes));
    }

    [Theory]
    [InlineData("coordinate real general\n2000000000 2000000000 0")]
    [InlineData("coordinate real general\n1 2147483646 1\n1 1 1")]
    [InlineData("coordinate real general\n2000000000 1 2000000000\n1 1 1")]
    [InlineData("coordinate real general\n9223372036854775807 9223372036854775807 9223372036854775807\n1 1 1")]
    [InlineData("array real general\n40000 40000\n1\n2")]
    [InlineData("array real general\n9000000000000000000 9000000000000000000\n1\n2")]
    [InlineData("coordinate real general\n99999999999999999999 1 1\n1 1 1")]
    public void ClaimedSizesCostNoMemory(string text)
    {
        byte[] bytes = Encoding.UTF8.GetBytes("%%MatrixMarket matrix " + text);
        long before = GC.GetAllocatedBytesForCurrentThread();
        Assert.ThrowsAny<FemCoreException>(() => MatrixMarket.Read<double>(new MemoryStream(bytes)));
        Assert.ThrowsAny<FemCoreException>(() => MatrixMarket.Read<double>(new Unseekable(bytes)));
        Assert.True(GC.GetAllocatedBytesForCurrentThread() - before < 1 << 20);
    }

    [Fact]
    public void AnEndlessLineIsRefused()
    {
        string text = "%%MatrixMarket matrix coordinate real general\n%" + new string('x', 1 << 20);
        Assert.Equal(2, Assert.Throws<MalformedFileException>(() => MatrixMarketTests.Read<double>(text)).Line);
    }

    public static Arbitrary<DamagedText> Texts()
    {
        Gen<string> damage = Gen.OneOf(Gen.Elements(pieces), Gen.Choose(0, 255).Select(c => ((char)c).ToString()));
        Gen<(int At, int Removed, string Inserted)> edit =
            from at in Gen.Choose(0, 120)
            from removed in Gen.Choose(0, 12)
            from inserted in damage
            select (at, removed, inserted);
        return Arb.From(
            from seed in Gen.Elements(seeds)
            from count in Gen.Choose(1, 4)
            from edits in edit.ArrayOf(count)
            select new DamagedText(edits.Aggregate(seed, Apply)));
    }

    private static string Apply(string text, (int At, int Removed, string Inserted) edit)
    {
        int at = Math.Min(edit.At, text.Length);
        return text.Remove(at, Math.Min(edit.Removed, text.Length - at)).Insert(at, edit.Inserted);
    }

    private static void Try<T>(Stream stream)
        where T : unmanaged, INumberBase<T>
    {
        long before = GC.GetAllocatedBytesForCurrentThread();
        try
        {
            SparseMatrix<T> matrix = MatrixMarket.Read<T>(stream);
            _ = SparsePattern.FromCompressedRows(matrix.ColumnCount, matrix.Pattern.RowStarts, matrix.Pattern.Columns);
        }
        catch (FemCoreException)
        {
        }

        Assert.True(GC.GetAllocatedBytesForCurrentThread() - before < AllowedBytes);
    }

    /// <summary>A text to be read.</summary>
    public sealed record DamagedText(string Text);

    /// <summary>A stream that does not tell its length and gives a few bytes at a time.</summary>
    private sealed class Unseekable(byte[] bytes) : MemoryStream(bytes)
    {
        public override bool CanSeek => false;

        public override int Read(Span<byte> buffer) => base.Read(buffer[..Math.Min(buffer.Length, 7)]);
    }
}
