using System.Runtime.InteropServices;
using FemCore2D.Geometry;
using SkiaSharp;

namespace FemCore2D.Drawing;

/// <summary>Which region covers each square point of a panel: finds room for names.</summary>
internal sealed class RegionMap
{
    private readonly int width;
    private readonly int height;
    private readonly ushort[] regions;
    private readonly PlotFrame frame;

    public RegionMap(Mesh mesh, PlotFrame frame)
    {
        this.frame = frame;
        width = Math.Max(1, (int)frame.Area.Width);
        height = Math.Max(1, (int)frame.Area.Height);
        regions = new ushort[width * height];
        RegionBorders borders = frame.BordersOf(mesh);
        using var bitmap = new SKBitmap(new SKImageInfo(width, height, SKColorType.Bgra8888, SKAlphaType.Opaque));
        using var canvas = new SKCanvas(bitmap);
        canvas.Clear(SKColors.Black);
        canvas.Translate(-frame.Area.Left, -frame.Area.Top);
        for (int region = 0; region < mesh.RegionNames.Length && region < ushort.MaxValue; region++)
        {
            using SKPath area = borders.Area(region, frame);
            int code = region + 1;
            using var paint = new SKPaint { Color = new SKColor(0, (byte)(code >> 8), (byte)code), IsAntialias = false };
            canvas.DrawPath(area, paint);
        }

        ReadOnlySpan<uint> pixels = MemoryMarshal.Cast<byte, uint>(bitmap.GetPixelSpan());
        for (int i = 0; i < regions.Length; i++)
            regions[i] = (ushort)(pixels[i] & 0xffff);
    }

    /// <summary>Whether any of a region is seen.</summary>
    public bool Sees(int region) => Array.IndexOf(regions, (ushort)(region + 1)) >= 0;

    /// <summary>
    /// Finds where a box fits wholly inside a region, with as much room around it as there is, near the middle of the
    /// places that offer such room; among equal ones the topmost.
    /// </summary>
    /// <returns>The middle of the box on the page, or null when it fits nowhere.</returns>
    public SKPoint? PlaceFor(int region, float boxWidth, float boxHeight)
    {
        int[] sums = SumsOf((ushort)(region + 1));
        foreach (double room in (ReadOnlySpan<double>)[16, 11, 8, 5.5, 4, 3, 2.2, 1.6, 1.3, 1.1, 1.0])
        {
            int w = (int)Math.Ceiling(boxWidth + ((room - 1) * boxHeight));
            int h = (int)Math.Ceiling(boxHeight * room);
            if (BestPlace(sums, w, h) is null)
                continue;

            // The very roomiest place is a chance of rounding: a little less room leaves a choice of equals.
            double eased = Math.Max(1, 0.85 * room);
            return BestPlace(
                sums, (int)Math.Ceiling(boxWidth + ((eased - 1) * boxHeight)), (int)Math.Ceiling(boxHeight * eased));
        }

        return null;
    }

    private SKPoint? BestPlace(int[] sums, int w, int h)
    {
        double sumX = 0;
        double sumY = 0;
        int count = 0;
        for (int y = 0; y + h <= height; y++)
        {
            for (int x = 0; x + w <= width; x++)
            {
                if (!Fits(x, y))
                    continue;
                sumX += x;
                sumY += y;
                count++;
            }
        }

        if (count == 0)
            return null;
        double middleX = sumX / count;
        double middleY = sumY / count;
        double least = double.PositiveInfinity;
        SKPoint best = default;
        for (int y = 0; y + h <= height; y++)
        {
            for (int x = 0; x + w <= width; x++)
            {
                if (!Fits(x, y))
                    continue;
                double dx = x - middleX;
                double dy = y - middleY;

                // Sideways costs more: in rings the name then stands at the top, where it is looked for.
                double distance = ((1.5 * dx * dx) + (dy * dy)) * (1 + (0.2 * y / height));
                if (distance < least)
                {
                    least = distance;
                    best = new SKPoint(frame.Area.Left + x + (w / 2f), frame.Area.Top + y + (h / 2f));
                }
            }
        }

        return best;

        bool Fits(int x, int y)
        {
            int stride = width + 1;
            return sums[((y + h) * stride) + x + w] - sums[(y * stride) + x + w]
                - sums[((y + h) * stride) + x] + sums[(y * stride) + x] == w * h;
        }
    }

    private int[] SumsOf(ushort code)
    {
        int stride = width + 1;
        int[] sums = new int[stride * (height + 1)];
        for (int y = 0; y < height; y++)
        {
            int row = 0;
            for (int x = 0; x < width; x++)
            {
                row += regions[(y * width) + x] == code ? 1 : 0;
                sums[((y + 1) * stride) + x + 1] = sums[(y * stride) + x + 1] + row;
            }
        }

        return sums;
    }
}
