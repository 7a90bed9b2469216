using System.Numerics;
using System.Runtime.CompilerServices;
using System.Runtime.InteropServices;
using FemCore2D.Elements;
using FemCore2D.Geometry;
using FemCore2D.Sparse;

namespace FemCore2D.Assembly;

/// <summary>Adds one term to a matrix: the generic loop over cells, compiled for each kind of term.</summary>
internal sealed class CellMatrixLoop<T, TTerm>(
    NodeSpace space, RefillPlan plan, SparseMatrix<T> matrix, TTerm term, Degrees degrees)
    where T : unmanaged, INumberBase<T>
    where TTerm : struct, ICellMatrixTerm<T>
{
    private readonly TTerm term = term;

    public CellScratch NewScratch() => CellScratch.For<T>(space, degrees.Highest);

    /// <summary>Does the rows of one chunk.</summary>
    public void Run(int chunk, CellScratch scratch)
    {
        int triangles = space.Mesh.TriangleCount;
        (int first, int count) = plan.Chunks.RowsOf(chunk);
        foreach (CellTables tables in space.PresentTables)
        {
            CellKind kind = tables.Element.Cell;
            ReadOnlySpan<int> cells = plan.Chunks.CellsOf(chunk, kind, triangles);
            if (kind == CellKind.Triangle && space.AllTrianglesStraight)
            {
                RunStraightTriangles(tables, cells, first, count, scratch);
            }
            else
            {
                RunAny(tables, cells, first, count, scratch);
            }
        }
    }

    private void RunStraightTriangles(
        CellTables tables, ReadOnlySpan<int> cells, int firstRow, int rowCount, CellScratch scratch)
    {
        Mesh mesh = space.Mesh;
        ReadOnlySpan<int> triangles = mesh.Triangles;
        ReadOnlySpan<Point2D> vertices = mesh.Vertices;
        ReadOnlySpan<int> regions = mesh.CellRegions;
        var target = new Target(plan, matrix, tables, firstRow, rowCount, scratch);
        bool direct = plan.Numbering.IsVertexNumbering;
        foreach (int cell in cells)
        {
            ReadOnlySpan<int> corners = triangles.Slice(3 * cell, 3);
            var geometry = new CellGeometry(vertices[corners[0]], vertices[corners[1]], vertices[corners[2]]);
            if (Compute(tables, geometry, cell, regions[cell], scratch))
            {
                target.Add(cell, direct ? corners : UnknownsOf(cell, scratch));
            }
        }
    }

    private void RunAny(
        CellTables tables, ReadOnlySpan<int> cells, int firstRow, int rowCount, CellScratch scratch)
    {
        ReadOnlySpan<int> regions = space.Mesh.CellRegions;
        var target = new Target(plan, matrix, tables, firstRow, rowCount, scratch);
        foreach (int cell in cells)
        {
            if (Compute(tables, CellGeometry.Of(space.Maps, cell), cell, regions[cell], scratch))
            {
                target.Add(cell, UnknownsOf(cell, scratch));
            }
        }
    }

    private ReadOnlySpan<int> UnknownsOf(int cell, CellScratch scratch) =>
        scratch.Unknowns.AsSpan(0, plan.Numbering.CellUnknowns(cell, scratch.Unknowns));

    /// <summary>Computes the local matrix of a cell; false when it is zero.</summary>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    private bool Compute(
        CellTables tables, in CellGeometry geometry, int cell, int region, CellScratch scratch)
    {
        return geometry.IsAffine && degrees.IsConstantIn(region)
            ? ComputeConstant(tables, geometry, cell, region, scratch)
            : Integrate(tables, geometry, cell, region, scratch);
    }

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    private bool ComputeConstant(
        CellTables tables, in CellGeometry geometry, int cell, int region, CellScratch scratch)
    {
        Jacobian map = geometry.Jacobian;
        Point2D centre = tables.Centre;
        double area = tables.ReferenceArea * map.Determinant;
        Coupling<T> coupling = term.At(new CellPoint(cell, region, centre, geometry.PlaceAt(centre), area));
        if (coupling == default)
        {
            return false;
        }

        int length = tables.Count * tables.Stride;
        Combine(PullBack.Real(coupling), map, tables.Integrals, scratch.Real.AsSpan(0, length));
        if (Scalar.IsComplex<T>())
        {
            Combine(PullBack.Imaginary(coupling), map, tables.Integrals, scratch.Imaginary.AsSpan(0, length));
        }

        return true;
    }

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    private static void Combine(
        in Coupling<double> coupling, Jacobian map, ChannelIntegrals integrals, Span<double> local)
    {
        // The compiler knows the number of slopes of each term, and drops the other branch for stiffness terms.
        if (TTerm.SlopeFactors == 2 && coupling.XY == coupling.YX)
        {
            PullBack.Slopes(coupling, map, 1, out double xiXi, out double xiEta, out _, out double etaEta);
            CellKernels.CombineSlopes(xiXi, xiEta, etaEta, integrals, local);
        }
        else
        {
            CellKernels.Combine(PullBack.Of(coupling, map, 1), integrals, local);
        }
    }

    private bool Integrate(
        CellTables tables, in CellGeometry geometry, int cell, int region, CellScratch scratch)
    {
        ChannelTable table = tables.Rule(degrees.On(tables.Element.Cell, region, geometry.IsAffine));
        int points = table.Points.Length;
        bool any = false;
        for (int point = 0; point < points; point++)
        {
            Point2D reference = table.Points[point];
            double weight = table.Weights[point];
            Jacobian map = geometry.JacobianAt(reference);
            Coupling<T> coupling = term.At(
                new CellPoint(cell, region, reference, geometry.PlaceAt(reference), weight * map.Determinant));
            any |= coupling != default;
            scratch.RealCouplings[point] = PullBack.Of(PullBack.Real(coupling), map, weight);
            if (Scalar.IsComplex<T>())
            {
                scratch.ImaginaryCouplings[point] = PullBack.Of(PullBack.Imaginary(coupling), map, weight);
            }
        }

        if (any)
        {
            CellKernels.Integrate(table, scratch.RealCouplings.AsSpan(0, points), scratch.Work, scratch.Real);
            if (Scalar.IsComplex<T>())
            {
                CellKernels.Integrate(
                    table, scratch.ImaginaryCouplings.AsSpan(0, points), scratch.Work, scratch.Imaginary);
            }
        }

        return any;
    }

    /// <summary>Where local matrices go: the entries of the rows of one chunk.</summary>
    private readonly ref struct Target
    {
        private readonly RefillPlan plan;
        private readonly ref T values;
        private readonly ref int rowStarts;
        private readonly ref byte narrow;
        private readonly ref int wide;
        private readonly ref double real;
        private readonly ref double imaginary;
        private readonly int firstRow;
        private readonly int rowCount;
        private readonly int stride;
        private readonly bool isNarrow;

        public Target(
            RefillPlan plan, SparseMatrix<T> matrix, CellTables tables, int firstRow, int rowCount,
            CellScratch scratch)
        {
            this.plan = plan;
            this.firstRow = firstRow;
            this.rowCount = rowCount;
            stride = tables.Stride;
            isNarrow = plan.IsNarrow;
            values = ref MemoryMarshal.GetReference(matrix.Values);
            rowStarts = ref MemoryMarshal.GetReference(plan.Pattern.RowStarts);
            narrow = ref MemoryMarshal.GetReference(plan.NarrowPlaces);
            wide = ref MemoryMarshal.GetReference(plan.WidePlaces);
            real = ref MemoryMarshal.GetArrayDataReference(scratch.Real);
            imaginary = ref MemoryMarshal.GetArrayDataReference(scratch.Imaginary);
        }

        [MethodImpl(MethodImplOptions.AggressiveInlining)]
        public void Add(int cell, ReadOnlySpan<int> unknowns)
        {
            nint places = plan.PlacesOf(cell);
            for (int i = 0; i < unknowns.Length; i++)
            {
                int row = unknowns[i];
                if ((uint)(row - firstRow) < (uint)rowCount)
                {
                    ref T target = ref Unsafe.Add(ref values, Unsafe.Add(ref rowStarts, row));
                    nint from = (nint)i * stride;
                    if (isNarrow)
                    {
                        AddNarrow(ref target, ref Unsafe.Add(ref narrow, places), from, unknowns.Length);
                    }
                    else
                    {
                        AddWide(ref target, ref Unsafe.Add(ref wide, places), from, unknowns.Length);
                    }
                }

                places += unknowns.Length;
            }
        }

        [MethodImpl(MethodImplOptions.AggressiveInlining)]
        private void AddNarrow(ref T target, ref byte place, nint from, int count)
        {
            for (nint j = 0; j < count; j++)
            {
                Unsafe.Add(ref target, (nint)Unsafe.Add(ref place, j)) += Local(from + j);
            }
        }

        private void AddWide(ref T target, ref int place, nint from, int count)
        {
            for (nint j = 0; j < count; j++)
            {
                Unsafe.Add(ref target, (nint)Unsafe.Add(ref place, j)) += Local(from + j);
            }
        }

        [MethodImpl(MethodImplOptions.AggressiveInlining)]
        private T Local(nint at) => Scalar.IsComplex<T>()
            ? Scalar.Create<T>(Unsafe.Add(ref real, at), Unsafe.Add(ref imaginary, at))
            : Scalar.Create<T>(Unsafe.Add(ref real, at));
    }
}
