using FemCore2D.Geometry;

namespace FemCore2D.Elements;

/// <summary>
/// The integrals of products of shape functions over the reference cell, from which the local matrices of all affine
/// cells with constant coefficients follow by a few multiplications an entry. Immutable.
/// </summary>
/// <remarks>
/// With the Jacobian J of an affine cell, its determinant d and a constant coefficient tensor D, the stiffness matrix is
/// the sum of <c>d (J^-1 D J^-T)_ab S_ab</c> over the four pairs (a, b) of reference coordinates, where the matrices
/// S_ab hold the integrals of the a-th derivative of function i times the b-th derivative of function j; S_10 is the
/// transpose of S_01. Mass and load are <c>d</c> times the matrix and vector here (P. Silvester, 1969).
/// All matrices are square, in row order.
/// </remarks>
public sealed class ReferenceMatrices
{
    private readonly double[] stiffnessXiXi;
    private readonly double[] stiffnessXiEta;
    private readonly double[] stiffnessMixed;
    private readonly double[] stiffnessEtaEta;
    private readonly double[] mass;
    private readonly double[] load;

    /// <summary>Integrates the matrices of an element.</summary>
    /// <param name="element">The element.</param>
    /// <param name="rule">The rule; left out, one that is exact for twice the element's degree. An element whose shape
    /// functions go beyond its degree (enriched by a bubble, say) needs a rule that knows of it.</param>
    /// <exception cref="ArgumentOutOfRangeException">Twice the degree of the element is beyond the rules.</exception>
    /// <exception cref="ArgumentException">Element and rule belong to different shapes.</exception>
    public ReferenceMatrices(INodeElement element, QuadratureRule? rule = null)
    {
        ArgumentNullException.ThrowIfNull(element);
        Element = element;
        int n = element.UnknownCount;
        ShapeTable table = new(element, rule ?? QuadratureRule.For(element.Cell, 2 * element.Degree));
        stiffnessXiXi = new double[n * n];
        stiffnessXiEta = new double[n * n];
        stiffnessEtaEta = new double[n * n];
        stiffnessMixed = new double[n * n];
        mass = new double[n * n];
        load = new double[n];
        for (int q = 0; q < table.PointCount; q++)
        {
            Add(table.Rule.Weights[q], table.ValuesAt(q), table.GradientsAt(q));
        }

        for (int i = 0; i < n; i++)
        {
            for (int j = 0; j < n; j++)
            {
                stiffnessMixed[(i * n) + j] = stiffnessXiEta[(i * n) + j] + stiffnessXiEta[(j * n) + i];
            }
        }
    }

    /// <summary>The element.</summary>
    public INodeElement Element { get; }

    /// <summary>The number of shape functions, which is the order of the matrices.</summary>
    public int Order => Element.UnknownCount;

    /// <summary>S_00: both derivatives along the first reference coordinate; symmetric.</summary>
    public ReadOnlySpan<double> StiffnessXiXi => stiffnessXiXi;

    /// <summary>S_01: function i along the first, function j along the second reference coordinate; not symmetric.</summary>
    public ReadOnlySpan<double> StiffnessXiEta => stiffnessXiEta;

    /// <summary>S_01 + S_10, which is all that a symmetric coefficient needs of the two; symmetric.</summary>
    public ReadOnlySpan<double> StiffnessMixed => stiffnessMixed;

    /// <summary>S_11: both derivatives along the second reference coordinate; symmetric.</summary>
    public ReadOnlySpan<double> StiffnessEtaEta => stiffnessEtaEta;

    /// <summary>The integrals of the products of function i and function j; symmetric.</summary>
    public ReadOnlySpan<double> Mass => mass;

    /// <summary>The integrals of the functions.</summary>
    public ReadOnlySpan<double> Load => load;

    private void Add(double weight, ReadOnlySpan<double> values, ReadOnlySpan<Vector2D> gradients)
    {
        int n = values.Length;
        for (int i = 0; i < n; i++)
        {
            load[i] += weight * values[i];
            for (int j = 0; j < n; j++)
            {
                // The factors that commute are multiplied first: symmetric matrices come out symmetric to the last bit.
                int place = (i * n) + j;
                mass[place] += weight * (values[i] * values[j]);
                stiffnessXiXi[place] += weight * (gradients[i].X * gradients[j].X);
                stiffnessXiEta[place] += weight * (gradients[i].X * gradients[j].Y);
                stiffnessEtaEta[place] += weight * (gradients[i].Y * gradients[j].Y);
            }
        }
    }
}
