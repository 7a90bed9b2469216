namespace FemCore2D.Sparse;

/// <summary>The kind of a Matrix Market file, as its first line states it.</summary>
/// <param name="Layout">How the entries are laid out.</param>
/// <param name="Field">The numbers.</param>
/// <param name="Symmetry">Which entries are left out.</param>
public sealed record MatrixMarketFormat(
    MatrixMarketLayout Layout = MatrixMarketLayout.Coordinate,
    MatrixMarketField Field = MatrixMarketField.Real,
    MatrixMarketSymmetry Symmetry = MatrixMarketSymmetry.General)
{
    internal const string Banner = "%%MatrixMarket";

    /// <summary>Why the format does not exist in the standard, or null if it does.</summary>
    internal string? Fault => (Layout, Field, Symmetry) switch
    {
        (MatrixMarketLayout.Array, MatrixMarketField.Pattern, _) => "an array cannot be a pattern",
        (_, MatrixMarketField.Pattern, MatrixMarketSymmetry.SkewSymmetric or MatrixMarketSymmetry.Hermitian) =>
            "a pattern is general or symmetric",
        (_, MatrixMarketField.Real or MatrixMarketField.Whole, MatrixMarketSymmetry.Hermitian) =>
            "a Hermitian matrix is complex; a real one is symmetric",
        _ => null,
    };

    /// <summary>The words of the standard for the three parts.</summary>
    internal static string Word(MatrixMarketSymmetry symmetry) => symmetry switch
    {
        MatrixMarketSymmetry.General => "general",
        MatrixMarketSymmetry.Symmetric => "symmetric",
        MatrixMarketSymmetry.SkewSymmetric => "skew-symmetric",
        _ => "hermitian",
    };

    internal static string Word(MatrixMarketField field) => field switch
    {
        MatrixMarketField.Real => "real",
        MatrixMarketField.Whole => "integer",
        MatrixMarketField.Complex => "complex",
        _ => "pattern",
    };

    internal static string Word(MatrixMarketLayout layout) =>
        layout == MatrixMarketLayout.Array ? "array" : "coordinate";

    /// <summary>The first line of a file.</summary>
    internal string FirstLine => $"{Banner} matrix {Word(Layout)} {Word(Field)} {Word(Symmetry)}";
}
