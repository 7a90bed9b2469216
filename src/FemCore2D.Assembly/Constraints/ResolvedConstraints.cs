using System.Collections.Immutable;
using System.Numerics;
using FemCore2D.Geometry;
using FemCore2D.Sparse;

namespace FemCore2D.Assembly;

/// <summary>
/// Conditions composed into rows <c>u = C v + g</c>: reduces a system to its free unknowns, expands their solution, and
/// gives the reactions. Immutable, and safe to use from many threads.
/// </summary>
/// <remarks>
/// The reduced system is <c>C^H K C v = C^H (f - K g)</c> plus the totals of floating targets, so a symmetric or
/// Hermitian matrix stays so. Reactions are the same rows of <c>K u - f</c>, so they are as accurate as the energy.
/// </remarks>
/// <typeparam name="T">The number type: <see cref="double"/> or <see cref="Complex"/>.</typeparam>
public sealed class ResolvedConstraints<T>
    where T : unmanaged, INumberBase<T>
{
    private readonly ImmutableList<Condition<T>> conditions;
    private readonly ConstraintRows<T> rows;
    private readonly T[] offsets;
    private readonly int[] owners;
    private readonly int[] targets;
    private readonly int[] floatColumns;
    private readonly ImmutableArray<Meeting<T>> meetings;

    internal ResolvedConstraints(
        NodeSpace space,
        ImmutableList<Condition<T>> conditions,
        ConstraintRows<T> rows,
        T[] offsets,
        int[] owners,
        int[] targets,
        int[] floatColumns,
        ImmutableArray<Meeting<T>> meetings)
    {
        Space = space;
        this.conditions = conditions;
        this.rows = rows;
        this.offsets = offsets;
        this.owners = owners;
        this.targets = targets;
        this.floatColumns = floatColumns;
        this.meetings = meetings;
    }

    /// <summary>The space.</summary>
    public NodeSpace Space { get; }

    /// <summary>The number of free unknowns.</summary>
    public int FreeCount => rows.ColumnCount;

    /// <summary>
    /// Changes the value of a target with one fixed value, or the total of a floating one. Everything else is shared
    /// with this object, so that many right-hand sides cost little.
    /// </summary>
    /// <param name="name">The boundary, region or point.</param>
    /// <param name="value">The new value, or the new total.</param>
    /// <exception cref="UnknownNameException">No such target has a fixed value or floats.</exception>
    /// <exception cref="ArgumentOutOfRangeException">The value is not finite.</exception>
    /// <exception cref="ConflictingConditionsException">A target that touches this one has another value.</exception>
    public ResolvedConstraints<T> WithValue(string name, T value)
    {
        int index = IndexOf(name, condition => condition.Kind is ConditionKind.Fixed or ConditionKind.Floating);
        if (!T.IsFinite(value))
        {
            throw new ArgumentOutOfRangeException(nameof(value), value, "The value of a condition must be finite.");
        }

        Condition<T> changed = conditions[index] with { Value = value };
        ImmutableList<Condition<T>> all = conditions.SetItem(index, changed);
        return new ResolvedConstraints<T>(
            Space, all, rows, offsets, owners, targets, floatColumns, meetings);
    }

    /// <summary>The number of the free unknown that an unknown of the space follows, or -1 when it is fixed.</summary>
    public int FreeUnknownOf(int unknown) => rows.Columns[unknown];

    /// <summary>The reduced matrix <c>C^H K C</c>.</summary>
    /// <param name="matrix">The full matrix of the space.</param>
    /// <exception cref="ArgumentException">The matrix is not of the size of the space.</exception>
    public SparseMatrix<T> Reduce(SparseMatrix<T> matrix)
    {
        MatrixReduction<T> plan = PlanFor(matrix);
        SparseMatrix<T> reduced = new(plan.Pattern);
        plan.Refill(matrix, reduced);
        return reduced;
    }

    /// <summary>Refills a reduced matrix in place.</summary>
    /// <param name="matrix">The full matrix, with the pattern of the one that was reduced first.</param>
    /// <param name="reduced">A matrix that <see cref="Reduce(SparseMatrix{T})"/> made from it.</param>
    /// <exception cref="ArgumentException">A matrix has another pattern.</exception>
    public void Reduce(SparseMatrix<T> matrix, SparseMatrix<T> reduced)
    {
        ArgumentNullException.ThrowIfNull(reduced);
        MatrixReduction<T> plan = PlanFor(matrix);
        if (!ReferenceEquals(plan.Pattern, reduced.Pattern))
        {
            throw new ArgumentException(
                "The reduced matrix was not made from a matrix of this pattern. Reduce without it first.",
                nameof(reduced));
        }

        plan.Refill(matrix, reduced);
    }

    /// <summary>The reduced right-hand side <c>C^H (f - K g)</c> plus the totals of floating targets.</summary>
    /// <param name="matrix">The full matrix.</param>
    /// <param name="rightHandSide">The full right-hand side.</param>
    /// <exception cref="ConflictingConditionsException">Targets that touch were given different values.</exception>
    public T[] Reduce(SparseMatrix<T> matrix, ReadOnlySpan<T> rightHandSide)
    {
        ArgumentNullException.ThrowIfNull(matrix);
        CheckLength(rightHandSide.Length, nameof(rightHandSide));
        CheckMeetings();
        T[] given = new T[Space.UnknownCount];
        AddGiven(given);
        T[] remainder = matrix.Multiply(given);
        T[] reduced = new T[FreeCount];
        for (int i = 0; i < remainder.Length; i++)
        {
            int column = rows.Columns[i];
            if (column >= 0)
            {
                T share = rightHandSide[i] - remainder[i];
                reduced[column] += rows.Weights is null ? share : Scalar.Conjugate(rows.Weights[i]) * share;
            }
        }

        for (int index = 0; index < floatColumns.Length; index++)
        {
            if (floatColumns[index] >= 0)
            {
                reduced[floatColumns[index]] += conditions[index].Value;
            }
        }

        return reduced;
    }

    /// <summary>All unknowns <c>u = C v + g</c> from the free ones.</summary>
    /// <param name="free">The free unknowns.</param>
    /// <exception cref="ArgumentException">There are not as many as <see cref="FreeCount"/>.</exception>
    public T[] Expand(ReadOnlySpan<T> free)
    {
        if (free.Length != FreeCount)
        {
            throw new ArgumentException(
                $"There are {FreeCount} free unknowns, but {free.Length} numbers were given.", nameof(free));
        }

        T[] all = new T[Space.UnknownCount];
        AddGiven(all);
        for (int i = 0; i < all.Length; i++)
        {
            int column = rows.Columns[i];
            if (column >= 0)
            {
                all[i] = rows.WeightOf(i) * free[column];
            }
        }

        return all;
    }

    /// <summary>What is left over in each row, <c>K u - f</c>: zero but where conditions act.</summary>
    /// <param name="matrix">The full matrix.</param>
    /// <param name="rightHandSide">The full right-hand side.</param>
    /// <param name="solution">All unknowns.</param>
    public T[] Residual(SparseMatrix<T> matrix, ReadOnlySpan<T> rightHandSide, ReadOnlySpan<T> solution)
    {
        ArgumentNullException.ThrowIfNull(matrix);
        CheckLength(rightHandSide.Length, nameof(rightHandSide));
        T[] residual = matrix.Multiply(solution);
        for (int i = 0; i < residual.Length; i++)
        {
            residual[i] -= rightHandSide[i];
        }

        return residual;
    }

    /// <summary>
    /// The total that a condition contributes, such as a charge, a heat flow or a current: the sum of the residual over
    /// its target. A node that two targets share counts with one of them: a floating one before a fixed value, a fixed
    /// value before a function of place, otherwise the one named first.
    /// </summary>
    /// <param name="name">The boundary, region or point with a fixed or floating value.</param>
    /// <param name="residual">The residual of the solution.</param>
    /// <exception cref="UnknownNameException">No such target has a fixed value or floats.</exception>
    /// <exception cref="ArgumentException">The residual has another length.</exception>
    public T Reaction(string name, ReadOnlySpan<T> residual)
    {
        CheckLength(residual.Length, nameof(residual));
        int index = IndexOf(name, condition => condition.Kind != ConditionKind.Paired);
        if (floatColumns[index] >= 0)
        {
            return SumOverMembers(rows.MembersOf(floatColumns[index]), residual);
        }

        T sum = T.Zero;
        for (int i = 0; i < residual.Length; i++)
        {
            if (targets[i] == index)
            {
                sum += residual[i];
            }
            else if (targets[i] < 0 && owners[i] == index)
            {
                // The far side of a pair: its row belongs to the near side's with the pair's factor.
                sum += Scalar.Conjugate(rows.WeightOf(i)) * residual[i];
            }
        }

        return sum;
    }

    /// <summary>The value of a target with one fixed value, or the value that a floating one has taken.</summary>
    /// <param name="name">The boundary, region or point.</param>
    /// <param name="free">The solution for the free unknowns.</param>
    /// <exception cref="UnknownNameException">No such target has one fixed value or floats.</exception>
    public T ValueOf(string name, ReadOnlySpan<T> free)
    {
        int index = IndexOf(name, condition => condition.Kind is ConditionKind.Fixed or ConditionKind.Floating);
        return floatColumns[index] >= 0 ? free[floatColumns[index]] : conditions[index].Value;
    }

    /// <summary>
    /// Finds an unknown in a part of the mesh in which no value is fixed, so that a problem without a mass term has no
    /// unique solution there. A part that is tied to itself with a factor other than 1 counts as fixed.
    /// </summary>
    /// <param name="takesPart">Whether a cell takes part in the problem; all do when it is left out.</param>
    /// <param name="heldBoundaries">Boundaries that hold the field in another way, such as by a boundary mass.</param>
    /// <returns>An unknown in such a part, or -1 when there is none.</returns>
    /// <exception cref="UnknownNameException">The mesh has no such boundary.</exception>
    public int FindUnfixed(Func<int, bool>? takesPart = null, params IEnumerable<string> heldBoundaries)
    {
        ArgumentNullException.ThrowIfNull(heldBoundaries);
        UnfixedSearch<T> search = new(rows);
        Span<int> unknowns = stackalloc int[32];
        for (int cell = 0; cell < Space.Mesh.CellCount; cell++)
        {
            if (takesPart is null || takesPart(cell))
            {
                int count = Space.Numbering.CellUnknowns(cell, unknowns);
                for (int i = 1; i < count; i++)
                {
                    search.Join(unknowns[i], unknowns[0], T.One);
                }
            }
        }

        foreach (string boundary in heldBoundaries)
        {
            foreach (int unknown in Space.Numbering.UnknownsOfBoundary(boundary))
            {
                search.Hold(unknown);
            }
        }

        for (int cell = 0; cell < Space.Mesh.CellCount; cell++)
        {
            if (takesPart is null || takesPart(cell))
            {
                Space.Numbering.CellUnknowns(cell, unknowns);
                if (!search.IsFixed(unknowns[0]))
                {
                    return unknowns[0];
                }
            }
        }

        return -1;
    }

    private T SumOverMembers(ReadOnlySpan<int> members, ReadOnlySpan<T> residual)
    {
        T sum = T.Zero;
        foreach (int member in members)
        {
            sum += Scalar.Conjugate(rows.WeightOf(member)) * residual[member];
        }

        return sum;
    }

    private void AddGiven(T[] all)
    {
        for (int i = 0; i < all.Length; i++)
        {
            if (owners[i] >= 0)
            {
                Condition<T> owner = conditions[owners[i]];
                all[i] = owner.Kind == ConditionKind.Fixed ? offsets[i] * owner.Value : offsets[i];
            }
        }
    }

    private void CheckMeetings()
    {
        foreach (Meeting<T> meeting in meetings)
        {
            Condition<T> first = conditions[meeting.First];
            Condition<T> second = conditions[meeting.Second];
            if (!meeting.Agrees(first, second))
            {
                throw new ConflictingConditionsException(
                    $"'{first.Name}' and '{second.Name}' touch at {Space.NodePlaces[meeting.Unknown]}, but have the "
                    + $"values {meeting.FirstValue(first)} and {meeting.SecondValue(second)} there. Let the two agree, "
                    + "or leave a gap between them.");
            }
        }
    }

    private MatrixReduction<T> PlanFor(SparseMatrix<T> matrix)
    {
        ArgumentNullException.ThrowIfNull(matrix);
        if (matrix.RowCount != Space.UnknownCount || matrix.ColumnCount != Space.UnknownCount)
        {
            throw new ArgumentException(
                $"The space has {Space.UnknownCount} unknowns, but the matrix is {matrix.RowCount} by {matrix.ColumnCount}.",
                nameof(matrix));
        }

        return rows.ReductionOf(matrix.Pattern);
    }

    private void CheckLength(int length, string name)
    {
        if (length != Space.UnknownCount)
        {
            throw new ArgumentException(
                $"The space has {Space.UnknownCount} unknowns, but {length} numbers were given.", name);
        }
    }

    private int IndexOf(string name, Func<Condition<T>, bool> fits)
    {
        ArgumentNullException.ThrowIfNull(name);
        for (int i = 0; i < conditions.Count; i++)
        {
            if (conditions[i].Name == name && fits(conditions[i]))
            {
                return i;
            }
        }

        throw new UnknownNameException(
            "condition on", name, conditions.Where(fits).Select(condition => condition.Name).Distinct());
    }
}
