using FemCore2D.Geometry;

namespace FemCore2D.Drawing;

/// <summary>What can be seen of a mesh.</summary>
internal static class Sight
{
    /// <summary>Whether a cell may reach into a window: its box, with room for arcs, meets it.</summary>
    public static bool Reaches(Mesh mesh, int cell, Box2D window)
    {
        Box2D box = Box2D.Empty;
        foreach (int vertex in mesh.VerticesOf(cell))
            box = box.Union(new Box2D(mesh.Vertices[vertex], mesh.Vertices[vertex]));
        return window.Meets(mesh.HasArcs ? box.Widened(box.Width + box.Height) : box);
    }

    /// <summary>The box that just holds a mesh, arcs included; empty without a cell.</summary>
    public static Box2D BoundsOf(Mesh mesh)
    {
        if (mesh.CellCount == 0)
            return Box2D.Empty;
        (Point2D low, Point2D high) = mesh.Bounds;
        return new Box2D(low, high);
    }
}
