using System.Collections.Immutable;
using System.Numerics;
using FemCore2D.Sparse;

namespace FemCore2D.Assembly;

/// <summary>Composes conditions by a union-find forest in which each unknown is a multiple of its parent.</summary>
/// <remarks>
/// Tarjan 1975, with a factor on each link. Pairs are joined first, floating targets after them, fixed values last, so
/// that every contradiction is met where both of its sides are known.
/// </remarks>
internal sealed class ConstraintResolver<T>
    where T : unmanaged, INumberBase<T>
{
    private const double RelativeTolerance = 1e-9;
    private const int Nobody = -1;

    private readonly NodeSpace space;
    private readonly ImmutableList<Condition<T>> conditions;
    private readonly int[] parents;
    private readonly T[] factors;

    /// <summary>For a root, the condition that fixes it, and its value per unit of the condition's.</summary>
    private readonly int[] fixedBy;
    private readonly T[] scales;

    /// <summary>For a fixed root, its factor to the unknown that was fixed first.</summary>
    private readonly T[] fixedFactors;

    /// <summary>For a root, the condition that lets it float.</summary>
    private readonly int[] floatsBy;

    /// <summary>For an unknown, the condition whose target it belongs to.</summary>
    private readonly int[] targets;
    private readonly List<(int Unknown, int Condition)> zeros = [];
    private readonly List<Meeting<T>> meetings = [];
    private readonly double[] functionScales;

    public ConstraintResolver(NodeSpace space, ImmutableList<Condition<T>> conditions)
    {
        this.space = space;
        this.conditions = conditions;
        int count = space.UnknownCount;
        parents = new int[count];
        factors = new T[count];
        scales = new T[count];
        fixedFactors = new T[count];
        functionScales = new double[conditions.Count];
        fixedBy = new int[count];
        floatsBy = new int[count];
        targets = new int[count];
        for (int i = 0; i < count; i++)
        {
            parents[i] = i;
        }

        Array.Fill(factors, T.One);
        Array.Fill(fixedFactors, T.One);
        Array.Fill(fixedBy, Nobody);
        Array.Fill(floatsBy, Nobody);
        Array.Fill(targets, Nobody);
    }

    public ResolvedConstraints<T> Resolve()
    {
        ForEach(ConditionKind.Paired, JoinPair);
        FixZeros();
        ForEach(ConditionKind.Floating, Float);
        ForEach(ConditionKind.Fixed, Fix);
        ForEach(ConditionKind.FixedByPlace, Fix);
        return Number();
    }

    private void ForEach(ConditionKind kind, Action<int> apply)
    {
        for (int i = 0; i < conditions.Count; i++)
        {
            if (conditions[i].Kind == kind)
            {
                apply(i);
            }
        }
    }

    private void JoinPair(int index)
    {
        Condition<T> pair = conditions[index];
        foreach ((int first, int second) in new BoundaryMatch(space.Numbering, pair.Name, pair.Partner!).FindPairs())
        {
            int firstRoot = RootOf(first, out T firstFactor);
            int secondRoot = RootOf(second, out T secondFactor);
            T wanted = pair.Value * firstFactor;
            if (firstRoot != secondRoot)
            {
                // The lower number stays root, which keeps the order of the unknowns.
                if (firstRoot < secondRoot)
                {
                    Link(secondRoot, firstRoot, wanted / secondFactor);
                }
                else
                {
                    Link(firstRoot, secondRoot, secondFactor / wanted);
                }
            }
            else if (!Agree(secondFactor, wanted))
            {
                // A point that a motion keeps in place equals a multiple of itself, so it is zero.
                if (first != second)
                {
                    throw new ConflictingConditionsException(
                        $"At {space.NodePlaces[second]}, {pair} and other pairs demand {secondFactor} and {wanted} "
                        + "times the same value. Choose factors whose product round every closed way is 1.");
                }

                zeros.Add((first, index));
            }
        }
    }

    /// <summary>Fixes what a pair demands to be zero; only now, since joining moves roots.</summary>
    private void FixZeros()
    {
        foreach ((int unknown, int index) in zeros)
        {
            int root = RootOf(unknown, out T factor);
            fixedBy[root] = index;
            fixedFactors[root] = factor;
            scales[root] = T.Zero;
        }
    }

    private void Float(int index)
    {
        Condition<T> condition = conditions[index];
        ImmutableArray<int> unknowns = TargetOf(condition);
        int root = RootOf(unknowns[0], out T rootFactor);
        foreach (int unknown in unknowns)
        {
            int other = RootOf(unknown, out T factor);
            int owner = floatsBy[other];
            if (fixedBy[other] != Nobody || (owner != Nobody && owner != index))
            {
                int rival = owner != Nobody ? owner : fixedBy[other];
                throw new ConflictingConditionsException(
                    $"{Upper(condition)} touches {conditions[rival]} at {space.NodePlaces[unknown]}. "
                    + "Make them one conductor, or leave a gap.");
            }

            if (other == root)
            {
                if (!Agree(factor, rootFactor))
                {
                    throw new ConflictingConditionsException(
                        $"{Upper(condition)} reaches both sides of a pair whose factor is not 1, at "
                        + $"{space.NodePlaces[unknown]}. Fix its value instead.");
                }
            }
            else
            {
                Link(other, root, rootFactor / factor);
            }

            targets[unknown] = index;
        }

        floatsBy[root] = index;
    }

    private void Fix(int index)
    {
        Condition<T> condition = conditions[index];
        ImmutableArray<int> unknowns = TargetOf(condition);
        T[] values = new T[unknowns.Length];
        for (int i = 0; i < values.Length; i++)
        {
            values[i] = condition.Kind == ConditionKind.Fixed ? T.One : ValueOf(condition, unknowns[i]);
            functionScales[index] = condition.Kind == ConditionKind.Fixed
                ? 0
                : Math.Max(functionScales[index], Scalar.Magnitude(values[i]));
        }

        for (int i = 0; i < values.Length; i++)
        {
            int unknown = unknowns[i];
            int root = RootOf(unknown, out T factor);
            if (floatsBy[root] != Nobody)
            {
                throw new ConflictingConditionsException(
                    $"{Upper(conditions[floatsBy[root]])} touches {condition} at {space.NodePlaces[unknown]}. "
                    + "Make them one conductor, or leave a gap.");
            }

            int rival = fixedBy[root];
            if (rival == Nobody)
            {
                fixedBy[root] = index;
                fixedFactors[root] = factor;
                scales[root] = values[i] / factor;
            }
            else
            {
                Meet(rival, index, unknown, factor * scales[root], values[i]);
            }

            if (targets[unknown] == Nobody)
            {
                targets[unknown] = index;
            }
        }
    }

    private void Meet(int rival, int index, int unknown, T known, T value)
    {
        var meeting = new Meeting<T>(
            rival, index, unknown, known, value, Math.Max(functionScales[rival], functionScales[index]));
        if (!meeting.Agrees(conditions[rival], conditions[index]))
        {
            throw new ConflictingConditionsException(
                $"At {space.NodePlaces[unknown]}, {conditions[index]} demands "
                + $"{meeting.SecondValue(conditions[index])}, but {conditions[rival]} demands "
                + $"{meeting.FirstValue(conditions[rival])}. Let the two agree there, or leave a gap between them.");
        }

        // Where large targets overlap, one unknown stands for all that compare the same two numbers.
        if (meetings.Count == 0 || meetings[^1] != meeting with { Unknown = meetings[^1].Unknown })
        {
            meetings.Add(meeting);
        }
    }

    private T ValueOf(Condition<T> condition, int unknown)
    {
        T value = condition.Function!(space.NodePlaces[unknown]);
        return T.IsFinite(value)
            ? value
            : throw new ConflictingConditionsException(
                $"The function for {condition} gives {value} at {space.NodePlaces[unknown]}. "
                + "Give one with finite values all along the boundary.");
    }

    private ImmutableArray<int> TargetOf(Condition<T> condition) => condition.Target switch
    {
        ConditionTarget.Boundary => space.Numbering.UnknownsOfBoundary(condition.Name),
        ConditionTarget.Region => space.Numbering.UnknownsOfRegion(condition.Name),
        _ => space.Numbering.UnknownsOfPoint(condition.Name),
    };

    private int RootOf(int unknown, out T factor)
    {
        int root = unknown;
        factor = T.One;
        while (parents[root] != root)
        {
            factor *= factors[root];
            root = parents[root];
        }

        T remaining = factor;
        for (int i = unknown; parents[i] != i;)
        {
            int next = parents[i];
            T own = factors[i];
            parents[i] = root;
            factors[i] = remaining;
            remaining /= own;
            i = next;
        }

        return root;
    }

    private void Link(int child, int root, T factor)
    {
        parents[child] = root;
        factors[child] = factor;
    }

    private ResolvedConstraints<T> Number()
    {
        int count = space.UnknownCount;
        int[] columns = new int[count];
        T[] weights = new T[count];
        T[] offsets = new T[count];
        int[] owners = new int[count];
        int[] columnOfRoot = new int[count];
        int[] floatColumns = new int[conditions.Count];
        Array.Fill(columnOfRoot, Nobody);
        Array.Fill(floatColumns, Nobody);
        int free = 0;
        for (int i = 0; i < count; i++)
        {
            int root = RootOf(i, out T factor);
            weights[i] = factor;
            owners[i] = fixedBy[root];
            if (fixedBy[root] != Nobody)
            {
                columns[i] = Nobody;
                offsets[i] = factor * scales[root];
                weights[i] = factor / fixedFactors[root];
                continue;
            }

            if (columnOfRoot[root] == Nobody)
            {
                columnOfRoot[root] = free++;
            }

            columns[i] = columnOfRoot[root];
            if (floatsBy[root] != Nobody)
            {
                // The total is that of the target, whose unknowns all have the same factor.
                floatColumns[floatsBy[root]] = columns[i];
            }
        }

        NormalizeFloating(columns, weights);
        return new ResolvedConstraints<T>(
            space, conditions, new ConstraintRows<T>(columns, weights, free), offsets, owners, targets,
            floatColumns, [.. meetings]);
    }

    /// <summary>Makes the free unknown of a floating target its value itself.</summary>
    private void NormalizeFloating(int[] columns, T[] weights)
    {
        Dictionary<int, T> factorOfColumn = [];
        for (int i = 0; i < columns.Length; i++)
        {
            if (columns[i] != Nobody && targets[i] != Nobody && weights[i] != T.One)
            {
                factorOfColumn.TryAdd(columns[i], weights[i]);
            }
        }

        for (int i = 0; i < columns.Length && factorOfColumn.Count > 0; i++)
        {
            if (columns[i] != Nobody && factorOfColumn.TryGetValue(columns[i], out T factor))
            {
                weights[i] /= factor;
            }
        }
    }

    private static bool Agree(T a, T b) =>
        Scalar.Magnitude(a - b) <= RelativeTolerance * Math.Max(Scalar.Magnitude(a), Scalar.Magnitude(b));

    private static string Upper(Condition<T> condition)
    {
        string text = condition.ToString();
        return char.ToUpperInvariant(text[0]) + text[1..];
    }
}
