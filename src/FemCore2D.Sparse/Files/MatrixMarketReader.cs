using System.Numerics;
using System.Runtime.InteropServices;
using FemCore2D.Geometry;

namespace FemCore2D.Sparse;

/// <summary>Reads one matrix. Memory grows with what has been read, never with what the header claims.</summary>
internal sealed partial class MatrixMarketReader<T>(Stream stream, CancellationToken cancellationToken)
    where T : unmanaged, INumberBase<T>
{
    private readonly LineReader lines = new(stream);
    private readonly List<int> rows = [];
    private readonly List<int> columns = [];
    private readonly List<T> values = [];
    private readonly List<int> sourceLines = [];
    private MatrixMarketFormat format = new();
    private int rowCount;
    private int columnCount;
    private long entryCount;

    /// <summary>Reads the matrix.</summary>
    public SparseMatrix<T> Read()
    {
        format = ReadFormat(lines);
        if (format.Field == MatrixMarketField.Complex && !Scalar.IsComplex<T>())
        {
            throw new MalformedFileException("The numbers are complex. Read them as such.", lines.Line);
        }

        ReadSizes();
        if (format.Layout == MatrixMarketLayout.Array)
        {
            ReadArray();
        }
        else
        {
            ReadCoordinates();
        }

        if (TryReadLine(out _))
        {
            throw new MalformedFileException($"There is more than the {entryCount} entries announced.", lines.Line);
        }

        return Build();
    }

    private void ReadCoordinates()
    {
        for (long i = 0; i < entryCount; i++)
        {
            TokenReader tokens = NextEntry(i);
            int row = tokens.Index("row", rowCount);
            int column = tokens.Index("column", columnCount);
            T value = ReadValue(ref tokens);
            if (format.Symmetry != MatrixMarketSymmetry.General)
            {
                CheckTriangle(in tokens, row, column, value);
            }

            Store(row, column, value);
        }
    }

    private void ReadArray()
    {
        long i = 0;
        for (int column = 0; column < columnCount; column++)
        {
            int first = format.Symmetry switch
            {
                MatrixMarketSymmetry.General => 0,
                MatrixMarketSymmetry.SkewSymmetric => column + 1,
                _ => column,
            };
            for (int row = first; row < rowCount; row++)
            {
                TokenReader tokens = NextEntry(i++);
                T value = ReadValue(ref tokens);
                if (format.Symmetry != MatrixMarketSymmetry.General)
                {
                    CheckTriangle(in tokens, row, column, value);
                }

                Store(row, column, value);
            }
        }
    }

    private TokenReader NextEntry(long index)
    {
        if (index % 4096 == 0)
        {
            cancellationToken.ThrowIfCancellationRequested();
        }

        ReadOnlySpan<byte> line = ReadLine(
            index == 0 ? "No entry follows" : "The text ends within the entries", skipComments: false);
        return new TokenReader(line, lines.Line);
    }

    private T ReadValue(ref TokenReader tokens)
    {
        T value = T.One;
        switch (format.Field)
        {
            case MatrixMarketField.Real:
                value = Scalar.Create<T>(tokens.Real("value"));
                break;
            case MatrixMarketField.Whole:
                value = Scalar.Create<T>(tokens.Whole("value"));
                break;
            case MatrixMarketField.Complex:
                double real = tokens.Real("real part");
                value = Scalar.Create<T>(real, tokens.Real("imaginary part"));
                break;
        }

        tokens.End();
        return value;
    }

    private void CheckTriangle(in TokenReader tokens, int row, int column, T value)
    {
        string word = MatrixMarketFormat.Word(format.Symmetry);
        if (row < column)
        {
            throw tokens.Fault(
                $"the entry at row {row + 1}, column {column + 1} lies above the diagonal, where a {word} file has none");
        }

        if (row == column && format.Symmetry == MatrixMarketSymmetry.SkewSymmetric)
        {
            throw tokens.Fault($"the entry at row {row + 1} lies on the diagonal, where a {word} file has none");
        }

        if (row == column && format.Symmetry == MatrixMarketSymmetry.Hermitian && Scalar.Imaginary(value) != 0)
        {
            throw tokens.Fault($"the entry on the diagonal of a {word} matrix must be real, not {value}");
        }
    }

    private void Store(int row, int column, T value)
    {
        Add(row, column, value);
        if (row == column || format.Symmetry == MatrixMarketSymmetry.General)
        {
            return;
        }

        Add(column, row, format.Symmetry switch
        {
            MatrixMarketSymmetry.SkewSymmetric => -value,
            MatrixMarketSymmetry.Hermitian => Scalar.Conjugate(value),
            _ => value,
        });
    }

    private void Add(int row, int column, T value)
    {
        rows.Add(row);
        columns.Add(column);
        values.Add(value);
        sourceLines.Add((int)Math.Min(lines.Line, int.MaxValue));
    }

    private SparseMatrix<T> Build()
    {
        TripletSort.Result sort = TripletSort.Build(
            rowCount, columnCount, CollectionsMarshal.AsSpan(rows), CollectionsMarshal.AsSpan(columns));
        if (sort.Pattern.EntryCount < rows.Count)
        {
            // Equal places stand side by side in the order, the later one behind.
            int repeat = 1;
            while (sort.Position[sort.Order[repeat]] != sort.Position[sort.Order[repeat - 1]])
            {
                repeat++;
            }

            int item = sort.Order[repeat];
            throw new MalformedFileException(
                $"the entry at row {rows[item] + 1}, column {columns[item] + 1} was given before, on line "
                + $"{sourceLines[sort.Order[repeat - 1]]}",
                sourceLines[item]);
        }

        SparseMatrix<T> matrix = new(sort.Pattern);
        Span<T> target = matrix.Values;
        for (int i = 0; i < values.Count; i++)
        {
            // Not added to zero, which would lose the sign of a negative zero.
            target[sort.Position[i]] = values[i];
        }

        return matrix;
    }

    private ReadOnlySpan<byte> ReadLine(string whenMissing, bool skipComments)
    {
        while (TryReadLine(out ReadOnlySpan<byte> line))
        {
            if (!skipComments || line[0] != (byte)'%')
            {
                return line;
            }
        }

        throw new MalformedFileException($"{whenMissing}.", lines.Line);
    }

    private bool TryReadLine(out ReadOnlySpan<byte> line)
    {
        while (lines.TryRead(out line))
        {
            if (!line.Trim(" \t\r"u8).IsEmpty)
            {
                return true;
            }
        }

        return false;
    }
}
