using System.Numerics;
using FemCore2D.Elements;
using FemCore2D.Geometry;
using FemCore2D.Sparse;

namespace FemCore2D.Assembly;

/// <summary>Adds one term to a right-hand side: the generic loop over cells, compiled for each kind of term.</summary>
internal sealed unsafe class CellVectorLoop<T, TTerm>(
    NodeSpace space, RefillPlan plan, T* vector, TTerm term, Degrees degrees)
    where T : unmanaged, INumberBase<T>
    where TTerm : struct, ICellVectorTerm<T>
{
    private readonly TTerm term = term;

    public CellScratch NewScratch() => CellScratch.For<T>(space, degrees.Highest);

    /// <summary>Does the rows of one chunk.</summary>
    public void Run(int chunk, CellScratch scratch)
    {
        (int first, int count) = plan.Chunks.RowsOf(chunk);
        ReadOnlySpan<int> regions = space.Mesh.CellRegions;
        foreach (CellTables tables in space.PresentTables)
        {
            foreach (int cell in plan.Chunks.CellsOf(chunk, tables.Element.Cell, space.Mesh.TriangleCount))
            {
                if (!Compute(tables, cell, regions[cell], scratch))
                {
                    continue;
                }

                int unknowns = plan.Numbering.CellUnknowns(cell, scratch.Unknowns);
                for (int i = 0; i < unknowns; i++)
                {
                    int row = scratch.Unknowns[i];
                    if ((uint)(row - first) < (uint)count)
                    {
                        vector[row] += Scalar.IsComplex<T>()
                            ? Scalar.Create<T>(scratch.Real[i], scratch.Imaginary[i])
                            : Scalar.Create<T>(scratch.Real[i]);
                    }
                }
            }
        }
    }

    private static Load<double> RealPart(in Load<T> load) =>
        new(Scalar.Real(load.Value), Scalar.Real(load.X), Scalar.Real(load.Y));

    private static Load<double> ImaginaryPart(in Load<T> load) =>
        new(Scalar.Imaginary(load.Value), Scalar.Imaginary(load.X), Scalar.Imaginary(load.Y));

    /// <summary>Computes the local vector of a cell; false when it is zero.</summary>
    private bool Compute(CellTables tables, int cell, int region, CellScratch scratch)
    {
        var geometry = CellGeometry.Of(space.Maps, cell);
        Span<double> real = scratch.Real.AsSpan(0, tables.Stride);
        Span<double> imaginary = Scalar.IsComplex<T>() ? scratch.Imaginary.AsSpan(0, tables.Stride) : default;
        if (geometry.IsAffine && degrees.IsConstantIn(region))
        {
            Jacobian map = geometry.Jacobian;
            double area = tables.ReferenceArea * map.Determinant;
            Load<T> load = term.At(
                new CellPoint(cell, region, tables.Centre, geometry.PlaceAt(tables.Centre), area));
            if (load == default)
            {
                return false;
            }

            CellKernels.Combine(PullBack.Of(RealPart(load), map, 1), tables.Integrals, real);
            if (Scalar.IsComplex<T>())
            {
                CellKernels.Combine(PullBack.Of(ImaginaryPart(load), map, 1), tables.Integrals, imaginary);
            }

            return true;
        }

        ChannelTable table = tables.Rule(degrees.On(tables.Element.Cell, region, geometry.IsAffine));
        real.Clear();
        imaginary.Clear();
        for (int point = 0; point < table.Points.Length; point++)
        {
            Point2D reference = table.Points[point];
            double weight = table.Weights[point];
            Jacobian map = geometry.JacobianAt(reference);
            Load<T> load = term.At(
                new CellPoint(cell, region, reference, geometry.PlaceAt(reference), weight * map.Determinant));
            CellKernels.AddPoint(table, point, PullBack.Of(RealPart(load), map, weight), real);
            if (Scalar.IsComplex<T>())
            {
                CellKernels.AddPoint(table, point, PullBack.Of(ImaginaryPart(load), map, weight), imaginary);
            }
        }

        return true;
    }
}
