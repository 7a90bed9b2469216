using System.Numerics;
using FemCore2D.Geometry;

namespace FemCore2D.Sparse;

/// <summary>Reading and writing of matrices in the Matrix Market exchange format.</summary>
/// <remarks>
/// R. F. Boisvert, R. Pozo and K. A. Remington, The Matrix Market exchange formats: initial design, NISTIR 5935, 1996.
/// Numbers are written with as many digits as bring back the same bits. A file that breaks its format is refused with
/// the line and the cause; nothing is guessed.
/// </remarks>
public static class MatrixMarket
{
    /// <summary>Reads a matrix from a file.</summary>
    /// <inheritdoc cref="Read{T}(Stream, CancellationToken)"/>
    /// <param name="path">The path of the file.</param>
    /// <param name="cancellationToken">Stops the work.</param>
    public static SparseMatrix<T> Read<T>(string path, CancellationToken cancellationToken = default)
        where T : unmanaged, INumberBase<T>
    {
        using FileStream stream = File.OpenRead(path);
        return Read<T>(stream, cancellationToken);
    }

    /// <summary>Reads a matrix from a stream, to its end; the stream stays open.</summary>
    /// <typeparam name="T">The number type: <see cref="double"/> or <see cref="Complex"/>. Complex takes real files too.</typeparam>
    /// <param name="stream">The text.</param>
    /// <param name="cancellationToken">Stops the work.</param>
    /// <returns>The whole matrix, with the entries that a symmetric file leaves out. An array stores all its entries.</returns>
    /// <exception cref="MalformedFileException">The text breaks its format, or holds complex numbers where real ones are asked for.</exception>
    /// <exception cref="SizeLimitException">The text states a size that no matrix can have, or that its entries do not bear out.</exception>
    /// <exception cref="IOException">The text cannot be read.</exception>
    /// <exception cref="OperationCanceledException">The work was stopped.</exception>
    public static SparseMatrix<T> Read<T>(Stream stream, CancellationToken cancellationToken = default)
        where T : unmanaged, INumberBase<T>
    {
        ArgumentNullException.ThrowIfNull(stream);
        Scalar.Require<T>();
        return new MatrixMarketReader<T>(stream, cancellationToken).Read();
    }

    /// <summary>Reads a vector, which is a matrix of one column, from a stream, to its end; the stream stays open.</summary>
    /// <inheritdoc cref="Read{T}(Stream, CancellationToken)"/>
    /// <returns>The vector, zero where the file stores no entry.</returns>
    /// <exception cref="MalformedFileException">The text breaks its format, or its matrix does not have one column.</exception>
    public static T[] ReadVector<T>(Stream stream, CancellationToken cancellationToken = default)
        where T : unmanaged, INumberBase<T>
    {
        SparseMatrix<T> matrix = Read<T>(stream, cancellationToken);
        if (matrix.ColumnCount != 1)
        {
            throw new MalformedFileException(
                $"A vector has one column, but the matrix has {matrix.ColumnCount}. Read it as a matrix.", 0);
        }

        T[] vector = new T[matrix.RowCount];
        for (int row = 0; row < vector.Length; row++)
        {
            vector[row] = matrix[row, 0];
        }

        return vector;
    }

    /// <summary>Reads a vector, which is a matrix of one column, from a file.</summary>
    /// <inheritdoc cref="ReadVector{T}(Stream, CancellationToken)"/>
    /// <param name="path">The path of the file.</param>
    /// <param name="cancellationToken">Stops the work.</param>
    public static T[] ReadVector<T>(string path, CancellationToken cancellationToken = default)
        where T : unmanaged, INumberBase<T>
    {
        using FileStream stream = File.OpenRead(path);
        return ReadVector<T>(stream, cancellationToken);
    }

    /// <summary>Reads what the first line of a stream states; the stream stays open, behind some part of the text.</summary>
    /// <param name="stream">The text.</param>
    /// <exception cref="MalformedFileException">The first line is not one of the format.</exception>
    /// <exception cref="IOException">The text cannot be read.</exception>
    public static MatrixMarketFormat ReadFormat(Stream stream)
    {
        ArgumentNullException.ThrowIfNull(stream);
        return MatrixMarketReader<double>.ReadFormat(new LineReader(stream));
    }

    /// <summary>Writes a matrix to a file, which is replaced if it exists.</summary>
    /// <inheritdoc cref="Write{T}(SparseMatrix{T}, Stream, MatrixMarketFormat?, string?, CancellationToken)"/>
    /// <param name="matrix">The matrix.</param>
    /// <param name="path">The path of the file.</param>
    /// <param name="format">The kind of file.</param>
    /// <param name="comment">Lines of comment, or none.</param>
    /// <param name="cancellationToken">Stops the work.</param>
    public static void Write<T>(
        SparseMatrix<T> matrix,
        string path,
        MatrixMarketFormat? format = null,
        string? comment = null,
        CancellationToken cancellationToken = default)
        where T : unmanaged, INumberBase<T>
    {
        MatrixMarketWriter<T> writer = new(matrix, format, comment);
        using FileStream stream = File.Create(path);
        writer.Write(stream, cancellationToken);
    }

    /// <summary>Writes a matrix to a stream, which stays open.</summary>
    /// <typeparam name="T">The number type: <see cref="double"/> or <see cref="Complex"/>.</typeparam>
    /// <param name="matrix">The matrix.</param>
    /// <param name="stream">Receives the text.</param>
    /// <param name="format">The kind of file; coordinates, general, and real or complex as the matrix is if left out.</param>
    /// <param name="comment">Lines of comment, or none.</param>
    /// <param name="cancellationToken">Stops the work.</param>
    /// <exception cref="ArgumentException">
    /// The format does not exist in the standard, or the matrix is not of the kind it states: not symmetric in its
    /// stored entries and their values, not of whole numbers, not real; or an entry is not finite, which the format
    /// cannot state; or a line of the comment is longer than the format allows. Nothing is written then.
    /// </exception>
    /// <exception cref="IOException">The text cannot be written.</exception>
    /// <exception cref="OperationCanceledException">The work was stopped.</exception>
    /// <remarks>
    /// Stored zeros are written and come back, save those on the diagonal of a skew-symmetric matrix, for which the
    /// format has no place.
    /// </remarks>
    public static void Write<T>(
        SparseMatrix<T> matrix,
        Stream stream,
        MatrixMarketFormat? format = null,
        string? comment = null,
        CancellationToken cancellationToken = default)
        where T : unmanaged, INumberBase<T>
    {
        ArgumentNullException.ThrowIfNull(stream);
        new MatrixMarketWriter<T>(matrix, format, comment).Write(stream, cancellationToken);
    }

    /// <summary>Writes a vector to a file, which is replaced if it exists, as an array of one column.</summary>
    /// <inheritdoc cref="WriteVector{T}(ReadOnlySpan{T}, Stream, CancellationToken)"/>
    /// <param name="vector">The vector.</param>
    /// <param name="path">The path of the file.</param>
    /// <param name="cancellationToken">Stops the work.</param>
    public static void WriteVector<T>(
        ReadOnlySpan<T> vector, string path, CancellationToken cancellationToken = default)
        where T : unmanaged, INumberBase<T>
    {
        MatrixMarketWriter<T> writer = WriterOf(vector);
        using FileStream stream = File.Create(path);
        writer.Write(stream, cancellationToken);
    }

    /// <summary>Writes a vector to a stream, as an array of one column; the stream stays open.</summary>
    /// <typeparam name="T">The number type: <see cref="double"/> or <see cref="Complex"/>.</typeparam>
    /// <param name="vector">The vector.</param>
    /// <param name="stream">Receives the text.</param>
    /// <param name="cancellationToken">Stops the work.</param>
    /// <exception cref="ArgumentException">A number is not finite, which the format cannot state.</exception>
    /// <exception cref="IOException">The text cannot be written.</exception>
    /// <exception cref="OperationCanceledException">The work was stopped.</exception>
    public static void WriteVector<T>(
        ReadOnlySpan<T> vector, Stream stream, CancellationToken cancellationToken = default)
        where T : unmanaged, INumberBase<T>
    {
        ArgumentNullException.ThrowIfNull(stream);
        WriterOf(vector).Write(stream, cancellationToken);
    }

    private static MatrixMarketWriter<T> WriterOf<T>(ReadOnlySpan<T> vector)
        where T : unmanaged, INumberBase<T>
    {
        int[] starts = new int[vector.Length + 1];
        for (int row = 0; row < vector.Length; row++)
        {
            starts[row + 1] = row + 1;
        }

        SparseMatrix<T> column = new(new SparsePattern(1, starts, new int[vector.Length]), vector);
        MatrixMarketField field = Scalar.IsComplex<T>() ? MatrixMarketField.Complex : MatrixMarketField.Real;
        return new MatrixMarketWriter<T>(column, new(MatrixMarketLayout.Array, field), null);
    }
}
