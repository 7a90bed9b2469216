namespace FemCore2D.Assembly;

/// <summary>A material property or a source as a function of place.</summary>
/// <remarks>Evaluation must be safe from many threads.</remarks>
/// <typeparam name="TValue">The type of its values: a real or complex number, or a <see cref="Tensor2D{T}"/> of these.</typeparam>
public interface ICoefficient<TValue>
    where TValue : struct
{
    /// <summary>
    /// The degree of the polynomials that describe the coefficient well in each cell of a region; 0 says that it does
    /// not change within a cell.
    /// </summary>
    /// <param name="region">The region, an index into <see cref="Geometry.Mesh.RegionNames"/>.</param>
    int DegreeIn(int region);

    /// <summary>The value at a point.</summary>
    TValue At(in CellPoint point);
}
