namespace FemCore2D.Fields;

/// <summary>What a cross-section stands for in space.</summary>
public enum CoordinateSystem
{
    /// <summary>A section through something long and uniform; quantities are per metre of its length.</summary>
    Plane,

    /// <summary>
    /// Half of a section through the axis of a body of revolution: the first coordinate is the distance from the
    /// axis, the second runs along it; quantities are those of the whole body.
    /// </summary>
    Axisymmetric,
}
