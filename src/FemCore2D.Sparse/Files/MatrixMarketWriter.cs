using System.Buffers.Text;
using System.Globalization;
using System.Numerics;
using System.Text;

namespace FemCore2D.Sparse;

/// <summary>Writes one matrix, after a check that it is of the kind that the format states.</summary>
internal sealed class MatrixMarketWriter<T>
    where T : unmanaged, INumberBase<T>
{
    private const int BufferLength = 1 << 16;
    private const int LongestEntry = 128;
    private readonly SparseMatrix<T> matrix;
    private readonly MatrixMarketFormat format;
    private readonly string comment;
    private readonly byte[] buffer = new byte[BufferLength];
    private int length;

    public MatrixMarketWriter(SparseMatrix<T> matrix, MatrixMarketFormat? format, string? comment)
    {
        ArgumentNullException.ThrowIfNull(matrix);
        MatrixMarketField own = Scalar.IsComplex<T>() ? MatrixMarketField.Complex : MatrixMarketField.Real;
        this.matrix = matrix;
        this.format = format ?? new MatrixMarketFormat(Field: own);
        this.comment = comment ?? string.Empty;
        if (this.format.Fault is string fault)
        {
            throw new ArgumentException($"There is no such format: {fault}.", nameof(format));
        }

        CheckComment();
        CheckValues();
        CheckSymmetry();
    }

    /// <summary>Writes the matrix.</summary>
    public void Write(Stream stream, CancellationToken cancellationToken)
    {
        StringBuilder head = new();
        head.Append(format.FirstLine).Append('\n');
        if (comment.Length > 0)
        {
            foreach (ReadOnlySpan<char> line in comment.AsSpan().EnumerateLines())
            {
                head.Append("% ").Append(line).Append('\n');
            }
        }

        bool isArray = format.Layout == MatrixMarketLayout.Array;
        head.Append(CultureInfo.InvariantCulture, $"{matrix.RowCount} {matrix.ColumnCount}");
        if (!isArray)
        {
            head.Append(CultureInfo.InvariantCulture, $" {CountKept()}");
        }

        stream.Write(Encoding.UTF8.GetBytes(head.Append('\n').ToString()));
        if (isArray)
        {
            WriteArray(stream, cancellationToken);
        }
        else
        {
            WriteCoordinates(stream, cancellationToken);
        }

        stream.Write(buffer.AsSpan(0, length));
        length = 0;
    }

    private bool IsKept(int row, int column) => format.Symmetry switch
    {
        MatrixMarketSymmetry.General => true,
        MatrixMarketSymmetry.SkewSymmetric => row > column,
        _ => row >= column,
    };

    private long CountKept()
    {
        long count = 0;
        for (int row = 0; row < matrix.RowCount; row++)
        {
            foreach (int column in matrix.Pattern.ColumnsOf(row))
            {
                count += IsKept(row, column) ? 1 : 0;
            }
        }

        return count;
    }

    private void WriteCoordinates(Stream stream, CancellationToken cancellationToken)
    {
        for (int row = 0; row < matrix.RowCount; row++)
        {
            cancellationToken.ThrowIfCancellationRequested();
            int k = matrix.Pattern.RowStarts[row];
            foreach (int column in matrix.Pattern.ColumnsOf(row))
            {
                T value = matrix.Values[k++];
                if (IsKept(row, column))
                {
                    Reserve(stream);
                    Append(row + 1);
                    Append((byte)' ');
                    Append(column + 1);
                    if (format.Field != MatrixMarketField.Pattern)
                    {
                        Append((byte)' ');
                        AppendValue(value);
                    }

                    Append((byte)'\n');
                }
            }
        }
    }

    private void WriteArray(Stream stream, CancellationToken cancellationToken)
    {
        SparseMatrix<T> byColumn = matrix.Transpose();
        T[] dense = new T[matrix.RowCount];
        for (int column = 0; column < matrix.ColumnCount; column++)
        {
            cancellationToken.ThrowIfCancellationRequested();
            ReadOnlySpan<int> rows = byColumn.Pattern.ColumnsOf(column);
            ReadOnlySpan<T> values = byColumn.Values.Slice(byColumn.Pattern.RowStarts[column], rows.Length);
            for (int k = 0; k < rows.Length; k++)
            {
                dense[rows[k]] = values[k];
            }

            for (int row = 0; row < dense.Length; row++)
            {
                if (IsKept(row, column))
                {
                    Reserve(stream);
                    AppendValue(dense[row]);
                    Append((byte)'\n');
                }
            }

            Array.Clear(dense);
        }
    }

    private void Reserve(Stream stream)
    {
        if (length + LongestEntry > buffer.Length)
        {
            stream.Write(buffer.AsSpan(0, length));
            length = 0;
        }
    }

    private void Append(byte symbol) => buffer[length++] = symbol;

    private void Append(long number)
    {
        Utf8Formatter.TryFormat(number, buffer.AsSpan(length), out int written);
        length += written;
    }

    private void Append(double number)
    {
        number.TryFormat(buffer.AsSpan(length), out int written, "R", CultureInfo.InvariantCulture);
        length += written;
    }

    private void AppendValue(T value)
    {
        if (format.Field == MatrixMarketField.Whole)
        {
            Append((long)Scalar.Real(value));
            return;
        }

        Append(Scalar.Real(value));
        if (format.Field == MatrixMarketField.Complex)
        {
            Append((byte)' ');
            Append(Scalar.Imaginary(value));
        }
    }

    private void CheckValues()
    {
        const double LargestInteger = 1L << 53;
        for (int row = 0; row < matrix.RowCount; row++)
        {
            int k = matrix.Pattern.RowStarts[row];
            foreach (int column in matrix.Pattern.ColumnsOf(row))
            {
                T value = matrix.Values[k++];
                double real = Scalar.Real(value);
                bool isReal = Scalar.Imaginary(value) == 0;
                string? fault = format.Field switch
                {
                    MatrixMarketField.Pattern => null,
                    _ when !T.IsFinite(value) => "the format has no word for it",
                    MatrixMarketField.Real when !isReal => "but the format is real",
                    MatrixMarketField.Whole
                        when !isReal || real != Math.Truncate(real) || Math.Abs(real) > LargestInteger =>
                        "but the format is of whole numbers",
                    _ => null,
                };
                if (fault is not null)
                {
                    throw new ArgumentException(
                        $"The entry at row {row}, column {column} is {value}, {fault}.", nameof(matrix));
                }
            }
        }
    }

    private void CheckSymmetry()
    {
        bool fits = (format.Field, format.Symmetry) switch
        {
            (_, MatrixMarketSymmetry.General) => true,
            _ when !matrix.Pattern.IsSymmetric() => false,
            (MatrixMarketField.Pattern, _) => true,
            (_, MatrixMarketSymmetry.Symmetric) => matrix.IsSymmetric(),
            (_, MatrixMarketSymmetry.Hermitian) => matrix.IsHermitian(),
            _ => matrix.Add(matrix.Transpose()).LargestMagnitude() == 0,
        };
        if (!fits)
        {
            throw new ArgumentException(
                $"The matrix is not {MatrixMarketFormat.Word(format.Symmetry)}, as the format states, in its stored "
                + "entries and their values. Write it as general.",
                nameof(matrix));
        }
    }

    private void CheckComment()
    {
        const int LongestLine = 1022;
        foreach (ReadOnlySpan<char> line in comment.AsSpan().EnumerateLines())
        {
            if (Encoding.UTF8.GetByteCount(line) > LongestLine)
            {
                throw new ArgumentException(
                    $"A line of the comment is longer than the {LongestLine} bytes that the format allows. Break it.",
                    nameof(comment));
            }
        }
    }
}
