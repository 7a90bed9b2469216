using System.Numerics;
using FemCore2D.Sparse;

namespace FemCore2D.Solvers;

/// <summary>
/// The vectors of the method of conjugate gradients, and its passes over them in parallel blocks. Each pass sums what
/// it sums within fixed blocks first and then over the blocks in order.
/// </summary>
/// <remarks>All factors are real, so complex vectors pass as real ones of twice the length.</remarks>
internal sealed unsafe class ConjugateGradientsWork<T> : IBlockWork
    where T : unmanaged, INumberBase<T>
{
    /// <summary>The doubles in a block of a pass over vectors.</summary>
    private const int BlockLength = 8192;

    private readonly SparseMatrix<T> matrix;
    private readonly IPreconditioner<T>? preconditioner;
    private readonly ITeamApplication<T>? application;
    private readonly int[] cuts;
    private readonly double[] partial;
    private readonly T[] residual;
    private readonly T[] corrected;
    private readonly T[] direction;
    private readonly T[] image;
    private ThreadTeam team = new(1);
    private int threads = 1;
    private T* rightHandSide;
    private T* solution;
    private Pass pass;
    private double factor;

    public ConjugateGradientsWork(SparseMatrix<T> matrix, IPreconditioner<T>? preconditioner)
    {
        this.matrix = matrix;
        this.preconditioner = preconditioner;
        application = (preconditioner as ITeamPreconditioner<T>)?.CreateApplication();
        Size = matrix.RowCount;
        cuts = matrix.Pattern.RowBlocks;
        residual = new T[Size];
        direction = new T[Size];
        image = new T[Size];
        corrected = preconditioner is null ? residual : new T[Size];
        partial = new double[Math.Max(cuts.Length, VectorBlocks)];
    }

    private enum Pass
    {
        RightHandSide,
        Residual,
        Image,
        Advance,
        Product,
        Turn,
    }

    /// <summary>The number of unknowns.</summary>
    public int Size { get; }

    private static int DoublesPerNumber => sizeof(T) / sizeof(double);

    private int VectorBlocks => (int)((((long)Size * DoublesPerNumber) + BlockLength - 1) / BlockLength);

    /// <summary>Takes the vectors of a solve, which the caller keeps pinned until it ends.</summary>
    public void Begin(T* b, T* x, int threadLimit)
    {
        rightHandSide = b;
        solution = x;
        int count = ThreadTeam.CountOf(threadLimit);
        if (count != threads)
        {
            threads = count;
            team = new ThreadTeam(count);
        }
    }

    /// <summary>The inner product of the right-hand side with itself.</summary>
    public double RightHandSideSquared() => Sum(Pass.RightHandSide, VectorBlocks);

    /// <summary>Computes the residual from the solution; returns its inner product with itself.</summary>
    public double ComputeResidual() => Sum(Pass.Residual, cuts.Length - 1);

    /// <summary>Computes the image of the direction under the matrix; returns the inner product of the two.</summary>
    public double MultiplyDirection() => Sum(Pass.Image, cuts.Length - 1);

    /// <summary>Goes along the direction; returns the inner product of the new residual with itself.</summary>
    public double Advance(double step)
    {
        factor = step;
        return Sum(Pass.Advance, VectorBlocks);
    }

    /// <summary>Applies the preconditioner to the residual; returns the inner product of the two.</summary>
    public double Precondition()
    {
        if (application is not null)
        {
            fixed (T* r = residual, z = corrected)
            {
                application.Apply(team, r, z);
            }
        }
        else
        {
            preconditioner?.Apply(residual, corrected);
        }

        return Sum(Pass.Product, VectorBlocks);
    }

    /// <summary>Sets the new direction: the preconditioned residual plus a multiple of the old direction.</summary>
    public void Turn(double multiple)
    {
        factor = multiple;
        pass = Pass.Turn;
        team.Run(this, VectorBlocks);
    }

    /// <inheritdoc/>
    public void Run(int block)
    {
        fixed (T* r = residual, z = corrected, p = direction, q = image)
        {
            if (pass is Pass.Residual or Pass.Image)
            {
                partial[block] = RunRows(block, r, p, q);
                return;
            }

            nint start = (nint)block * BlockLength;
            nint count = (nint)Math.Min(BlockLength, ((long)Size * DoublesPerNumber) - start);
            switch (pass)
            {
                case Pass.RightHandSide:
                    double* b = (double*)rightHandSide + start;
                    partial[block] = VectorKernels.Dot(b, b, count);
                    break;
                case Pass.Advance:
                    partial[block] = VectorKernels.Advance(
                        factor,
                        (double*)p + start,
                        (double*)q + start,
                        (double*)solution + start,
                        (double*)r + start,
                        count);
                    break;
                case Pass.Product:
                    partial[block] = VectorKernels.Dot((double*)r + start, (double*)z + start, count);
                    break;
                default:
                    if (factor == 0)
                    {
                        // Not a multiplication by zero: the old direction may hold what a failed solve left.
                        new ReadOnlySpan<double>((double*)z + start, (int)count).CopyTo(
                            new Span<double>((double*)p + start, (int)count));
                        break;
                    }

                    VectorKernels.Turn(factor, (double*)z + start, (double*)p + start, count);
                    break;
            }
        }
    }

    /// <summary>Works on a block of rows, whose part of the vectors stays in the cache between product and sum.</summary>
    private double RunRows(int block, T* r, T* p, T* q)
    {
        int first = cuts[block];
        int end = cuts[block + 1];
        nint start = (nint)first * DoublesPerNumber;
        nint count = (nint)(end - first) * DoublesPerNumber;
        fixed (int* starts = matrix.Pattern.RowStarts, columns = matrix.Pattern.Columns)
        fixed (T* values = matrix.Values)
        {
            if (pass == Pass.Residual)
            {
                RowProduct<T>.OneVector(first, end, starts, columns, values, solution, r);
                return VectorKernels.SubtractFrom((double*)rightHandSide + start, (double*)r + start, count);
            }

            RowProduct<T>.OneVector(first, end, starts, columns, values, p, q);
            return VectorKernels.Dot((double*)p + start, (double*)q + start, count);
        }
    }

    private double Sum(Pass next, int blocks)
    {
        pass = next;
        team.Run(this, blocks);
        double sum = 0;
        for (int block = 0; block < blocks; block++)
        {
            sum += partial[block];
        }

        return sum;
    }
}
