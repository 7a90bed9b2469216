namespace FemCore2D.Sparse.Tests;

public class ThreadTeamTests
{
    [Theory]
    [InlineData(1)]
    [InlineData(2)]
    [InlineData(7)]
    public void EachBlockOfEachRunIsDoneOnceBeforeTheRunReturns(int threads)
    {
        ThreadTeam team = new(threads);
        Counter counter = new();
        for (int run = 0; run < 20_000; run++)
        {
            int blocks = run % 23;
            Array.Clear(counter.Times);
            team.Run(counter, blocks);
            for (int block = 0; block < counter.Times.Length; block++)
            {
                Assert.Equal(block < blocks ? 1 : 0, counter.Times[block]);
            }
        }
    }

    [Fact]
    public void AnExceptionReachesTheCallerAndTheTeamStaysFitForUse()
    {
        ThreadTeam team = new(4);
        for (int run = 0; run < 200; run++)
        {
            Assert.Throws<InvalidOperationException>(() => team.Run(new Thrower(), 16));
            Counter counter = new();
            team.Run(counter, 16);
            Assert.Equal(16, counter.Times.Sum());
        }
    }

    [Fact]
    public void ANegativeNumberOfThreadsIsRefused() =>
        Assert.Throws<ArgumentOutOfRangeException>(() => new ThreadTeam(-1));

    private sealed class Counter : IBlockWork
    {
        public int[] Times { get; } = new int[24];

        public void Run(int block) => Interlocked.Increment(ref Times[block]);
    }

    private sealed class Thrower : IBlockWork
    {
        public void Run(int block)
        {
            if (block % 5 == 3)
            {
                throw new InvalidOperationException();
            }
        }
    }
}
