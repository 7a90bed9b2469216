using System.Runtime.ExceptionServices;

namespace FemCore2D.Solvers;

/// <summary>
/// A leader, which is the calling thread, and helpers from the thread pool that do blocks of work together. Which
/// thread does which block is left to chance, so the work must be cut in a way that makes its result independent of
/// that. The leader never waits for a helper that has not begun: on a busy machine it does all the work itself. Once
/// created, a crew allocates nothing.
/// </summary>
/// <remarks>
/// The state holds the number of the run in its upper half and the blocks not yet claimed in its lower half. A block is
/// claimed by one compare-and-swap on both, so that a helper which comes late from an earlier run claims nothing of it.
/// </remarks>
internal sealed class Crew
{
    private readonly Helper[] helpers;
    private Work? work;
    private int blockCount;
    private long state;
    private int unfinished;
    private int session;
    private ExceptionDispatchInfo? failure;

    /// <summary>Creates a crew.</summary>
    /// <param name="threads">The largest number of threads, the leader included; 0 for one a processor.</param>
    public Crew(int threads)
    {
        Size = SizeOf(threads);
        helpers = new Helper[Size - 1];
        for (int i = 0; i < helpers.Length; i++)
            helpers[i] = new Helper(this, i + 1);
    }

    /// <summary>One block of work, told which of the crew's places (from 0) does it.</summary>
    public delegate void Work(int block, int place);

    /// <summary>The largest number of threads, the leader included.</summary>
    public int Size { get; }

    /// <summary>Turns a caller's wish into a number of threads: 0 stands for one a processor.</summary>
    public static int SizeOf(int threads) => threads == 0 ? Environment.ProcessorCount : threads;

    /// <summary>Calls the helpers, which stay until the crew is dismissed.</summary>
    public void Gather()
    {
        int number = Interlocked.Increment(ref session) | 1;
        Volatile.Write(ref session, number);
        foreach (Helper helper in helpers)
            ThreadPool.UnsafeQueueUserWorkItem(helper, preferLocal: false);
    }

    /// <summary>Lets the helpers go.</summary>
    public void Dismiss()
    {
        if ((session & 1) != 0)
            Interlocked.Increment(ref session);
    }

    /// <summary>Does all blocks, and returns when the last one is done; the first exception of a block is passed on.</summary>
    public void Run(Work blocks, int count)
    {
        if (helpers.Length == 0 || count <= 1)
        {
            for (int block = 0; block < count; block++)
                blocks(block, 0);
            return;
        }

        work = blocks;
        blockCount = count;
        unfinished = count;
        Volatile.Write(ref state, (((state >> 32) + 1) << 32) | (uint)count);
        Drain(0);
        SpinWait wait = default;
        while (Volatile.Read(ref unfinished) != 0)
            wait.SpinOnce(sleep1Threshold: -1);
        work = null;
        Interlocked.Exchange(ref failure, null)?.Throw();
    }

    private void Drain(int place)
    {
        while (true)
        {
            long seen = Volatile.Read(ref state);
            int left = (int)(seen & int.MaxValue);
            if (left == 0)
                return;
            if (Interlocked.CompareExchange(ref state, seen - 1, seen) != seen)
                continue;
            try
            {
                if (Volatile.Read(ref failure) is null)
                    work!(blockCount - left, place);
            }
            catch (Exception e)
            {
                // Passed on to the leader: an exception must not end the process from a pool thread.
                Interlocked.CompareExchange(ref failure, ExceptionDispatchInfo.Capture(e), null);
            }
            finally
            {
                Interlocked.Decrement(ref unfinished);
            }
        }
    }

    private sealed class Helper(Crew crew, int place) : IThreadPoolWorkItem
    {
        private int busy;

        public void Execute()
        {
            // A helper that is still in its loop from the session before goes on in this one.
            if (Interlocked.Exchange(ref busy, 1) != 0)
                return;
            SpinWait wait = default;
            while ((Volatile.Read(ref crew.session) & 1) != 0)
            {
                if ((int)(Volatile.Read(ref crew.state) & int.MaxValue) != 0)
                {
                    crew.Drain(place);
                    wait.Reset();
                }

                wait.SpinOnce(sleep1Threshold: -1);
            }

            Volatile.Write(ref busy, 0);
        }
    }
}
