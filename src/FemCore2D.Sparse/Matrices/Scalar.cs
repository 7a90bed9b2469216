using System.Numerics;
using System.Runtime.CompilerServices;

namespace FemCore2D.Sparse;

/// <summary>
/// The few operations on real and complex numbers that generic arithmetic does not offer. The type tests are decided
/// when the code is compiled for a type, and cost nothing at run time.
/// </summary>
internal static class Scalar
{
    /// <summary>Refuses number types other than the two that the library is written for.</summary>
    public static void Require<T>()
        where T : unmanaged, INumberBase<T>
    {
        if (typeof(T) != typeof(double) && typeof(T) != typeof(Complex))
        {
            throw new NotSupportedException(
                $"Matrices hold double or Complex numbers, not {typeof(T).Name}. Convert the values.");
        }
    }

    /// <summary>Whether the numbers are complex.</summary>
    public static bool IsComplex<T>() => typeof(T) == typeof(Complex);

    /// <summary>The complex conjugate; a real number is its own.</summary>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static T Conjugate<T>(T value)
        where T : unmanaged, INumberBase<T>
    {
        if (typeof(T) == typeof(Complex))
        {
            Complex complex = Unsafe.BitCast<T, Complex>(value);
            return Unsafe.BitCast<Complex, T>(new Complex(complex.Real, -complex.Imaginary));
        }

        return value;
    }

    /// <summary>The magnitude, free of needless overflow.</summary>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static double Magnitude<T>(T value)
        where T : unmanaged, INumberBase<T>
    {
        if (typeof(T) == typeof(Complex))
        {
            return Complex.Abs(Unsafe.BitCast<T, Complex>(value));
        }

        return Math.Abs(Unsafe.BitCast<T, double>(value));
    }

    /// <summary>The square of the magnitude.</summary>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static double MagnitudeSquared<T>(T value)
        where T : unmanaged, INumberBase<T>
    {
        if (typeof(T) == typeof(Complex))
        {
            Complex complex = Unsafe.BitCast<T, Complex>(value);
            return (complex.Real * complex.Real) + (complex.Imaginary * complex.Imaginary);
        }

        double real = Unsafe.BitCast<T, double>(value);
        return real * real;
    }

    /// <summary>The real part.</summary>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static double Real<T>(T value)
        where T : unmanaged, INumberBase<T>
    {
        if (typeof(T) == typeof(Complex))
        {
            return Unsafe.BitCast<T, Complex>(value).Real;
        }

        return Unsafe.BitCast<T, double>(value);
    }

    /// <summary>The imaginary part.</summary>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static double Imaginary<T>(T value)
        where T : unmanaged, INumberBase<T>
    {
        if (typeof(T) == typeof(Complex))
        {
            return Unsafe.BitCast<T, Complex>(value).Imaginary;
        }

        return 0;
    }

    /// <summary>A number of the type with the given parts; the imaginary part is dropped for a real type.</summary>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static T Create<T>(double real, double imaginary = 0)
        where T : unmanaged, INumberBase<T>
    {
        if (typeof(T) == typeof(Complex))
        {
            return Unsafe.BitCast<Complex, T>(new Complex(real, imaginary));
        }

        return Unsafe.BitCast<double, T>(real);
    }

    /// <summary>The product with a real factor.</summary>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static T Scale<T>(T value, double factor)
        where T : unmanaged, INumberBase<T>
    {
        if (typeof(T) == typeof(Complex))
        {
            Complex complex = Unsafe.BitCast<T, Complex>(value);
            return Unsafe.BitCast<Complex, T>(new Complex(complex.Real * factor, complex.Imaginary * factor));
        }

        return Unsafe.BitCast<double, T>(Unsafe.BitCast<T, double>(value) * factor);
    }
}
