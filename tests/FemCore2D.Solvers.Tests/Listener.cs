namespace FemCore2D.Solvers.Tests;

/// <summary>Passes progress on at once, on the thread that reports it.</summary>
public sealed class Listener(Action<IterationProgress> hear) : IProgress<IterationProgress>
{
    public void Report(IterationProgress value) => hear(value);
}
