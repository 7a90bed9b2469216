using System.Diagnostics;
using System.Numerics;
using System.Runtime.InteropServices;
using FemCore2D.Sparse;

namespace FemCore2D.Benchmarks;

/// <summary>UMFPACK of SuiteSparse 5, a native yardstick for complex and general matrices, where the machine has it.</summary>
internal static unsafe partial class NativeUmfpack
{
    private const string Library = "libumfpack.so.5";
    private const int InfoSize = 90;
    private const int UnitSize = 3;
    private const int PeakUnits = 43;

    /// <summary>Analyzes, factorizes and solves a symmetric matrix; null where the library is absent.</summary>
    public static NativeTimes? Run(SparseMatrix<Complex> a, Complex[] b, Complex[] x)
    {
        if (!NativeLibrary.TryLoad(Library, out nint handle))
            return null;
        NativeLibrary.Free(handle);
        int n = a.RowCount;
        int[] starts = a.Pattern.RowStarts.ToArray();
        int[] columns = a.Pattern.Columns.ToArray();
        Complex[] values = a.Values.ToArray();
        double* info = stackalloc double[InfoSize];
        fixed (int* p = starts, i = columns)
        fixed (Complex* v = values, right = b, solution = x)
        {
            void* symbolic;
            void* numeric;
            long start = Stopwatch.GetTimestamp();
            Check(Symbolic(n, n, p, i, (double*)v, null, &symbolic, null, info));
            TimeSpan analysis = Stopwatch.GetElapsedTime(start);
            start = Stopwatch.GetTimestamp();
            Check(Numeric(p, i, (double*)v, null, symbolic, &numeric, null, info));
            TimeSpan factorization = Stopwatch.GetElapsedTime(start);
            long bytes = (long)(info[PeakUnits] * info[UnitSize]);
            start = Stopwatch.GetTimestamp();
            Check(Solve(0, p, i, (double*)v, null, (double*)solution, null, (double*)right, null, numeric, null, info));
            TimeSpan solve = Stopwatch.GetElapsedTime(start);
            FreeNumeric(&numeric);
            start = Stopwatch.GetTimestamp();
            Check(Numeric(p, i, (double*)v, null, symbolic, &numeric, null, info));
            TimeSpan again = Stopwatch.GetElapsedTime(start);
            FreeNumeric(&numeric);
            FreeSymbolic(&symbolic);
            return new NativeTimes(analysis, factorization, solve, again, bytes);
        }
    }

    private static void Check(int status)
    {
        if (status != 0)
            throw new InvalidOperationException($"UMFPACK returned {status}.");
    }

    [LibraryImport(Library, EntryPoint = "umfpack_zi_symbolic")]
    private static partial int Symbolic(
        int rows, int columns, int* starts, int* indices, double* real, double* imaginary, void** symbolic,
        double* control, double* info);

    [LibraryImport(Library, EntryPoint = "umfpack_zi_numeric")]
    private static partial int Numeric(
        int* starts, int* indices, double* real, double* imaginary, void* symbolic, void** numeric,
        double* control, double* info);

    [LibraryImport(Library, EntryPoint = "umfpack_zi_solve")]
    private static partial int Solve(
        int system, int* starts, int* indices, double* real, double* imaginary, double* x, double* xImaginary,
        double* b, double* bImaginary, void* numeric, double* control, double* info);

    [LibraryImport(Library, EntryPoint = "umfpack_zi_free_numeric")]
    private static partial void FreeNumeric(void** numeric);

    [LibraryImport(Library, EntryPoint = "umfpack_zi_free_symbolic")]
    private static partial void FreeSymbolic(void** symbolic);
}
