namespace FemCore2D.Reference;

/// <summary>Comparison with values from outside.</summary>
internal static class Check
{
    /// <summary>Fails unless two numbers agree within a tolerance relative to the expected one.</summary>
    public static void Relative(double expected, double actual, double tolerance)
    {
        double error = Math.Abs((actual - expected) / expected);
        Assert.True(error <= tolerance, $"Expected {expected:G12}, got {actual:G12}: relative error {error:E2} > {tolerance:E1}.");
    }
}
