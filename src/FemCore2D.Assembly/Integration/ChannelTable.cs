using FemCore2D.Elements;
using FemCore2D.Geometry;

namespace FemCore2D.Assembly;

/// <summary>
/// The values and slopes of all shape functions of an element at the points of a rule, laid out for the kernels:
/// padded with zeros to whole vectors of four numbers.
/// </summary>
internal sealed class ChannelTable
{
    private readonly double[] rows;
    private readonly double[] columns;

    public ChannelTable(INodeElement element, ReadOnlySpan<Point2D> points, ReadOnlySpan<double> weights)
    {
        Count = element.UnknownCount;
        Stride = Padded(Count);
        Points = points.ToArray();
        Weights = weights.ToArray();
        rows = new double[3 * Points.Length * Stride];
        columns = new double[3 * Points.Length * Count];
        double[] values = new double[Count];
        var gradients = new Vector2D[Count];
        for (int point = 0; point < Points.Length; point++)
        {
            element.Values(Points[point], values);
            element.Gradients(Points[point], gradients);
            for (int shape = 0; shape < Count; shape++)
            {
                Set(0, point, shape, values[shape]);
                Set(1, point, shape, gradients[shape].X);
                Set(2, point, shape, gradients[shape].Y);
            }
        }
    }

    /// <summary>The number of shape functions.</summary>
    public int Count { get; }

    /// <summary>The length of a padded row of shape functions.</summary>
    public int Stride { get; }

    public Point2D[] Points { get; }

    public double[] Weights { get; }

    /// <summary>The smallest multiple of four that is not less.</summary>
    public static int Padded(int count) => (count + 3) & ~3;

    /// <summary>All shape functions at a point: their values (channel 0) or slopes (channels 1 and 2).</summary>
    public ReadOnlySpan<double> Row(int channel, int point) =>
        rows.AsSpan(((channel * Points.Length) + point) * Stride, Stride);

    /// <summary>One shape function at all points.</summary>
    public ReadOnlySpan<double> Column(int channel, int shape) =>
        columns.AsSpan(((channel * Count) + shape) * Points.Length, Points.Length);

    private void Set(int channel, int point, int shape, double value)
    {
        rows[(((channel * Points.Length) + point) * Stride) + shape] = value;
        columns[(((channel * Count) + shape) * Points.Length) + point] = value;
    }
}
