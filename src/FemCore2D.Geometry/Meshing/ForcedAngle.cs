namespace FemCore2D.Geometry;

/// <summary>A place where the section forces an angle smaller than the one asked for.</summary>
/// <param name="Place">The corner at which pieces meet at a small angle, or the sharpest corner of a cell in a narrow place.</param>
/// <param name="InputDegrees">The angle between the pieces there, in degrees; null where no corner is the cause, but a division or a detail as fine as the tolerance.</param>
/// <param name="SmallestDegrees">The smallest angle of the cells there, in degrees.</param>
/// <param name="Cells">The number of cells with an angle smaller than asked for.</param>
public readonly record struct ForcedAngle(Point2D Place, double? InputDegrees, double SmallestDegrees, int Cells);
