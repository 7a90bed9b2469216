using System.Numerics;
using FemCore2D.Sparse;

namespace FemCore2D.Solvers;

/// <content>What the factors tell about the matrix.</content>
public sealed unsafe partial class DirectFactorization<T>
{
    /// <summary>The numbers of positive and negative eigenvalues.</summary>
    /// <exception cref="InvalidOperationException">The factorization is general, or the matrix complex symmetric.</exception>
    public Inertia Inertia
    {
        get
        {
            RequireValid();
            if (engine.Kind == FactorKind.Cholesky)
                return new Inertia(Size, 0);
            if (engine.Kind == FactorKind.General || (engine.Kind == FactorKind.Symmetric && Scalar.IsComplex<T>()))
            {
                throw new InvalidOperationException(
                    "Only symmetric real and Hermitian matrices have an inertia. Use the symmetric factorization.");
            }

            int negative = 0;
            foreach ((Complex first, Complex determinant, bool pair) in Pivots())
                negative += pair ? CountNegative(first.Real, determinant.Real) : first.Real < 0.0 ? 1 : 0;
            return new Inertia(Size - negative, negative);
        }
    }

    /// <summary>The natural logarithm of the magnitude of the determinant.</summary>
    public double LogDeterminant
    {
        get
        {
            RequireValid();
            double sum = 0.0;
            foreach ((_, Complex determinant, _) in Pivots())
                sum += Math.Log(Complex.Abs(determinant));
            if (scaling is not null)
            {
                for (int i = 0; i < Size; i++)
                    sum -= Math.Log(scaling.Rows[i]) + Math.Log(scaling.Columns[i]);
            }

            return sum;
        }
    }

    /// <summary>The determinant divided by its magnitude: 1 or -1 for real matrices.</summary>
    public T DeterminantSign
    {
        get
        {
            RequireValid();
            Complex sign = Complex.One;
            foreach ((_, Complex determinant, _) in Pivots())
                sign *= determinant / Complex.Abs(determinant);
            if (engine.Kind == FactorKind.General)
                sign *= SignOfExchanges();
            return Scalar.IsComplex<T>()
                ? Scalar.Create<T>(sign.Real, sign.Imaginary)
                : Scalar.Create<T>(Math.Sign(sign.Real));
        }
    }

    /// <summary>
    /// Estimates the reciprocal of the condition number in the norm of the largest column sum: near one for a matrix that
    /// loses nothing, near the rounding unit for one that loses all digits. Takes a few solves.
    /// </summary>
    /// <remarks>W. W. Hager (1984); N. J. Higham (1988). The estimate of the inverse's norm is a lower bound, rarely below a third.</remarks>
    public double EstimateReciprocalCondition()
    {
        RequireValid();
        int n = Size;
        if (n == 0)
            return 1.0;
        T[] x = new T[n];
        T[] y = new T[n];
        T[] signs = new T[n];
        x.AsSpan().Fill(Scalar.Create<T>(1.0 / n));
        double estimate = 0.0;
        int last = -1;
        for (int step = 0; step < 5; step++)
        {
            SolveOnce(x, y, transposed: false);
            double norm = SumOfMagnitudes(y);
            if (norm <= estimate)
                break;
            estimate = norm;
            for (int i = 0; i < n; i++)
            {
                double size = Scalar.Magnitude(y[i]);
                signs[i] = size == 0.0 ? T.One : Scalar.Scale(y[i], 1.0 / size);
            }

            SolveAdjoint(signs, y);
            int best = 0;
            for (int i = 1; i < n; i++)
            {
                if (Scalar.Magnitude(y[i]) > Scalar.Magnitude(y[best]))
                    best = i;
            }

            if (best == last)
                break;
            last = best;
            x.AsSpan().Clear();
            x[best] = T.One;
        }

        // Higham's alternating vector guards against unlucky cancellation.
        for (int i = 0; i < n; i++)
            x[i] = Scalar.Create<T>((i % 2 == 0 ? 1.0 : -1.0) * (1.0 + i / Math.Max(1.0, n - 1.0)));
        SolveOnce(x, y, transposed: false);
        estimate = Math.Max(estimate, 2.0 * SumOfMagnitudes(y) / (3.0 * n));
        double own = matrix is null || plan.Kind != FactorizationKind.General ? inspection.RowNorm : matrix.OneNorm();
        return 1.0 / (own * estimate);
    }

    private static double SumOfMagnitudes(ReadOnlySpan<T> x)
    {
        double sum = 0.0;
        foreach (T value in x)
            sum += Scalar.Magnitude(value);
        return sum;
    }

    private static int CountNegative(double first, double determinant) =>
        determinant < 0.0 ? 1 : first < 0.0 ? 2 : 0;

    private void SolveAdjoint(T[] b, T[] x)
    {
        if (engine.Kind is FactorKind.Cholesky or FactorKind.Hermitian)
        {
            SolveOnce(b, x, transposed: false);
            return;
        }

        for (int i = 0; i < b.Length; i++)
            b[i] = Scalar.Conjugate(b[i]);
        SolveOnce(b, x, transposed: engine.Kind == FactorKind.General);
        for (int i = 0; i < x.Length; i++)
            x[i] = Scalar.Conjugate(x[i]);
    }

    /// <summary>The blocks of the diagonal: the first entry, the determinant, and whether there are two columns.</summary>
    private IEnumerable<(Complex First, Complex Determinant, bool Pair)> Pivots()
    {
        FactorStructure structure = plan.Fronts.Structure;
        double[] off = engine.Pivots.OffDiagonals;
        int d = plan.Fronts.Doubles;
        for (int s = 0; s < structure.Tree.Count; s++)
        {
            int first = structure.Tree.Starts[s];
            int width = structure.Width(s);
            for (int k = 0; k < width; k++)
            {
                Complex pivot = DiagonalEntry(s, k);
                if (engine.Kind == FactorKind.Cholesky)
                {
                    yield return (pivot, pivot * pivot, false);
                    continue;
                }

                Complex b = off.Length == 0 ? Complex.Zero
                    : d == 1 ? off[first + k] : new Complex(off[2 * (first + k)], off[2 * (first + k) + 1]);
                if (b == Complex.Zero)
                {
                    yield return (pivot, pivot, false);
                    continue;
                }

                Complex c = engine.Kind == FactorKind.Hermitian ? Complex.Conjugate(b) : b;
                yield return (pivot, pivot * DiagonalEntry(s, k + 1) - b * c, true);
                k++;
            }
        }
    }

    private Complex DiagonalEntry(int s, int k)
    {
        FrontPlan fronts = plan.Fronts;
        double* entry = engine.Factor.Pointer + fronts.PanelStarts[s] + (long)k * fronts.Strides[s]
            + k * fronts.Doubles + (engine.Kind == FactorKind.General ? engine.SideSize : 0);
        return fronts.Doubles == 1 ? entry[0] : new Complex(entry[0], entry[1]);
    }

    private int SignOfExchanges()
    {
        // An exchange of rows changes the sign; a cycle of even length is an odd number of them.
        FactorStructure structure = plan.Fronts.Structure;
        int[] order = engine.Pivots.Order;
        bool[] seen = new bool[order.Length];
        int sign = 1;
        for (int s = 0; s < structure.Tree.Count; s++)
        {
            int first = structure.Tree.Starts[s];
            int end = structure.Tree.Starts[s + 1];
            for (int k = first; k < end; k++)
            {
                int length = 0;
                for (int i = k; !seen[i]; i = first + order[i])
                {
                    seen[i] = true;
                    length++;
                }

                sign = length > 0 && length % 2 == 0 ? -sign : sign;
            }
        }

        return sign;
    }
}
