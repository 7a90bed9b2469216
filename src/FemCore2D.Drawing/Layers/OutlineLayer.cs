using FemCore2D.Geometry;
using SkiaSharp;

namespace FemCore2D.Drawing;

/// <summary>The lines between the regions of a mesh and around it, arcs drawn as arcs.</summary>
public sealed record OutlineLayer : Layer
{
    private readonly float width = 0.8f;

    /// <summary>Creates the layer.</summary>
    /// <param name="mesh">The mesh.</param>
    public OutlineLayer(Mesh mesh)
    {
        ArgumentNullException.ThrowIfNull(mesh);
        Mesh = mesh;
    }

    /// <summary>The mesh.</summary>
    public Mesh Mesh { get; }

    /// <summary>The colour of the lines.</summary>
    public Colour Colour { get; init; } = Ink.Outline;

    /// <summary>The width of the lines in points.</summary>
    /// <exception cref="ArgumentOutOfRangeException">The width is not from 0 to 100.</exception>
    public double Width
    {
        get => width;
        init => width = CheckedWidth(value, nameof(Width));
    }

    internal override Box2D Extent => Sight.BoundsOf(Mesh);

    internal override void Draw(Surface surface, PlotFrame frame)
    {
        if (width == 0)
            return;
        using SKPath path = frame.BordersOf(Mesh).Lines(frame);
        surface.Stroke(path, Colour, width);
    }
}
