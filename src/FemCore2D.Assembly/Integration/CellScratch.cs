using System.Numerics;
using FemCore2D.Sparse;

namespace FemCore2D.Assembly;

/// <summary>The arrays that one worker needs during a loop over cells; made once a worker, not once a cell.</summary>
internal sealed class CellScratch
{
    public CellScratch(int unknowns, int points, bool complex)
    {
        int stride = ChannelTable.Padded(unknowns);
        Unknowns = new int[unknowns];
        Real = new double[unknowns * stride];
        Imaginary = complex ? new double[unknowns * stride] : [];
        RealCouplings = new Coupling<double>[points];
        ImaginaryCouplings = complex ? new Coupling<double>[points] : [];
        Work = new double[3 * points * stride];
    }

    public int[] Unknowns { get; }

    /// <summary>The real part of the local matrix or vector.</summary>
    public double[] Real { get; }

    /// <summary>The imaginary part, of length zero for real numbers.</summary>
    public double[] Imaginary { get; }

    public Coupling<double>[] RealCouplings { get; }

    public Coupling<double>[] ImaginaryCouplings { get; }

    public double[] Work { get; }

    /// <summary>Creates the arrays for loops over both kinds of cells.</summary>
    /// <param name="space">The space.</param>
    /// <param name="degree">The highest degree of quadrature in the loop.</param>
    public static CellScratch For<T>(NodeSpace space, int degree)
        where T : unmanaged, INumberBase<T>
    {
        int unknowns = 0;
        int points = 1;
        foreach (CellTables tables in space.PresentTables)
        {
            unknowns = Math.Max(unknowns, tables.Count);
            points = Math.Max(points, tables.Rule(degree).Points.Length);
        }

        return new CellScratch(unknowns, points, Scalar.IsComplex<T>());
    }
}
