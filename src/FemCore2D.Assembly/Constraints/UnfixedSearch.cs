using System.Numerics;
using FemCore2D.Sparse;

namespace FemCore2D.Assembly;

/// <summary>
/// Looks for a part of the mesh in which a constant can be added to a field without a condition taking notice.
/// </summary>
/// <remarks>
/// A union-find forest (Tarjan 1975) over the unknowns, with the ratio of such constants on each link: 1 within a cell,
/// the factor of the condition between tied unknowns. A closed way round which the ratios do not multiply to 1 allows
/// no constant but zero, so an antiperiodic part counts as fixed.
/// </remarks>
internal sealed class UnfixedSearch<T>
    where T : unmanaged, INumberBase<T>
{
    private const double RelativeTolerance = 1e-9;

    private readonly int[] parents;
    private readonly T[] ratios;
    private readonly bool[] isFixed;

    public UnfixedSearch(ConstraintRows<T> rows)
    {
        int count = rows.Columns.Length;
        parents = new int[count];
        ratios = new T[count];
        isFixed = new bool[count];
        for (int i = 0; i < count; i++)
        {
            parents[i] = i;
            ratios[i] = T.One;
            isFixed[i] = rows.Columns[i] < 0;
        }

        for (int column = 0; column < rows.ColumnCount; column++)
        {
            ReadOnlySpan<int> members = rows.MembersOf(column);
            for (int i = 1; i < members.Length; i++)
            {
                Join(members[i], members[0], rows.WeightOf(members[i]) / rows.WeightOf(members[0]));
            }
        }
    }

    /// <summary>Notes that an unknown is held in another way than by a constraint.</summary>
    public void Hold(int unknown) => isFixed[RootOf(unknown, out _)] = true;

    public bool IsFixed(int unknown) => isFixed[RootOf(unknown, out _)];

    /// <summary>Notes that a constant at one unknown means a multiple of it at another.</summary>
    public void Join(int unknown, int other, T ratio)
    {
        int root = RootOf(unknown, out T own);
        int otherRoot = RootOf(other, out T otherOwn);
        T wanted = ratio * otherOwn;
        if (root == otherRoot)
        {
            double size = Math.Max(Scalar.Magnitude(own), Scalar.Magnitude(wanted));
            isFixed[root] |= Scalar.Magnitude(own - wanted) > RelativeTolerance * size;
            return;
        }

        parents[root] = otherRoot;
        ratios[root] = wanted / own;
        isFixed[otherRoot] |= isFixed[root];
    }

    private int RootOf(int unknown, out T ratio)
    {
        ratio = T.One;
        while (parents[unknown] != unknown)
        {
            int parent = parents[unknown];
            ratios[unknown] *= ratios[parent];
            parents[unknown] = parents[parent];
            ratio *= ratios[unknown];
            unknown = parents[unknown];
        }

        return unknown;
    }
}
