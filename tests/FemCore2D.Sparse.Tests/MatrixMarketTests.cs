using System.Numerics;
using System.Text;
using FemCore2D.Geometry;
using FsCheck.Xunit;

namespace FemCore2D.Sparse.Tests;

[Properties(Arbitrary = [typeof(Samples)])]
public class MatrixMarketTests
{
    /// <summary>The example of coordinates in the report that defines the format (NISTIR 5935, 1996).</summary>
    private const string Example = """
        %%MatrixMarket matrix coordinate real general
        % A 5x5 sparse matrix with 8 nonzeros
        5 5 8
        1 1 1.0
        2 2 10.5
        4 2 250.5
        3 3 1.5e-2
        1 4 6.0
        4 4 -2.8e2
        4 5 3.332e1
        5 5 1.2e+1
        """;

    [Fact]
    public void TheExampleOfTheStandardIsRead()
    {
        SparseMatrix<double> matrix = Read<double>(Example);
        Assert.Equal((5, 5, 8), (matrix.RowCount, matrix.ColumnCount, matrix.Pattern.EntryCount));
        Assert.Equal(-280, matrix[3, 3]);
        Assert.Equal(250.5, matrix[3, 1]);
        Assert.Equal(0.015, matrix[2, 2]);
        Assert.Equal(33.32, Read<Complex>(Example.ReplaceLineEndings("\r\n"))[3, 4].Real);
    }

    [Theory]
    [InlineData("coordinate real symmetric\n2 2 2\n1 1 3\n2 1 4", "3 4 4 0")]
    [InlineData("coordinate integer skew-symmetric\n2 2 1\n2 1 4", "0 -4 4 0")]
    [InlineData("coordinate pattern symmetric\n2 2 1\n2 1", "0 1 1 0")]
    [InlineData("coordinate pattern general\n\n2 2 2\n\n2 1\n1 2\n\n", "0 1 1 0")]
    [InlineData("array real general\n% columns first\n2 2\n1\n2\n3\n4", "1 3 2 4")]
    [InlineData("array real symmetric\n2 2\n1\n2\n3", "1 2 2 3")]
    [InlineData("array integer skew-symmetric\n2 2\n-7", "0 7 -7 0")]
    [InlineData("ARRAY Integer GENERAL\n 2\t2 \n1\n2 \n 3\n4\n", "1 3 2 4")]
    public void EachKindIsRead(string text, string byRows)
    {
        SparseMatrix<double> matrix = Read<double>("%%MatrixMarket matrix " + text);
        double[] dense = matrix.Transpose().ToMathNetDense().ToColumnMajorArray();
        Assert.Equal(byRows, string.Join(' ', dense.Select(v => v == 0 ? 0 : v)));
    }

    [Fact]
    public void AHermitianMatrixIsRead()
    {
        SparseMatrix<Complex> matrix =
            Read<Complex>("%%MatrixMarket matrix array complex hermitian\n2 2\n1 0\n2 3\n4 0");
        Assert.Equal(new Complex(2, -3), matrix[0, 1]);
        Assert.Equal(new Complex(2, 3), matrix[1, 0]);
    }

    [Property]
    public void MatricesComeBackBitByBit(Triplets t, FsCheck.NormalFloat[] numbers)
    {
        Check<double>();
        Check<Complex>();

        void Check<T>()
            where T : unmanaged, INumberBase<T>
        {
            SparseMatrix<T> matrix = t.Sparse<T>();
            for (int i = 0; i < Math.Min(numbers.Length, matrix.Values.Length); i++)
            {
                matrix.Values[i] = Scalar.Create<T>(numbers[i].Get, -numbers[^(i + 1)].Get);
            }

            SparseMatrix<T> back = Read<T>(Write(matrix));
            Assert.True(matrix.Pattern.HasSameEntriesAs(back.Pattern));
            AssertSameBits(matrix, back);
            MatrixMarketField field = Scalar.IsComplex<T>() ? MatrixMarketField.Complex : MatrixMarketField.Real;
            SparseMatrix<T> dense = Read<T>(Write(matrix, new(MatrixMarketLayout.Array, field)));
            Assert.Equal(t.RowCount * t.ColumnCount, dense.Pattern.EntryCount);
            Assert.Equal(
                matrix.ToMathNetDense().ToColumnMajorArray(), dense.ToMathNetDense().ToColumnMajorArray());
        }
    }

    [Property]
    public void SymmetricKindsComeBackBitByBit(Triplets t)
    {
        int size = Math.Max(t.RowCount, t.ColumnCount);
        SparseMatrix<Complex> half = SparseMatrices.FromTriplets<Complex>(
            size, size, t.Rows, t.Columns, t.Values<Complex>());
        Check(half.Add(half.Transpose()), MatrixMarketSymmetry.Symmetric);
        Check(half.Subtract(half.Transpose()), MatrixMarketSymmetry.SkewSymmetric);
        Check(half.Add(half.ConjugateTranspose()), MatrixMarketSymmetry.Hermitian);

        static void Check(SparseMatrix<Complex> matrix, MatrixMarketSymmetry symmetry)
        {
            foreach (MatrixMarketLayout layout in Enum.GetValues<MatrixMarketLayout>())
            {
                MatrixMarketFormat format = new(layout, MatrixMarketField.Complex, symmetry);
                byte[] text = Write(matrix, format);
                Assert.Equal(format, MatrixMarket.ReadFormat(new MemoryStream(text)));
                SparseMatrix<Complex> back = Read<Complex>(text);
                AlgebraTests.AssertEqual(matrix.ToMathNetDense(), back);
                Assert.True(
                    layout == MatrixMarketLayout.Array
                    || symmetry == MatrixMarketSymmetry.SkewSymmetric
                    || back.Pattern.HasSameEntriesAs(matrix.Pattern));
            }
        }
    }

    [Fact]
    public void ExtremeNumbersComeBackBitByBit()
    {
        double[] numbers =
            [double.MaxValue, -double.Epsilon, -0.0, 1.0 / 3, Math.PI * 1e-310, 123456789012345680, 5e-324, 0.1 + 0.2];
        MemoryStream stream = new();
        MatrixMarket.WriteVector<double>(numbers, stream);
        stream.Position = 0;
        double[] back = MatrixMarket.ReadVector<double>(stream);
        Assert.Equal(numbers.Select(BitConverter.DoubleToInt64Bits), back.Select(BitConverter.DoubleToInt64Bits));
    }

    [Fact]
    public void WholeNumbersPatternsAndCommentsAreWritten()
    {
        SparseMatrix<double> matrix = SparseMatrices.FromTriplets<double>(2, 2, [0, 1], [1, 0], [7, 7.0]);
        Assert.Equal(
            "%%MatrixMarket matrix coordinate integer symmetric\n% made\n% here\n2 2 1\n2 1 7\n",
            Encoding.UTF8.GetString(Write(
                matrix,
                new(Field: MatrixMarketField.Whole, Symmetry: MatrixMarketSymmetry.Symmetric),
                "made\r\nhere")));
        Assert.Equal(
            "%%MatrixMarket matrix coordinate pattern general\n2 2 2\n1 2\n2 1\n",
            Encoding.UTF8.GetString(Write(matrix, new(Field: MatrixMarketField.Pattern))));
    }

    [Fact]
    public void FilesAreWrittenAndRead()
    {
        string path = Path.GetTempFileName();
        try
        {
            SparseMatrix<double> matrix = Samples.Large<double>(3000, 2000, 40_000, 4);
            MatrixMarket.Write(matrix, path);
            SparseMatrix<double> back = MatrixMarket.Read<double>(path);
            Assert.True(matrix.Pattern.HasSameEntriesAs(back.Pattern));
            AssertSameBits(matrix, back);
            MatrixMarket.WriteVector<double>([1, -0.0, 1.0 / 3], path);
            Assert.Equal("1 -0 0.3333333333333333", string.Join(' ', MatrixMarket.ReadVector<double>(path)));
        }
        finally
        {
            File.Delete(path);
        }
    }

    /// <summary>Its mirror would not come back, so a stored zero without one makes a matrix general.</summary>
    [Fact]
    public void SymmetryOfTheStoredEntriesCounts()
    {
        SparseMatrix<double> lonelyZero = SparseMatrices.FromTriplets<double>(2, 2, [0], [1], [0]);
        Assert.True(lonelyZero.IsSymmetric());
        foreach (MatrixMarketSymmetry symmetry in new[] { MatrixMarketSymmetry.Symmetric, MatrixMarketSymmetry.SkewSymmetric })
        {
            Assert.Throws<ArgumentException>(() => Write(lonelyZero, new(Symmetry: symmetry)));
        }
    }

    [Fact]
    public void CommentsThatTheFormatCannotHoldAreRefused()
    {
        SparseMatrix<double> matrix = SparseMatrices.Identity<double>(1);
        Assert.Throws<ArgumentException>(() => MatrixMarket.Write(matrix, Stream.Null, comment: new string('x', 1023)));
        using MemoryStream stream = new();
        MatrixMarket.Write(matrix, stream, comment: new string('x', 1022) + "\r\n\nend");
        stream.Position = 0;
        Assert.Equal(1, MatrixMarket.Read<double>(stream)[0, 0]);
    }

    [Fact]
    public void TheSignatureOfUtf8IsSkipped()
    {
        byte[] text = [.. "\uFEFF%%MatrixMarket matrix array real general\n1 1\n7"u8];
        Assert.Equal(7, MatrixMarket.Read<double>(new MemoryStream(text))[0, 0]);
    }

    [Fact]
    public void AMatrixThatIsNotOfTheFormatIsNotWritten()
    {
        SparseMatrix<double> matrix = SparseMatrices.FromTriplets<double>(2, 2, [0, 1], [1, 0], [7, 7.5]);
        Refuse(matrix, new(Field: MatrixMarketField.Whole));
        Refuse(matrix, new(Symmetry: MatrixMarketSymmetry.Symmetric));
        Refuse(matrix, new(Symmetry: MatrixMarketSymmetry.SkewSymmetric));
        Refuse(matrix, new(Symmetry: MatrixMarketSymmetry.Hermitian));
        Refuse(matrix, new(MatrixMarketLayout.Array, MatrixMarketField.Pattern));
        Refuse(SparseMatrices.FromTriplets<double>(2, 2, [0], [1], [1]), new(Field: MatrixMarketField.Pattern, Symmetry: MatrixMarketSymmetry.Symmetric));
        Refuse(SparseMatrices.FromTriplets<double>(1, 1, [0], [0], [double.NaN]), new());
        Refuse(SparseMatrices.FromTriplets<Complex>(1, 1, [0], [0], [Complex.ImaginaryOne]), new());

        static void Refuse<T>(SparseMatrix<T> matrix, MatrixMarketFormat format)
            where T : unmanaged, INumberBase<T> =>
            Assert.Throws<ArgumentException>(() => Write(matrix, format));
    }

    [Theory]
    [InlineData(1, "")]
    [InlineData(1, "%%MatrixMarkt matrix coordinate real general\n1 1 0")]
    [InlineData(1, "%%MatrixMarket vector coordinate real general\n1 1 0")]
    [InlineData(1, "%%MatrixMarket matrix coordinate real")]
    [InlineData(1, "%%MatrixMarket matrix coordinate real general extra\n1 1 0")]
    [InlineData(1, "%%MatrixMarket matrix array pattern general\n1 1")]
    [InlineData(1, "%%MatrixMarket matrix coordinate real hermitian\n1 1 0")]
    [InlineData(1, "%%MatrixMarket matrix coordinate pattern skew-symmetric\n1 1 0")]
    [InlineData(1, "%%MatrixMarket matrix coordinate complex general\n1 1 0")]
    [InlineData(2, "%%MatrixMarket matrix coordinate real general\n% only words")]
    [InlineData(2, "%%MatrixMarket matrix coordinate real general\n2 2")]
    [InlineData(2, "%%MatrixMarket matrix coordinate real general\n2 2 1 1")]
    [InlineData(2, "%%MatrixMarket matrix coordinate real general\n-2 2 0")]
    [InlineData(2, "%%MatrixMarket matrix coordinate real general\n2 2 5")]
    [InlineData(2, "%%MatrixMarket matrix coordinate real symmetric\n2 3 1")]
    [InlineData(2, "%%MatrixMarket matrix coordinate real skew-symmetric\n2 2 2")]
    [InlineData(2, "%%MatrixMarket matrix array real general\n1 1 1")]
    [InlineData(2, "%%MatrixMarket matrix coordinate real general\n9 9 81\n1 1 1")]
    [InlineData(3, "%%MatrixMarket matrix coordinate real general\n2 2 1\n0 1 1.0")]
    [InlineData(3, "%%MatrixMarket matrix coordinate real general\n2 2 1\n1 3 1.0")]
    [InlineData(3, "%%MatrixMarket matrix coordinate real general\n2 2 1\n1 1 1,5")]
    [InlineData(3, "%%MatrixMarket matrix coordinate real general\n2 2 1\n1 1 NaN")]
    [InlineData(3, "%%MatrixMarket matrix coordinate real general\n2 2 1\n1 1 1e999")]
    [InlineData(3, "%%MatrixMarket matrix coordinate real general\n2 2 1\n1 1 1.0 2.0")]
    [InlineData(3, "%%MatrixMarket matrix coordinate real general\n2 2 1\n1 1")]
    [InlineData(3, "%%MatrixMarket matrix coordinate integer general\n2 2 1\n1 1 1.5")]
    [InlineData(3, "%%MatrixMarket matrix coordinate integer general\n2 2 1\n1 1 9007199254740993")]
    [InlineData(3, "%%MatrixMarket matrix coordinate real symmetric\n2 2 1\n1 2 1.0")]
    [InlineData(3, "%%MatrixMarket matrix coordinate real skew-symmetric\n2 2 1\n2 2 1.0")]
    [InlineData(3, "%%MatrixMarket matrix coordinate real general\n2 2 2\n1 1 1.00000")]
    [InlineData(4, "%%MatrixMarket matrix coordinate real general\n2 2 1\n1 1 1.0\n2 2 1.0")]
    [InlineData(5, "%%MatrixMarket matrix coordinate real general\n2 2 2\n1 1 1.0\n\n1 1 2.0")]
    public void AMalformedTextIsRefusedAtItsLine(int line, string text)
    {
        MalformedFileException e = Assert.Throws<MalformedFileException>(() => Read<double>(text));
        Assert.Equal(line, e.Line);
        Assert.Contains($"Line {line}", e.Message, StringComparison.Ordinal);
    }

    [Fact]
    public void ADiagonalOfAHermitianMatrixThatIsNotRealIsRefused() =>
        Assert.Equal(3, Assert.Throws<MalformedFileException>(() => Read<Complex>(
            "%%MatrixMarket matrix coordinate complex hermitian\n1 1 1\n1 1 1.0 2.0")).Line);

    [Fact]
    public void AVectorHasOneColumn() => Assert.Throws<MalformedFileException>(
        () => MatrixMarket.ReadVector<double>(new MemoryStream(Encoding.UTF8.GetBytes(Example))));

    [Fact]
    public void ReadingAndWritingAreCancelled()
    {
        CancellationToken cancelled = new(canceled: true);
        using MemoryStream stream = new(Encoding.UTF8.GetBytes(Example));
        Assert.Throws<OperationCanceledException>(() => MatrixMarket.Read<double>(stream, cancelled));
        Assert.Throws<OperationCanceledException>(() => MatrixMarket.Write(
            SparseMatrices.Identity<double>(2), new MemoryStream(), cancellationToken: cancelled));
    }

    internal static SparseMatrix<T> Read<T>(string text)
        where T : unmanaged, INumberBase<T> => Read<T>(Encoding.UTF8.GetBytes(text));

    internal static SparseMatrix<T> Read<T>(byte[] text)
        where T : unmanaged, INumberBase<T>
    {
        using MemoryStream stream = new(text);
        return MatrixMarket.Read<T>(stream);
    }

    internal static byte[] Write<T>(SparseMatrix<T> matrix, MatrixMarketFormat? format = null, string? comment = null)
        where T : unmanaged, INumberBase<T>
    {
        MemoryStream stream = new();
        MatrixMarket.Write(matrix, stream, format, comment);
        return stream.ToArray();
    }

    private static void AssertSameBits<T>(SparseMatrix<T> expected, SparseMatrix<T> actual)
        where T : unmanaged, INumberBase<T>
    {
        for (int i = 0; i < expected.Values.Length; i++)
        {
            (T a, T b) = (expected.Values[i], actual.Values[i]);
            Assert.Equal(
                (BitConverter.DoubleToInt64Bits(Scalar.Real(a)), BitConverter.DoubleToInt64Bits(Scalar.Imaginary(a))),
                (BitConverter.DoubleToInt64Bits(Scalar.Real(b)), BitConverter.DoubleToInt64Bits(Scalar.Imaginary(b))));
        }
    }
}
