namespace FemCore2D.Solvers;

/// <summary>How many doubles make one number, known to the compiler of each kernel.</summary>
internal interface INumberForm
{
    /// <summary>1 for real, 2 for complex numbers.</summary>
    static abstract int Doubles { get; }
}

/// <summary>Real numbers.</summary>
internal readonly struct RealForm : INumberForm
{
    /// <inheritdoc/>
    public static int Doubles => 1;
}

/// <summary>Complex numbers, the real part before the imaginary one.</summary>
internal readonly struct ComplexForm : INumberForm
{
    /// <inheritdoc/>
    public static int Doubles => 2;
}
