using System.Collections.Immutable;
using System.Globalization;
using System.Text;
using FemCore2D.Geometry;

namespace FemCore2D.Fields;

/// <summary>
/// The capacitances of a set of conductors with respect to each other and to ground (all other conductors and fixed
/// potentials): in F/m for a plane section, in F for an axisymmetric one.
/// </summary>
/// <remarks>
/// In Maxwell's form (Maxwell 1873, art. 87) the charges are the matrix times the potentials: its diagonal is
/// positive, the rest is not. In the mutual form each entry is a capacitor between two conductors, and the diagonal
/// holds the capacitor to ground, so that the matrix can be drawn as a circuit.
/// </remarks>
public sealed class CapacitanceMatrix
{
    private readonly double[,] maxwell;

    internal CapacitanceMatrix(
        ImmutableArray<string> conductors, double[,] maxwell, CoordinateSystem coordinates, SolveReport report)
    {
        Report = report;
        Conductors = conductors;
        this.maxwell = maxwell;
        Coordinates = coordinates;
    }

    /// <summary>The conductors, in the order of rows and columns.</summary>
    public ImmutableArray<string> Conductors { get; }

    /// <summary>Whether the entries are per metre of length (plane) or of the whole body (axisymmetric).</summary>
    public CoordinateSystem Coordinates { get; }

    /// <summary>What the solution took.</summary>
    public SolveReport Report { get; }

    /// <summary>
    /// The charge on <paramref name="conductor"/> per volt on <paramref name="driven"/>, all other conductors being at
    /// zero potential.
    /// </summary>
    /// <exception cref="UnknownNameException">A name is not among the conductors.</exception>
    public double Maxwell(string conductor, string driven) => maxwell[IndexOf(conductor), IndexOf(driven)];

    /// <summary>
    /// The capacitor between two conductors, or between a conductor and ground when both names are the same.
    /// </summary>
    /// <exception cref="UnknownNameException">A name is not among the conductors.</exception>
    public double Mutual(string conductor, string other) => MutualAt(IndexOf(conductor), IndexOf(other));

    /// <summary>A copy of Maxwell's matrix, rows and columns in the order of <see cref="Conductors"/>.</summary>
    public double[,] ToMaxwellArray() => (double[,])maxwell.Clone();

    /// <summary>The matrix of the mutual form, rows and columns in the order of <see cref="Conductors"/>.</summary>
    public double[,] ToMutualArray()
    {
        int count = Conductors.Length;
        double[,] mutual = new double[count, count];
        for (int row = 0; row < count; row++)
        {
            for (int column = 0; column < count; column++)
            {
                mutual[row, column] = MutualAt(row, column);
            }
        }

        return mutual;
    }

    /// <summary>A table of the mutual form in pF/m or pF, the capacitors to ground on its diagonal.</summary>
    public override string ToString()
    {
        string unit = Coordinates == CoordinateSystem.Plane ? "pF/m" : "pF";
        int width = Math.Max(12, Conductors.Max(name => name.Length) + 2);
        StringBuilder text = new();
        text.Append(unit.PadRight(width));
        foreach (string name in Conductors)
        {
            text.Append(name.PadLeft(width));
        }

        for (int row = 0; row < Conductors.Length; row++)
        {
            text.AppendLine().Append(Conductors[row].PadRight(width));
            for (int column = 0; column < Conductors.Length; column++)
            {
                string value = (1e12 * MutualAt(row, column)).ToString("0.0000", CultureInfo.InvariantCulture);
                text.Append(value.PadLeft(width));
            }
        }

        return text.ToString();
    }

    private double MutualAt(int row, int column)
    {
        if (row != column)
        {
            return -maxwell[row, column];
        }

        double sum = 0;
        for (int k = 0; k < Conductors.Length; k++)
        {
            sum += maxwell[row, k];
        }

        return sum;
    }

    private int IndexOf(string conductor)
    {
        ArgumentNullException.ThrowIfNull(conductor);
        int index = Conductors.IndexOf(conductor);
        return index >= 0 ? index : throw new UnknownNameException("conductor", conductor, Conductors);
    }
}
