namespace FemCore2D.Geometry;

/// <summary>Orders points along Hilbert's curve (D. Hilbert, 1891), so that near numbers are near places.</summary>
internal static unsafe class HilbertOrder
{
    private const int BitsEach = 16;

    /// <summary>The numbers of the points in their order along the curve; equal places keep their order.</summary>
    /// <param name="coordinates">Two coordinates a point.</param>
    /// <param name="count">The number of points.</param>
    public static int[] Of(double* coordinates, int count)
    {
        double left = double.PositiveInfinity, right = double.NegativeInfinity;
        double bottom = double.PositiveInfinity, top = double.NegativeInfinity;
        for (int i = 0; i < count; i++)
        {
            left = Math.Min(left, coordinates[2 * i]);
            right = Math.Max(right, coordinates[2 * i]);
            bottom = Math.Min(bottom, coordinates[(2 * i) + 1]);
            top = Math.Max(top, coordinates[(2 * i) + 1]);
        }

        double side = Math.Max(right - left, top - bottom);
        double scale = side > 0 ? ((1 << BitsEach) - 1) / side : 0;
        uint[] keys = new uint[count];
        for (int i = 0; i < count; i++)
        {
            uint x = (uint)((coordinates[2 * i] - left) * scale);
            uint y = (uint)((coordinates[(2 * i) + 1] - bottom) * scale);
            keys[i] = KeyOf(x, y);
        }

        return Sorted(keys);
    }

    private static uint KeyOf(uint x, uint y)
    {
        uint key = 0;
        for (uint s = 1u << (BitsEach - 1); s > 0; s >>= 1)
        {
            uint right = (x & s) != 0 ? 1u : 0u;
            uint upper = (y & s) != 0 ? 1u : 0u;
            key = (key << 2) | ((3 * right) ^ upper);
            if (upper == 0)
            {
                if (right != 0)
                {
                    x = ~x;
                    y = ~y;
                }

                (x, y) = (y, x);
            }
        }

        return key;
    }

    /// <summary>A stable sort by digits of eleven bits.</summary>
    private static int[] Sorted(uint[] keys)
    {
        int count = keys.Length;
        int[] order = new int[count];
        int[] other = new int[count];
        for (int i = 0; i < count; i++)
        {
            order[i] = i;
        }

        int[] starts = new int[2049];
        for (int shift = 0; shift < 2 * BitsEach; shift += 11)
        {
            Array.Clear(starts);
            foreach (uint key in keys)
            {
                starts[((key >> shift) & 2047) + 1]++;
            }

            for (int digit = 0; digit < 2048; digit++)
            {
                starts[digit + 1] += starts[digit];
            }

            foreach (int item in order)
            {
                other[starts[(keys[item] >> shift) & 2047]++] = item;
            }

            (order, other) = (other, order);
        }

        return order;
    }
}
