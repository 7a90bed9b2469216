using System.Numerics;

namespace FemCore2D.Assembly;

/// <summary>A part of the weak form that contributes to the right-hand side by an integral over cells.</summary>
/// <remarks>See <see cref="ICellMatrixTerm{T}"/> for how to write one.</remarks>
/// <typeparam name="T">The number type: <see cref="double"/> or <see cref="Complex"/>.</typeparam>
public interface ICellVectorTerm<T>
    where T : unmanaged, INumberBase<T>
{
    /// <summary>
    /// The degree of the polynomials, in each cell of a region, that describe the term's coefficients well; 0 says
    /// that they do not change within a cell.
    /// </summary>
    /// <param name="region">The region, an index into <see cref="Geometry.Mesh.RegionNames"/>.</param>
    int DegreeIn(int region);

    /// <summary>The coefficients at a point. A load of zeros leaves a cell out.</summary>
    Load<T> At(in CellPoint point);
}
