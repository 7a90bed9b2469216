using System.Numerics;

namespace FemCore2D.Assembly;

/// <summary>A part of the weak form that contributes to the matrix by an integral over cells.</summary>
/// <remarks>
/// Implement it with a <c>readonly struct</c>, and the loop over the cells is compiled for it: no call is indirect
/// and nothing is allocated. The loop alone decides how to integrate; a term whose <see cref="DegreeIn"/> is zero is
/// evaluated once in a straight cell and uses pre-integrated reference matrices. Evaluation must be safe from many
/// threads.
/// </remarks>
/// <typeparam name="T">The number type: <see cref="double"/> or <see cref="Complex"/>.</typeparam>
public interface ICellMatrixTerm<T>
    where T : unmanaged, INumberBase<T>
{
    /// <summary>
    /// How many of the two factors in each product are slopes: 2 when only slopes meet slopes, as in a stiffness; 1
    /// when at least one is a slope, as in convection; 0 otherwise. It lowers the degree of the quadrature.
    /// </summary>
    static virtual int SlopeFactors => 0;

    /// <summary>
    /// The degree of the polynomials, in each cell of a region, that describe the term's coefficients well; 0 says
    /// that they do not change within a cell.
    /// </summary>
    /// <param name="region">The region, an index into <see cref="Geometry.Mesh.RegionNames"/>.</param>
    int DegreeIn(int region);

    /// <summary>The coefficients at a point. A coupling of zeros leaves a cell out.</summary>
    Coupling<T> At(in CellPoint point);
}
