using System.Runtime.Intrinsics;

namespace FemCore2D.Solvers;

/// <summary>
/// The dense operations on fronts, chosen once for the number type and the SIMD registers of the machine. Matrices are
/// stored by columns, at distances given in doubles.
/// </summary>
internal abstract unsafe class FrontArithmetic
{
    /// <summary>The columns of a panel that are factorized before the rest is brought up to date.</summary>
    public const int BlockWidth = 64;

    /// <summary>The rows of a tile of a large product, in doubles.</summary>
    public const int TileRows = 384;

    /// <summary>The doubles across a tile of a large product.</summary>
    public const int TileDoubles = 128;

    /// <summary>The doubles of scratch memory that a product needs.</summary>
    public const int ScratchSize = (TileDoubles + 32) * InnerBlock;

    /// <summary>The inner dimension of a packed product.</summary>
    protected const int InnerBlock = 256;

    /// <summary>How many doubles make a number.</summary>
    public abstract int Doubles { get; }

    /// <summary>The columns of a tile of a large product.</summary>
    public int TileColumns => TileDoubles / Doubles;

    /// <summary>The arithmetic of real (1) or complex (2) numbers on this machine.</summary>
    public static FrontArithmetic For(int doubles) => Of(
        Vector512.IsHardwareAccelerated ? 512 : Vector256.IsHardwareAccelerated ? 256 : 128, doubles);

    /// <summary>The arithmetic with registers of a chosen width, whatever the machine prefers.</summary>
    internal static FrontArithmetic Of(int bits, int doubles) => (bits, doubles) switch
    {
        (512, 1) => new FrontKernels<Lanes512, Vector512<double>, RealForm>(),
        (512, _) => new FrontKernels<Lanes512, Vector512<double>, ComplexForm>(),
        (256, 1) => new FrontKernels<Lanes256, Vector256<double>, RealForm>(),
        (256, _) => new FrontKernels<Lanes256, Vector256<double>, ComplexForm>(),
        (_, 1) => new FrontKernels<Lanes128, Vector128<double>, RealForm>(),
        _ => new FrontKernels<Lanes128, Vector128<double>, ComplexForm>(),
    };

    /// <summary>Subtracts <c>A B^T</c> from C; with <paramref name="lower"/> only on and below the diagonal.</summary>
    /// <remarks>
    /// The rows of A and C are counted in doubles, a multiple of eight; what lies beyond the true rows is worthless. The
    /// offset tells how many columns the first column lies right of the first row.
    /// </remarks>
    public abstract void Product(
        double* a, nint lda, double* b, nint ldb, int inner, double* c, nint ldc, int rows, int columns,
        bool lower, int offset, bool conjugate, double* scratch);

    /// <summary>Overwrites X by the solution of <c>X L^T = X</c>, where L is a lower triangle.</summary>
    public abstract void SolveRows(
        double* x, nint ldx, int rows, double* l, nint ldl, int n, bool unit, bool conjugate);

    /// <summary>Factorizes the columns of a block; returns -1, or the column whose pivot is not positive.</summary>
    public abstract int Cholesky(double* p, nint ld, int n, int rows);

    /// <summary>Adds some columns of the lower triangle of a child's update to the panel and the update of its parent.</summary>
    /// <remarks>
    /// Places tell for each row of the child its row in the parent, and run ends how far places follow one another.
    /// </remarks>
    public abstract void AddUpdate(
        double* panel, nint ld, int width, double* update, nint ldu,
        int* places, int* runEnds, int count, double* child, nint ldc, int from, int to);

    /// <summary>Factorizes a corner block with pivots of one or two columns; see <see cref="PivotBlock{T}"/>.</summary>
    public abstract int SymmetricCorner(
        double* p, double* q, nint ld, int n, int rows, bool hermitian, double least,
        Span<int> order, Span<double> offDiagonals, ref int firstPerturbed);

    /// <summary>Factorizes a corner block with exchanges of rows; see <see cref="PivotBlock{T}"/>.</summary>
    public abstract int GeneralCorner(
        double* p, double* q, nint ld, int n, int rows, double least, Span<int> order, ref int firstPerturbed);

    /// <summary>Copies rows of a panel, which are L D, to the second panel, and divides them by D.</summary>
    public abstract void DivideRows(
        double* p, double* q, nint ld, int n, int rows, double* corner, ReadOnlySpan<double> offDiagonals, bool hermitian);

    /// <summary>Eliminates known values: solves the triangle on top of the panel and takes its share off the rows below.</summary>
    public abstract void Forward(double* panel, nint ld, int width, int rows, bool unit, double* f);

    /// <summary>Solves the transposed triangle on top of a panel, after taking the share of the rows below off.</summary>
    public abstract void Backward(double* panel, nint ld, int width, int rows, bool unit, bool conjugate, double* f);
}
