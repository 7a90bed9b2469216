using System.Numerics;
using System.Runtime.CompilerServices;
using FemCore2D.Elements;
using FemCore2D.Sparse;

namespace FemCore2D.Assembly;

/// <summary>
/// Carries coefficients from the real cell to the reference cell, where the tabulated shape functions are used as they
/// are. For node elements the value stays and the gradient turns with the inverse of the map's derivative.
/// </summary>
internal static class PullBack
{
    /// <summary>The real part of a coupling of real or complex numbers.</summary>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Coupling<double> Real<T>(in Coupling<T> m)
        where T : unmanaged, INumberBase<T>
    {
        if (typeof(T) == typeof(double))
        {
            return Unsafe.As<Coupling<T>, Coupling<double>>(ref Unsafe.AsRef(in m));
        }

        return new Coupling<double>(
            Scalar.Real(m.ValueValue), Scalar.Real(m.ValueX), Scalar.Real(m.ValueY),
            Scalar.Real(m.XValue), Scalar.Real(m.XX), Scalar.Real(m.XY),
            Scalar.Real(m.YValue), Scalar.Real(m.YX), Scalar.Real(m.YY));
    }

    public static Coupling<double> Imaginary<T>(in Coupling<T> m)
        where T : unmanaged, INumberBase<T> => new(
        Scalar.Imaginary(m.ValueValue), Scalar.Imaginary(m.ValueX), Scalar.Imaginary(m.ValueY),
        Scalar.Imaginary(m.XValue), Scalar.Imaginary(m.XX), Scalar.Imaginary(m.XY),
        Scalar.Imaginary(m.YValue), Scalar.Imaginary(m.YX), Scalar.Imaginary(m.YY));

    /// <summary>The coupling of slopes only, in reference coordinates, times a weight of the reference cell.</summary>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static void Slopes(
        in Coupling<double> m, Jacobian map, double weight,
        out double xiXi, out double xiEta, out double etaXi, out double etaEta)
    {
        // The adjugate of the map's derivative times the slopes' coefficients, from both sides.
        double scale = weight / map.Determinant;
        double ax = map.Eta.Y;
        double ay = -map.Eta.X;
        double bx = -map.Xi.Y;
        double by = map.Xi.X;
        double mxa = (m.XX * ax) + (m.XY * ay);
        double mya = (m.YX * ax) + (m.YY * ay);
        double mxb = (m.XX * bx) + (m.XY * by);
        double myb = (m.YX * bx) + (m.YY * by);
        xiXi = scale * ((ax * mxa) + (ay * mya));
        etaEta = scale * ((bx * mxb) + (by * myb));
        xiEta = scale * ((ax * mxb) + (ay * myb));

        // A symmetric tensor must stay so to the bit.
        etaXi = m.XY == m.YX ? xiEta : scale * ((bx * mxa) + (by * mya));
    }

    /// <summary>A coupling in reference coordinates, times a weight of the reference cell.</summary>
    public static Coupling<double> Of(in Coupling<double> m, Jacobian map, double weight)
    {
        Slopes(m, map, weight, out double xiXi, out double xiEta, out double etaXi, out double etaEta);
        return new Coupling<double>(
            weight * map.Determinant * m.ValueValue,
            weight * ((m.ValueX * map.Eta.Y) - (m.ValueY * map.Eta.X)),
            weight * ((m.ValueY * map.Xi.X) - (m.ValueX * map.Xi.Y)),
            weight * ((m.XValue * map.Eta.Y) - (m.YValue * map.Eta.X)),
            xiXi,
            xiEta,
            weight * ((m.YValue * map.Xi.X) - (m.XValue * map.Xi.Y)),
            etaXi,
            etaEta);
    }

    /// <summary>A load in reference coordinates, times a weight of the reference cell.</summary>
    public static Load<double> Of(in Load<double> load, Jacobian map, double weight) => new(
        weight * map.Determinant * load.Value,
        weight * ((load.X * map.Eta.Y) - (load.Y * map.Eta.X)),
        weight * ((load.Y * map.Xi.X) - (load.X * map.Xi.Y)));
}
