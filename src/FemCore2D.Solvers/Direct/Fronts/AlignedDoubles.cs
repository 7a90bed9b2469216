using System.Runtime.CompilerServices;
using System.Runtime.InteropServices;

namespace FemCore2D.Solvers;

/// <summary>
/// A pinned array of doubles of which the part in use begins on a cache line and is not cleared. Large ones ask the
/// operating system for large pages where it gives them on request.
/// </summary>
internal sealed unsafe partial class AlignedDoubles
{
    private const int Line = 8;
    private const int Advice = 14;
    private readonly double[] memory;

    /// <summary>Allocates the memory.</summary>
    /// <param name="count">The number of doubles that will be used.</param>
    public AlignedDoubles(long count)
    {
        Count = count;
        memory = GC.AllocateUninitializedArray<double>(checked((int)(count + 4 * Line)), pinned: true);
        double* first = (double*)Unsafe.AsPointer(ref MemoryMarshal.GetArrayDataReference(memory));
        nint skip = (-((nint)first / sizeof(double)) % Line + Line) % Line;
        Pointer = first + skip;
        if (count > 1 << 19 && OperatingSystem.IsLinux())
        {
            // Whole pages only; that the advice is not taken does no harm.
            const long Page = 4096;
            long start = ((long)Pointer + Page - 1) / Page * Page;
            long length = ((long)(Pointer + count) - start) / Page * Page;
            if (length > 0)
                _ = Advise((nint)start, (nuint)length, Advice);
        }
    }

    /// <summary>The most doubles that can be allocated.</summary>
    public static long MostDoubles => Array.MaxLength - 4 * Line;

    /// <summary>The number of doubles in use.</summary>
    public long Count { get; }

    /// <summary>The first double; valid as long as this object is reachable.</summary>
    public double* Pointer { get; }

    [LibraryImport("libc", EntryPoint = "madvise")]
    private static partial int Advise(nint address, nuint length, int advice);
}
