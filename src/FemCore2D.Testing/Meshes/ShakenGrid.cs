using FemCore2D.Geometry;

namespace FemCore2D.Testing;

/// <summary>A rectangular grid whose inner vertices are moved by a share of the grid's step.</summary>
internal sealed class ShakenGrid(
    int columns, int rows, double size, Func<Vector2D, Point2D> place, double[] shakes, int[] cuts, int[] regions)
{
    public Mesh ToMesh()
    {
        List<int> triangles = [];
        List<int> quadrilaterals = [];
        List<int> triangleRegions = [];
        List<int> quadrilateralRegions = [];
        for (int cell = 0; cell < columns * rows; cell++)
        {
            int a = Vertex(cell % columns, cell / columns);
            int b = a + 1;
            int d = a + columns + 1;
            int c = d + 1;
            if (cuts[cell] == 0)
            {
                quadrilaterals.AddRange([a, b, c, d]);
                quadrilateralRegions.Add(regions[cell]);
            }
            else
            {
                triangles.AddRange(cuts[cell] == 1 ? [a, b, c, a, c, d] : [a, b, d, b, c, d]);
                triangleRegions.AddRange([regions[cell], regions[cell]]);
            }
        }

        return new MeshDefinition
        {
            Vertices = [.. Enumerable.Range(0, (columns + 1) * (rows + 1)).Select(Place)],
            Triangles = triangles,
            Quadrilaterals = quadrilaterals,
            RegionNames = ["air", "iron", "copper"],
            CellRegions = [.. triangleRegions, .. quadrilateralRegions],
            Boundaries = new Dictionary<string, IReadOnlyList<(int Start, int End)>>
            {
                ["bottom"] = Line(columns, i => Vertex(i, 0)),
                ["right"] = Line(rows, j => Vertex(columns, j)),
                ["top"] = Line(columns, i => Vertex(i, rows)),
                ["left"] = Line(rows, j => Vertex(0, j)),
            },
        }.ToMesh();
    }

    private static (int Start, int End)[] Line(int count, Func<int, int> vertex) =>
        [.. Enumerable.Range(0, count).Select(i => (vertex(i), vertex(i + 1)))];

    private int Vertex(int column, int row) => (row * (columns + 1)) + column;

    private Point2D Place(int vertex)
    {
        int column = vertex % (columns + 1);
        int row = vertex / (columns + 1);
        bool isInner = column > 0 && column < columns && row > 0 && row < rows;
        Vector2D shake = isInner ? new Vector2D(shakes[2 * vertex], shakes[(2 * vertex) + 1]) : Vector2D.Zero;
        return place(size * (new Vector2D(column, row) + shake));
    }
}
