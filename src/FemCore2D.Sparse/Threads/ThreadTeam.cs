using System.Runtime.ExceptionServices;

namespace FemCore2D.Sparse;

/// <summary>
/// Runs blocks of work on the calling thread and on helpers from the thread pool. Which thread does which block is
/// left to chance, so the work must be cut in a way that makes the result independent of it. One caller at a time.
/// A run allocates nothing, and never waits for a helper that has not begun: on a busy machine the caller does all.
/// </summary>
/// <remarks>
/// The state holds the number of the run in its upper half and the blocks not yet claimed in its lower half. A block
/// is claimed by one compare-and-swap on both, so a helper that comes late from an earlier run claims either nothing
/// or a block of the present one.
/// </remarks>
internal sealed class ThreadTeam : IThreadPoolWorkItem
{
    private readonly int helpers;
    private IBlockWork? work;
    private int blockCount;
    private long state;
    private int unfinished;
    private int queued;
    private ExceptionDispatchInfo? failure;

    /// <summary>Creates a team.</summary>
    /// <param name="threads">The largest number of threads, the caller's included; 0 for one a processor.</param>
    public ThreadTeam(int threads) => helpers = CountOf(threads) - 1;

    /// <summary>Turns a caller's wish into a number of threads: 0 stands for one a processor.</summary>
    public static int CountOf(int threads)
    {
        ArgumentOutOfRangeException.ThrowIfNegative(threads);
        return threads == 0 ? Environment.ProcessorCount : threads;
    }

    /// <summary>Runs all blocks and returns when the last one is done.</summary>
    public void Run(IBlockWork blocks, int count)
    {
        if (helpers == 0 || count <= 1)
        {
            for (int block = 0; block < count; block++)
            {
                blocks.Run(block);
            }

            return;
        }

        work = blocks;
        blockCount = count;
        unfinished = count;
        Volatile.Write(ref state, (((state >> 32) + 1) << 32) | (uint)count);
        for (int i = Math.Min(helpers, count - 1); i > 0 && Volatile.Read(ref queued) < helpers; i--)
        {
            Interlocked.Increment(ref queued);
            ThreadPool.UnsafeQueueUserWorkItem(this, preferLocal: false);
        }

        Drain();
        SpinWait wait = default;
        while (Volatile.Read(ref unfinished) != 0)
        {
            wait.SpinOnce(sleep1Threshold: -1);
        }

        work = null;
        Interlocked.Exchange(ref failure, null)?.Throw();
    }

    /// <inheritdoc/>
    void IThreadPoolWorkItem.Execute()
    {
        Interlocked.Decrement(ref queued);
        Drain();
    }

    private void Drain()
    {
        while (true)
        {
            long seen = Volatile.Read(ref state);
            int left = (int)(seen & int.MaxValue);
            if (left == 0)
            {
                return;
            }

            if (Interlocked.CompareExchange(ref state, seen - 1, seen) != seen)
            {
                continue;
            }

            try
            {
                work!.Run(blockCount - left);
            }
            catch (Exception e)
            {
                // Passed on to the caller: an exception must not end the process from a pool thread.
                Interlocked.CompareExchange(ref failure, ExceptionDispatchInfo.Capture(e), null);
            }
            finally
            {
                Interlocked.Decrement(ref unfinished);
            }
        }
    }
}
