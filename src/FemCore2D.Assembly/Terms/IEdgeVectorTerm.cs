using System.Numerics;

namespace FemCore2D.Assembly;

/// <summary>
/// A part of the weak form that contributes to the right-hand side by an integral over edges, of a coefficient times
/// the value of the test function.
/// </summary>
/// <typeparam name="T">The number type: <see cref="double"/> or <see cref="Complex"/>.</typeparam>
public interface IEdgeVectorTerm<T>
    where T : unmanaged, INumberBase<T>
{
    /// <summary>The degree of the polynomials that describe the coefficient well along each edge of a region's cells.</summary>
    /// <param name="region">The region, an index into <see cref="Geometry.Mesh.RegionNames"/>.</param>
    int DegreeIn(int region);

    /// <summary>The coefficient at a point.</summary>
    T At(in EdgePoint point);
}
