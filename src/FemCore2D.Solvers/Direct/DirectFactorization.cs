using System.Diagnostics;
using System.Numerics;
using FemCore2D.Sparse;

namespace FemCore2D.Solvers;

/// <summary>The factors of a sparse matrix, ready to solve, and to be computed anew for a matrix of the same pattern.</summary>
/// <typeparam name="T">The number type: <see cref="double"/> or <see cref="Complex"/>.</typeparam>
/// <remarks>
/// Solves may run on many threads at the same time; a refactorization must be the only user. The kinds that pivot keep a
/// copy of the matrix and refine each solution until its backward error is of the size of rounding.
/// </remarks>
public sealed unsafe partial class DirectFactorization<T> : IFactorization<T>
    where T : unmanaged, INumberBase<T>
{
    private const double Rounding = 2.220446049250313e-16;

    /// <summary>Pivots below this, in a matrix scaled to entries of one, are raised to it.</summary>
    private const double LeastPivot = 1e-10;

    /// <summary>A vector mapped to this many rounding units of the matrix's size counts as mapped to nothing.</summary>
    private const double SingularRoundings = 50.0;

    private readonly FactorizationPlan<T> plan;
    private readonly FrontEngine engine;
    private readonly Crew crew;
    private readonly MatrixInspection<T> inspection;
    private readonly MatrixScaling<T>? scaling;
    private readonly SparseMatrix<T>? matrix;
    private readonly T[] scaled = [];
    private TimeSpan factorizationTime;
    private bool valid;

    internal DirectFactorization(
        FactorizationPlan<T> plan, SparseMatrix<T> first, CancellationToken cancellationToken)
    {
        this.plan = plan;
        crew = new Crew(plan.Options.Threads);
        bool general = plan.Kind == FactorizationKind.General;
        inspection = new MatrixInspection<T>(plan.Pattern, !general);
        FactorKind kind = general
            ? FactorKind.General
            : plan.Kind == FactorizationKind.Cholesky ? FactorKind.Cholesky : FactorKind.Symmetric;
        if (kind != FactorKind.Cholesky)
        {
            scaling = new MatrixScaling<T>(plan.Pattern, !general);
            matrix = new SparseMatrix<T>(plan.Pattern);
            scaled = new T[plan.Pattern.EntryCount];
        }

        engine = new FrontEngine(plan.Fronts, plan.Map, kind, crew, plan.Options.Progress)
        {
            Diagonals = inspection.Diagonals,
            LeastPivot = kind == FactorKind.Cholesky
                ? 4.0 * Rounding * Math.Sqrt(plan.Pattern.RowCount)
                : LeastPivot,
        };
        spaces = new SolveSpace[8];
        Refactorize(first, cancellationToken);
    }

    /// <inheritdoc/>
    public int Size => plan.Pattern.RowCount;

    /// <summary>What the factorization has used and spent.</summary>
    public DirectReport Report => new()
    {
        Ordering = plan.Ordering.Method,
        FactorEntries = plan.FactorEntries,
        Operations = plan.Operations,
        Bytes = plan.Bytes,
        RaisedPivots = engine.RaisedPivots,
        OrderingTime = plan.OrderingTime,
        AnalysisTime = plan.AnalysisTime,
        FactorizationTime = factorizationTime,
    };

    /// <summary>Computes the factors of another matrix of the same pattern, in the same memory.</summary>
    /// <param name="newMatrix">The matrix; it is not changed, and not needed any more after the call.</param>
    /// <param name="cancellationToken">Stops the work; the factors are then of no use until they are computed anew.</param>
    /// <exception cref="ArgumentException">The matrix has another pattern.</exception>
    /// <exception cref="UnsuitableMatrixException">The matrix is not of its class, or not finite.</exception>
    /// <exception cref="NotPositiveDefiniteException">The kind is Cholesky and the matrix is not positive definite.</exception>
    /// <exception cref="SingularMatrixException">The matrix is singular.</exception>
    /// <exception cref="OperationCanceledException">The work was stopped.</exception>
    public void Refactorize(SparseMatrix<T> newMatrix, CancellationToken cancellationToken = default)
    {
        ArgumentNullException.ThrowIfNull(newMatrix);
        if (!ReferenceEquals(newMatrix.Pattern, plan.Pattern) && !newMatrix.Pattern.HasSameEntriesAs(plan.Pattern))
        {
            throw new ArgumentException(
                "The matrix has another pattern than the plan was made for. Make a new plan.", nameof(newMatrix));
        }

        long start = Stopwatch.GetTimestamp();
        valid = false;
        cancellationToken.ThrowIfCancellationRequested();
        Inspect(newMatrix);
        cancellationToken.ThrowIfCancellationRequested();
        Span<T> values = newMatrix.Values;
        if (matrix is not null)
        {
            values.CopyTo(matrix.Values);
            scaling!.Run(matrix, scaled, cancellationToken);
            values = scaled;
        }

        int failed;
        fixed (T* first = values)
            failed = engine.Run((double*)first, cancellationToken);
        if (failed >= 0)
            ThrowNotPositiveDefinite(failed);
        valid = true;
        if (engine.RaisedPivots > 0)
            RequireRegular();
        factorizationTime = Stopwatch.GetElapsedTime(start);
    }

    private void Inspect(SparseMatrix<T> newMatrix)
    {
        crew.Gather();
        try
        {
            inspection.Run(newMatrix, crew);
        }
        finally
        {
            crew.Dismiss();
        }

        if (plan.Kind == FactorizationKind.General)
            return;
        bool mustBeHermitian = plan.Kind == FactorizationKind.Cholesky || !Scalar.IsComplex<T>();
        if (!mustBeHermitian && inspection.FirstUnsymmetric < 0)
        {
            engine.Kind = FactorKind.Symmetric;
            return;
        }

        if (inspection.FirstNotHermitian < 0)
        {
            if (plan.Kind == FactorizationKind.Symmetric && Scalar.IsComplex<T>())
                engine.Kind = FactorKind.Hermitian;
            return;
        }

        string property = !Scalar.IsComplex<T>() ? "symmetric"
            : mustBeHermitian ? "Hermitian" : "symmetric or Hermitian";
        int row = mustBeHermitian ? inspection.FirstNotHermitian : inspection.FirstUnsymmetric;
        throw new UnsuitableMatrixException(
            $"The matrix is not {property}: row {row} differs from column {row}. Use the general factorization, or the "
            + "symmetric one for complex symmetric matrices.");
    }

    private void ThrowNotPositiveDefinite(int column)
    {
        int unknown = plan.Fronts.Structure.Tree.Order[column];
        throw new NotPositiveDefiniteException(
            $"The matrix is not positive definite: the pivot of unknown {unknown} is zero or negative to the precision of "
            + "the machine. The usual causes are a potential that is fixed nowhere, an unknown on which nothing acts, and "
            + "a coefficient of the wrong sign; an indefinite matrix needs the symmetric factorization.",
            unknown);
    }

    /// <summary>
    /// Where pivots were raised, looks for a vector that the matrix maps to nothing: inverse iteration finds it in a few
    /// steps, if there is one.
    /// </summary>
    private void RequireRegular()
    {
        T[] x = new T[Size];
        T[] y = new T[Size];
        uint state = 1;
        for (int i = 0; i < x.Length; i++)
        {
            state = 1664525 * state + 1013904223;
            x[i] = Scalar.Create<T>(0.5 + state / 4294967296.0);
        }

        // Inverse iteration with the factors finds the vector up to what raising the pivots has changed; correcting it by
        // its own residual then leads to the vector of the matrix itself.
        double least = double.MaxValue;
        SolveOnce(x, y, transposed: false);
        for (int step = 0; step < 4; step++)
        {
            double size = Norm(y);
            for (int i = 0; i < y.Length; i++)
                x[i] = Scalar.Scale(y[i], 1.0 / size);
            Residual(default, x, y);
            least = Math.Min(least, Norm(y) / inspection.RowNorm);
            SolveOnce(y, y, transposed: false);
            for (int i = 0; i < y.Length; i++)
                y[i] = x[i] - y[i];
        }

        if (least > SingularRoundings * Rounding)
            return;
        valid = false;
        int unknown = 0;
        for (int i = 1; i < x.Length; i++)
        {
            if (Scalar.Magnitude(x[i]) > Scalar.Magnitude(x[unknown]))
                unknown = i;
        }

        throw new SingularMatrixException(
            $"The matrix is singular: a combination of unknowns, unknown {unknown} foremost, is left free. The usual causes "
            + "are a potential that is fixed nowhere, an unknown on which nothing acts, and constraints that repeat one "
            + "another.",
            unknown);
    }

    private void RequireValid()
    {
        if (!valid)
        {
            throw new InvalidOperationException(
                "There are no factors: the last factorization failed or was stopped. Factorize again.");
        }
    }
}
