namespace FemCore2D.Solvers;

/// <summary>The few operations on one SIMD register of doubles that the dense kernels are written in.</summary>
/// <typeparam name="TVector">The register.</typeparam>
internal unsafe interface ILanes<TVector>
    where TVector : unmanaged
{
    /// <summary>The number of doubles in a register.</summary>
    static abstract int Width { get; }

    /// <summary>Whether there are registers enough for tiles of eight columns instead of four.</summary>
    static abstract bool Wide { get; }

    /// <summary>A register of zeros.</summary>
    static abstract TVector Zero { get; }

    /// <summary>Reads a register.</summary>
    static abstract TVector Load(double* source);

    /// <summary>Writes a register.</summary>
    static abstract void Store(double* target, TVector value);

    /// <summary>Copies one number to all lanes.</summary>
    static abstract TVector Spread(double value);

    /// <summary>Copies two numbers to the even and the odd lanes.</summary>
    static abstract TVector SpreadPair(double even, double odd);

    /// <summary>Adds.</summary>
    static abstract TVector Add(TVector a, TVector b);

    /// <summary>Subtracts.</summary>
    static abstract TVector Subtract(TVector a, TVector b);

    /// <summary>Multiplies.</summary>
    static abstract TVector Multiply(TVector a, TVector b);

    /// <summary>The product of the first two plus the third, rounded once where the machine can.</summary>
    static abstract TVector MultiplyAdd(TVector a, TVector b, TVector c);

    /// <summary>Exchanges the two lanes of each pair.</summary>
    static abstract TVector SwapPairs(TVector a);

    /// <summary>The sum of all lanes.</summary>
    static abstract double Sum(TVector a);
}
