using System.Collections.Immutable;
using FemCore2D.Geometry;
using SkiaSharp;

namespace FemCore2D.Drawing;

/// <summary>
/// The regions of a mesh: tinted, outlined and named. A name stands inside its region where it fits; a region too
/// small for its name is explained by a legend under the panel.
/// </summary>
public sealed record RegionLayer : Layer
{
    internal static readonly ImmutableDictionary<string, Colour> NoTints = ImmutableDictionary<string, Colour>.Empty;
    private readonly float outlineWidth = 0.8f;

    /// <summary>Creates the layer.</summary>
    /// <param name="mesh">The mesh.</param>
    public RegionLayer(Mesh mesh)
    {
        ArgumentNullException.ThrowIfNull(mesh);
        Mesh = mesh;
    }

    /// <summary>The mesh.</summary>
    public Mesh Mesh { get; }

    /// <summary>Whether the regions are tinted. Leave it off to name regions over a field; then small regions stay unnamed.</summary>
    public bool IsTinted { get; init; } = true;

    /// <summary>Whether the regions are named.</summary>
    public bool ShowsNames { get; init; } = true;

    /// <summary>Tints of our own choice by region name; other regions get those of <see cref="RegionTints"/>.</summary>
    public ImmutableDictionary<string, Colour> Tints { get; init; } = NoTints;

    /// <summary>The width of the outlines in points; 0 draws none.</summary>
    /// <exception cref="ArgumentOutOfRangeException">The width is not from 0 to 100.</exception>
    public double OutlineWidth
    {
        get => outlineWidth;
        init => outlineWidth = CheckedWidth(value, nameof(OutlineWidth));
    }

    internal override Box2D Extent => Sight.BoundsOf(Mesh);

    internal static void FillAreas(
        Surface surface, PlotFrame frame, Mesh mesh, ImmutableDictionary<string, Colour> tints)
    {
        RegionBorders borders = frame.BordersOf(mesh);
        for (int region = 0; region < mesh.RegionNames.Length; region++)
        {
            Colour tint = TintOf(mesh, region, tints);
            using SKPath area = borders.Area(region, frame);
            surface.Fill(area, tint);

            // A seam of the same tint closes the fine gap that two smoothed edges leave between regions.
            surface.Stroke(area, tint, (float)(0.7 / surface.PixelsPerPoint));
        }
    }

    internal override IEnumerable<LegendItem> LegendIn(PlotFrame frame)
    {
        if (!ShowsNames || !IsTinted)
            yield break;
        foreach ((int region, SKPoint? place) in Places(frame))
        {
            if (place is null)
                yield return new LegendItem(Mesh.RegionNames[region], TintOf(Mesh, region, Tints));
        }
    }

    internal override void Draw(Surface surface, PlotFrame frame)
    {
        if (IsTinted)
            FillAreas(surface, frame, Mesh, Tints);
        if (outlineWidth > 0)
        {
            using SKPath path = frame.BordersOf(Mesh).Lines(frame);
            surface.Stroke(path, Ink.Outline, outlineWidth);
        }

        if (!ShowsNames)
            return;
        Colour halo = IsTinted ? default : Colour.White.WithOpacity(0.85);
        foreach ((int region, SKPoint? place) in Places(frame))
        {
            if (place is not { } middle)
                continue;
            string name = Mesh.RegionNames[region];
            surface.Write(name, middle.X, middle.Y, Anchor.Middle, new TextStyle(Ink.NameSize, Ink.Text, Halo: halo));
            float width = Surface.WidthOf(name, Ink.NameSize);
            frame.Taken.Add(SKRect.Create(middle.X - (width / 2), middle.Y - Ink.NameSize, width, 2 * Ink.NameSize));
        }
    }

    private static Colour TintOf(Mesh mesh, int region, ImmutableDictionary<string, Colour> tints) =>
        tints.TryGetValue(mesh.RegionNames[region], out Colour own) ? own : RegionTints.Of(region);

    private List<(int Region, SKPoint? Place)> Places(PlotFrame frame)
    {
        if (frame.NamePlaces.TryGetValue(this, out List<(int Region, SKPoint? Place)>? known))
            return known;
        var map = new RegionMap(Mesh, frame);
        var places = new List<(int Region, SKPoint? Place)>();
        for (int region = 0; region < Mesh.RegionNames.Length; region++)
        {
            if (!map.Sees(region))
                continue;
            float width = Surface.WidthOf(Mesh.RegionNames[region], Ink.NameSize) + 4;
            places.Add((region, map.PlaceFor(region, width, Ink.NameSize + 3)));
        }

        frame.NamePlaces.Add(this, places);
        return places;
    }
}
