namespace FemCore2D.Geometry;

/// <summary>The grid of a patch on its way to a mesh: vertices row by row, cells row by row.</summary>
internal sealed class PatchGrid(FourSides sides, string?[] boundaries, double[] u, double[] v)
{
    private readonly int along = u.Length - 1;
    private readonly int across = v.Length - 1;
    private readonly List<MarkedEdge> marks = [];

    public Mesh ToMesh(string region)
    {
        var vertices = new Point2D[u.Length * v.Length];
        for (int j = 0; j <= across; j++)
        {
            for (int i = 0; i <= along; i++)
            {
                vertices[Vertex(i, j)] = sides.PointAt(u[i], v[j]);
            }
        }

        int[] cells = new int[4 * along * across];
        int place = 0;
        for (int j = 0; j < across; j++)
        {
            for (int i = 0; i < along; i++)
            {
                cells[place++] = Vertex(i, j);
                cells[place++] = Vertex(i + 1, j);
                cells[place++] = Vertex(i + 1, j + 1);
                cells[place++] = Vertex(i, j + 1);
            }
        }

        string[] names = [.. boundaries.OfType<string>().Distinct()];
        int[] sets = [.. boundaries.Select(name => name is null ? -1 : Array.IndexOf(names, name))];
        MarkLines(vertices, sides.Bottom, sides.Top, u, v, Vertex, sets[0], sets[2]);
        MarkLines(vertices, sides.Left, sides.Right, v, u, (j, i) => Vertex(i, j), sets[3], sets[1]);
        return new MeshBuilder
        {
            Vertices = vertices,
            Quadrilaterals = cells,
            CellRegions = new int[along * across],
            RegionNames = [region],
            MarkedEdges = marks,
            BoundarySets = [.. names.Select(name => System.Collections.Immutable.ImmutableArray.Create(name))],
        }.Build();
    }

    private int Vertex(int i, int j) => (j * (along + 1)) + i;

    /// <summary>Gives the edges along all lines of one direction their arcs, and the two outer lines their names.</summary>
    private void MarkLines(
        Point2D[] vertices, in OutlinePiece first, in OutlinePiece last, double[] steps, double[] lines,
        Func<int, int, int> vertex, int firstSet, int lastSet)
    {
        bool isStraight = first.IsStraight && last.IsStraight;
        for (int line = 0; line < lines.Length; line++)
        {
            int set = line == 0 ? firstSet : line == lines.Length - 1 ? lastSet : -1;
            if (isStraight && set < 0)
            {
                continue;
            }

            for (int step = 0; step < steps.Length - 1; step++)
            {
                int start = vertex(step, line);
                int end = vertex(step + 1, line);
                double share = steps[step + 1] - steps[step];
                double sweep = line == 0 ? share * first.SweepRadians
                    : line == lines.Length - 1 ? share * last.SweepRadians
                    : FourSides.SweepBetween(
                        first.Part(steps[step], steps[step + 1]), last.Part(steps[step], steps[step + 1]),
                        lines[line], vertices[start].DistanceTo(vertices[end]));
                if (sweep != 0 || set >= 0)
                {
                    marks.Add(new MarkedEdge(start, end, sweep, set));
                }
            }
        }
    }
}
