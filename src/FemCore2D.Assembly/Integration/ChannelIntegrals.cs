namespace FemCore2D.Assembly;

/// <summary>
/// The integrals over the reference cell of all products of two shape functions, value or slope each, and of single
/// ones. In a straight cell with constant coefficients every local matrix is a combination of these.
/// </summary>
internal sealed class ChannelIntegrals
{
    private readonly double[][] products = new double[9][];
    private readonly double[][] symmetric = new double[3][];
    private readonly double[][] singles = new double[3][];

    /// <summary>Integrates with a rule that is exact for products of shape functions.</summary>
    public ChannelIntegrals(ChannelTable table)
    {
        for (int channel = 0; channel < 3; channel++)
        {
            singles[channel] = Single(table, channel);
            for (int other = channel; other < 3; other++)
            {
                double[] product = Product(table, channel, other);
                products[(3 * channel) + other] = product;
                products[(3 * other) + channel] = other == channel ? product : Transposed(product, table);
            }
        }

        for (int pair = 0; pair < 3; pair++)
        {
            (int a, int b) = pair switch { 0 => (0, 1), 1 => (0, 2), _ => (1, 2) };
            symmetric[pair] = Sum(products[(3 * a) + b], products[(3 * b) + a]);
        }
    }

    /// <summary>Test functions (rows) in one channel with fields (columns) in another.</summary>
    public ReadOnlySpan<double> Of(int testChannel, int fieldChannel) => products[(3 * testChannel) + fieldChannel];

    /// <summary>The sum of a mixed product and its transpose: 0 for value and first slope, 1 for value and second, 2 for both slopes.</summary>
    public ReadOnlySpan<double> Symmetric(int pair) => symmetric[pair];

    /// <summary>The integrals of the shape functions in one channel.</summary>
    public ReadOnlySpan<double> Of(int channel) => singles[channel];

    private static double[] Single(ChannelTable table, int channel)
    {
        double[] integrals = new double[table.Stride];
        for (int point = 0; point < table.Points.Length; point++)
        {
            ReadOnlySpan<double> row = table.Row(channel, point);
            for (int shape = 0; shape < table.Count; shape++)
            {
                integrals[shape] += table.Weights[point] * row[shape];
            }
        }

        return integrals;
    }

    private static double[] Product(ChannelTable table, int channel, int other)
    {
        double[] integrals = new double[table.Count * table.Stride];
        for (int point = 0; point < table.Points.Length; point++)
        {
            ReadOnlySpan<double> left = table.Row(channel, point);
            ReadOnlySpan<double> right = table.Row(other, point);
            for (int i = 0; i < table.Count; i++)
            {
                for (int j = 0; j < table.Count; j++)
                {
                    // The product of the shapes is taken first, so that equal channels give a symmetric matrix to the bit.
                    integrals[(i * table.Stride) + j] += table.Weights[point] * (left[i] * right[j]);
                }
            }
        }

        return integrals;
    }

    private static double[] Transposed(double[] matrix, ChannelTable table)
    {
        double[] transposed = new double[matrix.Length];
        for (int i = 0; i < table.Count; i++)
        {
            for (int j = 0; j < table.Count; j++)
            {
                transposed[(j * table.Stride) + i] = matrix[(i * table.Stride) + j];
            }
        }

        return transposed;
    }

    private static double[] Sum(double[] left, double[] right)
    {
        double[] sum = new double[left.Length];
        for (int k = 0; k < sum.Length; k++)
        {
            sum[k] = left[k] + right[k];
        }

        return sum;
    }
}
