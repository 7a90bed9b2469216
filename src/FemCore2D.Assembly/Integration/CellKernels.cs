using System.Runtime.CompilerServices;
using System.Runtime.InteropServices;
using System.Runtime.Intrinsics;

namespace FemCore2D.Assembly;

/// <summary>
/// The dense arithmetic of local matrices and vectors, on plain doubles; complex numbers are treated as two matrices,
/// real and imaginary. A local matrix has rows padded to a multiple of four.
/// </summary>
internal static class CellKernels
{
    /// <summary>The combination of reference matrices that belongs to a coupling constant in an affine cell.</summary>
    public static void Combine(in Coupling<double> m, ChannelIntegrals integrals, Span<double> local)
    {
        SetMultiple(m.ValueValue, integrals.Of(0, 0), local);
        AddMultiple(m.XX, integrals.Of(1, 1), local);
        AddMultiple(m.YY, integrals.Of(2, 2), local);
        if (m.ValueX != 0 || m.ValueY != 0 || m.XValue != 0 || m.YValue != 0)
        {
            AddPair(m.ValueX, m.XValue, 0, 0, 1, integrals, local);
            AddPair(m.ValueY, m.YValue, 1, 0, 2, integrals, local);
        }

        AddPair(m.XY, m.YX, 2, 1, 2, integrals, local);
    }

    /// <summary>The combination for slopes coupled by a symmetric tensor: the most frequent case.</summary>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static void CombineSlopes(
        double xiXi, double xiEta, double etaEta, ChannelIntegrals integrals, Span<double> local)
    {
        ref double a = ref MemoryMarshal.GetReference(integrals.Of(1, 1));
        ref double b = ref MemoryMarshal.GetReference(integrals.Symmetric(2));
        ref double c = ref MemoryMarshal.GetReference(integrals.Of(2, 2));
        ref double to = ref MemoryMarshal.GetReference(local);
        var fa = Vector256.Create(xiXi);
        var fb = Vector256.Create(xiEta);
        var fc = Vector256.Create(etaEta);
        for (nuint k = 0; k < (nuint)local.Length; k += 4)
        {
            Vector256<double> sum = fa * Vector256.LoadUnsafe(ref a, k);
            sum += fb * Vector256.LoadUnsafe(ref b, k);
            sum += fc * Vector256.LoadUnsafe(ref c, k);
            sum.StoreUnsafe(ref to, k);
        }
    }

    /// <summary>Sums the products of shape functions over the points of a rule.</summary>
    /// <param name="table">The shape functions.</param>
    /// <param name="couplings">The coupling at each point, in reference coordinates and weighted.</param>
    /// <param name="work">Room for three padded rows a point.</param>
    /// <param name="local">Receives the local matrix.</param>
    public static void Integrate(
        ChannelTable table, ReadOnlySpan<Coupling<double>> couplings, Span<double> work, Span<double> local)
    {
        int stride = table.Stride;
        int points = couplings.Length;
        ReadOnlySpan<double> flat = MemoryMarshal.Cast<Coupling<double>, double>(couplings);
        (int used, bool symmetric) = Survey(flat);

        // First what the field does, then what meets it: work holds, for each channel of the test function that is
        // in use and each point, the factors of that channel for all shape functions of the field.
        Span<int> channels = stackalloc int[3];
        int channelCount = 0;
        for (int test = 0; test < 3; test++)
        {
            if (((used >> (3 * test)) & 7) == 0)
            {
                continue;
            }

            for (int point = 0; point < points; point++)
            {
                Span<double> row = work.Slice(((channelCount * points) + point) * stride, stride);
                row.Clear();
                for (int field = 0; field < 3; field++)
                {
                    if (((used >> ((3 * test) + field)) & 1) != 0)
                    {
                        AddMultiple(flat[(9 * point) + (3 * test) + field], table.Row(field, point), row);
                    }
                }
            }

            channels[channelCount++] = test;
        }

        for (int i = 0; i < table.Count; i++)
        {
            // Of a symmetric matrix only the vectors from the diagonal on are computed.
            int start = symmetric ? i & ~3 : 0;
            Span<double> row = local.Slice(i * stride, stride);
            for (int j = start; j < stride; j += 4)
            {
                Vector256<double> sum = default;
                for (int c = 0; c < channelCount; c++)
                {
                    ref double shape = ref MemoryMarshal.GetReference(table.Column(channels[c], i));
                    ref double factor = ref Unsafe.Add(
                        ref MemoryMarshal.GetReference(work), (c * points * stride) + j);
                    for (int point = 0; point < points; point++)
                    {
                        sum += Vector256.Create(Unsafe.Add(ref shape, point))
                            * Vector256.LoadUnsafe(ref factor, (nuint)(point * stride));
                    }
                }

                sum.StoreUnsafe(ref row[j]);
            }
        }

        if (symmetric)
        {
            Mirror(local, table.Count, stride);
        }
    }

    /// <summary>The combination of reference vectors that belongs to a load constant in an affine cell.</summary>
    public static void Combine(in Load<double> load, ChannelIntegrals integrals, Span<double> local)
    {
        SetMultiple(load.Value, integrals.Of(0), local);
        AddMultiple(load.X, integrals.Of(1), local);
        AddMultiple(load.Y, integrals.Of(2), local);
    }

    /// <summary>Adds what a load at one point does to the local vector.</summary>
    public static void AddPoint(ChannelTable table, int point, in Load<double> load, Span<double> local)
    {
        AddMultiple(load.Value, table.Row(0, point), local);
        AddMultiple(load.X, table.Row(1, point), local);
        AddMultiple(load.Y, table.Row(2, point), local);
    }

    private static void AddPair(
        double coefficient, double mirrored, int pair, int test, int field,
        ChannelIntegrals integrals, Span<double> local)
    {
        if (coefficient == mirrored)
        {
            AddMultiple(coefficient, integrals.Symmetric(pair), local);
        }
        else
        {
            AddMultiple(coefficient, integrals.Of(test, field), local);
            AddMultiple(mirrored, integrals.Of(field, test), local);
        }
    }

    /// <summary>Which of the nine coefficients are not zero at some point, as bits, and whether all couplings are symmetric.</summary>
    private static (int Used, bool Symmetric) Survey(ReadOnlySpan<double> flat)
    {
        int used = 0;
        bool symmetric = true;
        for (int at = 0; at < flat.Length; at += 9)
        {
            for (int k = 0; k < 9; k++)
            {
                used |= flat[at + k] != 0 ? 1 << k : 0;
            }

            symmetric &= flat[at + 1] == flat[at + 3] && flat[at + 2] == flat[at + 6] && flat[at + 5] == flat[at + 7];
        }

        return (used, symmetric);
    }

    private static void Mirror(Span<double> local, int count, int stride)
    {
        for (int i = 1; i < count; i++)
        {
            for (int j = 0; j < i; j++)
            {
                local[(i * stride) + j] = local[(j * stride) + i];
            }
        }
    }

    private static void SetMultiple(double factor, ReadOnlySpan<double> from, Span<double> to)
    {
        var spread = Vector256.Create(factor);
        ref double source = ref MemoryMarshal.GetReference(from);
        ref double target = ref MemoryMarshal.GetReference(to);
        for (nuint k = 0; k < (nuint)from.Length; k += 4)
        {
            (spread * Vector256.LoadUnsafe(ref source, k)).StoreUnsafe(ref target, k);
        }
    }

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    private static void AddMultiple(double factor, ReadOnlySpan<double> from, Span<double> to)
    {
        if (factor == 0)
        {
            return;
        }

        var spread = Vector256.Create(factor);
        ref double source = ref MemoryMarshal.GetReference(from);
        ref double target = ref MemoryMarshal.GetReference(to);
        for (nuint k = 0; k < (nuint)from.Length; k += 4)
        {
            (Vector256.LoadUnsafe(ref target, k) + (spread * Vector256.LoadUnsafe(ref source, k)))
                .StoreUnsafe(ref target, k);
        }
    }
}
