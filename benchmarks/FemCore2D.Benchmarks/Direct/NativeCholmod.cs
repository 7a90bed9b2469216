using System.Diagnostics;
using System.Runtime.InteropServices;
using FemCore2D.Sparse;

namespace FemCore2D.Benchmarks;

/// <summary>CHOLMOD of SuiteSparse 5, a native yardstick for Cholesky factorization, where the machine has it.</summary>
internal static unsafe partial class NativeCholmod
{
    private const string Library = "libcholmod.so.3";

    /// <summary>The places in the structure of version 3 of the parameters that are read or set.</summary>
    private const int MethodCount = 168;
    private const int FirstOrdering = 316;
    private const int MemoryUsage = 2016;
    private const int MinimumDegree = 2;

    /// <summary>Analyzes, factorizes and solves; null where the library is absent.</summary>
    public static NativeTimes? Run(SparseMatrix<double> a, double[] b, double[] x, bool byDegree)
    {
        if (!NativeLibrary.TryLoad(Library, out nint handle))
            return null;
        NativeLibrary.Free(handle);
        byte* common = (byte*)NativeMemory.AllocZeroed(16384);
        _ = Start(common);
        if (byDegree)
        {
            *(int*)(common + MethodCount) = 1;
            *(int*)(common + FirstOrdering) = MinimumDegree;
        }

        int n = a.RowCount;
        int[] starts = a.Pattern.RowStarts.ToArray();
        int[] columns = a.Pattern.Columns.ToArray();
        double[] values = a.Values.ToArray();
        fixed (int* p = starts, i = columns)
        fixed (double* v = values, right = b)
        {
            // Rows of a symmetric matrix are its columns; the upper triangle is used.
            CholmodSparse matrix = new()
            {
                Rows = n,
                Columns = n,
                Room = columns.Length,
                Starts = p,
                Indices = i,
                Values = v,
                Side = 1,
                NumberType = 1,
                Sorted = 1,
                Packed = 1,
            };
            CholmodDense rightHandSide = new() { Rows = n, Columns = 1, Room = n, Stride = n, Values = right, NumberType = 1 };
            long start = Stopwatch.GetTimestamp();
            void* factor = Analyze(&matrix, common);
            TimeSpan analysis = Stopwatch.GetElapsedTime(start);
            start = Stopwatch.GetTimestamp();
            _ = Factorize(&matrix, factor, common);
            TimeSpan factorization = Stopwatch.GetElapsedTime(start);
            start = Stopwatch.GetTimestamp();
            CholmodDense* solution = Solve(0, factor, &rightHandSide, common);
            TimeSpan solve = Stopwatch.GetElapsedTime(start);
            start = Stopwatch.GetTimestamp();
            _ = Factorize(&matrix, factor, common);
            TimeSpan again = Stopwatch.GetElapsedTime(start);
            new ReadOnlySpan<double>(solution->Values, n).CopyTo(x);
            long bytes = *(long*)(common + MemoryUsage);
            _ = FreeDense(&solution, common);
            _ = FreeFactor(&factor, common);
            _ = Finish(common);
            NativeMemory.Free(common);
            return new NativeTimes(analysis, factorization, solve, again, bytes);
        }
    }

    [LibraryImport(Library, EntryPoint = "cholmod_start")]
    private static partial int Start(void* common);

    [LibraryImport(Library, EntryPoint = "cholmod_finish")]
    private static partial int Finish(void* common);

    [LibraryImport(Library, EntryPoint = "cholmod_analyze")]
    private static partial void* Analyze(CholmodSparse* matrix, void* common);

    [LibraryImport(Library, EntryPoint = "cholmod_factorize")]
    private static partial int Factorize(CholmodSparse* matrix, void* factor, void* common);

    [LibraryImport(Library, EntryPoint = "cholmod_solve")]
    private static partial CholmodDense* Solve(int system, void* factor, CholmodDense* rightHandSide, void* common);

    [LibraryImport(Library, EntryPoint = "cholmod_free_dense")]
    private static partial int FreeDense(CholmodDense** dense, void* common);

    [LibraryImport(Library, EntryPoint = "cholmod_free_factor")]
    private static partial int FreeFactor(void** factor, void* common);

    [StructLayout(LayoutKind.Sequential)]
    private struct CholmodSparse
    {
        public nint Rows;
        public nint Columns;
        public nint Room;
        public int* Starts;
        public int* Indices;
        public void* Counts;
        public double* Values;
        public void* Imaginary;
        public int Side;
        public int IndexType;
        public int NumberType;
        public int Precision;
        public int Sorted;
        public int Packed;
    }

    [StructLayout(LayoutKind.Sequential)]
    private struct CholmodDense
    {
        public nint Rows;
        public nint Columns;
        public nint Room;
        public nint Stride;
        public double* Values;
        public void* Imaginary;
        public int NumberType;
        public int Precision;
    }
}
