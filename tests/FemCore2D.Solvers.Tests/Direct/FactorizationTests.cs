using System.Numerics;
using FemCore2D.Sparse;
using FsCheck.Xunit;

namespace FemCore2D.Solvers.Tests;

/// <summary>Every kind of factorization against dense ones, on random matrices of its class.</summary>
public class FactorizationTests
{
    private const double Rounding = 2.3e-16;

    [Property(MaxTest = 60)]
    public void Cholesky_solves_real_positive_definite_systems(int seed, byte extent)
    {
        int n = 1 + extent % 60;
        SparseMatrix<double> a = DirectMatrices.Dominant(
            DirectMatrices.Symmetric(seed, n, DirectMatrices.Real, false, DirectMatrices.Real));
        DirectFactorization<double> factors = new DirectFactorizer<double>(FactorizationKind.Cholesky).Factorize(a);
        Check(a, factors, 20.0);
        Assert.Equal(new Inertia(n, 0), factors.Inertia);
        Assert.Equal(DirectMatrices.Dense(a).Cholesky().DeterminantLn, factors.LogDeterminant, 1e-9);
    }

    [Property(MaxTest = 60)]
    public void Cholesky_solves_Hermitian_positive_definite_systems(int seed, byte extent)
    {
        int n = 1 + extent % 60;
        SparseMatrix<Complex> a = DirectMatrices.Dominant(
            DirectMatrices.Symmetric(seed, n, DirectMatrices.Complex, true, DirectMatrices.Complex));
        DirectFactorization<Complex> factors = new DirectFactorizer<Complex>(FactorizationKind.Cholesky).Factorize(a);
        Check(a, factors, 20.0);
        Assert.Equal(1.0, factors.DeterminantSign.Real, 1e-12);
    }

    [Property(MaxTest = 100)]
    public void Symmetric_kind_solves_indefinite_systems_and_counts_their_eigenvalues(int seed, byte extent)
    {
        int n = 1 + extent % 60;
        SparseMatrix<double> a = DirectMatrices.Symmetric(seed, n, DirectMatrices.Real, false, DirectMatrices.Real);
        var dense = DirectMatrices.Dense(a);
        double[] eigenvalues = [.. dense.Evd().EigenValues.Select(e => e.Real)];
        if (eigenvalues.Min(Math.Abs) < 1e-8)
            return;
        DirectFactorization<double> factors = new DirectFactorizer<double>(FactorizationKind.Symmetric).Factorize(a);
        Check(a, factors, 8.0);
        Assert.Equal(new Inertia(eigenvalues.Count(e => e > 0), eigenvalues.Count(e => e < 0)), factors.Inertia);
        Assert.Equal(Math.Sign(dense.Determinant()), factors.DeterminantSign);
        Assert.Equal(eigenvalues.Sum(e => Math.Log(Math.Abs(e))), factors.LogDeterminant, 1e-6);
        double condition = 1.0 / (dense.L1Norm() * dense.Inverse().L1Norm());
        Assert.InRange(factors.EstimateReciprocalCondition(), 0.99 * condition, 10.0 * condition);
    }

    [Property(MaxTest = 60)]
    public void Symmetric_kind_solves_complex_symmetric_systems(int seed, byte extent)
    {
        int n = 1 + extent % 60;
        SparseMatrix<Complex> a = DirectMatrices.Symmetric(
            seed, n, DirectMatrices.Complex, false, DirectMatrices.Complex);
        var dense = DirectMatrices.Dense(a);
        if (dense.Svd(false).S.Last().Real < 1e-8)
            return;
        DirectFactorization<Complex> factors = new DirectFactorizer<Complex>(FactorizationKind.Symmetric).Factorize(a);
        Check(a, factors, 8.0);
        CheckDeterminant(dense.Determinant(), factors);
        double condition = 1.0 / (dense.L1Norm() * dense.Inverse().L1Norm());
        Assert.InRange(factors.EstimateReciprocalCondition(), 0.99 * condition, 10.0 * condition);
    }

    [Property(MaxTest = 60)]
    public void Symmetric_kind_solves_Hermitian_indefinite_systems(int seed, byte extent)
    {
        int n = 1 + extent % 60;
        SparseMatrix<Complex> a = DirectMatrices.Symmetric(
            seed, n, DirectMatrices.Complex, true, r => new Complex(DirectMatrices.Real(r), 0.0));
        var dense = DirectMatrices.Dense(a);
        if (dense.Svd(false).S.Last().Real < 1e-8)
            return;
        DirectFactorization<Complex> factors = new DirectFactorizer<Complex>(FactorizationKind.Symmetric).Factorize(a);
        Check(a, factors, 8.0);
        double[] eigenvalues = [.. dense.Evd(MathNet.Numerics.LinearAlgebra.Symmetricity.Hermitian).EigenValues.Select(e => e.Real)];
        if (a.Pattern.EntryCount > n)
            Assert.Equal(new Inertia(eigenvalues.Count(e => e > 0), eigenvalues.Count(e => e < 0)), factors.Inertia);
    }

    [Property(MaxTest = 100)]
    public void General_kind_solves_real_systems_and_their_transposes(int seed, byte extent)
    {
        int n = 1 + extent % 60;
        SparseMatrix<double> a = DirectMatrices.General(seed, n, DirectMatrices.Real);
        var dense = DirectMatrices.Dense(a);
        if (dense.Svd(false).S.Last() < 1e-8)
            return;
        DirectFactorization<double> factors = new DirectFactorizer<double>(FactorizationKind.General).Factorize(a);
        Check(a, factors, 8.0);
        CheckTransposed(a, factors);
        Assert.Equal(Math.Sign(dense.Determinant()), factors.DeterminantSign);
        Assert.Equal(Math.Log(Math.Abs(dense.Determinant())), factors.LogDeterminant, 1e-6);
        double condition = 1.0 / (dense.L1Norm() * dense.Inverse().L1Norm());
        Assert.InRange(factors.EstimateReciprocalCondition(), 0.99 * condition, 10.0 * condition);
    }

    [Property(MaxTest = 60)]
    public void General_kind_solves_complex_systems_and_their_transposes(int seed, byte extent)
    {
        int n = 1 + extent % 60;
        SparseMatrix<Complex> a = DirectMatrices.General(seed, n, DirectMatrices.Complex);
        var dense = DirectMatrices.Dense(a);
        if (dense.Svd(false).S.Last().Real < 1e-8)
            return;
        DirectFactorization<Complex> factors = new DirectFactorizer<Complex>(FactorizationKind.General).Factorize(a);
        Check(a, factors, 8.0);
        CheckTransposed(a, factors);
        CheckDeterminant(dense.Determinant(), factors);
    }

    [Theory]
    [InlineData(FactorizationKind.Cholesky, OrderingMethod.MinimumDegree)]
    [InlineData(FactorizationKind.Cholesky, OrderingMethod.NestedDissection)]
    [InlineData(FactorizationKind.Cholesky, OrderingMethod.Natural)]
    [InlineData(FactorizationKind.Symmetric, OrderingMethod.NestedDissection)]
    [InlineData(FactorizationKind.General, OrderingMethod.NestedDissection)]
    public void Fronts_of_all_sizes_are_solved(FactorizationKind kind, OrderingMethod method)
    {
        SparseMatrix<double> a = DirectMatrices.Grid(150, 90);
        DirectOptions options = new() { OrderingMethod = method };
        DirectFactorization<double> factors = new DirectFactorizer<double>(kind, options).Factorize(a);
        Check(a, factors, 8.0);
        Assert.Equal(method, factors.Report.Ordering);
    }

    [Theory]
    [InlineData(FactorizationKind.Symmetric)]
    [InlineData(FactorizationKind.General)]
    public void A_shifted_Laplacian_is_solved_to_rounding(FactorizationKind kind)
    {
        SparseMatrix<double> a = DirectMatrices.Grid(120, 120, 4.0 - 0.31);
        DirectFactorization<double> factors = new DirectFactorizer<double>(kind).Factorize(a);
        Check(a, factors, 8.0);
        if (kind == FactorizationKind.Symmetric)
        {
            // Its eigenvalues are known: 4 - 2 cos - 2 cos of multiples of pi / 121, less the shift.
            int negative = 0;
            for (int i = 1; i <= 120; i++)
            {
                for (int j = 1; j <= 120; j++)
                    negative += 3.69 - 2.0 * Math.Cos(i * Math.PI / 121) - 2.0 * Math.Cos(j * Math.PI / 121) < 0.0 ? 1 : 0;
            }

            Assert.Equal(new Inertia(14400 - negative, negative), factors.Inertia);
        }
    }

    [Fact]
    public void A_complex_symmetric_grid_is_solved_to_rounding()
    {
        SparseMatrix<Complex> a = DirectMatrices.Grid(100, 100).ToComplex();
        for (int i = 0; i < a.RowCount; i++)
            a.Entry(i, i) += new Complex(-0.2, 0.05);
        foreach (FactorizationKind kind in new[] { FactorizationKind.Symmetric, FactorizationKind.General })
            Check(a, new DirectFactorizer<Complex>(kind).Factorize(a), 8.0);
    }

    private static void Check<T>(SparseMatrix<T> a, DirectFactorization<T> factors, double roundings)
        where T : unmanaged, INumberBase<T>
    {
        int n = a.RowCount;
        T[] b = DirectMatrices.RightHandSide<T>(n);
        T[] x = new T[n];
        factors.Solve(b, x);
        Assert.InRange(DirectMatrices.BackwardError<T>(a, x, b), 0.0, roundings * Rounding);

        // Many right-hand sides at once, in place, are the single ones.
        const int Count = 11;
        T[] many = [.. Enumerable.Range(1, Count).SelectMany(seed => DirectMatrices.RightHandSide<T>(n, seed))];
        factors.Solve(many, many, Count);
        Assert.Equal(x, many[..n]);
        for (int k = 0; k < Count; k++)
        {
            T[] own = DirectMatrices.RightHandSide<T>(n, k + 1);
            Assert.InRange(
                DirectMatrices.BackwardError<T>(a, many.AsSpan(k * n, n), own), 0.0, roundings * Rounding);
        }
    }

    private static void CheckTransposed<T>(SparseMatrix<T> a, DirectFactorization<T> factors)
        where T : unmanaged, INumberBase<T>
    {
        T[] b = DirectMatrices.RightHandSide<T>(a.RowCount);
        T[] x = new T[b.Length];
        factors.SolveTransposed(b, x);
        Assert.InRange(DirectMatrices.BackwardError(a.Transpose(), x, b), 0.0, 20.0 * Rounding);
    }

    private static void CheckDeterminant(Complex expected, DirectFactorization<Complex> factors)
    {
        Assert.Equal(Math.Log(Complex.Abs(expected)), factors.LogDeterminant, 1e-6);
        Complex sign = expected / Complex.Abs(expected);
        Assert.InRange(Complex.Abs(sign - factors.DeterminantSign), 0.0, 1e-6);
    }
}
