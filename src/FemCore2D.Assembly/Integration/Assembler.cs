using System.Collections.Concurrent;
using System.Numerics;
using System.Runtime.ExceptionServices;
using FemCore2D.Geometry;
using FemCore2D.Sparse;

namespace FemCore2D.Assembly;

/// <summary>
/// Integrates terms into the matrices and right-hand sides of a space. Immutable; the results are the same to the bit
/// for any number of threads.
/// </summary>
/// <remarks>
/// The pattern of the matrices is found at the first use of a space and shared by all. The rows are cut into chunks
/// that do not depend on the number of threads; a worker computes all cells that touch its chunk and keeps what falls
/// in its rows, so that no lock and no atomic operation is needed and every sum is in the order of the cells.
/// </remarks>
public sealed class Assembler
{
    private readonly int threads;

    /// <summary>Creates an assembler.</summary>
    /// <param name="space">The space.</param>
    /// <param name="threads">The largest number of threads to use; 0 for one a processor.</param>
    /// <exception cref="ArgumentOutOfRangeException">The number of threads is negative.</exception>
    public Assembler(NodeSpace space, int threads = 0)
    {
        ArgumentNullException.ThrowIfNull(space);
        ArgumentOutOfRangeException.ThrowIfNegative(threads);
        Space = space;
        this.threads = threads == 0 ? Environment.ProcessorCount : threads;
    }

    /// <summary>The space.</summary>
    public NodeSpace Space { get; }

    /// <summary>The pattern of all matrices of the space; found at first use.</summary>
    /// <exception cref="SizeLimitException">The matrix would have more entries than can be stored.</exception>
    public SparsePattern Pattern => Space.PlanWith(Options(default)).Pattern;

    /// <summary>A matrix of zeros with the pattern of the space.</summary>
    /// <exception cref="SizeLimitException">The matrix would have more entries than can be stored.</exception>
    public SparseMatrix<T> CreateMatrix<T>()
        where T : unmanaged, INumberBase<T> => new(Pattern);

    /// <summary>A right-hand side of zeros.</summary>
    public T[] CreateVector<T>()
        where T : unmanaged, INumberBase<T> => new T[Space.UnknownCount];

    /// <summary>Adds a term to a matrix.</summary>
    /// <param name="matrix">The matrix, made by <see cref="CreateMatrix"/> for this space.</param>
    /// <param name="term">The term.</param>
    /// <param name="extraDegree">How far to go beyond the degree of quadrature that the term asks for.</param>
    /// <param name="cancellationToken">Stops the work; the matrix is then of no use.</param>
    /// <exception cref="ArgumentException">The matrix has another pattern.</exception>
    /// <exception cref="ArgumentOutOfRangeException">No quadrature rule is of the degree that would be needed.</exception>
    /// <exception cref="OperationCanceledException">The work was stopped.</exception>
    public void Add<T, TTerm>(
        SparseMatrix<T> matrix, TTerm term, int extraDegree = 0, CancellationToken cancellationToken = default)
        where T : unmanaged, INumberBase<T>
        where TTerm : struct, ICellMatrixTerm<T>
    {
        RefillPlan plan = CheckedPlan(matrix, cancellationToken);
        int shapes = (2 * Space.Degree) - (Space.PresentTables.Any(t => t.Element.Cell == CellKind.Quadrilateral)
            ? 0
            : TTerm.SlopeFactors);
        var degrees = new Degrees(Space, shapes, DegreesOf(term.DegreeIn), extraDegree);
        var loop = new CellMatrixLoop<T, TTerm>(Space, plan, matrix, term, degrees);
        ForEachChunk(plan, loop.Run, loop.NewScratch, cancellationToken);
    }

    /// <summary>Adds a term to a right-hand side.</summary>
    /// <param name="vector">The right-hand side, one number for each unknown of the space.</param>
    /// <param name="term">The term.</param>
    /// <param name="extraDegree">How far to go beyond the degree of quadrature that the term asks for.</param>
    /// <param name="cancellationToken">Stops the work; the right-hand side is then of no use.</param>
    /// <exception cref="ArgumentException">The right-hand side has another length.</exception>
    /// <exception cref="ArgumentOutOfRangeException">No quadrature rule is of the degree that would be needed.</exception>
    /// <exception cref="OperationCanceledException">The work was stopped.</exception>
    public unsafe void Add<T, TTerm>(
        Span<T> vector, TTerm term, int extraDegree = 0, CancellationToken cancellationToken = default)
        where T : unmanaged, INumberBase<T>
        where TTerm : struct, ICellVectorTerm<T>
    {
        CheckLength(vector.Length, nameof(vector));
        RefillPlan plan = Space.PlanWith(Options(cancellationToken));
        var degrees = new Degrees(Space, Space.Degree, DegreesOf(term.DegreeIn), extraDegree);
        fixed (T* start = vector)
        {
            var loop = new CellVectorLoop<T, TTerm>(Space, plan, start, term, degrees);
            ForEachChunk(plan, loop.Run, loop.NewScratch, cancellationToken);
        }
    }

    /// <summary>Adds a term on the edges of a boundary to a matrix.</summary>
    /// <param name="matrix">The matrix, made by <see cref="CreateMatrix"/> for this space.</param>
    /// <param name="term">The term.</param>
    /// <param name="boundary">The name of the boundary.</param>
    /// <param name="extraDegree">How far to go beyond the degree of quadrature that the term asks for.</param>
    /// <exception cref="ArgumentException">The matrix has another pattern.</exception>
    /// <exception cref="ArgumentOutOfRangeException">No quadrature rule is of the degree that would be needed.</exception>
    /// <exception cref="UnknownNameException">No boundary has that name.</exception>
    public void AddOnBoundary<T, TTerm>(
        SparseMatrix<T> matrix, TTerm term, string boundary, int extraDegree = 0)
        where T : unmanaged, INumberBase<T>
        where TTerm : struct, IEdgeMatrixTerm<T>
    {
        CheckedPlan(matrix, default);
        ArgumentOutOfRangeException.ThrowIfNegative(extraDegree);
        new EdgeLoop(Space, extraDegree).AddMatrix(matrix, term, Space.Mesh.BoundaryEdges(boundary));
    }

    /// <summary>Adds a term on the edges of a boundary to a right-hand side.</summary>
    /// <param name="vector">The right-hand side, one number for each unknown of the space.</param>
    /// <param name="term">The term.</param>
    /// <param name="boundary">The name of the boundary.</param>
    /// <param name="extraDegree">How far to go beyond the degree of quadrature that the term asks for.</param>
    /// <exception cref="ArgumentException">The right-hand side has another length.</exception>
    /// <exception cref="ArgumentOutOfRangeException">No quadrature rule is of the degree that would be needed.</exception>
    /// <exception cref="UnknownNameException">No boundary has that name.</exception>
    public void AddOnBoundary<T, TTerm>(Span<T> vector, TTerm term, string boundary, int extraDegree = 0)
        where T : unmanaged, INumberBase<T>
        where TTerm : struct, IEdgeVectorTerm<T>
    {
        CheckLength(vector.Length, nameof(vector));
        ArgumentOutOfRangeException.ThrowIfNegative(extraDegree);
        new EdgeLoop(Space, extraDegree).AddVector(vector, term, Space.Mesh.BoundaryEdges(boundary));
    }

    private ParallelOptions Options(CancellationToken cancellationToken) =>
        new() { MaxDegreeOfParallelism = threads, CancellationToken = cancellationToken };

    private int[] DegreesOf(Func<int, int> degreeIn) =>
        [.. Enumerable.Range(0, Space.Mesh.RegionNames.Length).Select(degreeIn)];

    private RefillPlan CheckedPlan<T>(SparseMatrix<T> matrix, CancellationToken cancellationToken)
        where T : unmanaged, INumberBase<T>
    {
        ArgumentNullException.ThrowIfNull(matrix);
        RefillPlan plan = Space.PlanWith(Options(cancellationToken));
        return ReferenceEquals(plan.Pattern, matrix.Pattern)
            ? plan
            : throw new ArgumentException(
                "The matrix does not have the pattern of this space. Create it by the assembler's CreateMatrix.",
                nameof(matrix));
    }

    private void CheckLength(int length, string name)
    {
        if (length != Space.UnknownCount)
        {
            throw new ArgumentException(
                $"The space has {Space.UnknownCount} unknowns, but the right-hand side has {length} numbers.", name);
        }
    }

    private void ForEachChunk(
        RefillPlan plan, Action<int, CellScratch> run, Func<CellScratch> newScratch, CancellationToken cancellationToken)
    {
        if (threads == 1 || plan.Chunks.Count == 1)
        {
            CellScratch scratch = newScratch();
            for (int chunk = 0; chunk < plan.Chunks.Count; chunk++)
            {
                cancellationToken.ThrowIfCancellationRequested();
                run(chunk, scratch);
            }

            return;
        }

        // The runtime starts more workers than threads, one after another: later ones take over from those that ended.
        var idle = new ConcurrentBag<CellScratch>();
        try
        {
            Parallel.For(
                0,
                plan.Chunks.Count,
                Options(cancellationToken),
                () => idle.TryTake(out CellScratch? scratch) ? scratch : newScratch(),
                (chunk, _, scratch) =>
                {
                    run(chunk, scratch);
                    return scratch;
                },
                idle.Add);
        }
        catch (AggregateException faults)
        {
            // A term that refuses its data does so by one exception, whatever the number of threads.
            ExceptionDispatchInfo.Throw(faults.InnerExceptions[0]);
        }
    }
}
