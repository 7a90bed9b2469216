using System.Numerics;
using FemCore2D.Sparse;

namespace FemCore2D.Solvers;

/// <summary>The two triangular solves with incomplete factors, over the chunks at the same time.</summary>
internal sealed unsafe class TriangularSweep<T>(IncompleteFactor<T> factor) : IBlockWork, ITeamApplication<T>
    where T : unmanaged, INumberBase<T>
{
    private bool isForward;
    private T* residual;
    private T* correction;

    /// <summary>Applies the factors on the calling thread alone.</summary>
    public static void Apply(IncompleteFactor<T> factor, T* residual, T* correction)
    {
        Forward(factor, 0, factor.Scale.Length, residual, correction);
        Backward(factor, 0, factor.Scale.Length, correction);
    }

    /// <inheritdoc/>
    public void Apply(ThreadTeam team, T* residual, T* correction)
    {
        this.residual = residual;
        this.correction = correction;
        int chunks = factor.Order.ChunkCount;
        int firstSeparator = factor.Order.ChunkStarts[chunks];
        isForward = true;
        team.Run(this, chunks);
        Forward(factor, firstSeparator, factor.Scale.Length, residual, correction);
        Backward(factor, firstSeparator, factor.Scale.Length, correction);
        isForward = false;
        team.Run(this, chunks);
    }

    /// <inheritdoc/>
    public void Run(int block)
    {
        int first = factor.Order.ChunkStarts[block];
        int end = factor.Order.ChunkStarts[block + 1];
        if (isForward)
        {
            Forward(factor, first, end, residual, correction);
        }
        else
        {
            Backward(factor, first, end, correction);
        }
    }

    /// <summary>Solves with L for the scaled residual, at some places of the order.</summary>
    private static void Forward(IncompleteFactor<T> factor, int first, int end, T* residual, T* correction)
    {
        fixed (int* order = factor.Order.Order, starts = factor.Starts, columns = factor.Columns)
        fixed (float* lower = factor.Lower)
        fixed (double* scale = factor.Scale)
        {
            for (int place = first; place < end; place++)
            {
                int unknown = order[place];
                T sum = Scalar.Scale(residual[unknown], scale[unknown]);
                int stop = starts[place + 1];
                for (int k = starts[place]; k < stop; k++)
                {
                    sum -= IncompleteFactor<T>.Load(lower, k) * correction[columns[k]];
                }

                correction[unknown] = sum;
            }
        }
    }

    /// <summary>Solves with the conjugate transpose of L and scales the result, at some places of the order.</summary>
    private static void Backward(IncompleteFactor<T> factor, int first, int end, T* correction)
    {
        fixed (int* order = factor.Order.Order, starts = factor.Starts, columns = factor.Columns)
        fixed (float* lower = factor.Lower)
        fixed (double* scale = factor.Scale)
        {
            for (int place = end - 1; place >= first; place--)
            {
                int unknown = order[place];
                T value = correction[unknown];
                int start = starts[place];
                for (int k = starts[place + 1] - 1; k >= start; k--)
                {
                    correction[columns[k]] -= Scalar.Conjugate(IncompleteFactor<T>.Load(lower, k)) * value;
                }

                correction[unknown] = Scalar.Scale(value, scale[unknown]);
            }
        }
    }
}
