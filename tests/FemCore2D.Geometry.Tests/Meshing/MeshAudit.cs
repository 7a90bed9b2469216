using System.Runtime.InteropServices;

namespace FemCore2D.Geometry.Tests;

/// <summary>What must hold of every mesh of an arrangement, checked without the mesher's own means.</summary>
internal sealed partial class MeshAudit
{
    private readonly Arrangement arrangement;
    private readonly MeshOptions options;
    private readonly Mesh mesh;
    private readonly MeshReport report;
    private readonly double extent;
    private readonly PieceCurve[] curves;
    private readonly int[] pieceOfEdge;

    private MeshAudit(Arrangement arrangement, MeshOptions options, MeshingResult result)
    {
        this.arrangement = arrangement;
        this.options = options;
        mesh = result.Mesh;
        report = result.Report;
        extent = Math.Max(
            arrangement.Vertices.Max(p => p.X) - arrangement.Vertices.Min(p => p.X),
            arrangement.Vertices.Max(p => p.Y) - arrangement.Vertices.Min(p => p.Y));
        curves = [.. arrangement.Pieces.Select(piece =>
            new PieceCurve(arrangement.Vertices[piece.Start], arrangement.Vertices[piece.End], piece.SweepRadians))];
        pieceOfEdge = new int[mesh.EdgeCount];
        Array.Fill(pieceOfEdge, -1);
    }

    /// <summary>Meshes the arrangement and checks the mesh.</summary>
    public static MeshingResult Generate(Arrangement arrangement, MeshOptions? options = null)
    {
        options ??= MeshOptions.Default;
        MeshingResult result = Mesher.Generate(arrangement, options);
        MeshAudit audit = new(arrangement, options, result);
        audit.CellsAreValid();
        audit.PiecesAreKept();
        audit.AreasAreExact();
        audit.RegionsAreRight();
        audit.EdgesAreDelaunay();
        audit.AnglesAreMet();
        audit.CurvedCellsAreValid();
        audit.ReportCounts();
        IsTheSame(result.Mesh, Mesher.Generate(arrangement, options).Mesh);
        return result;
    }

    private void CellsAreValid()
    {
        Assert.Equal(0, mesh.QuadrilateralCount);
        HashSet<int> used = [];
        Assert.Equal(mesh.VertexCount, mesh.Vertices.ToArray().Distinct().Count());
        for (int cell = 0; cell < mesh.CellCount; cell++)
        {
            ReadOnlySpan<int> v = mesh.VerticesOf(cell);
            Assert.True(Predicates.Orientation(mesh.Vertices[v[0]], mesh.Vertices[v[1]], mesh.Vertices[v[2]]) > 0);
            used.UnionWith(v.ToArray());
        }

        Assert.Equal(mesh.VertexCount, used.Count);

        // Where an outer edge ends another must begin, so that the cells' outline is closed.
        Dictionary<int, int> balance = [];
        for (int edge = 0; edge < mesh.EdgeCount; edge++)
        {
            (int from, int to) = mesh.EndsOf(edge);
            (int left, int right) = mesh.CellsOf(edge);
            Assert.True(left >= 0 || right >= 0);
            if (left >= 0 && right >= 0)
                continue;
            int sign = left >= 0 ? 1 : -1;
            balance[from] = balance.GetValueOrDefault(from) + sign;
            balance[to] = balance.GetValueOrDefault(to) - sign;
        }

        Assert.All(balance.Values, value => Assert.Equal(0, value));
    }

    /// <summary>Every piece with cells at it is a chain of edges with the right sweeps, names and regions.</summary>
    private void PiecesAreKept()
    {
        Dictionary<int, List<int>> edgesAt = [];
        for (int edge = 0; edge < mesh.EdgeCount; edge++)
        {
            (int from, int to) = mesh.EndsOf(edge);
            CollectionsMarshal.GetValueRefOrAddDefault(edgesAt, from, out _) ??= [];
            CollectionsMarshal.GetValueRefOrAddDefault(edgesAt, to, out _) ??= [];
            edgesAt[from].Add(edge);
            edgesAt[to].Add(edge);
        }

        Dictionary<Point2D, int> vertexAt = [];
        for (int vertex = 0; vertex < mesh.VertexCount; vertex++)
        {
            vertexAt.Add(mesh.Vertices[vertex], vertex);
        }

        HashSet<(string, int)> named = [.. mesh.BoundaryNames.SelectMany(name =>
            mesh.BoundaryEdges(name).ToArray().Select(edge => (name, edge)))];
        int namedCount = 0;
        for (int piece = 0; piece < curves.Length; piece++)
        {
            ArrangedPiece arranged = arrangement.Pieces[piece];
            if (arranged.LeftRegion < 0 && arranged.RightRegion < 0)
                continue;
            PieceCurve curve = curves[piece];
            int end = vertexAt[curve.End];
            double sweep = 0;
            for (int vertex = vertexAt[curve.Start]; vertex != end;)
            {
                int edge = NextAlong(piece, vertex, end, sweep, edgesAt[vertex]);
                pieceOfEdge[edge] = piece;
                (int from, int to) = mesh.EndsOf(edge);
                (int left, int right) = mesh.CellsOf(edge);
                bool forward = from == vertex;
                sweep += forward ? mesh.SweepRadiansOf(edge) : -mesh.SweepRadiansOf(edge);
                if (!forward)
                    (left, right) = (right, left);
                Assert.Equal(arranged.LeftRegion, left < 0 ? -1 : mesh.CellRegions[left]);
                Assert.Equal(arranged.RightRegion, right < 0 ? -1 : mesh.CellRegions[right]);
                foreach (string name in arranged.Boundaries < 0 ? [] : arrangement.BoundarySets[arranged.Boundaries])
                {
                    Assert.Contains((name, edge), named);
                    namedCount++;
                }

                Assert.True(Math.Abs(mesh.SweepRadiansOf(edge)) <= (options.LargestArcDegrees * Math.PI / 180) + 1e-9);
                vertex = forward ? to : from;
            }

            Assert.Equal(curve.Sweep, sweep, 1e-12);
        }

        Assert.Equal(namedCount, named.Count);
        for (int edge = 0; edge < mesh.EdgeCount; edge++)
        {
            Assert.True(mesh.SweepRadiansOf(edge) == 0 || pieceOfEdge[edge] >= 0);
            Assert.True(pieceOfEdge[edge] >= 0 || !mesh.IsOuter(edge));
            (int left, int right) = mesh.CellsOf(edge);
            Assert.True(pieceOfEdge[edge] >= 0 || mesh.CellRegions[left] == mesh.CellRegions[right]);
        }
    }

    private int NextAlong(int piece, int vertex, int end, double sweep, List<int> edges)
    {
        PieceCurve curve = curves[piece];
        double done = curve.Sweep == 0 ? curve.Start.DistanceTo(mesh.Vertices[vertex]) / curve.Length : sweep / curve.Sweep;
        foreach (int edge in edges)
        {
            (int from, int to) = mesh.EndsOf(edge);
            int other = from == vertex ? to : from;
            double edgeSweep = from == vertex ? mesh.SweepRadiansOf(edge) : -mesh.SweepRadiansOf(edge);
            if ((curve.Sweep == 0) != (edgeSweep == 0) || (curve.Sweep != 0 && Math.Sign(curve.Sweep) != Math.Sign(edgeSweep)))
                continue;
            double fraction = curve.Sweep == 0
                ? (mesh.Vertices[other] - curve.Start).Dot(curve.End - curve.Start) / (curve.Length * curve.Length)
                : done + (edgeSweep / curve.Sweep);
            bool isOn = curve.PointAt(fraction).DistanceTo(mesh.Vertices[other]) <= 1e-12 * extent;
            if (isOn && fraction > done && (other == end || fraction < 1))
                return edge;
        }

        Assert.Fail($"The chain of edges along the piece from {curve.Start} to {curve.End} breaks at {mesh.Vertices[vertex]}.");
        return -1;
    }

    private void AreasAreExact()
    {
        double[] exact = new double[arrangement.RegionNames.Length];
        double[] found = new double[exact.Length];
        for (int piece = 0; piece < curves.Length; piece++)
        {
            PieceCurve curve = curves[piece];
            double radius = curve.Sweep == 0 ? 0 : curve.Radius;
            Vector2D start = curve.Start - arrangement.Vertices[0];
            Vector2D end = curve.End - arrangement.Vertices[0];
            double area = 0.5 * (start.Cross(end) + (radius * radius * (curve.Sweep - Math.Sin(curve.Sweep))));
            Add(exact, arrangement.Pieces[piece].LeftRegion, area);
            Add(exact, arrangement.Pieces[piece].RightRegion, -area);
        }

        for (int cell = 0; cell < mesh.CellCount; cell++)
        {
            ReadOnlySpan<int> v = mesh.VerticesOf(cell);
            Point2D a = mesh.Vertices[v[0]];
            Add(found, mesh.CellRegions[cell], 0.5 * (mesh.Vertices[v[1]] - a).Cross(mesh.Vertices[v[2]] - a));
        }

        for (int edge = 0; edge < mesh.EdgeCount; edge++)
        {
            double sweep = mesh.SweepRadiansOf(edge);
            if (sweep == 0)
                continue;
            (int from, int to) = mesh.EndsOf(edge);
            (int left, int right) = mesh.CellsOf(edge);
            double radius = mesh.Vertices[from].DistanceTo(mesh.Vertices[to]) / (2 * Math.Sin(sweep / 2));
            double segment = 0.5 * radius * radius * (sweep - Math.Sin(sweep));
            Add(found, left < 0 ? -1 : mesh.CellRegions[left], segment);
            Add(found, right < 0 ? -1 : mesh.CellRegions[right], -segment);
        }

        for (int region = 0; region < exact.Length; region++)
        {
            Assert.Equal(exact[region], found[region], 1e-13 * extent * extent);
        }

        static void Add(double[] areas, int region, double area)
        {
            if (region >= 0)
                areas[region] += area;
        }
    }

    /// <summary>A ray from the middle of a cell crosses the lines of its own region, and of no other, an odd number of times.</summary>
    private void RegionsAreRight()
    {
        List<(Point2D A, Point2D B, int Left, int Right)> lines = [];
        for (int piece = 0; piece < curves.Length; piece++)
        {
            int parts = curves[piece].Sweep == 0 ? 1 : 256;
            for (int i = 0; i < parts; i++)
            {
                lines.Add((
                    curves[piece].PointAt((double)i / parts),
                    curves[piece].PointAt((i + 1.0) / parts),
                    arrangement.Pieces[piece].LeftRegion,
                    arrangement.Pieces[piece].RightRegion));
            }
        }

        // A sample is enough: next to every line the regions have been checked, and between lines they do not change.
        int step = Math.Max(1, mesh.CellCount / 50);
        int[] crossings = new int[arrangement.RegionNames.Length];
        for (int cell = 0; cell < mesh.CellCount; cell += step)
        {
            ReadOnlySpan<int> v = mesh.VerticesOf(cell);
            Vector2D sum = (mesh.Vertices[v[0]] - Point2D.Origin) + (mesh.Vertices[v[1]] - Point2D.Origin) + (mesh.Vertices[v[2]] - Point2D.Origin);
            Point2D middle = Point2D.Origin + (sum / 3);
            Array.Clear(crossings);
            foreach ((Point2D a, Point2D b, int left, int right) in lines)
            {
                if (a.Y > middle.Y == b.Y > middle.Y || left == right)
                    continue;
                double x = a.X + ((middle.Y - a.Y) / (b.Y - a.Y) * (b.X - a.X));
                if (x < middle.X)
                    continue;
                if (left >= 0)
                    crossings[left]++;
                if (right >= 0)
                    crossings[right]++;
            }

            bool isNearArc = Enumerable.Range(0, 3).Any(i => mesh.SweepRadiansOf(mesh.EdgesOf(cell)[i]) != 0);
            for (int region = 0; region < crossings.Length && !isNearArc; region++)
            {
                Assert.Equal(region == mesh.CellRegions[cell] ? 1 : 0, crossings[region] % 2);
            }
        }
    }

    private void ReportCounts()
    {
        Assert.Equal(mesh.VertexCount, report.Vertices);
        Assert.Equal(mesh.EdgeCount, report.Edges);
        Assert.Equal(mesh.CellCount, report.Cells);
        Assert.Equal(mesh.CellCount, report.AngleHistogram.Sum());
        Assert.Equal(mesh.CellCount, report.SizeHistogram.Sum());
        Assert.Equal(mesh.CellCount, report.CellsByRegion.Sum(entry => entry.Cells));
        Assert.Contains($"{mesh.CellCount} cells", report.ToString(), StringComparison.Ordinal);
        HashSet<int> onPieces = [];
        for (int edge = 0; edge < mesh.EdgeCount; edge++)
        {
            if (pieceOfEdge[edge] >= 0)
                onPieces.UnionWith([mesh.EndsOf(edge).From, mesh.EndsOf(edge).To]);
        }

        int lonely = arrangement.PointVertices.Count(vertex =>
            !arrangement.Pieces.Any(piece => piece.Start == vertex || piece.End == vertex));
        Assert.Equal(onPieces.Count + lonely, report.BoundaryVertices);
    }

    private static void IsTheSame(Mesh one, Mesh other)
    {
        Assert.True(MemoryMarshal.AsBytes(one.Vertices).SequenceEqual(MemoryMarshal.AsBytes(other.Vertices)));
        Assert.True(one.Triangles.SequenceEqual(other.Triangles));
        Assert.True(one.CellRegions.SequenceEqual(other.CellRegions));
    }
}
