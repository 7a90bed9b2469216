using System.Collections.Immutable;

namespace FemCore2D.Geometry;

/// <summary>One thing drawn into a cross-section.</summary>
internal abstract record SectionItem;

/// <summary>A shape painted with a region, or cut out where the region is <see langword="null"/>.</summary>
internal sealed record PaintedShape(Shape Shape, string? Region) : SectionItem;

/// <summary>Lines of no thickness.</summary>
internal sealed record SheetLine(ImmutableArray<OutlinePiece> Pieces, string Boundary) : SectionItem;

/// <summary>A point that becomes a vertex.</summary>
internal sealed record NamedPoint(Point2D Place, string Name) : SectionItem;
