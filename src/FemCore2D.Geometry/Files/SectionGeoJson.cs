using System.Text;

namespace FemCore2D.Geometry;

/// <summary>Reads and writes cross-sections as GeoJSON (RFC 7946), with circles that stay circles.</summary>
/// <remarks>
/// <para>The text is one FeatureCollection. Its features are drawn in order, later ones over earlier ones:</para>
/// <list type="bullet">
/// <item>A <c>Polygon</c> fills its property <c>region</c>; without a region, or with null, it is a hole. Further rings
/// are cut out of the first.</item>
/// <item>A <c>Point</c> with the property <c>radius</c> does so as a circle, with <c>innerRadius</c> as well as a ring.</item>
/// <item>A <c>Point</c> without a radius is a fixed point that its property <c>name</c> names.</item>
/// <item>A <c>LineString</c> is a sheet that its property <c>boundary</c> names.</item>
/// </list>
/// <para>The property <c>boundary</c> names the whole outline (<c>innerBoundary</c> the inner circle of a ring), or
/// <c>boundaries</c> each piece: one array a ring of names or nulls, one array alone for a LineString. The property
/// <c>sweeps</c>, of the same form, makes pieces arcs: the angle in radians by which each turns, positive
/// counterclockwise, 0 when straight. Programs that do not know it show the chords.</para>
/// <para>The member <c>metresPerUnit</c> of the collection tells the unit of all lengths; without it they are metres.
/// The coordinates are those of the drawing plane, not longitudes and latitudes (RFC 7946, section 4, leaves this to
/// prior arrangement). Other members and properties are not looked at.</para>
/// </remarks>
public static class SectionGeoJson
{
    /// <summary>The largest text that is read, in bytes.</summary>
    public const int LargestLength = 1 << 24;

    /// <summary>The deepest nesting of arrays and objects that is read.</summary>
    public const int DeepestNesting = 32;

    /// <summary>Reads a cross-section from a file.</summary>
    /// <param name="path">The path of the file.</param>
    /// <exception cref="IOException">The file cannot be read.</exception>
    /// <exception cref="MalformedFileException">The file is too large or does not follow the format; the message tells line and cause.</exception>
    public static CrossSection ReadFile(string path)
    {
        ArgumentException.ThrowIfNullOrEmpty(path);
        using FileStream stream = File.OpenRead(path);
        return Read(stream);
    }

    /// <summary>Reads a cross-section from a stream of UTF-8 text, up to its end.</summary>
    /// <param name="stream">The stream.</param>
    /// <exception cref="IOException">The stream cannot be read.</exception>
    /// <exception cref="MalformedFileException">The text is too large or does not follow the format; the message tells line and cause.</exception>
    public static CrossSection Read(Stream stream)
    {
        ArgumentNullException.ThrowIfNull(stream);
        using MemoryStream buffer = new();
        byte[] block = new byte[1 << 16];
        for (int count = stream.Read(block); count > 0; count = stream.Read(block))
        {
            CheckLength(buffer.Length + count);
            buffer.Write(block, 0, count);
        }

        return Read(buffer.GetBuffer().AsSpan(0, (int)buffer.Length));
    }

    /// <summary>Reads a cross-section from a text.</summary>
    /// <param name="text">The text.</param>
    /// <exception cref="MalformedFileException">The text is too large or does not follow the format; the message tells line and cause.</exception>
    public static CrossSection Parse(string text)
    {
        ArgumentNullException.ThrowIfNull(text);
        CheckLength(text.Length);
        return Read(Encoding.UTF8.GetBytes(text));
    }

    /// <summary>Writes a cross-section into a file; an existing one is replaced.</summary>
    /// <param name="section">The section.</param>
    /// <param name="path">The path of the file.</param>
    /// <param name="metresPerUnit">The unit of the lengths in the file, positive: 0.001 writes millimetres.</param>
    /// <exception cref="IOException">The file cannot be written.</exception>
    public static void WriteFile(CrossSection section, string path, double metresPerUnit = 1)
    {
        ArgumentException.ThrowIfNullOrEmpty(path);

        // Checks come before an existing file is touched.
        byte[] text = SectionGeoJsonWriter.Write(section, metresPerUnit);
        File.WriteAllBytes(path, text);
    }

    /// <summary>Writes a cross-section to a stream, as UTF-8.</summary>
    /// <param name="section">The section.</param>
    /// <param name="stream">The stream.</param>
    /// <param name="metresPerUnit">The unit of the lengths in the text, positive: 0.001 writes millimetres.</param>
    /// <exception cref="IOException">The stream cannot be written.</exception>
    public static void Write(CrossSection section, Stream stream, double metresPerUnit = 1)
    {
        ArgumentNullException.ThrowIfNull(stream);
        stream.Write(SectionGeoJsonWriter.Write(section, metresPerUnit));
    }

    /// <summary>Writes a cross-section as a text.</summary>
    /// <param name="section">The section.</param>
    /// <param name="metresPerUnit">The unit of the lengths in the text, positive: 0.001 writes millimetres.</param>
    public static string ToText(CrossSection section, double metresPerUnit = 1) =>
        Encoding.UTF8.GetString(SectionGeoJsonWriter.Write(section, metresPerUnit));

    private static CrossSection Read(ReadOnlySpan<byte> utf8)
    {
        ReadOnlySpan<byte> text = utf8.StartsWith(Encoding.UTF8.Preamble) ? utf8[Encoding.UTF8.Preamble.Length..] : utf8;
        return new SectionGeoJsonReader(JsonItem.Read(text, DeepestNesting)).Read();
    }

    private static void CheckLength(long length)
    {
        if (length > LargestLength)
        {
            throw new MalformedFileException(
                $"The text is longer than {LargestLength} bytes, the most that is read. Divide the section.", 0);
        }
    }
}
