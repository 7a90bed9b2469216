using BenchmarkDotNet.Running;
using FemCore2D.Benchmarks;

if (args is ["direct", .. string[] names])
    DirectComparison.Run(names);
else
    BenchmarkSwitcher.FromAssembly(typeof(Program).Assembly).Run(args);
